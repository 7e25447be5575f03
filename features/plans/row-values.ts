import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { planRows, seedLots, varieties } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { formatNumber } from '@/lib/format';
import { createId } from '@/lib/ids';
import type { FieldGround, RowRecord } from './plan-record';
import { type AssessAt, deviates } from './reassess';
import type { SetRow } from './schemas';
import { exactUnits, suggestedSeedsPerAcre } from './seed-math';
import type { SupplyBook } from './supply-book';

type Lot = typeof seedLots.$inferSelect;
export type RowValues = Pick<
  RowRecord,
  'varietyId' | 'seedLotId' | 'populationSeedsPerAcre' | 'rowWidthInches' | 'locked' | 'note' | 'assessment'
>;

/** A row with nothing on it. */
export const EMPTY_ROW: RowValues = {
  varietyId: null,
  seedLotId: null,
  populationSeedsPerAcre: null,
  rowWidthInches: null,
  locked: false,
  note: null,
  assessment: null,
};

/** The row after a change, or the problem with it. A new variety brings the lot that covers it and, where unset, width and rate. */
export async function valuesAfter(
  transaction: Transaction,
  viewer: Viewer,
  season: number,
  field: FieldGround,
  before: RowValues | null,
  set: Partial<SetRow['set']>,
  book: SupplyBook,
  assessAt: AssessAt | null = null,
): Promise<Outcome<RowValues>> {
  const after: RowValues = { ...(before ?? EMPTY_ROW), ...set };
  if (before === null && set.rowWidthInches === undefined) after.rowWidthInches = field.facts?.rowWidthInches ?? null;
  if (!after.varietyId) return good({ ...after, varietyId: null, seedLotId: null, assessment: null });

  const [variety] = await transaction
    .select()
    .from(varieties)
    .where(and(eq(varieties.id, after.varietyId), eq(varieties.dealershipId, viewer.dealershipId), eq(varieties.season, season)));
  if (!variety) throw new NotFoundError('No such variety in this season’s line-up.');
  const chosen = set.varietyId !== undefined && set.varietyId !== before?.varietyId;
  if (chosen && (!variety.published || variety.archivedAt !== null)) {
    return bad(`${variety.code} is not published. Publish it in the line-up first.`, 'varietyId');
  }
  const stopped = chosen ? field.ranking?.stopped.find((one) => one.varietyId === variety.id) : undefined;
  if (stopped) return bad(`${variety.code} is stopped on ${field.name}: ${stopped.reason}`, 'varietyId');

  const lots = (await transaction.select().from(seedLots).where(eq(seedLots.varietyId, variety.id))).filter(
    (lot) => lot.archivedAt === null || lot.id === before?.seedLotId,
  );
  const rateFor = (lot: Lot | null) =>
    after.populationSeedsPerAcre ??
    field.facts?.populationSeedsPerAcre ??
    suggestedSeedsPerAcre({
      rowWidthInches: after.rowWidthInches,
      plantingDate: field.facts?.plantingDate ?? null,
      germinationPercent: lot?.germinationPercent ?? null,
    });
  if (chosen && set.seedLotId === undefined) {
    const covering = book.lotCovering(variety.id, (lot) => exactUnits(field.areaAcres, rateFor(lot), lot.unitSizeSeeds));
    after.seedLotId = (covering ?? book.lotsOf(variety.id)[0])?.id ?? null;
  }
  const lot = lots.find((one) => one.id === after.seedLotId) ?? null;
  if (after.seedLotId && !lot) return bad(`That lot is not one of ${variety.code}.`, 'seedLotId');

  after.populationSeedsPerAcre = rateFor(lot);
  after.assessment = field.ranking?.picks.find((pick) => pick.varietyId === variety.id) ?? null;
  if (after.assessment && assessAt && deviates(after, field.facts)) {
    const { rowWidthInches, populationSeedsPerAcre } = after;
    after.assessment = assessAt(variety.id, { rowWidthInches, populationSeedsPerAcre }) ?? after.assessment;
  }
  return good(after);
}

/** Inserts or updates the row; the id of it. */
export async function writeRow(
  transaction: Transaction,
  planId: string,
  field: FieldGround,
  before: RowValues | RowRecord | null,
  after: RowValues,
): Promise<string> {
  const { varietyId, seedLotId, populationSeedsPerAcre, rowWidthInches, locked, note, assessment } = after;
  const values = {
    varietyId,
    seedLotId,
    populationSeedsPerAcre,
    rowWidthInches,
    locked,
    note,
    assessment,
    updatedAt: Date.now(),
  };
  if (before && 'id' in before) {
    const areaAcres = before.partGeometry ? before.areaAcres : field.areaAcres;
    await transaction
      .update(planRows)
      .set({ ...values, areaAcres })
      .where(eq(planRows.id, before.id));
    return before.id;
  }
  const id = createId();
  await transaction.insert(planRows).values({ id, planId, fieldId: field.id, areaAcres: field.areaAcres, ...values });
  return id;
}

/** What changed of a row, before → after, in words; empty when nothing did. */
export async function wordsOfChange(transaction: Transaction, before: RowValues, after: RowValues): Promise<string[]> {
  const codeOf = async (id: string | null) =>
    id === null
      ? 'none'
      : ((await transaction.select({ code: varieties.code }).from(varieties).where(eq(varieties.id, id)))[0]?.code ?? id);
  const lotOf = async (id: string | null) =>
    id === null
      ? 'none'
      : ((await transaction.select({ lot: seedLots.lotNumber }).from(seedLots).where(eq(seedLots.id, id)))[0]?.lot ?? id);
  const words: string[] = [];
  if (before.varietyId !== after.varietyId) {
    words.push(`variety ${await codeOf(before.varietyId)} → ${await codeOf(after.varietyId)}`);
  }
  if (before.seedLotId !== after.seedLotId) words.push(`lot ${await lotOf(before.seedLotId)} → ${await lotOf(after.seedLotId)}`);
  if (before.populationSeedsPerAcre !== after.populationSeedsPerAcre) {
    words.push(`seeds/ac ${formatNumber(before.populationSeedsPerAcre)} → ${formatNumber(after.populationSeedsPerAcre)}`);
  }
  if (before.rowWidthInches !== after.rowWidthInches) {
    words.push(`rows ${inches(before.rowWidthInches)} → ${inches(after.rowWidthInches)}`);
  }
  if (before.locked !== after.locked) words.push(after.locked ? 'locked' : 'unlocked');
  if ((before.note ?? '') !== (after.note ?? '')) words.push(`note “${after.note ?? ''}”`);
  return words;
}

function inches(width: number | null): string {
  return width === null ? '—' : `${width} in`;
}
