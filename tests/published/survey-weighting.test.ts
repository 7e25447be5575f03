import { describe, expect, test } from 'vitest';
import { columnOrders, splitBars, tableRows } from '@/features/soil/survey/tables';
import { componentWeighted, depthWeighted } from '@/features/soil/survey/weighting';

/**
 * SSURGO: map unit → component → horizon; a property of the top 30 cm is the mean over horizons by thickness, then over
 * components by percent of the map unit (NRCS, "SSURGO Metadata – Table Column Descriptions" for the columns; the weighting is
 * *common practice, no source*). Numbers are worked out by hand beside each row.
 */
const BY_DEPTH: { horizons: [number, number, number | null][]; from: number; to: number; mean: number | null; why: string }[] = [
  {
    horizons: [
      [0, 20, 6],
      [20, 50, 7],
    ],
    from: 0,
    to: 30,
    mean: 6.3333,
    why: '(20×6.0 + 10×7.0)/30',
  },
  {
    horizons: [
      [0, 18, 5.8],
      [18, 60, 6.4],
      [60, 152, 7.9],
    ],
    from: 0,
    to: 30,
    mean: 6.04,
    why: '(18×5.8 + 12×6.4)/30',
  },
  {
    horizons: [
      [0, 20, null],
      [20, 50, 7],
    ],
    from: 0,
    to: 30,
    mean: 7,
    why: 'a horizon without a value is left out',
  },
  { horizons: [[0, 10, 6]], from: 0, to: 30, mean: 6, why: 'a shallow soil has what it has' },
  { horizons: [[40, 90, 6]], from: 0, to: 30, mean: null, why: 'nothing above 30 cm' },
  { horizons: [], from: 0, to: 30, mean: null, why: 'no horizons' },
];

describe('horizons weighted by depth', () => {
  test.each(BY_DEPTH)('$why', ({ horizons, from, to, mean }) => {
    const value = depthWeighted(
      horizons.map(([topCm, bottomCm, one]) => ({ topCm, bottomCm, value: one })),
      from,
      to,
    );
    if (mean === null) expect(value).toBeNull();
    else expect(value).toBeCloseTo(mean, 4);
  });

  test('no row was dropped', () => expect(BY_DEPTH).toHaveLength(6));
});

describe('components weighted by percent', () => {
  test('85 % at 6.0 and 15 % at 7.0 make 6.15', () => {
    expect(
      componentWeighted([
        { percent: 85, value: 6 },
        { percent: 15, value: 7 },
      ]),
    ).toBeCloseTo(6.15, 10);
  });
  test('a component without a value is left out: 85 % at 6.0 alone is 6.0', () => {
    expect(
      componentWeighted([
        { percent: 85, value: 6 },
        { percent: 15, value: null },
      ]),
    ).toBe(6);
    expect(componentWeighted([{ percent: 0, value: 6 }])).toBeNull();
  });
});

describe('the tables as delivered', () => {
  // Order of a horizon's 171 columns: R. Hijmans, r-gis (2011), after the NRCS description; that of muaggatt: NRCS.
  test('a horizon’s pH stands in column 136 and its carbonate in column 115 of 171', () => {
    const cells = Array.from({ length: 171 }, (_, at) => String(at));
    expect(tableRows('chorizon', cells.join('|'), new Map(), () => true)).toEqual([
      { hzdept_r: '6', hzdepb_r: '9', caco3_r: '114', ph1to1h2o_r: '135', cokey: '169' },
    ]);
  });

  test('an area that says its own order of columns is believed', () => {
    const orders = columnOrders('"mapunit"|1|"mukey"|"Key"\r\n"mapunit"|2|"musym"|"Symbol"\r\n"mapunit"|3|"muname"|"Name"\r\n');
    expect(tableRows('mapunit', '"77"|"55"|"Nicollet | loam"', orders, () => true)).toEqual([
      { mukey: '77', musym: '55', muname: 'Nicollet | loam' },
    ]);
  });

  test('bars and doubled quotation marks inside text stay text', () => {
    expect(splitBars('1|"a|b"|"say ""so"""||2')).toEqual(['1', 'a|b', 'say "so"', '', '2']);
  });
});
