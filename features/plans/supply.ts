import 'server-only';
import { and, eq, inArray, isNotNull, isNull } from 'drizzle-orm';
import { database, type Transaction } from '@/db/client';
import { operations, planRows, plans, seedLots, varieties } from '@/db/schema';
import { type SupplyWord, supplyWord } from '@/features/line-up/model';
import type { Release } from '@/features/placement/engine/model';
import { formatNumber } from '@/lib/format';

import { exactUnits, SEEDS_PER_UNIT, wholeUnits } from './seed-math';
import { HOLDING_STATES, type PlanState } from './states';

export interface Held {
  byVariety: Map<string, number>;
  /** Key: lot id, or `variety:<id>` for rows without a lot. */
  byLot: Map<string, number>;
}

export interface AskedUnits {
  planId: string;
  operationId: string;
  operationName: string;
  state: PlanState;
  varietyId: string;
  seedLotId: string | null;
  acres: number;
  /** Whole units, rounded up once per plan and lot. */
  units: number;
}

/** What every plan of a dealership and season asks for, by plan and lot, whole units. Scope is the caller's business. */
export async function askedUnits(
  dealershipId: string,
  season: number,
  connection: Transaction | null = null,
): Promise<AskedUnits[]> {
  const rows = await (connection ?? database())
    .select({
      planId: plans.id,
      operationId: operations.id,
      operationName: operations.name,
      state: plans.state,
      varietyId: planRows.varietyId,
      seedLotId: planRows.seedLotId,
      areaAcres: planRows.areaAcres,
      rate: planRows.populationSeedsPerAcre,
      unitSizeSeeds: seedLots.unitSizeSeeds,
    })
    .from(planRows)
    .innerJoin(plans, eq(plans.id, planRows.planId))
    .innerJoin(operations, eq(operations.id, plans.operationId))
    .leftJoin(seedLots, eq(seedLots.id, planRows.seedLotId))
    .where(
      and(
        eq(operations.dealershipId, dealershipId),
        eq(plans.season, season),
        isNull(operations.archivedAt),
        isNotNull(planRows.varietyId),
      ),
    );
  const groups = new Map<string, AskedUnits & { exact: number }>();
  for (const row of rows) {
    const key = `${row.planId} ${row.varietyId} ${row.seedLotId ?? ''}`;
    const group = groups.get(key) ?? {
      planId: row.planId,
      operationId: row.operationId,
      operationName: row.operationName,
      state: row.state,
      varietyId: row.varietyId as string,
      seedLotId: row.seedLotId,
      acres: 0,
      units: 0,
      exact: 0,
    };
    group.acres += row.areaAcres;
    group.exact += row.rate === null ? 0 : exactUnits(row.areaAcres, row.rate, row.unitSizeSeeds ?? SEEDS_PER_UNIT);
    group.units = wholeUnits(group.exact);
    groups.set(key, group);
  }
  return [...groups.values()].map(({ exact: _exact, ...group }) => group);
}

/** Units that other plans hold (proposed, agreed, planted), by variety and by lot. */
export async function heldByLot(
  dealershipId: string,
  season: number,
  exceptPlanId: string | null,
  connection: Transaction | null = null,
): Promise<Held> {
  const held: Held = { byVariety: new Map(), byLot: new Map() };
  for (const asked of await askedUnits(dealershipId, season, connection)) {
    if (asked.planId === exceptPlanId || !HOLDING_STATES.includes(asked.state)) continue;
    const lot = asked.seedLotId ?? `variety:${asked.varietyId}`;
    held.byVariety.set(asked.varietyId, (held.byVariety.get(asked.varietyId) ?? 0) + asked.units);
    held.byLot.set(lot, (held.byLot.get(lot) ?? 0) + asked.units);
  }
  return held;
}

/**
 * Does what this plan asks fit what is on hand less what other plans hold? One sentence for each variety or lot that
 * does not. A variety without lots has no count, so it is not held back. Run inside the transaction that takes the units.
 */
export async function shortages(
  dealershipId: string,
  season: number,
  planId: string,
  connection: Transaction,
): Promise<{ varietyId: string; message: string }[]> {
  const own = (await askedUnits(dealershipId, season, connection)).filter((asked) => asked.planId === planId);
  if (own.length === 0) return [];
  const held = await heldByLot(dealershipId, season, planId, connection);
  const varietyIds = [...new Set(own.map((asked) => asked.varietyId))];
  const lots = await connection
    .select()
    .from(seedLots)
    .where(and(inArray(seedLots.varietyId, varietyIds), isNull(seedLots.archivedAt)));
  const codes = new Map(
    (
      await connection.select({ id: varieties.id, code: varieties.code }).from(varieties).where(inArray(varieties.id, varietyIds))
    ).map((variety) => [variety.id, variety.code]),
  );
  const found: { varietyId: string; message: string }[] = [];
  for (const varietyId of varietyIds) {
    const varietyLots = lots.filter((lot) => lot.varietyId === varietyId);
    if (varietyLots.length === 0) continue;
    const code = codes.get(varietyId) ?? varietyId;
    const asks = own.filter((asked) => asked.varietyId === varietyId);
    const wanted = asks.reduce((total, asked) => total + asked.units, 0);
    const onHand = varietyLots.reduce((total, lot) => total + lot.unitsOnHand, 0);
    const others = held.byVariety.get(varietyId) ?? 0;
    if (wanted > onHand - others) {
      found.push({ varietyId, message: sentence(code, wanted, onHand, others) });
      continue;
    }
    for (const asked of asks) {
      const lot = varietyLots.find((one) => one.id === asked.seedLotId);
      if (!lot) continue;
      const heldOfLot = held.byLot.get(lot.id) ?? 0;
      if (asked.units > lot.unitsOnHand - heldOfLot) {
        found.push({ varietyId, message: sentence(`${code} lot ${lot.lotNumber}`, asked.units, lot.unitsOnHand, heldOfLot) });
      }
    }
  }
  return found;
}

function sentence(what: string, wanted: number, onHand: number, held: number): string {
  const free = Math.max(0, onHand - held);
  const why = held > 0 ? ` (${formatNumber(onHand)} on hand, ${formatNumber(held)} held by other plans)` : '';
  return `${formatNumber(wanted)} units of ${what} are asked, ${formatNumber(free)} are free${why}.`;
}

/** The word a grower sees in place of numbers: of what is left for this plan after what other plans hold. */
export function supplyWordFor(input: {
  unitsOnHand: number | null;
  heldByOthers: number;
  need: number;
  release: Release;
}): SupplyWord {
  if (input.unitsOnHand === null) return supplyWord(null, input.release);
  const free = input.unitsOnHand - input.heldByOthers;
  return free < input.need ? 'sold out' : supplyWord(free, input.release);
}
