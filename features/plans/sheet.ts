import 'server-only';
import { and, eq, gt, isNull } from 'drizzle-orm';
import type { MultiPolygon, Polygon } from 'geojson';
import { database, type Transaction } from '@/db/client';
import { planRows, plans, plantedMarks, sheetLinks } from '@/db/schema';
import { bad, good, type Outcome } from '@/lib/errors';
import { sha256 } from '@/lib/ids';
import { figuresOf, lineName } from './model';
import { addEvent } from './plan-record';
import { readPlan } from './read';
import { plantedMarkSchema } from './schemas';
import { wholeUnits } from './seed-math';
import { HOLDING_STATES } from './states';

/** One block of the planting sheet. No yield, no price, nothing of anybody else. */
export interface SheetBlock {
  rowId: string;
  name: string;
  farmName: string | null;
  areaAcres: number;
  geometry: Polygon | MultiPolygon;
  code: string;
  relativeMaturity: number;
  lotNumber: string | null;
  treatment: string | null;
  rowWidthInches: number | null;
  seedsPerAcre: number | null;
  seedsPerFoot: number | null;
  poundsPerAcre: number | null;
  poundsAreUsual: boolean;
  largeSeed: boolean;
  units: number | null;
  /** Whole units to carry to this field. */
  bags: number | null;
  note: string | null;
  plantedOn: string | null;
}

export interface Sheet {
  operationName: string;
  season: number;
  expiresAt: number;
  blocks: SheetBlock[];
}

/** The open link behind a token; `null` when there is none, or it was revoked or has run out. */
async function openLink(token: string, connection: Transaction | null = null) {
  if (!/^[\w-]{20,64}$/.test(token)) return null;
  const [found] = await (connection ?? database())
    .select({ linkId: sheetLinks.id, expiresAt: sheetLinks.expiresAt, plan: plans })
    .from(sheetLinks)
    .innerJoin(plans, eq(plans.id, sheetLinks.planId))
    .where(and(eq(sheetLinks.tokenHash, sha256(token)), isNull(sheetLinks.revokedAt), gt(sheetLinks.expiresAt, Date.now())));
  return found ?? null;
}

/** The planting sheet behind a crew link; `null` when the link opens nothing. A plan taken back shows no blocks until it stands again. */
export async function sheetOf(token: string): Promise<Sheet | null> {
  const link = await openLink(token);
  if (!link) return null;
  const view = await readPlan(link.plan.operationId, link.plan.season, { dealershipSide: false });
  const stands = HOLDING_STATES.includes(view.state);
  return {
    operationName: view.operationName,
    season: view.season,
    expiresAt: link.expiresAt,
    blocks: (stands ? view.lines : [])
      .filter((line) => line.variety && line.id)
      .map((line) => {
        const figures = figuresOf(line);
        return {
          rowId: line.id as string,
          name: lineName(line),
          farmName: line.farmName,
          areaAcres: line.areaAcres,
          geometry: line.geometry,
          code: line.variety?.code as string,
          relativeMaturity: line.variety?.relativeMaturity as number,
          lotNumber: line.lot?.lotNumber ?? null,
          treatment: line.lot?.treatment ?? null,
          rowWidthInches: line.rowWidthInches,
          seedsPerAcre: line.populationSeedsPerAcre,
          seedsPerFoot: figures.seedsPerFoot,
          poundsPerAcre: figures.poundsPerAcre,
          poundsAreUsual: figures.poundsAreUsual,
          largeSeed: figures.largeSeed,
          units: figures.units,
          bags: figures.units === null ? null : wholeUnits(figures.units),
          note: line.note,
          plantedOn: line.plantedOn,
        };
      }),
  };
}

/**
 * Keeps a mark from the crew's phone: once, however often it is sent. The plan is planted when its last row is.
 * Fails with words when the link is closed, the row is not on its plan, or the mark makes no sense.
 */
export async function markPlanted(token: string, input: unknown): Promise<Outcome<{ id: string; already: boolean }>> {
  const parsed = plantedMarkSchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((one) => ({ message: one.message, path: one.path.join('.') })));
  const { rowId, ...mark } = parsed.data;
  return database().transaction(
    async (transaction): Promise<Outcome<{ id: string; already: boolean }>> => {
      const link = await openLink(token, transaction);
      if (!link) return bad('This link is closed. Ask for a new one; the mark stays on this phone.', 'link');
      const [row] = await transaction
        .select({ id: planRows.id, fieldId: planRows.fieldId })
        .from(planRows)
        .where(and(eq(planRows.id, rowId), eq(planRows.planId, link.plan.id)));
      if (!row) return bad('This field is not on the plan any more. Load the sheet again.', 'rowId');
      const [known] = await transaction.select({ id: plantedMarks.id }).from(plantedMarks).where(eq(plantedMarks.id, mark.id));
      if (known) return good({ id: mark.id, already: true });
      await transaction.insert(plantedMarks).values({ ...mark, planRowId: row.id, sheetLinkId: link.linkId });
      const view = await readPlan(link.plan.operationId, link.plan.season, { dealershipSide: false }, transaction);
      const placed = view.lines.filter((line) => line.variety);
      const done = placed.every((line) => line.plantedOn !== null);
      if (done && link.plan.state === 'agreed') {
        await transaction.update(plans).set({ state: 'planted', updatedAt: Date.now() }).where(eq(plans.id, link.plan.id));
      }
      const line = view.lines.find((one) => one.id === row.id);
      await addEvent(transaction, { personId: null }, link.plan.id, {
        verb: 'planted',
        revision: link.plan.revision,
        planRowId: row.id,
        ...(mark.note ? { word: mark.note } : {}),
        snapshot: {
          fieldId: row.fieldId,
          ...(line ? { fieldName: lineName(line) } : {}),
          words: [
            mark.plantedOn,
            ...(mark.lotNumber ? [`lot ${mark.lotNumber}`] : []),
            ...(mark.areaAcres ? [`${mark.areaAcres} ac`] : []),
          ],
        },
      });
      return good({ id: mark.id, already: false });
    },
    { behavior: 'immediate' },
  );
}
