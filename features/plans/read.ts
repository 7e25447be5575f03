import 'server-only';
import { and, asc, desc, eq, inArray, isNull, or } from 'drizzle-orm';
import { database, type Transaction } from '@/db/client';
import {
  dealerships,
  farms,
  fieldFacts,
  fieldScores,
  fields,
  operations,
  people,
  planEvents,
  planRows,
  plans,
  plantedMarks,
  seedLots,
  varieties,
} from '@/db/schema';
import type { Ranking } from '@/features/placement/engine/model';
import { NotFoundError } from '@/lib/errors';
import { type Choice, type PlanEvent, type PlanLine, type PlanLot, type PlanView, totalsOf, type VarietySupply } from './model';
import { deviates } from './reassess';
import { HOLDING_STATES, type PlanState } from './states';
import { type Held, heldByLot, supplyWordFor } from './supply';

export interface Reader {
  /** Prices and supply numbers, unpublished varieties, choices for editing: the dealership's own people only. */
  dealershipSide: boolean;
}

export interface EventSnapshot {
  fieldId?: string;
  partName?: string;
  fieldName?: string;
  words?: string[];
  lines?: unknown;
}

/**
 * The whole plan of an operation and season. Scope is the caller's business: `queries.ts` asks it of the viewer, `changes/`
 * in its transaction, the sheet by its token. Throws NotFoundError when the operation is unknown.
 */
export async function readPlan(
  operationId: string,
  season: number,
  reader: Reader,
  connection: Transaction | null = null,
): Promise<PlanView> {
  const from = connection ?? database();
  const [operation] = await from
    .select({
      id: operations.id,
      name: operations.name,
      dealershipId: operations.dealershipId,
      dealershipName: dealerships.name,
      soybeanPriceCentsPerBushel: dealerships.soybeanPriceCentsPerBushel,
    })
    .from(operations)
    .innerJoin(dealerships, eq(dealerships.id, operations.dealershipId))
    .where(eq(operations.id, operationId));
  if (!operation) throw new NotFoundError('No such operation.');
  const [plan] = await from
    .select()
    .from(plans)
    .where(and(eq(plans.operationId, operationId), eq(plans.season, season)));
  const state: PlanState = plan?.state ?? 'draft';
  const frozen = HOLDING_STATES.includes(state);

  const fieldRows = await from
    .select({ id: fields.id, name: fields.name, farmName: farms.name, boundary: fields.boundary, areaAcres: fields.areaAcres })
    .from(fields)
    .leftJoin(farms, eq(farms.id, fields.farmId))
    .where(
      and(
        eq(fields.operationId, operationId),
        // A field that was archived stays on a plan that holds seed for it.
        plan
          ? or(
              isNull(fields.archivedAt),
              inArray(fields.id, from.select({ id: planRows.fieldId }).from(planRows).where(eq(planRows.planId, plan.id))),
            )
          : isNull(fields.archivedAt),
      ),
    )
    .orderBy(asc(farms.name), asc(fields.name));
  const scores = await from
    .select({ fieldId: fieldScores.fieldId, ranking: fieldScores.ranking, facts: fieldFacts })
    .from(fieldScores)
    .innerJoin(fields, eq(fields.id, fieldScores.fieldId))
    .leftJoin(fieldFacts, and(eq(fieldFacts.fieldId, fields.id), eq(fieldFacts.season, season)))
    .where(and(eq(fields.operationId, operationId), eq(fieldScores.season, season)));
  const rankings = new Map(scores.map((score) => [score.fieldId, score.ranking]));
  const factsBy = new Map(scores.map((score) => [score.fieldId, score.facts]));
  const lineUp = await from
    .select()
    .from(varieties)
    .where(and(eq(varieties.dealershipId, operation.dealershipId), eq(varieties.season, season)));
  const lineUpIds = lineUp.map((variety) => variety.id);
  const lotRows = lineUpIds.length
    ? await from
        .select()
        .from(seedLots)
        .where(inArray(seedLots.varietyId, lineUpIds))
        .orderBy(desc(seedLots.unitsOnHand), asc(seedLots.lotNumber))
    : [];
  const rows = plan ? await from.select().from(planRows).where(eq(planRows.planId, plan.id)) : [];
  const planted = rows.length
    ? await from
        .select({ planRowId: plantedMarks.planRowId, plantedOn: plantedMarks.plantedOn })
        .from(plantedMarks)
        .where(
          inArray(
            plantedMarks.planRowId,
            rows.map((row) => row.id),
          ),
        )
    : [];
  const plantedOn = new Map(planted.map((mark) => [mark.planRowId, mark.plantedOn]));
  const varietyById = new Map(lineUp.map((variety) => [variety.id, variety]));
  const lotById = new Map(lotRows.map((lot) => [lot.id, lot]));

  const held = await heldByLot(operation.dealershipId, season, plan?.id ?? null, connection);

  const lines: PlanLine[] = [];
  for (const field of fieldRows) {
    const parts = rows.filter((row) => row.fieldId === field.id).sort((a, b) => a.partName.localeCompare(b.partName));
    const ranking = rankings.get(field.id) ?? null;
    for (const row of parts.length > 0 ? parts : [null]) {
      const variety = row?.varietyId ? (varietyById.get(row.varietyId) ?? null) : null;
      const lot = row?.seedLotId ? (lotById.get(row.seedLotId) ?? null) : null;
      const pick = variety ? (ranking?.picks.find((one) => one.varietyId === variety.id) ?? null) : null;
      const own = row?.varietyId ? row.assessment : null;
      // A draft shows today's score, unless the row is planted otherwise than the score was reckoned for.
      const otherwise = row !== null && deviates(row, factsBy.get(field.id) ?? null);
      const assessment = !row?.varietyId || frozen ? own : otherwise ? (own ?? pick) : (pick ?? own);
      lines.push({
        id: row?.id ?? null,
        fieldId: field.id,
        fieldName: field.name,
        farmName: field.farmName,
        partName: row?.partName ?? '',
        geometry: row?.partGeometry ?? field.boundary,
        areaAcres: row && (frozen || row.partGeometry) ? row.areaAcres : field.areaAcres,
        variety: variety
          ? {
              id: variety.id,
              code: reader.dealershipSide || variety.published ? variety.code : 'Not published',
              relativeMaturity: variety.relativeMaturity,
            }
          : null,
        lot: lot ? lotOf(lot, reader, held) : null,
        rowWidthInches: row?.rowWidthInches ?? null,
        populationSeedsPerAcre: row?.populationSeedsPerAcre ?? null,
        locked: row?.locked ?? false,
        note: row?.note ?? null,
        assessment: assessment ?? null,
        runnerUp: variety && assessment ? runnerUpOf(ranking, variety.id, (pick ?? assessment).expected) : null,
        caution: cautionOf(ranking, row?.varietyId ?? null),
        plantedOn: row ? (plantedOn.get(row.id) ?? null) : null,
      });
    }
  }

  const totals = totalsOf(lines);
  const onPlan = new Set(totals.varieties.map((one) => one.variety.id));
  const lotsOf = (varietyId: string) => lotRows.filter((lot) => lot.varietyId === varietyId && lot.archivedAt === null);
  const supply: VarietySupply[] = lineUp
    .filter((variety) => onPlan.has(variety.id) || (reader.dealershipSide && variety.archivedAt === null))
    .map((variety) => {
      const lots = lotsOf(variety.id);
      const unitsOnHand = lots.length > 0 ? lots.reduce((total, lot) => total + lot.unitsOnHand, 0) : null;
      const heldByOthers = held.byVariety.get(variety.id) ?? 0;
      const need = totals.varieties.find((one) => one.variety.id === variety.id)?.units ?? 0;
      return {
        varietyId: variety.id,
        word: supplyWordFor({ unitsOnHand, heldByOthers, need, release: variety.release }),
        unitsOnHand: reader.dealershipSide ? unitsOnHand : null,
        unitsHeldByOthers: reader.dealershipSide ? heldByOthers : null,
      };
    });

  const published = lineUp.filter((variety) => variety.published && variety.archivedAt === null);
  const choices: Record<string, Choice[]> = {};
  const lots: Record<string, PlanLot[]> = {};
  if (reader.dealershipSide) {
    for (const field of fieldRows) choices[field.id] = choicesOf(rankings.get(field.id) ?? null, published);
    for (const variety of lineUp) {
      lots[variety.id] = lotsOf(variety.id).map((lot) => lotOf(lot, reader, held));
    }
  }
  return {
    planId: plan?.id ?? null,
    operationId,
    operationName: operation.name,
    dealershipName: operation.dealershipName,
    season,
    soybeanPriceCentsPerBushel: operation.soybeanPriceCentsPerBushel,
    state,
    revision: plan?.revision ?? 0,
    signedName: plan?.signedName ?? null,
    signedAt: plan?.signedAt ?? null,
    lines,
    totals,
    events: plan ? await readEvents(plan.id, connection) : [],
    choices,
    lots,
    supply,
  };
}

function lotOf(lot: typeof seedLots.$inferSelect, reader: Reader, held: Held): PlanLot {
  return {
    id: lot.id,
    lotNumber: lot.lotNumber,
    seedsPerLb: lot.seedsPerLb,
    germinationPercent: lot.germinationPercent,
    treatment: lot.treatment,
    unitSizeSeeds: lot.unitSizeSeeds,
    priceCentsPerUnit: reader.dealershipSide ? lot.priceCentsPerUnit : null,
    unitsFree: reader.dealershipSide ? lot.unitsOnHand - (held.byLot.get(lot.id) ?? 0) : null,
  };
}

function runnerUpOf(ranking: Ranking | null, varietyId: string, expected: number): PlanLine['runnerUp'] {
  const other = ranking?.picks.find((pick) => pick.varietyId !== varietyId);
  return other ? { code: other.code, differenceBushels: other.expected - expected } : null;
}

function cautionOf(ranking: Ranking | null, varietyId: string | null): string | null {
  if (!ranking) return 'not scored yet';
  if (ranking.picks.length === 0) return ranking.stopped[0] ? `every variety stopped: ${ranking.stopped[0].reason}` : 'no pick';
  const stopped = ranking.stopped.find((one) => one.varietyId === varietyId);
  if (stopped) return `stopped: ${stopped.reason}`;
  const untested = ranking.questions.some((question) => question.fact === 'phShares');
  return untested ? 'needs soil tests' : null;
}

function choicesOf(ranking: Ranking | null, published: (typeof varieties.$inferSelect)[]): Choice[] {
  const byId = new Map(published.map((variety) => [variety.id, variety]));
  const ranked: Choice[] = (ranking?.picks ?? [])
    .filter((pick) => byId.has(pick.varietyId))
    .map((pick) => ({
      varietyId: pick.varietyId,
      code: pick.code,
      relativeMaturity: pick.relativeMaturity,
      expected: pick.expected,
      stopped: null,
    }));
  const seen = new Set(ranked.map((choice) => choice.varietyId));
  const rest: Choice[] = published
    .filter((variety) => !seen.has(variety.id))
    .sort((a, b) => a.code.localeCompare(b.code))
    .map((variety) => ({
      varietyId: variety.id,
      code: variety.code,
      relativeMaturity: variety.relativeMaturity,
      expected: null,
      stopped: ranking?.stopped.find((one) => one.varietyId === variety.id)?.reason ?? null,
    }));
  return [...ranked, ...rest];
}

/** Events of a plan, newest first. */
async function readEvents(planId: string, connection: Transaction | null): Promise<PlanEvent[]> {
  const rows = await (connection ?? database())
    .select({ event: planEvents, personName: people.name })
    .from(planEvents)
    .leftJoin(people, eq(people.id, planEvents.personId))
    .where(eq(planEvents.planId, planId))
    .orderBy(desc(planEvents.at), desc(planEvents.revision))
    .limit(300);
  return rows.map(({ event, personName }) => {
    const snapshot = (event.snapshot ?? {}) as EventSnapshot;
    return {
      id: event.id,
      at: event.at,
      personName,
      verb: event.verb,
      word: event.word,
      fieldName: snapshot.fieldName ?? null,
      revision: event.revision,
      words: snapshot.words ?? [],
    };
  });
}
