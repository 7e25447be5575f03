import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { formatCell, parseCell, parseRelativeMaturity } from '@/features/line-up/cells';
import { COLUMNS, columnOfHeader } from '@/features/line-up/columns';
import { supplyWord } from '@/features/line-up/model';
import { fromHeader, matchHeaders, parseLineUpCsv, readRows } from '@/features/line-up/read-line-up';
import { lotSchema, varietySchema } from '@/features/line-up/schemas';

const column = (key: string) => COLUMNS.find((one) => one.key === key) as (typeof COLUMNS)[number];
const sheet = (...rows: string[][]) => rows.map((cells, index) => ({ line: index + 1, cells }));

function read(...rows: string[][]) {
  const outcome = readRows(sheet(...rows), matchHeaders(rows[0] as string[]));
  if (!outcome.ok) throw new Error('The file was refused.');
  return outcome.value;
}

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

  test('names the line of the file, blank lines counted', () => {
    const outcome = parseLineUpCsv('code,relativeMaturity\n\nA 1,2.1\n\nA 2,late\n');
    expect(!outcome.ok && outcome.problems[0]?.message).toContain('Line-up row 5 (A 2)');
  });

  test('may have titles above its header', () => {
    const rows = sheet(['Fall line-up', ''], ['printed in October', ''], ['Variety', 'RM'], ['A 1', '2.1']);
    expect(fromHeader(rows)[0]?.cells).toEqual(['Variety', 'RM']);
    expect(fromHeader(sheet(['seed'], ['A 1']))).toHaveLength(2);
  });

  test('turns a scale whose best end is 1, ratings only', () => {
    const rows = sheet(['Variety', 'RM', 'SDS'], ['A 1', '2.1', '2']);
    const outcome = readRows(rows, matchHeaders(rows[0]?.cells as string[]), ['suddenDeath', 'relativeMaturity']);
    expect(outcome.ok && outcome.value.rows[0]?.traits).toMatchObject({ suddenDeath: 8, relativeMaturity: 2.1 });
  });
});

describe('two rows of one variety', () => {
  test('are two lots of it; the units are those of both, the seed that of the first lot with units', () => {
    const outcome = parseLineUpCsv(
      'code,relativeMaturity,lot,units,seedsPerLb\nA 1,2.1,X1,0,2700\nA 1,2.1,X2,40,2800\na 1,,X3,10,2900\n',
    );
    expect(outcome.ok && outcome.value.varieties).toMatchObject([{ code: 'A 1', unitsOnHand: 50, seedsPerLb: 2800 }]);
  });

  test('without lot numbers are refused: nobody can tell which is right', () => {
    expect(read(['code', 'RM'], ['A 1', '2.1'], ['a 1', '2.1']).refused[0]?.problems[0]).toContain('stands in row 2 already');
    expect(read(['code', 'RM', 'lot'], ['A 1', '2.1', 'X'], ['A 1', '', 'x']).refused[0]?.problems[0]).toContain('its lot x too');
  });

  test('are refused when they say different things of the variety', () => {
    const { rows, refused } = read(['code', 'RM', 'lot'], ['A 1', '2.1', 'X1'], ['A 1', '2.2', 'X2']);
    expect(rows[0]?.lots).toHaveLength(1);
    expect(refused).toEqual([{ row: 3, code: 'A 1', problems: ['A 1 stands in row 2 with another relativeMaturity.'] }]);
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

  test('no spelling means two columns', () => {
    const spellings = COLUMNS.flatMap((one) => [one.header.toLowerCase(), ...one.aliases]);
    expect(spellings.filter((one, index) => spellings.indexOf(one) !== index)).toEqual([]);
  });

  test('every value a column may hold reads back from what it writes', () => {
    for (const one of COLUMNS) {
      fc.assert(
        fc.property(valuesOf(one), (value) => {
          expect(parseCell(one, formatCell(one, value))).toEqual({ ok: true, value });
        }),
        { numRuns: 60, seed: 2027 },
      );
    }
  });

  test('maturity is written as the trade does, early groups too', () => {
    expect(['2.4', '00.7', '000.5', '0.0', 'two', '11', '00', '000'].map(parseRelativeMaturity)).toEqual([
      2.4,
      -0.3,
      -1.5,
      0,
      null,
      null,
      -1,
      -2,
    ]);
    expect([2.4, 2, -0.3, -1.5, 0, -1, -2].map((value) => formatCell(column('relativeMaturity'), value))).toEqual([
      '2.4',
      '2.0',
      '00.7',
      '000.5',
      '0.0',
      '00.0',
      '000.0',
    ]);
  });

  test('"2,4-D" in a list with commas is one tolerance', () => {
    expect(parseCell(column('tolerances'), 'glyphosate, 2,4-D, glufosinate')).toEqual({
      ok: true,
      value: ['glyphosate', '2,4-D', 'glufosinate'],
    });
  });
});

/** Values a column may hold in the line-up. */
function valuesOf({ kind, words, range, key }: (typeof COLUMNS)[number]): fc.Arbitrary<unknown> {
  switch (kind) {
    case 'maturity':
      return fc.integer({ min: -20, max: 100 }).map((tenths) => tenths / 10);
    case 'rating':
      return fc.option(fc.integer({ min: 10, max: 90 }).map((tenths) => tenths / 10));
    case 'choice':
      return fc.option(fc.constantFrom(...(words as string[])));
    case 'list':
      return fc.subarray([...(words as string[])]);
    case 'genes':
      return fc.uniqueArray(fc.constantFrom('1a', '1c', '1k', '3a', '6', '8', '11'), { maxLength: 3 });
    case 'number':
      return fc.option(fc.integer({ min: range?.[0] ?? 0, max: range?.[1] ?? 10 }));
    default:
      return fc
        .string({ minLength: 1, maxLength: key === 'code' ? 40 : 60 })
        .map((text) => `x${text}y`.slice(0, 40))
        .filter((text) => text === text.trim());
  }
}

describe('what a form may say', () => {
  const form = {
    ...Object.fromEntries(COLUMNS.filter((one) => !one.ofLot).map((one) => [one.key, ''])),
    code: 'CR 1',
    relativeMaturity: '2.4',
    tolerances: [],
    release: 'full',
    published: true,
  };

  test('an empty box is not rated, and a maturity may be an early group', () => {
    expect(varietySchema.parse({ ...form, relativeMaturity: '00.7' })).toMatchObject({
      relativeMaturity: -0.3,
      standability: null,
      height: null,
      phytophthoraGenes: [],
    });
  });

  test('each wrong box gets its own words', () => {
    const outcome = varietySchema.safeParse({
      ...form,
      code: '',
      relativeMaturity: 'late',
      whiteMould: '10',
      phytophthoraGenes: 'abc',
    });
    expect(Object.fromEntries(outcome.error?.issues.map((issue) => [issue.path.join('.'), issue.message]) ?? [])).toEqual({
      code: 'Write the code.',
      relativeMaturity: 'Write a maturity like 2.4 (early groups like 00.7).',
      whiteMould: 'Ratings run from 1 to 9; 9 is best.',
      phytophthoraGenes: 'phytophthoraGenes: "abc" is not a gene. Write genes like 1k or 3a, with ; between them.',
    });
  });

  test('a lot has no negative units, and its empty price stays unknown', () => {
    const lot = { varietyId: 'v', lotNumber: 'A1', unitSizeSeeds: '140000', unitsOnHand: '-1', priceDollarsPerUnit: '' };
    expect(lotSchema.safeParse(lot).error?.issues[0]?.message).toBe('Units cannot be negative.');
    expect(lotSchema.parse({ ...lot, unitsOnHand: '3' })).toMatchObject({ priceDollarsPerUnit: null, seedsPerLb: null });
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
