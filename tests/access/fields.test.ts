import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { fields, uploads } from '@/db/schema';
import { archiveField, copyFacts, keepBoundaries, renameField, saveFacts, undoBoundaries } from '@/features/fields/changes';
import { inspectBoundaries } from '@/features/fields/inspect';
import { factsOf, factsOfOperation, fieldOf, fieldsOf } from '@/features/fields/queries';
import { discardUpload, originalOf, readUploadFiles, receiveUpload, uploadOf, uploadsOf } from '@/features/imports/machine';
import { scoreOperation } from '@/features/placement/changes/score';
import { placementOf, scoredFieldsOf, scoreOf, scoresOf } from '@/features/placement/queries';
import { NotFoundError } from '@/lib/errors';
import { aSquare, aStoredField, aStoredVariety, someSoilTests } from '../support/fields';
import { aScenario, refuses, type Scenario, type Stranger, strangers } from './helpers';

async function* oneFile(name: string, text: string) {
  yield {
    name,
    stream: (async function* () {
      yield new TextEncoder().encode(text);
    })(),
  };
}

const collection = JSON.stringify({
  type: 'FeatureCollection',
  features: [{ type: 'Feature', properties: { name: 'New ground' }, geometry: aSquare(5) }],
});

let scenario: Scenario;
let others: Stranger[];
let field: { id: string; name: string };
let uploadId: string;

beforeAll(async () => {
  scenario = await aScenario();
  others = await strangers(scenario);
  field = await aStoredField(scenario.operationId, { name: 'Home 80' });
  await someSoilTests(scenario.operationId, field.id);
  await aStoredVariety(scenario.dealership.id, { code: 'CR 21' });
  const outcome = await receiveUpload(
    scenario.grower,
    { kind: 'boundaries', operationId: scenario.operationId, season: 2027 },
    oneFile('new.geojson', collection),
  );
  if (!outcome.ok) throw new Error(outcome.problems[0]?.message);
  uploadId = outcome.value.uploadId;
});

describe('reading fields', () => {
  test('the grower, the assigned rep and the manager see the field with its facts', async () => {
    for (const viewer of [scenario.grower, scenario.rep, scenario.manager]) {
      expect((await fieldsOf(viewer, scenario.operationId)).map((one) => one.name)).toEqual(['Home 80']);
      expect((await fieldOf(viewer, field.id)).name).toBe('Home 80');
      expect((await factsOf(viewer, field.id, 2027)).rowWidthInches).toBe(30);
      expect((await factsOfOperation(viewer, scenario.operationId, 2027)).size).toBe(1);
    }
  });

  test('a stranger learns nothing, not even that the field exists', async () => {
    for (const { who, viewer } of others) {
      expect(await fieldsOf(viewer, scenario.operationId), who).toEqual([]);
      await expect(fieldOf(viewer, field.id), who).rejects.toThrow(NotFoundError);
      await expect(factsOf(viewer, field.id, 2027), who).rejects.toThrow(NotFoundError);
      expect((await factsOfOperation(viewer, scenario.operationId, 2027)).size, who).toBe(0);
    }
  });
});

describe('scores and picks', () => {
  test('no stranger scores or reads the picks of an operation', async () => {
    for (const { who, viewer } of others) {
      expect(await refuses(() => scoreOperation(viewer, { operationId: scenario.operationId, season: 2027 })), who).toBe(true);
      expect(await scoredFieldsOf(viewer, scenario.operationId, 2027), who).toEqual([]);
      expect((await scoresOf(viewer, scenario.operationId, 2027)).size, who).toBe(0);
      await expect(scoreOf(viewer, field.id, 2027), who).rejects.toThrow(NotFoundError);
      await expect(placementOf(viewer, field.id, 2027), who).rejects.toThrow(NotFoundError);
    }
  });

  test('the grower scores their own fields, and never receives a count of units', async () => {
    expect(await scoreOperation(scenario.grower, { operationId: scenario.operationId, season: 2027 })).toMatchObject({
      ok: true,
      value: { fieldCount: 1 },
    });
    const score = await scoreOf(scenario.grower, field.id, 2027);
    expect(score?.stale).toBe(false);
    expect(score?.ranking.picks[0]?.code).toBe('CR 21');
    const placement = await placementOf(scenario.grower, field.id, 2027);
    expect(JSON.stringify(placement)).not.toMatch(/"unitsOnHand":(?!null|0[,}])/);
    expect((await scoresOf(scenario.grower, scenario.operationId, 2027)).size).toBe(1);
  });

  test('a changed fact makes the stored score stale, and scoring again renews it', async () => {
    const facts = await factsOf(scenario.grower, field.id, 2027);
    expect(
      await saveFacts(scenario.grower, { fieldId: field.id, season: 2027, facts: { ...facts, rowWidthInches: 15 } }),
    ).toMatchObject({ ok: true });
    expect((await scoreOf(scenario.grower, field.id, 2027))?.stale).toBe(true);
    await scoreOperation(scenario.rep, { operationId: scenario.operationId, season: 2027 });
    expect((await scoredFieldsOf(scenario.rep, scenario.operationId, 2027))[0]?.score?.stale).toBe(false);
  });

  test('a new name of the field leaves its score fresh', async () => {
    expect(await renameField(scenario.rep, { fieldId: field.id, name: 'Home Eighty', farm: 'Home farm' })).toMatchObject({
      ok: true,
    });
    expect((await scoreOf(scenario.rep, field.id, 2027))?.stale).toBe(false);
  });
});

describe('changing fields', () => {
  test('no stranger changes, copies, renames or takes out a field', async () => {
    const facts = await factsOf(scenario.grower, field.id, 2027);
    for (const { who, viewer } of others) {
      expect(await refuses(() => saveFacts(viewer, { fieldId: field.id, season: 2027, facts })), who).toBe(true);
      expect(
        await refuses(() => copyFacts(viewer, { fieldId: field.id, season: 2027, toFieldIds: [field.id], names: ['tiled'] })),
        who,
      ).toBe(true);
      expect(await refuses(() => renameField(viewer, { fieldId: field.id, name: 'Mine', farm: null })), who).toBe(true);
      expect(await refuses(() => archiveField(viewer, { fieldId: field.id })), who).toBe(true);
    }
    const [row] = await database().select().from(fields).where(eq(fields.id, field.id));
    expect(row).toMatchObject({ name: 'Home Eighty', archivedAt: null });
  });

  test('facts are never copied onto a field of another operation', async () => {
    const foreign = await aStoredField((await aScenario()).operationId);
    const outcome = await copyFacts(scenario.grower, {
      fieldId: field.id,
      season: 2027,
      toFieldIds: [foreign.id],
      names: ['tiled'],
    });
    expect(outcome).toMatchObject({ ok: false });
  });
});

describe('imports', () => {
  test('no stranger brings in, reads, checks, keeps, puts away or takes back an import', async () => {
    for (const { who, viewer } of others) {
      await expect(
        receiveUpload(
          viewer,
          { kind: 'boundaries', operationId: scenario.operationId, season: 2027 },
          oneFile('x.geojson', collection),
        ),
        who,
      ).rejects.toThrow(NotFoundError);
      await expect(uploadOf(viewer, uploadId), who).rejects.toThrow(NotFoundError);
      expect(await uploadsOf(viewer, ['boundaries'], scenario.operationId), who).toEqual([]);
      await expect(readUploadFiles(viewer, uploadId), who).rejects.toThrow(NotFoundError);
      await expect(originalOf(viewer, uploadId, 0), who).rejects.toThrow(NotFoundError);
      expect(await refuses(() => inspectBoundaries(viewer, { uploadId })), who).toBe(true);
      expect(
        await refuses(() =>
          keepBoundaries(viewer, { uploadId, shapes: [{ index: 0, name: 'Mine', farm: null, replaces: null }] }),
        ),
        who,
      ).toBe(true);
      expect(await refuses(() => undoBoundaries(viewer, { uploadId })), who).toBe(true);
      expect(await refuses(() => discardUpload(viewer, uploadId)), who).toBe(true);
    }
  });

  test('a grower may not bring in a line-up', async () => {
    await expect(
      receiveUpload(scenario.grower, { kind: 'line-up', operationId: null, season: 2027 }, oneFile('l.csv', 'code')),
    ).rejects.toThrow();
  });

  test('the grower checks and keeps their own file once, takes it back, and the original stays', async () => {
    const inspection = await inspectBoundaries(scenario.grower, { uploadId });
    expect(inspection).toMatchObject({ ok: true, value: { format: 'GeoJSON', nameColumn: 'name' } });
    const keep = () =>
      keepBoundaries(scenario.grower, {
        uploadId,
        shapes: [{ index: 0, name: 'New ground', farm: 'Home farm', replaces: null }],
      });
    expect(await keep()).toMatchObject({ ok: true, value: { keptCount: 1 } });
    expect(await keep()).toMatchObject({ ok: false });
    expect((await fieldsOf(scenario.grower, scenario.operationId)).map((one) => one.name)).toContain('New ground');
    expect(await undoBoundaries(scenario.grower, { uploadId })).toMatchObject({ ok: true, value: { count: 1 } });
    expect((await fieldsOf(scenario.grower, scenario.operationId)).map((one) => one.name)).not.toContain('New ground');
    expect(new TextDecoder().decode((await readUploadFiles(scenario.grower, uploadId))[0]?.bytes)).toBe(collection);
  });

  test('an import never replaces a field of another operation', async () => {
    const foreign = await aStoredField((await aScenario()).operationId);
    const received = await receiveUpload(
      scenario.grower,
      { kind: 'boundaries', operationId: scenario.operationId, season: 2027 },
      oneFile('again.geojson', collection),
    );
    if (!received.ok) throw new Error('not received');
    const outcome = await keepBoundaries(scenario.grower, {
      uploadId: received.value.uploadId,
      shapes: [{ index: 0, name: 'Taken', farm: null, replaces: foreign.id }],
    });
    expect(outcome).toMatchObject({ ok: false });
    const [row] = await database().select().from(uploads).where(eq(uploads.id, received.value.uploadId));
    expect(row?.state).toBe('received');
  });
});
