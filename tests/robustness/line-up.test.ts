import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { planRows, plans, seedLots } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { receiveUpload } from '@/features/imports/machine';
import { archiveLot, archiveVariety, createVariety, saveLot, updateVariety } from '@/features/line-up/changes';
import { type ExportRow, lineUpCsv } from '@/features/line-up/export';
import { inspectLineUp, keepLineUp } from '@/features/line-up/import-changes';
import { undoLineUp } from '@/features/line-up/import-undo';
import { lineUp, lotsOf, lotsOfLineUp, varietyOf } from '@/features/line-up/queries';
import { createId } from '@/lib/ids';
import { aScenario, type Scenario } from '../access/helpers';
import { aStoredField, aStoredVariety } from '../support/fields';

let scenario: Scenario;
let rep: Viewer;
let variety: { id: string; code: string; lotId: string };

beforeEach(async () => {
  scenario = await aScenario();
  rep = scenario.rep;
  variety = await aStoredVariety(scenario.dealership.id, { code: 'CR 21', unitsOnHand: 300 });
});

async function received(text: string | Uint8Array, name = 'line-up.csv'): Promise<string> {
  const bytes = typeof text === 'string' ? new TextEncoder().encode(text) : text;
  async function* files() {
    yield {
      name,
      stream: (async function* () {
        yield bytes;
      })(),
    };
  }
  const outcome = await receiveUpload(rep, { kind: 'line-up', operationId: null, season: 2027 }, files());
  if (!outcome.ok) throw new Error(outcome.problems[0]?.message);
  return outcome.value.uploadId;
}

/** Everything of the line-up that a person can see, without the marks that every change moves. */
async function everything(): Promise<unknown> {
  const [seen, lots] = await Promise.all([lineUp(rep, 2027), lotsOfLineUp(rep, 2027)]);
  return [seen.map(({ revision, ...one }) => one), lots.map(({ updatedAt, ...one }) => one)];
}

async function exportRows(): Promise<ExportRow[]> {
  const [seen, lots] = await Promise.all([lineUp(rep, 2027), lotsOfLineUp(rep, 2027)]);
  return seen.flatMap((one): ExportRow[] => {
    const own = lots.filter((lot) => lot.varietyId === one.id);
    return own.length > 0 ? own.map((lot) => ({ variety: one, lot })) : [{ variety: one, lot: null }];
  });
}

const FILE = 'Variety,RM,IDC,Lot,Units\nCR 21,2.1,8,A1,50\nCR 21,,,B7,40\nCR 40,2.0,7,C1,10\n';
const words = (outcome: { ok: boolean; problems?: { message: string }[] }) => outcome.problems?.[0]?.message ?? '';

describe('an import of a line-up', () => {
  test('taken back leaves everything as it was: traits, units and lots', async () => {
    const before = await everything();
    const uploadId = await received(FILE);
    expect(await keepLineUp(rep, { uploadId, publish: true })).toMatchObject({ ok: true, value: { added: 1, changed: 1 } });
    expect(await varietyOf(rep, variety.id)).toMatchObject({ ironChlorosis: 8, unitsOnHand: 90 });
    expect(await undoLineUp(rep, { uploadId })).toMatchObject({ ok: true });
    expect(await everything()).toEqual(before);
    expect(words(await undoLineUp(rep, { uploadId }))).toContain('nothing to take back');
  });

  test('is not taken back over what somebody changed since; nothing of it is', async () => {
    const uploadId = await received(FILE);
    await keepLineUp(rep, { uploadId, publish: true });
    const lot = (await lotsOf(rep, variety.id)).find((one) => one.lotNumber === 'B7');
    await saveLot(rep, {
      varietyId: variety.id,
      lotId: lot?.id,
      lotNumber: 'B7',
      unitSizeSeeds: 140000,
      unitsOnHand: 39,
      treatment: '',
      seedsPerLb: '',
      germinationPercent: '',
      priceDollarsPerUnit: '',
    });
    const before = await everything();
    expect(words(await undoLineUp(rep, { uploadId }))).toBe('CR 21, lot B7, was changed since. Nothing was taken back.');
    expect(await everything()).toEqual(before);
  });

  test('is not taken back while a plan has a variety that it added', async () => {
    const uploadId = await received(FILE);
    await keepLineUp(rep, { uploadId, publish: true });
    const added = (await lineUp(rep, 2027)).find((one) => one.code === 'CR 40');
    const field = await aStoredField(scenario.operationId);
    const planId = createId();
    await database().insert(plans).values({ id: planId, operationId: scenario.operationId, season: 2027 });
    await database().insert(planRows).values({ id: createId(), planId, fieldId: field.id, areaAcres: 40, varietyId: added?.id });
    expect(words(await undoLineUp(rep, { uploadId }))).toBe('CR 40 is on a plan: take it off first. Nothing was taken back.');
    expect(await varietyOf(rep, added?.id as string)).toMatchObject({ code: 'CR 40' });
  });

  test('of its own export changes nothing', async () => {
    await saveLot(rep, {
      varietyId: variety.id,
      lotNumber: 'A2',
      unitSizeSeeds: 130000,
      unitsOnHand: 12.5,
      treatment: '=x',
      seedsPerLb: '2650',
      germinationPercent: '91',
      priceDollarsPerUnit: '61.25',
    });
    const before = await everything();
    const uploadId = await received(lineUpCsv(await exportRows(), true));
    const inspection = await inspectLineUp(rep, { uploadId });
    expect(inspection).toMatchObject({
      ok: true,
      value: { refused: [], planned: [{ code: 'CR 21', kind: 'same', changes: [] }] },
    });
    expect(await keepLineUp(rep, { uploadId, publish: true })).toMatchObject({
      ok: true,
      value: { added: 0, changed: 0, same: 1 },
    });
    expect(await everything()).toEqual(before);
  });

  test('that two people keep at once is kept once', async () => {
    const uploadId = await received(FILE);
    const outcomes = await Promise.all([
      keepLineUp(rep, { uploadId, publish: true }),
      keepLineUp(scenario.manager, { uploadId, publish: true }),
    ]);
    expect(outcomes.filter((outcome) => outcome.ok)).toHaveLength(1);
    expect(await varietyOf(rep, variety.id)).toMatchObject({ unitsOnHand: 90 });
    expect(words(await inspectLineUp(rep, { uploadId }))).toBe('This import is kept already. Open the page again.');
  });

  test('beside another that adds the same code: the second is told, and keeps nothing', async () => {
    const [first, second] = [await received(FILE), await received(FILE.replace('CR 40,2.0', 'CR 40,2.3'))];
    await Promise.all([inspectLineUp(rep, { uploadId: first }), inspectLineUp(rep, { uploadId: second })]);
    const outcomes = await Promise.all([
      keepLineUp(rep, { uploadId: first, publish: true }),
      keepLineUp(scenario.manager, { uploadId: second, publish: true }),
    ]);
    expect(outcomes.map((outcome) => outcome.ok).sort()).toEqual([false, true]);
    expect(words(outcomes.find((outcome) => !outcome.ok) as never)).toContain('meanwhile. Nothing was kept.');
  });

  test('brings a lot that was taken out back in', async () => {
    await archiveLot(rep, { lotId: variety.lotId });
    const uploadId = await received('code,lot,units\nCR 21,A1,77\n');
    expect(await keepLineUp(rep, { uploadId, publish: true })).toMatchObject({ ok: true });
    expect(await varietyOf(rep, variety.id)).toMatchObject({ unitsOnHand: 77 });
    await undoLineUp(rep, { uploadId });
    expect(await lotsOf(rep, variety.id)).toEqual([]);
  });

  test.each([
    ['', 'empty'],
    ['\u0000\u0001\u0002\u0003\u0004\u0005'.repeat(50), 'is not text'],
    ['code,RM\n', 'has no rows under its header'],
    ['code,RM\n"CR 1,2.1\n', 'quotation mark'],
    ['PK\u0003\u0004 nothing', 'line-up.csv'],
    [new Uint8Array([0xd0, 0xcf, 0x11, 0xe0, 0, 0]), 'old kind'],
  ])('of a file that is none ends in words (%#)', async (text, part) => {
    let said: string;
    try {
      const uploadId = await received(text);
      const outcome = await inspectLineUp(rep, { uploadId });
      said = words(outcome);
      expect(outcome.ok).toBe(false);
      expect((await keepLineUp(rep, { uploadId, publish: true })).ok).toBe(false);
    } catch (error) {
      said = (error as Error).message;
    }
    expect(said).toContain(part);
    expect((await lineUp(rep, 2027)).map((one) => one.code)).toEqual(['CR 21']);
  });
});

describe('two people at one lot', () => {
  const form = {
    lotNumber: 'A1',
    unitSizeSeeds: 140000,
    treatment: '',
    seedsPerLb: '2800',
    germinationPercent: '',
    priceDollarsPerUnit: '',
  };

  test('the second is told how many units there are now, and overwrites nothing', async () => {
    const [lot] = await lotsOf(rep, variety.id);
    const open = { ...form, varietyId: variety.id, lotId: lot?.id, updatedAt: lot?.updatedAt };
    expect(await saveLot(rep, { ...open, unitsOnHand: 250 })).toMatchObject({ ok: true });
    expect(words(await saveLot(scenario.manager, { ...open, unitsOnHand: 310 }))).toContain('it has 250 units now');
    expect((await lotsOf(rep, variety.id))[0]?.unitsOnHand).toBe(250);
  });

  test('a number that stands already is refused; one that was taken out comes back as the same lot', async () => {
    const again = { ...form, varietyId: variety.id, unitsOnHand: 5 };
    expect(await saveLot(rep, again)).toMatchObject({ ok: false, problems: [{ path: 'lotNumber' }] });
    await archiveLot(rep, { lotId: variety.lotId });
    expect(await saveLot(rep, again)).toMatchObject({ ok: true, value: { lotId: variety.lotId } });
    const rows = await database().select().from(seedLots).where(eq(seedLots.varietyId, variety.id));
    expect(rows.map((row) => [row.unitsOnHand, row.archivedAt])).toEqual([[5, null]]);
  });
});

describe('a code', () => {
  const form = {
    code: 'cr 21',
    relativeMaturity: '2.0',
    height: '',
    bushType: '',
    standability: '',
    emergence: '',
    phytophthoraGenes: '',
    phytophthora: '',
    suddenDeath: '',
    brownStemRot: '',
    whiteMould: '',
    frogeye: '',
    stemCanker: '',
    charcoalRot: '',
    ironChlorosis: '',
    drought: '',
    cystNematodeSource: '',
    tolerances: [],
    release: 'full',
    published: true,
    note: '',
  };

  test('stands once in a season, whatever its case, and is free again once its variety is out', async () => {
    expect(await createVariety(rep, form)).toMatchObject({ ok: false, problems: [{ path: 'code' }] });
    for (let round = 0; round < 3; round += 1) {
      const [standing] = await lineUp(rep, 2027);
      expect(await archiveVariety(rep, { varietyId: standing?.id })).toMatchObject({ ok: true });
      expect(await createVariety(rep, form)).toMatchObject({ ok: true });
    }
    const [last] = await lineUp(rep, 2027);
    expect(await updateVariety(rep, { ...form, code: 'CR 21', varietyId: last?.id, revision: 1 })).toMatchObject({ ok: true });
  });
});
