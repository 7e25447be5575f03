import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import type { planRows } from '@/db/schema';
import { seedLots, varieties } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { exactUnits, SEEDS_PER_UNIT, wholeUnits } from './seed-math';
import { heldByLot } from './supply';

type Lot = typeof seedLots.$inferSelect;
type Row = Pick<typeof planRows.$inferSelect, 'varietyId' | 'seedLotId' | 'populationSeedsPerAcre' | 'areaAcres'>;

/** What is left of each lot and variety while rows are put on one plan: on hand, less other plans, less the plan's own rows. */
export interface SupplyBook {
  /** Lots of a variety that may be planted, the one with the most left first. */
  lotsOf: (varietyId: string) => Lot[];
  /** The first of those lots that covers a row; `null` when no single one does. `unitsIn` is what the row takes of a lot. */
  lotCovering: (varietyId: string, unitsIn: (lot: Lot) => number) => Lot | null;
  /** Puts a row on the book if the variety and its lot cover it; says whether they did. */
  take: (row: Row) => boolean;
}

/** The book of one plan with `rows` already on it. */
export async function openSupplyBook(
  transaction: Transaction,
  viewer: Viewer,
  season: number,
  planId: string,
  rows: readonly Row[],
): Promise<SupplyBook> {
  const held = await heldByLot(viewer.dealershipId, season, planId, transaction);
  const lots = (
    await transaction
      .select({ lot: seedLots })
      .from(seedLots)
      .innerJoin(varieties, eq(varieties.id, seedLots.varietyId))
      .where(and(eq(varieties.dealershipId, viewer.dealershipId), eq(varieties.season, season)))
  ).map(({ lot }) => lot);
  const lotById = new Map(lots.map((lot) => [lot.id, lot]));
  const open = lots.filter((lot) => lot.archivedAt === null);
  const used = new Map<string, number>();
  const usedOf = (key: string) => used.get(key) ?? 0;

  const leftOfLot = (lot: Lot) => lot.unitsOnHand - (held.byLot.get(lot.id) ?? 0) - usedOf(lot.id);
  const freeOfVariety = (varietyId: string): number | null => {
    const own = open.filter((lot) => lot.varietyId === varietyId);
    if (own.length === 0) return null;
    return own.reduce((total, lot) => total + lot.unitsOnHand, 0) - (held.byVariety.get(varietyId) ?? 0);
  };
  const unitsOf = (row: Row) =>
    exactUnits(
      row.areaAcres,
      row.populationSeedsPerAcre ?? 0,
      (row.seedLotId ? lotById.get(row.seedLotId) : undefined)?.unitSizeSeeds ?? SEEDS_PER_UNIT,
    );
  const put = (row: Row) => {
    const units = unitsOf(row);
    for (const key of [row.varietyId, row.seedLotId]) if (key) used.set(key, usedOf(key) + units);
  };
  for (const row of rows) if (row.varietyId) put(row);

  const lotsOf = (varietyId: string) =>
    open.filter((lot) => lot.varietyId === varietyId).sort((a, b) => leftOfLot(b) - leftOfLot(a));
  return {
    lotsOf,
    lotCovering: (varietyId, unitsIn) =>
      lotsOf(varietyId).find(
        (lot) => wholeUnits(usedOf(lot.id) + unitsIn(lot)) <= lot.unitsOnHand - (held.byLot.get(lot.id) ?? 0),
      ) ?? null,
    take: (row) => {
      const units = unitsOf(row);
      const free = freeOfVariety(row.varietyId as string);
      if (free !== null && wholeUnits(usedOf(row.varietyId as string) + units) > free) return false;
      const lot = row.seedLotId ? lotById.get(row.seedLotId) : undefined;
      if (lot && wholeUnits(usedOf(lot.id) + units) > lot.unitsOnHand - (held.byLot.get(lot.id) ?? 0)) return false;
      put(row);
      return true;
    },
  };
}
