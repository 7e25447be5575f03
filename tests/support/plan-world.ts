import { database } from '@/db/client';
import { dealerships, fieldScores, fields, operationPeople, operations, people, seedLots, varieties } from '@/db/schema';
import type { Role, Viewer } from '@/features/accounts/model';
import type { Assessment, Ranking } from '@/features/placement/engine/model';
import { createId } from '@/lib/ids';

/** A small dealership with operations, scored fields and seed, made for tests of plans. Everything in it is invented. */
export const SEASON = 2027;

export async function aDealership(name = 'Cedar Ridge Seed'): Promise<string> {
  const id = createId();
  await database().insert(dealerships).values({ id, name, currentSeason: SEASON });
  return id;
}

export async function aViewer(dealershipId: string, role: Role, operationIds: string[] = []): Promise<Viewer> {
  const personId = createId();
  const name = `${role[0]?.toUpperCase()}${role.slice(1)} ${personId.slice(0, 4)}`;
  const email = `${personId}@example.test`;
  await database().insert(people).values({ id: personId, dealershipId, email, name, role, passwordHash: 'none' });
  for (const operationId of operationIds) await database().insert(operationPeople).values({ operationId, personId });
  return { personId, dealershipId, dealershipName: 'Cedar Ridge Seed', season: SEASON, role, name, email };
}

export async function anOperation(dealershipId: string, name = `Farm ${createId().slice(0, 5)}`): Promise<string> {
  const id = createId();
  await database().insert(operations).values({ id, dealershipId, name, state: 'IA' });
  return id;
}

/** A square field near 42.5° N; its acres are as said, not measured. */
export async function aField(operationId: string, name: string, areaAcres: number): Promise<string> {
  const id = createId();
  const [west, south] = [-93.5, 42.5];
  const boundary = {
    type: 'Polygon' as const,
    coordinates: [
      [
        [west, south],
        [west + 0.008, south],
        [west + 0.008, south + 0.006],
        [west, south + 0.006],
        [west, south],
      ],
    ],
  };
  await database()
    .insert(fields)
    .values({ id, operationId, name, boundary, areaAcres, latitude: south, longitude: west, state: 'IA' });
  return id;
}

export interface MadeVariety {
  id: string;
  code: string;
  lotId: string;
}

export async function aVariety(
  dealershipId: string,
  code: string,
  options: { relativeMaturity?: number; unitsOnHand?: number; published?: boolean; seedsPerLb?: number; price?: number } = {},
): Promise<MadeVariety> {
  const id = createId();
  const lotId = createId();
  await database()
    .insert(varieties)
    .values({
      id,
      dealershipId,
      season: SEASON,
      code,
      relativeMaturity: options.relativeMaturity ?? 2.4,
      phytophthoraGenes: [],
      tolerances: [],
      published: options.published ?? true,
    });
  await database()
    .insert(seedLots)
    .values({
      id: lotId,
      varietyId: id,
      lotNumber: `${code}-1`,
      seedsPerLb: options.seedsPerLb ?? 2800,
      germinationPercent: 90,
      unitsOnHand: options.unitsOnHand ?? 500,
      priceCentsPerUnit: options.price ?? 6200,
    });
  return { id, code, lotId };
}

/** A stored ranking with these expected yields, best first. */
export async function aScore(fieldId: string, picks: { variety: MadeVariety; expected: number }[], stopped: MadeVariety[] = []) {
  const ranking: Ranking = {
    engineVersion: 'test',
    fieldId,
    potential: 62,
    potentialSource: 'goal',
    picks: picks.map(({ variety, expected }) => ({ ...anAssessment(variety, expected), hold: 0.8 })),
    stopped: stopped.map((variety) => ({
      varietyId: variety.id,
      code: variety.code,
      factor: 'weed-programme' as const,
      reason: 'The programme sprays dicamba and it has no tolerance.',
    })),
    fixFirst: [],
    questions: [],
  };
  await database()
    .insert(fieldScores)
    .values({ fieldId, season: SEASON, engineVersion: 'test', inputsHash: 'test', ranking })
    .onConflictDoUpdate({ target: [fieldScores.fieldId, fieldScores.season], set: { ranking } });
}

export function anAssessment(variety: Pick<MadeVariety, 'id' | 'code'>, expected: number): Assessment {
  return {
    varietyId: variety.id,
    code: variety.code,
    relativeMaturity: 2.4,
    potential: 62,
    potentialSource: 'goal',
    ledger: [
      {
        factor: 'soil-ph',
        label: 'Soil pH',
        bushels: expected - 62,
        fieldBushels: expected - 62,
        matchBushels: 0,
        reason: '21 % below pH 6.0',
        detail: '',
        source: 'invented for a test',
      },
    ],
    gatheredBushels: 0,
    trialBushels: 0,
    expected,
    low: expected - 4,
    high: expected + 4,
    fieldLogDeviation: 0.04,
    varietyLogDeviation: 0.02,
    advice: [],
    season: { r1: '2027-06-28', r5: '2027-08-03', r7: '2027-09-12', r8: '2027-09-22', chanceOfFreezeBeforeR7: 0.02 },
  };
}

/** Two operations of one dealership, each with its grower and rep, a manager, and three varieties; the first is scarce on request. */
export async function aPlanWorld(options: { scarceUnits?: number } = {}) {
  const dealershipId = await aDealership(`Cedar Ridge ${createId().slice(0, 5)}`);
  const a = await anOperation(dealershipId);
  const b = await anOperation(dealershipId);
  const early = await aVariety(dealershipId, 'CR 21', { relativeMaturity: 2.1, unitsOnHand: options.scarceUnits ?? 500 });
  const middle = await aVariety(dealershipId, 'CR 24', { relativeMaturity: 2.4 });
  const late = await aVariety(dealershipId, 'CR 26', { relativeMaturity: 2.6, seedsPerLb: 2150 });
  const home = await aField(a, 'Home 80', 79.6);
  const slough = await aField(a, 'Slough', 40);
  const creek = await aField(b, 'Creek Bend', 40);
  for (const [field, best] of [
    [home, 61.2],
    [slough, 53],
    [creek, 57],
  ] as const) {
    await aScore(field, [
      { variety: early, expected: best },
      { variety: middle, expected: best - 0.6 },
      { variety: late, expected: best - 2 },
    ]);
  }
  return {
    dealershipId,
    operations: { a, b },
    fields: { home, slough, creek },
    varieties: { early, middle, late },
    manager: await aViewer(dealershipId, 'manager'),
    rep: await aViewer(dealershipId, 'rep', [a, b]),
    otherRep: await aViewer(dealershipId, 'rep', [b]),
    growerA: await aViewer(dealershipId, 'grower', [a]),
    growerB: await aViewer(dealershipId, 'grower', [b]),
  };
}
