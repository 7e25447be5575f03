import 'server-only';
import { and, asc, eq, inArray, isNull } from 'drizzle-orm';
import { database } from '@/db/client';
import { seedLots, varieties } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import type { VarietyProfile } from '@/features/placement/engine/model';
import { NotFoundError } from '@/lib/errors';
import { groupBy } from '@/lib/group';
import { type LineUpVariety, type SeedLot, supplyWord } from './model';

type VarietyRow = typeof varieties.$inferSelect;
type LotRow = typeof seedLots.$inferSelect;

/** SQL: varieties of the viewer's dealership that they may see; drafts only for those who keep the line-up. */
function inScope(viewer: Viewer) {
  return and(
    eq(varieties.dealershipId, viewer.dealershipId),
    isNull(varieties.archivedAt),
    may(viewer, 'variety', 'readDraft') ? undefined : eq(varieties.published, true),
  );
}

async function lotsByVariety(varietyIds: string[]): Promise<Map<string, LotRow[]>> {
  if (varietyIds.length === 0) return new Map();
  const rows = await database()
    .select()
    .from(seedLots)
    .where(and(inArray(seedLots.varietyId, varietyIds), isNull(seedLots.archivedAt)))
    .orderBy(asc(seedLots.lotNumber));
  return groupBy(rows, (row) => row.varietyId);
}

function unitsOf(lots: LotRow[]): number | null {
  return lots.length === 0 ? null : lots.reduce((total, lot) => total + lot.unitsOnHand, 0);
}

function traitsOf(viewer: Viewer, row: VarietyRow, lots: LotRow[]): LineUpVariety {
  const { dealershipId, uploadId, createdAt, updatedAt, archivedAt, ...traits } = row;
  const units = unitsOf(lots);
  return { ...traits, supplyWord: supplyWord(units, row.release), unitsOnHand: may(viewer, 'supply', 'read') ? units : null };
}

/** The line-up of a season by maturity and code. Growers: published only, supply as a word. */
export async function lineUp(viewer: Viewer, season: number): Promise<LineUpVariety[]> {
  const rows = await database()
    .select()
    .from(varieties)
    .where(and(inScope(viewer), eq(varieties.season, season)))
    .orderBy(asc(varieties.relativeMaturity), asc(varieties.code));
  const lots = await lotsByVariety(rows.map((row) => row.id));
  return rows.map((row) => traitsOf(viewer, row, lots.get(row.id) ?? []));
}

/** One variety the viewer may see. Throws NotFoundError otherwise. */
export async function varietyOf(viewer: Viewer, varietyId: string): Promise<LineUpVariety> {
  const [row] = await database()
    .select()
    .from(varieties)
    .where(and(inScope(viewer), eq(varieties.id, varietyId)));
  if (!row) throw new NotFoundError('No such variety.');
  return traitsOf(viewer, row, (await lotsByVariety([row.id])).get(row.id) ?? []);
}

/** Seed lots of a variety the viewer may see; growers get neither units nor prices. */
export async function lotsOf(viewer: Viewer, varietyId: string): Promise<SeedLot[]> {
  await varietyOf(viewer, varietyId);
  const lots = (await lotsByVariety([varietyId])).get(varietyId) ?? [];
  return lots.map((lot) => lotFor(viewer, lot));
}

/** Seed lots of every variety of a season the viewer may see; growers get neither units nor prices. */
export async function lotsOfLineUp(viewer: Viewer, season: number): Promise<SeedLot[]> {
  const rows = await database()
    .select({ id: varieties.id })
    .from(varieties)
    .where(and(inScope(viewer), eq(varieties.season, season)));
  const lots = await lotsByVariety(rows.map((row) => row.id));
  return [...lots.values()].flat().map((lot) => lotFor(viewer, lot));
}

function lotFor(viewer: Viewer, { createdAt, archivedAt, ...lot }: LotRow): SeedLot {
  const seesSupply = may(viewer, 'supply', 'read');
  return {
    ...lot,
    unitsOnHand: seesSupply ? lot.unitsOnHand : null,
    priceCentsPerUnit: seesSupply ? lot.priceCentsPerUnit : null,
  };
}

/**
 * The published line-up as the engine reads it, units summed over lots. For the server alone: never hand it to a grower's
 * browser as it is, because units are in it.
 */
export async function profilesForPlacement(viewer: Viewer, season: number): Promise<VarietyProfile[]> {
  const rows = await database()
    .select()
    .from(varieties)
    .where(
      and(
        eq(varieties.dealershipId, viewer.dealershipId),
        eq(varieties.season, season),
        eq(varieties.published, true),
        isNull(varieties.archivedAt),
      ),
    )
    .orderBy(asc(varieties.code));
  const lots = await lotsByVariety(rows.map((row) => row.id));
  return rows.map((row) => {
    const own = lots.get(row.id) ?? [];
    const lead = own.find((lot) => lot.unitsOnHand > 0) ?? own[0];
    const { dealershipId, season: _, published, note, uploadId, revision, createdAt, updatedAt, archivedAt, ...traits } = row;
    return {
      ...traits,
      seedsPerLb: lead?.seedsPerLb ?? null,
      germinationPercent: lead?.germinationPercent ?? null,
      unitsOnHand: unitsOf(own),
      trialAdvantage: 0,
      trialAdvantageStandardError: 0,
    };
  });
}
