import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { addedStations, auditEntries, coefficientOverrides, maturityZones } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { receiveUpload, uploadOf } from '@/features/imports/machine';
import { setRules } from '@/features/placement/changes/rules';
import { scoreOperation } from '@/features/placement/changes/score';
import { addStations, deleteStation } from '@/features/placement/changes/stations';
import { addZone, changeZone, deleteZone, keepZones } from '@/features/placement/changes/zones';
import { placementOf, rulesOf, scoreOf, stationsOf, zonesOf } from '@/features/placement/queries';
import { inspectZones } from '@/features/placement/zone-file';
import { boxOutline } from '@/features/placement/zones';
import { NotAllowedError, NotFoundError } from '@/lib/errors';
import { aStoredField, aStoredVariety } from '../support/fields';
import { aPerson } from '../support/viewers';
import { aScenario, refuses, type Scenario, type Stranger, strangers } from './helpers';

/** A box around the fields that the builders make. */
const OUTLINE = boxOutline({ west: -94, south: 42.9, east: -93.2, north: 43.4 });
const ZONE = { name: 'North prairie', relativeMaturityFrom: 1.6, relativeMaturityTo: 2, geometry: OUTLINE };

/** A made-up station of the monthly product, twelve rows. */
const STATION_CSV = [
  'STATION,NAME,LATITUDE,LONGITUDE,ELEVATION,DATE,MLY-TMAX-NORMAL,MLY-TMIN-NORMAL',
  ...[24, 28, 41, 56, 69, 79, 82, 80, 74, 60, 43, 29].map(
    (maximum, month) =>
      `INV00000001,INVENTED CROSSING,43.1,-93.6,370,${String(month + 1).padStart(2, '0')},${maximum},${maximum - 20}`,
  ),
].join('\n');

async function* oneFile(name: string, text: string) {
  yield {
    name,
    stream: (async function* () {
      yield new TextEncoder().encode(text);
    })(),
  };
}

async function anUpload(
  viewer: Viewer,
  kind: 'maturity-zones' | 'climate-stations',
  name: string,
  text: string,
): Promise<string> {
  const outcome = await receiveUpload(viewer, { kind, operationId: null, season: 2027 }, oneFile(name, text));
  if (!outcome.ok) throw new Error(outcome.problems[0]?.message);
  return outcome.value.uploadId;
}

let scenario: Scenario;
let others: Stranger[];
let notManagers: [string, Viewer][];
let field: { id: string };
let zoneId: string;

beforeAll(async () => {
  scenario = await aScenario();
  others = await strangers(scenario);
  notManagers = [
    ['its grower', scenario.grower],
    ['its rep', scenario.rep],
    ...others.filter((one) => one.viewer.role !== 'manager').map((one): [string, Viewer] => [one.who, one.viewer]),
  ];
  field = await aStoredField(scenario.operationId, { name: 'Home 80' });
  await aStoredVariety(scenario.dealership.id, { code: 'CR 19', relativeMaturity: 1.9 });
  await scoreOperation(scenario.rep, { operationId: scenario.operationId, season: 2027 });
  expect(await addZone(scenario.manager, ZONE)).toMatchObject({ ok: true });
  zoneId = (await zonesOf(scenario.manager))[0]?.id as string;
});

const rows = <T extends typeof maturityZones | typeof coefficientOverrides | typeof addedStations>(table: T) =>
  database().select().from(table).where(eq(table.dealershipId, scenario.dealership.id));

describe('maturity zones', () => {
  test('only a manager reads or sets them, and only those of the own dealership', async () => {
    for (const [who, viewer] of notManagers) {
      await expect(zonesOf(viewer), who).rejects.toThrow(NotAllowedError);
      expect(await refuses(() => addZone(viewer, ZONE)), who).toBe(true);
      expect(
        await refuses(() => changeZone(viewer, { zoneId, name: 'Mine', relativeMaturityFrom: 1, relativeMaturityTo: 2 })),
        who,
      ).toBe(true);
      expect(await refuses(() => deleteZone(viewer, { zoneId })), who).toBe(true);
    }
    const stranger = await aPerson({ role: 'manager' });
    expect(await zonesOf(stranger)).toEqual([]);
    expect(
      await refuses(() => changeZone(stranger, { zoneId, name: 'Mine', relativeMaturityFrom: 1, relativeMaturityTo: 2 })),
    ).toBe(true);
    expect(await refuses(() => deleteZone(stranger, { zoneId }))).toBe(true);
    expect((await rows(maturityZones)).map((zone) => (zone as { name: string }).name)).toEqual(['North prairie']);
  });

  test('a zone makes the scores of its fields stale, and sets the RM they are placed by', async () => {
    expect((await scoreOf(scenario.rep, field.id, 2027))?.stale).toBe(true);
    await scoreOperation(scenario.rep, { operationId: scenario.operationId, season: 2027 });
    expect((await scoreOf(scenario.grower, field.id, 2027))?.stale).toBe(false);
    expect((await placementOf(scenario.grower, field.id, 2027)).engine.rules.zone).toEqual({
      name: 'North prairie',
      relativeMaturityFrom: 1.6,
      relativeMaturityTo: 2,
    });
  });

  test('a range the wrong way round, a name too long and an outline without ground are refused with words', async () => {
    const upsideDown = await addZone(scenario.manager, { ...ZONE, relativeMaturityFrom: 2.4, relativeMaturityTo: 2 });
    expect(upsideDown).toMatchObject({ ok: false, problems: [{ path: 'relativeMaturityTo' }] });
    expect(await addZone(scenario.manager, { ...ZONE, name: 'x'.repeat(200) })).toMatchObject({ ok: false });
    const line = {
      type: 'Polygon',
      coordinates: [
        [
          [-93, 42],
          [-93, 43],
          [-93, 42],
          [-93, 42],
        ],
      ],
    };
    expect(await addZone(scenario.manager, { ...ZONE, geometry: line })).toMatchObject({ ok: false });
    expect(await rows(maturityZones)).toHaveLength(1);
  });

  test('zones come in from a file all together, once, and only through a manager', async () => {
    const file = JSON.stringify({
      type: 'FeatureCollection',
      features: [
        {
          type: 'Feature',
          properties: { name: 'South, RM 2.4-2.8' },
          geometry: boxOutline({ west: -94, south: 41.5, east: -93, north: 42.4 }),
        },
        { type: 'Feature', properties: { name: 'A point' }, geometry: { type: 'Point', coordinates: [-93, 42] } },
      ],
    });
    const uploadId = await anUpload(scenario.manager, 'maturity-zones', 'zones.geojson', file);
    for (const [who, viewer] of notManagers) {
      await expect(uploadOf(viewer, uploadId), who).rejects.toThrow(NotFoundError);
      await expect(inspectZones(viewer, uploadId), who).rejects.toThrow(NotAllowedError);
      expect(
        await refuses(() =>
          keepZones(viewer, { uploadId, shapes: [{ index: 0, name: 'Mine', relativeMaturityFrom: 2, relativeMaturityTo: 3 }] }),
        ),
        who,
      ).toBe(true);
      await expect(
        receiveUpload(viewer, { kind: 'maturity-zones', operationId: null, season: 2027 }, oneFile('z.geojson', file)),
        who,
      ).rejects.toThrow(NotAllowedError);
    }
    const seen = await inspectZones(scenario.manager, uploadId);
    expect(seen).toMatchObject({
      ok: true,
      value: {
        leftOut: 1,
        shapes: [{ index: 0, name: 'South, RM 2.4-2.8', relativeMaturityFrom: 2.4, relativeMaturityTo: 2.8 }],
      },
    });
    const shape = { index: 0, name: 'South', relativeMaturityFrom: 2.4, relativeMaturityTo: 2.8 };
    const missing = await keepZones(scenario.manager, { uploadId, shapes: [shape, { ...shape, index: 1 }] });
    expect(missing.ok).toBe(false);
    expect(await rows(maturityZones)).toHaveLength(1);
    expect(await keepZones(scenario.manager, { uploadId, shapes: [shape] })).toMatchObject({ ok: true, value: { count: 1 } });
    expect((await keepZones(scenario.manager, { uploadId, shapes: [shape] })).ok).toBe(false);
    expect(await rows(maturityZones)).toHaveLength(2);
  });

  test('a manager renames and deletes a zone, and the trail says what it was', async () => {
    expect(
      await changeZone(scenario.manager, { zoneId, name: 'Prairie', relativeMaturityFrom: '1.8', relativeMaturityTo: '2.2' }),
    ).toMatchObject({ ok: true });
    expect(await deleteZone(scenario.manager, { zoneId })).toMatchObject({ ok: true, value: { name: 'Prairie' } });
    const trail = await database().select().from(auditEntries).where(eq(auditEntries.thingId, zoneId));
    expect(trail.map((one) => one.verb).sort()).toEqual(['zone.added', 'zone.changed', 'zone.deleted']);
    expect(trail.find((one) => one.verb === 'zone.changed')?.summary).toBe(
      'Changed the maturity zone North prairie from RM 1.6–2.0 to Prairie, RM 1.8–2.2.',
    );
  });
});

describe('placement rules', () => {
  test('only a manager reads or sets them', async () => {
    for (const [who, viewer] of notManagers) {
      await expect(rulesOf(viewer), who).rejects.toThrow(NotAllowedError);
      expect(await refuses(() => setRules(viewer, { values: { maturityEarlyLoss: 0.12 } })), who).toBe(true);
    }
    expect(await rulesOf(scenario.manager)).toEqual({});
  });

  test('a value within its range is kept with an audit row, makes scores stale, and goes back to usual', async () => {
    await scoreOperation(scenario.rep, { operationId: scenario.operationId, season: 2027 });
    expect(await setRules(scenario.manager, { values: { maturityEarlyLoss: 0.12 } })).toMatchObject({
      ok: true,
      value: { changedCount: 1 },
    });
    expect(await rulesOf(scenario.manager)).toEqual({ maturityEarlyLoss: 0.12 });
    expect((await scoreOf(scenario.rep, field.id, 2027))?.stale).toBe(true);
    expect((await placementOf(scenario.rep, field.id, 2027)).engine.rules.overrides).toEqual({ maturityEarlyLoss: 0.12 });
    expect(await setRules(scenario.manager, { values: { maturityEarlyLoss: null } })).toMatchObject({ ok: true });
    expect(await rulesOf(scenario.manager)).toEqual({});
    expect((await scoreOf(scenario.rep, field.id, 2027))?.stale).toBe(false);
    const trail = await database().select().from(auditEntries).where(eq(auditEntries.thingId, 'maturityEarlyLoss'));
    expect(trail.map((one) => one.verb).sort()).toEqual(['coefficient.reset', 'coefficient.set']);
    expect(trail[0]?.personId).toBe(scenario.manager.personId);
  });

  test('a value out of range, an unknown name and one that may not be changed keep nothing of the whole', async () => {
    for (const values of [
      { maturityEarlyLoss: 0.12, maturityLateLoss: 9 },
      { nonsense: 1 },
      { potentialGoalDeviation: 0.05 },
      { maturityEarlyLoss: 0.1 },
    ]) {
      expect((await setRules(scenario.manager, { values })).ok, JSON.stringify(values)).toBe(false);
    }
    expect(await rows(coefficientOverrides)).toEqual([]);
  });

  test('a value that the engine no longer takes is passed over instead of failing every page', async () => {
    await database()
      .insert(coefficientOverrides)
      .values([
        { dealershipId: scenario.dealership.id, name: 'goneWithAnOldEngine', value: 1 },
        { dealershipId: scenario.dealership.id, name: 'maturityLateLoss', value: 99 },
      ]);
    expect(await rulesOf(scenario.manager)).toEqual({});
    expect((await placementOf(scenario.grower, field.id, 2027)).engine.rules.overrides).toEqual({});
    await database().delete(coefficientOverrides).where(eq(coefficientOverrides.dealershipId, scenario.dealership.id));
  });
});

describe('climate stations', () => {
  test('a manager adds one from the published file; nobody else adds, reads or takes it out', async () => {
    const uploadId = await anUpload(scenario.manager, 'climate-stations', 'mly-normal.csv', STATION_CSV);
    for (const [who, viewer] of notManagers) {
      await expect(stationsOf(viewer), who).rejects.toThrow(NotAllowedError);
      expect(await refuses(() => addStations(viewer, { uploadId })), who).toBe(true);
    }
    const stranger = await aPerson({ role: 'manager' });
    expect(await refuses(() => addStations(stranger, { uploadId }))).toBe(true);
    const kept = await addStations(scenario.manager, { uploadId });
    expect(kept).toMatchObject({ ok: true, value: { count: 1, replacedCount: 0 } });
    expect(kept.ok ? kept.notes?.join(' ') : '').toContain('28 °F');
    const [added] = await stationsOf(scenario.manager);
    expect(added?.station.name).toBe('INVENTED CROSSING');
    for (const [who, viewer] of [...notManagers, ['a strange manager', stranger] as [string, Viewer]])
      expect(await refuses(() => deleteStation(viewer, { stationId: added?.id })), who).toBe(true);
    expect((await placementOf(scenario.rep, field.id, 2027)).engine.season.climate.stations[0]?.name).toBe('INVENTED CROSSING');
    const again = await anUpload(scenario.manager, 'climate-stations', 'mly-normal.csv', STATION_CSV);
    expect(await addStations(scenario.manager, { uploadId: again })).toMatchObject({ ok: true, value: { replacedCount: 1 } });
    const [newer] = await stationsOf(scenario.manager);
    expect(await deleteStation(scenario.manager, { stationId: newer?.id })).toMatchObject({ ok: true });
    expect(await rows(addedStations)).toEqual([]);
  });

  test('a file that is none is refused with words and keeps nothing', async () => {
    const uploadId = await anUpload(scenario.manager, 'climate-stations', 'yields.csv', 'field,bushels\nHome,61\n');
    const outcome = await addStations(scenario.manager, { uploadId });
    expect(outcome).toMatchObject({ ok: false });
    expect(outcome.ok ? '' : outcome.problems[0]?.message).toContain('NOAA');
    expect((await uploadOf(scenario.manager, uploadId)).state).toBe('failed');
    expect(await rows(addedStations)).toEqual([]);
  });
});
