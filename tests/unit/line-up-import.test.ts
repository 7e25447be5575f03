import { describe, expect, test } from 'vitest';
import { type ExportRow, lineUpCsv, lineUpXlsx } from '@/features/line-up/export';
import { planLineUp } from '@/features/line-up/import-model';
import type { LineUpVariety, SeedLot } from '@/features/line-up/model';
import { rowsOfFile } from '@/features/line-up/read-file';
import { matchHeaders, readRows } from '@/features/line-up/read-line-up';

/** Varieties and lots here are invented. */
function aVariety(traits: Partial<LineUpVariety> = {}): LineUpVariety {
  return {
    id: 'variety-1',
    season: 2027,
    published: true,
    revision: 3,
    supplyWord: 'available',
    unitsOnHand: 300,
    code: 'CR 21',
    relativeMaturity: 2.1,
    height: 'tall',
    bushType: 'bushy',
    standability: 6,
    emergence: null,
    phytophthoraGenes: ['1k', '3a'],
    phytophthora: 6.5,
    suddenDeath: 5,
    brownStemRot: null,
    whiteMould: 4,
    frogeye: 7,
    stemCanker: null,
    charcoalRot: null,
    ironChlorosis: 8,
    drought: 5,
    cystNematodeSource: 'PI 88788',
    tolerances: ['glyphosate', '2,4-D'],
    release: 'limited',
    note: '=SUM(A1) "wet ground", says Ola\nsecond line',
    ...traits,
  };
}

function aLot(lot: Partial<SeedLot> = {}): SeedLot {
  return {
    id: 'lot-1',
    varietyId: 'variety-1',
    lotNumber: 'A1',
    seedsPerLb: 2800,
    germinationPercent: 92,
    treatment: 'fungicide',
    unitSizeSeeds: 140_000,
    unitsOnHand: 200,
    priceCentsPerUnit: 6350,
    updatedAt: 1,
    ...lot,
  };
}

function planOf(rows: string[][], varieties: LineUpVariety[] = [aVariety()], lots: SeedLot[] = [aLot()]) {
  const read = readRows(
    rows.map((cells, index) => ({ line: index + 1, cells })),
    matchHeaders(rows[0] as string[]),
  );
  if (!read.ok) throw new Error('The file was refused.');
  return planLineUp(read.value, varieties, lots);
}

const changesOf = (plan: ReturnType<typeof planOf>) =>
  plan.plans.map((one) => [one.kind, ...one.changes.map((change) => `${change.label}: ${change.from} → ${change.to}`)]);

describe('what a line-up file would do', () => {
  test('a variety is known by its code, whatever its case, and shown old to new', () => {
    expect(
      changesOf(
        planOf([
          ['Variety', 'RM', 'IDC', 'Traits'],
          ['cr 21', '2.2', '8', 'conventional'],
        ]),
      ),
    ).toEqual([['changed', 'Relative maturity: 2.1 → 2.2', 'Herbicide tolerances: glyphosate;2,4-D → conventional']]);
  });

  test('an empty cell leaves what is kept, and a column left out too', () => {
    const plan = planOf([
      ['Variety', 'RM', 'IDC', 'Release'],
      ['CR 21', '', '', ''],
    ]);
    expect(changesOf(plan)).toEqual([['same']]);
    expect(plan.plans[0]?.traits).toMatchObject({ ironChlorosis: 8, release: 'limited', relativeMaturity: 2.1, code: 'CR 21' });
  });

  test('a sheet of codes and units alone brings the supply up to date: the one lot is meant, none is added', () => {
    expect(
      changesOf(
        planOf([
          ['Variety', 'Units'],
          ['CR 21', '90'],
        ]),
      ),
    ).toEqual([['changed', 'Lot A1, units: 200 → 90']]);
  });

  test('units without a lot number are refused where there are several lots', () => {
    const plan = planOf(
      [
        ['Variety', 'Units'],
        ['CR 21', '90'],
      ],
      [aVariety()],
      [aLot(), aLot({ id: 'lot-2', lotNumber: 'A2' })],
    );
    expect(plan.plans).toEqual([]);
    expect(plan.refused[0]?.problems[0]).toBe('CR 21 has 2 lots (A1, A2). Say which one in a column for the seed lot.');
  });

  test('a new variety needs its maturity; refused rows come in the order of the file', () => {
    const plan = planOf([
      ['Variety', 'RM', 'IDC'],
      ['CR 50', '', '5'],
      ['CR 51', '2.0', '12'],
      ['CR 52', '2.0', '5'],
    ]);
    expect(plan.refused.map((one) => [one.row, one.code])).toEqual([
      [2, 'CR 50'],
      [3, 'CR 51'],
    ]);
    expect(changesOf(plan)).toEqual([['new']]);
  });
});

describe('a line-up sent out', () => {
  const varieties = [
    aVariety(),
    aVariety({ id: 'variety-2', code: '-early', relativeMaturity: -0.3, tolerances: [], phytophthoraGenes: [], note: null }),
    aVariety({ id: 'variety-3', code: 'CR 60', release: 'full', note: 'x'.repeat(900) }),
  ];
  const lots = [aLot(), aLot({ id: 'lot-2', lotNumber: '@A2', treatment: null, unitsOnHand: 100.5, priceCentsPerUnit: null })];
  const rows: ExportRow[] = [
    ...lots.map((lot) => ({ variety: varieties[0] as LineUpVariety, lot })),
    { variety: varieties[1] as LineUpVariety, lot: null },
    { variety: varieties[2] as LineUpVariety, lot: aLot({ id: 'lot-3', varietyId: 'variety-3', seedsPerLb: null }) },
  ];
  const allLots = [...lots, (rows[3] as { lot: SeedLot }).lot];

  test.each(['csv', 'xlsx'] as const)(
    'as %s comes back in with nothing to change, two lots and early groups too',
    async (format) => {
      const bytes = format === 'csv' ? new TextEncoder().encode(lineUpCsv(rows, true)) : await lineUpXlsx(rows, true);
      const read = await rowsOfFile({ name: `line-up.${format}`, bytes });
      if (!read.ok) throw new Error(read.problems[0]?.message);
      const cells = read.value.map((row) => row.cells);
      const known = planOf(cells, varieties, allLots);
      expect(known.refused).toEqual([]);
      expect(changesOf(known)).toEqual([['same'], ['same'], ['same']]);
      const fresh = planOf(cells, [], []);
      expect(fresh.plans.map((plan) => plan.traits)).toMatchObject(
        varieties.map(({ id, season, published, revision, supplyWord, unitsOnHand, ...traits }) => traits),
      );
      expect(fresh.plans.map((plan) => plan.lots.length)).toEqual([2, 0, 1]);
    },
  );

  test('holds no cell that a spreadsheet would take for a formula', () => {
    const text = lineUpCsv(rows, true);
    for (const cell of text.split(/[\r\n,]/)) expect(cell.replace(/^"/, '')).not.toMatch(/^[=+\-@]/);
  });

  test('for a grower has neither units nor prices', async () => {
    expect(lineUpCsv(rows, false)).not.toMatch(/unitsOnHand|priceDollarsPerUnit|63\.5|100\.5/);
    const workbook = await rowsOfFile({ name: 'line-up.xlsx', bytes: await lineUpXlsx(rows, false) });
    expect(JSON.stringify(workbook)).not.toMatch(/unitsOnHand|priceDollarsPerUnit|63\.5|100\.5/);
  });
});
