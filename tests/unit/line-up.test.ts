import { describe, expect, test } from 'vitest';
import { COLUMNS, columnOfHeader, formatCell, parseCell, parseRelativeMaturity } from '@/features/line-up/columns';
import { supplyWord } from '@/features/line-up/model';
import { matchHeaders, parseLineUpCsv, readRows } from '@/features/line-up/read-line-up';

const column = (key: string) => COLUMNS.find((one) => one.key === key) as (typeof COLUMNS)[number];

describe('a line-up file', () => {
  test('with the code alone is read; what has no maturity cannot be placed, and is named', () => {
    const outcome = parseLineUpCsv('code,relativeMaturity\nA 1,2.1\nA 2,\n');
    expect(outcome).toMatchObject({ ok: true, value: { withoutMaturity: ['A 2'] } });
    expect(outcome.ok && outcome.value.varieties).toMatchObject([
      { code: 'A 1', relativeMaturity: 2.1, standability: null, tolerances: [], unitsOnHand: null, release: 'full' },
    ]);
  });

  test('reads every column of the command line in its words', () => {
    const outcome = parseLineUpCsv(
      'code,relativeMaturity,height,bushType,standability,emergence,phytophthoraGenes,phytophthora,suddenDeath,brownStemRot,whiteMould,frogeye,ironChlorosis,cystNematodeSource,tolerances,seedsPerLb,germination,unitsOnHand,release\nA 1,2.4,short,upright,8,7,1k;3a,6,5,4,3,2,9,PI 88788,"glyphosate;2,4-D",2800,90,0,limited\n',
    );
    expect(outcome.ok && outcome.value.varieties[0]).toMatchObject({
      height: 'short',
      bushType: 'upright',
      phytophthoraGenes: ['1k', '3a'],
      cystNematodeSource: 'PI 88788',
      tolerances: ['glyphosate', '2,4-D'],
      seedsPerLb: 2800,
      germinationPercent: 90,
      unitsOnHand: 0,
      release: 'limited',
    });
  });

  test('refuses unknown words with the list of known ones, and names the row', () => {
    const outcome = parseLineUpCsv('code,relativeMaturity,bushType\nA 1,2.1,wide\n');
    expect(!outcome.ok && outcome.problems[0]?.message).toBe(
      'Line-up row 2 (A 1): bushType: "wide" is not known. Known are: upright, medium, bushy.',
    );
  });

  test('refuses a rating of 11 and says which end is best', () => {
    const outcome = parseLineUpCsv('code,relativeMaturity,whiteMould\nA 1,2.1,11\n');
    expect(!outcome.ok && outcome.problems[0]?.message).toContain('outside 1–9 (9 is best)');
  });

  test('turns a scale whose best end is 1', () => {
    const rows = [
      ['Variety', 'RM', 'SDS'],
      ['A 1', '2.1', '2'],
    ];
    const outcome = readRows(rows, matchHeaders(rows[0] as string[]), ['suddenDeath']);
    expect(outcome.ok && outcome.value.rows[0]?.traits.suddenDeath).toBe(8);
  });

  test('refuses the same code twice', () => {
    const rows = [
      ['code', 'RM'],
      ['A 1', '2.1'],
      ['a 1', '2.2'],
    ];
    const outcome = readRows(rows, matchHeaders(rows[0] as string[]));
    expect(outcome.ok && outcome.value.refused[0]?.problems).toEqual(['a 1 stands in row 2 already.']);
  });
});

describe('columns', () => {
  test('headers of other people are known by their spellings', () => {
    expect(
      ['Variety Name', 'RM', 'IDC', 'PRR', 'Rps Gene', 'Seeds / lb', 'Germ %'].map(
        (header) => columnOfHeader(header)?.key ?? null,
      ),
    ).toEqual(['code', 'relativeMaturity', 'ironChlorosis', 'phytophthora', 'phytophthoraGenes', 'seedsPerLb', 'germination']);
  });

  test('what a column writes it reads back', () => {
    for (const [key, value] of [
      ['code', 'OP 1'],
      ['relativeMaturity', 2.4],
      ['height', 'tall'],
      ['phytophthoraGenes', ['1k', '3a']],
      ['tolerances', ['glyphosate', '2,4-D']],
      ['standability', 7.5],
      ['unitsOnHand', 1200],
      ['emergence', null],
    ] as const) {
      expect(parseCell(column(key), formatCell(column(key), value))).toEqual({ ok: true, value });
    }
  });

  test('maturity is written as the trade does, early groups too', () => {
    expect([
      parseRelativeMaturity('2.4'),
      parseRelativeMaturity('00.7'),
      parseRelativeMaturity('000.5'),
      parseRelativeMaturity('0.0'),
      parseRelativeMaturity('two'),
    ]).toEqual([2.4, -0.3, -1.5, 0, null]);
  });
});

describe('supply as growers see it', () => {
  test('is a word', () => {
    expect([
      supplyWord(null, 'full'),
      supplyWord(500, 'full'),
      supplyWord(40, 'full'),
      supplyWord(0, 'full'),
      supplyWord(500, 'limited'),
    ]).toEqual(['available', 'available', 'limited', 'sold out', 'limited']);
  });
});
