import { describe, expect, test } from 'vitest';
import { type FreezeStages, freezeLossOnDay } from '@/features/placement/climate/freeze';
import { assess } from '@/features/placement/engine/assess';
import { RELATIVE_YIELD_BY_PLANTING_DAY } from '@/features/placement/engine/factors/planting-date';
import {
  fullSeasonMaturity,
  latePlantingShift,
  lateRuleOf,
  MATURITY_BY_LATITUDE,
  ohioLateBand,
} from '@/features/placement/engine/maturity';
import { along } from '@/features/placement/engine/numbers';
import { dayOfYear } from '@/lib/dates';
import { expectPublished, type PublishedCheck } from '@/tests/support/engine-checks';
import { aField, aSeason, aVariety, someRules } from '@/tests/support/profiles';

const OHIO = 'Ohio Agronomy Guide, Ohio State University Extension (late-planting table)';
const REGIONS = ['northern', 'central', 'southern'] as const;
const OHIO_ROWS = [
  ['06-10', [3.2, 3.8], [3.4, 4.0], [3.6, 4.2]],
  ['06-25', [3.1, 3.5], [3.3, 3.7], [3.5, 3.9]],
  ['07-05', [3.0, 3.3], [3.2, 3.5], [3.4, 3.7]],
] as const;

const ohio: PublishedCheck[] = OHIO_ROWS.flatMap(([day, ...bands]) =>
  bands.flatMap((band, i) =>
    (['from', 'to'] as const).map((end, j) => ({
      name: `${REGIONS[i]} Ohio planted ${day}, RM ${end}`,
      source: OHIO,
      published: band[j] as number,
      computed: () => ohioLateBand(REGIONS[i]!, dayOfYear(`2027-${day}`))![end],
      tolerance: 0,
    })),
  ),
);

/** Zone anchors; the latitude table claims ± 0.4 RM and no more. */
const anchors: PublishedCheck[] = [
  ['Iowa, northern third, early group II', 43.1, [2.0, 2.4], 'De Bruin & Pedersen 2009, ASA abstract 51721'],
  ['Iowa, southern two-thirds, long II and short III', 41.5, [2.5, 3.4], 'De Bruin & Pedersen 2009, ASA abstract 51721'],
  ['Illinois, far north, early group II', 42.3, [2.0, 2.4], 'University of Illinois, soybean variety selection'],
  ['Illinois, far south, early to middle group IV', 37.5, [4.0, 4.6], 'University of Illinois, soybean variety selection'],
  ['North Dakota, south, 0 and early 1', 46.2, [0.0, 1.3], 'NDSU Crop & Pest Report, 16 June 2016'],
  ['North Dakota, zone 0 at its south end', 46.0, [0.5, 0.9], 'NDSU Crop & Pest Report, 16 June 2016'],
  ['Arlington, Wisconsin', 43.3, [2.2, 2.2], 'Mourtzinis & Conley 2017, as cited for Wisconsin'],
  ['Michigan at 45.5° N, adapted', 45.5, [0.06, 1.8], 'Michigan State University Extension 2018'],
  ['Kentucky, groups IV and V', 37.5, [4.0, 5.0], 'University of Kentucky Agronomy Notes 25(2), 1992'],
  ['Eastern Nebraska at the South Dakota line', 43.0, [2.5, 2.5], 'Extension article on the 2017 delineation, Nebraska'],
].map(([name, latitude, published, source]) => ({
  name: name as string,
  source: source as string,
  published: published as [number, number],
  computed: () => fullSeasonMaturity(latitude as number, -93, null),
  tolerance: 0.4,
}));

const keptAway = (distance: number) => {
  const rules = someRules({ zone: { name: 'test', relativeMaturityFrom: 2.75, relativeMaturityTo: 2.75 } });
  const one = assess(aField(), aVariety({ relativeMaturity: 2.75 + distance }), aSeason(), rules);
  const line = one.ledger.find((item) => item.factor === 'maturity-zone');
  return line ? -line.bushels : 0;
};

const rules: PublishedCheck[] = [
  {
    name: 'one whole group earlier than the best costs no more than 10 %',
    source: 'Furseth et al. 2011, Crop Management (Wisconsin, 893 varieties)',
    published: [0, 6.2],
    computed: () => keptAway(-1),
    tolerance: 0,
  },
  {
    name: 'a quarter of a group either way costs under 1 bu (varieties within 1 bu of the best span 0.5)',
    source: 'University of Illinois, soybean variety selection',
    published: [0, 1],
    computed: () => Math.max(keptAway(-0.25), keptAway(0.25)),
    tolerance: 0,
  },
  {
    name: '2.2 degrees of latitude are one maturity group (45.0 to 42.8° N)',
    source: 'Delta Farm Press, Stoneville data',
    published: 1,
    computed: () => fullSeasonMaturity(42.8, -93, null) - fullSeasonMaturity(45, -93, null),
    tolerance: 0.1,
  },
  {
    name: 'Minnesota drops RM by 0.5 when planting slips to June 10',
    source: 'University of Minnesota Extension 2024',
    published: -0.5,
    computed: () => latePlantingShift(lateRuleOf('MN', 45, -95), dayOfYear('2027-06-10')),
    tolerance: 0,
  },
  {
    name: 'Iowa keeps its variety until mid-June',
    source: 'Iowa State University ICM 2007',
    published: 0,
    computed: () => latePlantingShift(lateRuleOf('IA', 42, -93), dayOfYear('2027-06-14')),
    tolerance: 0,
  },
  {
    name: 'a zone line lies further south in the west: 98° W takes an earlier RM than 93° W',
    source: 'Mourtzinis & Conley 2017, Agronomy Journal 109:1397 (size from memory)',
    published: -0.2,
    computed: () => fullSeasonMaturity(43, -98, null) - fullSeasonMaturity(43, -93, null),
    tolerance: 1e-9,
  },
];

const PENN_STATE = 'Penn State Agronomy Guide (relative yield by planting date)';
const planting: PublishedCheck[] = (
  [
    ['05-10', 1, 0, PENN_STATE],
    ['05-20', 0.98, 0, PENN_STATE],
    ['05-30', 0.95, 0, PENN_STATE],
    ['06-10', 0.88, 0, PENN_STATE],
    ['06-20', 0.76, 0, PENN_STATE],
    ['06-15', [0.6, 0.8], 0.03, 'Iowa State ICM 2008, after Whigham 1995–97 (mid-June, north to south)'],
    ['07-04', [0.33, 0.5], 0.01, 'Iowa State ICM 2008, after Whigham 1995–97 (early July)'],
  ] as const
).map(([day, published, tolerance, source]) => ({
  name: `relative yield planted ${day}`,
  source,
  published,
  computed: () => along(RELATIVE_YIELD_BY_PLANTING_DAY, dayOfYear(`2027-${day}`)),
  tolerance,
}));

const STAGES: FreezeStages = { r3: 180, r5: 200, r6: 220, r7: 240, r8: 252 };
const SALIBA = 'Saliba et al. 1982, Crop Science 22:73-78, in Kansas State University MF-2234 (1996)';
const freeze: PublishedCheck[] = (
  [
    ['at R5', 200, 0.65],
    ['at R6', 220, 0.37],
    ['at R7', 240, 0.11],
    ['at R8', 252, 0],
    ['half-way from R5 to R6 (linear)', 210, 0.51],
    ['half-way from R6 to R7 (linear)', 230, 0.24],
  ] as const
).map(([name, day, published]) => ({
  name: `yield lost to a killing freeze ${name}`,
  source: SALIBA,
  published,
  computed: () => freezeLossOnDay(STAGES, day),
  tolerance: 1e-9,
}));

const LATITUDE_TABLE = [
  [49, -0.3],
  [48, 0],
  [47, 0.4],
  [46, 0.8],
  [45, 1.2],
  [44, 1.7],
  [43, 2.1],
  [42, 2.5],
  [41, 2.8],
  [40, 3.2],
  [39, 3.6],
  [38, 4],
  [37, 4.3],
  [36, 4.5],
  [35, 4.7],
  [34, 4.9],
  [33, 5.3],
  [32, 5.9],
  [31, 6.4],
  [41.5, 2.65],
  [38.5, 3.8],
] as const;
const latitudes: PublishedCheck[] = LATITUDE_TABLE.map(([latitude, published]) => ({
  name: `centre RM at ${latitude}° N`,
  source: 'Published delineations (Scott & Aldrich 1970; Zhang et al. 2007; Mourtzinis & Conley 2017), from memory',
  published,
  computed: () => fullSeasonMaturity(latitude, -93, 900),
  tolerance: 1e-9,
}));

const CHECKS = [...ohio, ...anchors, ...rules, ...planting, ...freeze, ...latitudes];

describe('maturity, planting date and freeze against what is published', () => {
  test.each(CHECKS)('$name ($source)', expectPublished);

  test('none was silently dropped', () => {
    expect(CHECKS).toHaveLength(18 + 10 + 6 + 7 + 6 + 21);
    expect(MATURITY_BY_LATITUDE).toHaveLength(19);
    expect(CHECKS.every((check) => check.source.length > 10)).toBe(true);
  });
});
