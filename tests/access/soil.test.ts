import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { laboratoryLayouts, soilMapUnits, soilSamples, uploads } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { receiveUpload } from '@/features/imports/machine';
import { keepSoilTests, keepSurvey, undoSoilImport } from '@/features/soil/changes';
import { inspectSoilTests } from '@/features/soil/inspect';
import { mapUnitsOfField, mapUnitsOfOperation, samplesOfField, samplesOfOperation, soilSummaryOf } from '@/features/soil/queries';
import { inspectSurvey } from '@/features/soil/survey/prepare';
import { aStoredField } from '../support/fields';
import { boxPolygon, bytesOf, surveyArea } from '../support/soil-files';
import { aScenario, refuses, type Scenario, type Stranger, strangers } from './helpers';

async function* oneFile(name: string, bytes: Uint8Array) {
  yield {
    name,
    stream: (async function* () {
      yield bytes;
    })(),
  };
}

async function upload(viewer: Viewer, operationId: string, kind: 'soil-tests' | 'soil-survey', name: string, bytes: Uint8Array) {
  const outcome = await receiveUpload(viewer, { kind, operationId, season: 2027 }, oneFile(name, bytes));
  if (!outcome.ok) throw new Error(outcome.problems[0]?.message);
  return outcome.value.uploadId;
}

const sheet = (rows: string) => bytesOf(`Sample ID,Lat,Lon,Soil reaction,Buffer pH,P,Date\n${rows}`);
const FOUR =
  '1,43.081,-93.699,6.1,6.7,20,2026-10-20\n2,43.082,-93.698,6.3,6.8,21,2026-10-20\n3,44.5,-93.7,6.4,,22,2026-10-20\n4,43.083,-93.697,5.9,6.6,19,2026-10-20\n';
const area = surveyArea([
  {
    key: '1',
    symbol: '55',
    name: 'Nicollet',
    outline: boxPolygon(-93.71, 43.07, -93.698, 43.09),
    drainage: 'Somewhat poorly drained',
  },
  { key: '2', symbol: '507', name: 'Canisteo', outline: boxPolygon(-93.698, 43.07, -93.69, 43.09), drainage: 'Poorly drained' },
]);
const COLUMNS = {
  columns: {
    'Sample ID': 'id',
    Lat: 'latitude',
    Lon: 'longitude',
    'Soil reaction': 'ph',
    'Buffer pH': 'bufferPh',
    P: 'phosphorusPpm',
    Date: 'sampledOn',
  },
  bufferMethod: 'SMP',
};

let scenario: Scenario;
let others: Stranger[];
let field: { id: string };
let testsId: string;
let surveyId: string;

beforeAll(async () => {
  scenario = await aScenario();
  others = await strangers(scenario);
  field = await aStoredField(scenario.operationId, { name: 'Home 80' });
  testsId = await upload(scenario.grower, scenario.operationId, 'soil-tests', 'lab.csv', sheet(FOUR));
  surveyId = await upload(scenario.rep, scenario.operationId, 'soil-survey', 'IA081.zip', area);
});

describe('bringing soil in', () => {
  test('a stranger can neither check nor keep nor take back another operation’s soil', async () => {
    for (const { who, viewer } of others) {
      expect(await refuses(() => inspectSoilTests(viewer, { uploadId: testsId, choices: {} })), who).toBe(true);
      expect(await refuses(() => inspectSurvey(viewer, { uploadId: surveyId })), who).toBe(true);
      expect(await refuses(() => keepSoilTests(viewer, { uploadId: testsId, choices: {} })), who).toBe(true);
      expect(await refuses(() => keepSurvey(viewer, { uploadId: surveyId })), who).toBe(true);
      expect(await refuses(() => undoSoilImport(viewer, { uploadId: testsId })), who).toBe(true);
    }
    expect(await samplesOfOperation(scenario.manager, scenario.operationId)).toEqual([]);
    const states = await database()
      .select({ state: uploads.state })
      .from(uploads)
      .where(eq(uploads.operationId, scenario.operationId));
    expect(states.map((one) => one.state)).toEqual(['received', 'received']);
  });

  test('the grower checks a sheet, names its odd column once, and keeps it; the point in no field waits', async () => {
    const checked = await inspectSoilTests(scenario.grower, { uploadId: testsId, choices: COLUMNS });
    expect(checked).toMatchObject({ ok: true, value: { counts: { all: 4, inFields: 3, stray: 1, repeated: 0 } } });
    expect(await samplesOfOperation(scenario.grower, scenario.operationId)).toEqual([]);
    const kept = await keepSoilTests(scenario.grower, { uploadId: testsId, choices: COLUMNS });
    expect(kept).toMatchObject({ ok: true, value: { keptCount: 4, strayCount: 1 } });
    const samples = await samplesOfField(scenario.grower, field.id);
    expect(samples.map((one) => [one.sampleNumber, one.ph, one.bufferPh, one.bufferMethod])).toEqual([
      ['1', 6.1, 6.7, 'SMP'],
      ['2', 6.3, 6.8, 'SMP'],
      ['4', 5.9, 6.6, 'SMP'],
    ]);
  });

  test('keeping the same import twice is refused and adds nothing', async () => {
    expect((await keepSoilTests(scenario.grower, { uploadId: testsId, choices: COLUMNS })).ok).toBe(false);
    expect(await samplesOfOperation(scenario.grower, scenario.operationId)).toHaveLength(4);
  });

  test('the same headers are matched as before for this dealership, and for no other', async () => {
    const again = await upload(
      scenario.rep,
      scenario.operationId,
      'soil-tests',
      'next.csv',
      sheet('9,43.081,-93.698,6.6,6.9,30,2026-11-02\n1,43.081,-93.699,6.1,6.7,20,2026-10-20\n'),
    );
    const checked = await inspectSoilTests(scenario.rep, { uploadId: again, choices: {} });
    expect(checked).toMatchObject({ ok: true, value: { remembered: true, counts: { all: 2, repeated: 1 } } });
    if (checked.ok) expect(checked.value.samples[0]).toMatchObject({ ph: 6.6, bufferMethod: 'SMP', repeats: null });
    const rows = await database().select().from(laboratoryLayouts);
    expect(rows.map((row) => row.dealershipId)).toEqual([scenario.dealership.id]);
    const stranger = others.find((one) => !one.sameDealership && one.viewer.role === 'rep') as Stranger;
    const elsewhere = await aScenario();
    await aStoredField(elsewhere.operationId);
    const theirs = await upload(elsewhere.rep, elsewhere.operationId, 'soil-tests', 'lab.csv', sheet(FOUR));
    expect(await inspectSoilTests(elsewhere.rep, { uploadId: theirs, choices: {} })).toMatchObject({
      value: { remembered: false },
    });
    expect(await refuses(() => inspectSoilTests(stranger.viewer, { uploadId: theirs, choices: {} }))).toBe(true);
  });

  test('two people who import at once both succeed', async () => {
    const [one, other] = await Promise.all(
      [scenario.grower, scenario.rep].map((viewer, at) =>
        upload(
          viewer,
          scenario.operationId,
          'soil-tests',
          `lab${at}.csv`,
          sheet(`A${at},43.081,-93.698,6.6,6.9,30,2025-11-02\n`),
        ),
      ),
    );
    const kept = await Promise.all([
      keepSoilTests(scenario.grower, { uploadId: one, choices: {} }),
      keepSoilTests(scenario.rep, { uploadId: other, choices: {} }),
    ]);
    expect(kept.map((outcome) => outcome.ok)).toEqual([true, true]);
  });
});

describe('a soil survey', () => {
  test('is cut to the field, kept, and kept anew in place of the old', async () => {
    const checked = await inspectSurvey(scenario.rep, { uploadId: surveyId });
    expect(checked).toMatchObject({ ok: true, value: { areas: ['IA081'], fields: [{ name: 'Home 80' }] } });
    expect(await keepSurvey(scenario.rep, { uploadId: surveyId })).toMatchObject({
      ok: true,
      value: { fieldCount: 1, unitCount: 2 },
    });
    const units = await mapUnitsOfField(scenario.grower, field.id);
    expect(units.map((unit) => [unit.symbol, unit.drainage, Number(unit.share.toFixed(2))])).toEqual(
      expect.arrayContaining([
        ['55', 'somewhat poorly', 0.5],
        ['507', 'poorly', 0.5],
      ]),
    );
    const second = await upload(scenario.rep, scenario.operationId, 'soil-survey', 'IA081.zip', area);
    expect((await keepSurvey(scenario.rep, { uploadId: second })).ok).toBe(true);
    expect(await mapUnitsOfOperation(scenario.manager, scenario.operationId)).toHaveLength(2);
  });
});

describe('reading soil', () => {
  test('a stranger sees no sample, no map unit and no history', async () => {
    for (const { who, viewer } of others) {
      expect(await samplesOfField(viewer, field.id), who).toEqual([]);
      expect(await samplesOfOperation(viewer, scenario.operationId), who).toEqual([]);
      expect(await mapUnitsOfField(viewer, field.id), who).toEqual([]);
      expect(await mapUnitsOfOperation(viewer, scenario.operationId), who).toEqual([]);
      expect(await soilSummaryOf(viewer, field.id), who).toEqual({ latest: null, years: [] });
    }
  });

  test('the history stands by year, newest first', async () => {
    const { latest, years } = await soilSummaryOf(scenario.grower, field.id);
    expect(years.map((year) => year.year)).toEqual([2026, 2025]);
    expect(latest?.figures.ph).toMatchObject({ low: 5.9, high: 6.3, count: 3 });
    expect(latest?.figures.ph?.mean).toBeCloseTo(6.1, 10);
  });
});

describe('taking soil back', () => {
  test('the grower takes an import back whole, once, and only that one', async () => {
    expect(await undoSoilImport(scenario.grower, { uploadId: testsId })).toMatchObject({ ok: true, value: { count: 4 } });
    expect((await undoSoilImport(scenario.grower, { uploadId: testsId })).ok).toBe(false);
    const left = await database().select().from(soilSamples).where(eq(soilSamples.uploadId, testsId));
    expect(left).toEqual([]);
    expect(await samplesOfOperation(scenario.grower, scenario.operationId)).toHaveLength(2);
    expect(await database().select().from(soilMapUnits)).toHaveLength(2);
  });

  test('an import of last season stays', async () => {
    const old = await upload(
      scenario.grower,
      scenario.operationId,
      'soil-tests',
      'old.csv',
      sheet('B1,43.081,-93.698,6.6,6.9,30,2024-11-02\n'),
    );
    await keepSoilTests(scenario.grower, { uploadId: old, choices: {} });
    await database().update(uploads).set({ season: 2026 }).where(eq(uploads.id, old));
    expect((await undoSoilImport(scenario.grower, { uploadId: old })).ok).toBe(false);
  });
});
