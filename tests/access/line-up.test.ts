import { beforeAll, describe, expect, test } from 'vitest';
import { receiveUpload } from '@/features/imports/machine';
import { archiveLot, archiveVariety, createVariety, saveLot, setPublished, updateVariety } from '@/features/line-up/changes';
import { inspectLineUp, keepLineUp } from '@/features/line-up/import-changes';
import { undoLineUp } from '@/features/line-up/import-undo';
import { lineUp, lotsOf, lotsOfLineUp, profilesForPlacement, varietyOf } from '@/features/line-up/queries';
import { NotFoundError } from '@/lib/errors';
import { aStoredVariety } from '../support/fields';
import { aScenario, refuses, type Scenario, type Stranger, strangers } from './helpers';

const form = {
  code: 'CR 99',
  relativeMaturity: '2.4',
  height: '',
  bushType: 'bushy',
  standability: '7',
  emergence: '',
  phytophthoraGenes: '1k;3a',
  phytophthora: '',
  suddenDeath: '',
  brownStemRot: '',
  whiteMould: '',
  frogeye: '',
  stemCanker: '',
  charcoalRot: '',
  ironChlorosis: '',
  drought: '',
  cystNematodeSource: 'Peking',
  tolerances: ['glyphosate'],
  release: 'full',
  published: true,
  note: '',
};

let scenario: Scenario;
let others: Stranger[];
let variety: { id: string; code: string; lotId: string };
let draft: { id: string; code: string; lotId: string };

beforeAll(async () => {
  scenario = await aScenario();
  others = await strangers(scenario);
  variety = await aStoredVariety(scenario.dealership.id, { code: 'CR 21', unitsOnHand: 321 });
  draft = await aStoredVariety(scenario.dealership.id, { code: 'CR 22 draft', published: false });
});

describe('reading the line-up', () => {
  test('reps and managers see drafts, units and prices', async () => {
    for (const viewer of [scenario.rep, scenario.manager]) {
      expect((await lineUp(viewer, 2027)).map((one) => one.code)).toEqual(['CR 21', 'CR 22 draft']);
      expect((await varietyOf(viewer, variety.id)).unitsOnHand).toBe(321);
      expect((await lotsOf(viewer, variety.id))[0]).toMatchObject({ unitsOnHand: 321, priceCentsPerUnit: 6543 });
      expect(await lotsOfLineUp(viewer, 2027)).toHaveLength(2);
    }
  });

  test('a grower sees published varieties with a word for their supply: no draft, no units, no price', async () => {
    const seen = await lineUp(scenario.grower, 2027);
    expect(seen.map((one) => [one.code, one.supplyWord, one.unitsOnHand])).toEqual([['CR 21', 'available', null]]);
    await expect(varietyOf(scenario.grower, draft.id)).rejects.toThrow(NotFoundError);
    await expect(lotsOf(scenario.grower, draft.id)).rejects.toThrow(NotFoundError);
    const everything = JSON.stringify([
      seen,
      await lotsOf(scenario.grower, variety.id),
      await lotsOfLineUp(scenario.grower, 2027),
    ]);
    expect(everything).not.toMatch(/321|6543/);
  });

  test('another dealership sees nothing of it', async () => {
    for (const { who, viewer } of others.filter((one) => !one.sameDealership)) {
      expect(await lineUp(viewer, 2027), who).toEqual([]);
      expect(await lotsOfLineUp(viewer, 2027), who).toEqual([]);
      expect(await profilesForPlacement(viewer, 2027), who).toEqual([]);
      await expect(varietyOf(viewer, variety.id), who).rejects.toThrow(NotFoundError);
      await expect(lotsOf(viewer, variety.id), who).rejects.toThrow(NotFoundError);
    }
  });

  test('placement never gets a draft', async () => {
    expect((await profilesForPlacement(scenario.rep, 2027)).map((one) => one.code)).toEqual(['CR 21']);
  });
});

describe('changing the line-up', () => {
  test('growers and other dealerships change nothing', async () => {
    const outsiders = [
      scenario.grower,
      ...others.filter((one) => !one.sameDealership || one.viewer.role === 'grower').map((one) => one.viewer),
    ];
    for (const viewer of outsiders) {
      const who = `${viewer.role} of ${viewer.dealershipName}`;
      if (viewer.role === 'grower') expect(await refuses(() => createVariety(viewer, form)), who).toBe(true);
      expect(await refuses(() => updateVariety(viewer, { ...form, varietyId: variety.id, revision: 1 })), who).toBe(true);
      expect(await refuses(() => setPublished(viewer, { varietyId: draft.id, published: true })), who).toBe(true);
      expect(await refuses(() => archiveVariety(viewer, { varietyId: variety.id })), who).toBe(true);
      expect(
        await refuses(() => saveLot(viewer, { varietyId: variety.id, lotNumber: 'X', unitSizeSeeds: 140000, unitsOnHand: 5 })),
        who,
      ).toBe(true);
      expect(await refuses(() => archiveLot(viewer, { lotId: variety.lotId })), who).toBe(true);
    }
    expect((await varietyOf(scenario.rep, variety.id)).code).toBe('CR 21');
  });

  test('a rep adds a variety, and its empty ratings stay unrated', async () => {
    const outcome = await createVariety(scenario.rep, form);
    expect(outcome).toMatchObject({ ok: true });
    if (!outcome.ok) return;
    expect(await varietyOf(scenario.rep, outcome.value.varietyId)).toMatchObject({
      relativeMaturity: 2.4,
      standability: 7,
      emergence: null,
      phytophthoraGenes: ['1k', '3a'],
    });
    expect(await createVariety(scenario.rep, form)).toMatchObject({ ok: false, problems: [{ path: 'code' }] });
  });

  test('the second of two writers is told what differs, and nothing is overwritten', async () => {
    const changed = {
      ...form,
      code: 'CR 21',
      varietyId: variety.id,
      revision: (await varietyOf(scenario.rep, variety.id)).revision,
    };
    expect(await updateVariety(scenario.rep, { ...changed, standability: '8' })).toMatchObject({ ok: true });
    const second = await updateVariety(scenario.manager, { ...changed, standability: '4' });
    expect(second).toMatchObject({ ok: false });
    expect(!second.ok && second.problems[0]?.message).toContain('Standability: 8 → 4');
    expect((await varietyOf(scenario.rep, variety.id)).standability).toBe(8);
  });

  test('a rating outside 1 to 9 and an unknown word are refused with what is right', async () => {
    const outcome = await createVariety(scenario.rep, { ...form, code: 'CR 98', whiteMould: '11', bushType: 'wide' });
    expect(!outcome.ok && outcome.problems.map((problem) => problem.path).sort()).toEqual(['bushType', 'whiteMould']);
  });
});

describe('bringing in a line-up', () => {
  async function* csv(text: string) {
    yield {
      name: 'line-up.csv',
      stream: (async function* () {
        yield new TextEncoder().encode(text);
      })(),
    };
  }

  test('a file adds, changes by code, refuses row by row, and can be taken back', async () => {
    const text = 'Variety,RM,IDC,Lot,Units\nCR 21,2.1,8,B7,50\nCR 40,2.0,7,,\nCR 41,two,7,,\n';
    const received = await receiveUpload(scenario.rep, { kind: 'line-up', operationId: null, season: 2027 }, csv(text));
    if (!received.ok) throw new Error('not received');
    const { uploadId } = received.value;
    for (const { who, viewer } of others.filter((one) => !one.sameDealership || one.viewer.role === 'grower')) {
      expect(await refuses(() => inspectLineUp(viewer, { uploadId })), who).toBe(true);
      expect(await refuses(() => keepLineUp(viewer, { uploadId, publish: true })), who).toBe(true);
      expect(await refuses(() => undoLineUp(viewer, { uploadId })), who).toBe(true);
    }
    const inspection = await inspectLineUp(scenario.rep, { uploadId });
    expect(inspection.ok && inspection.value.planned.map((one) => [one.code, one.kind])).toEqual([
      ['CR 21', 'changed'],
      ['CR 40', 'new'],
    ]);
    expect(inspection.ok && inspection.value.refused[0]?.problems[0]).toContain('"two" is not a maturity');
    expect(await keepLineUp(scenario.rep, { uploadId, publish: false })).toMatchObject({
      ok: true,
      value: { added: 1, changed: 1 },
    });
    const after = await varietyOf(scenario.rep, variety.id);
    expect(after).toMatchObject({ ironChlorosis: 8, standability: 8, unitsOnHand: 371 });
    expect(await undoLineUp(scenario.rep, { uploadId })).toMatchObject({ ok: true });
    expect((await lineUp(scenario.rep, 2027)).map((one) => one.code)).not.toContain('CR 40');
  });
});
