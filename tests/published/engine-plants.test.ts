import { describe, expect, test } from 'vitest';
import { coefficients } from '@/features/placement/engine/coefficients';
import { cystNematode } from '@/features/placement/engine/factors/cyst-nematode';
import { RELATIVE_YIELD_BY_STAND } from '@/features/placement/engine/factors/emergence';
import {
  closureDays,
  RELATIVE_YIELD_NORTH,
  RELATIVE_YIELD_SOUTH,
  wideRowLoss,
} from '@/features/placement/engine/factors/row-width';
import { standability } from '@/features/placement/engine/factors/standability';
import { suddenDeath } from '@/features/placement/engine/factors/sudden-death';
import { geneSpares } from '@/features/placement/engine/factors/wet-feet';
import { whiteMould } from '@/features/placement/engine/factors/white-mould';
import type { FieldProfile, VarietyProfile } from '@/features/placement/engine/model';
import { along } from '@/features/placement/engine/numbers';
import {
  cystHostClass,
  standabilityFromLodging,
  suddenDeathIndex,
  whiteMouldLossBushels,
  whiteMouldSeverityIndex,
} from '@/features/placement/engine/scales';
import { siteOf } from '@/features/placement/engine/site';
import { expectPublished, type PublishedCheck } from '@/tests/support/engine-checks';
import { aField, aSeason, aVariety, drained, someRules } from '@/tests/support/profiles';

const c = coefficients();
const MAY_8 = 128;
const context = (field: Partial<FieldProfile>, variety: Partial<VarietyProfile>) => ({
  site: siteOf(aField(field), aSeason(), someRules()),
  variety: aVariety(variety),
});

const SYNTHESIS = 'Synthesis of Iowa State, University of Minnesota, Cornell and Ohio State row-width work';
const at = (width: number) => along(RELATIVE_YIELD_NORTH, width);
const rows: PublishedCheck[] = [
  ...(
    [
      [7.5, 1],
      [10, 1],
      [15, 1],
      [20, 0.99],
      [30, [0.94, 0.96]],
      [36, 0.92],
      [38, 0.91],
    ] as const
  ).map(([width, published]) => ({
    name: `relative yield in ${width} in rows, north`,
    source: SYNTHESIS,
    published,
    computed: () => at(width),
    tolerance: 0,
  })),
  {
    name: 'relative yield in 30 in rows south of 38° N',
    source: SYNTHESIS,
    published: 0.97,
    computed: () => along(RELATIVE_YIELD_SOUTH, 30),
    tolerance: 0,
  },
  {
    name: 'bushels that 30 in rows cost on 58 bu',
    source: 'Naeve, University of Minnesota, 3 years, 6 states',
    published: 2.9,
    computed: () => 58 * wideRowLoss(30, 43, MAY_8, c),
    tolerance: 0.05,
  },
  {
    name: 'bushels that 30 in rows and wider cost on 60 bu',
    source: 'Iowa State University soybean production, over 30 trials',
    published: 4,
    computed: () => (60 * (wideRowLoss(30, 43, MAY_8, c) + wideRowLoss(38, 43, MAY_8, c))) / 2,
    tolerance: 0.5,
  },
  {
    name: '15 over 30 in rows in Iowa',
    source: 'De Bruin & Pedersen 2008, Agronomy Journal (from memory)',
    published: 0.04,
    computed: () => at(15) / at(30) - 1,
    tolerance: 0.015,
  },
  {
    name: 'most that differs between 7.5 and 20 in',
    source: 'Iowa State University: no difference among 7.5, 10, 15 and 20 in',
    published: 0,
    computed: () => at(7.5) - at(20),
    tolerance: 0.0101,
  },
  {
    name: 'days to a closed canopy, 7.5 in rows',
    source: 'from memory, medium confidence',
    published: [35, 40],
    computed: () => closureDays(7.5, 'medium', MAY_8),
    tolerance: 0,
  },
  {
    name: 'days to a closed canopy, 15 in rows',
    source: 'from memory, medium confidence',
    published: [45, 50],
    computed: () => closureDays(15, 'medium', MAY_8),
    tolerance: 0,
  },
  {
    name: 'days to a closed canopy, 30 in rows',
    source: 'from memory, medium confidence',
    published: [60, 70],
    computed: () => closureDays(30, 'medium', MAY_8),
    tolerance: 0,
  },
];

const stand = (plants: number) => along(RELATIVE_YIELD_BY_STAND, plants);
const PENN = 'Penn State Agronomy Guide (replanting)';
const stands: PublishedCheck[] = [
  { name: 'relative yield of 100,000 plants', source: PENN, published: 1, computed: () => stand(100000), tolerance: 0 },
  { name: 'relative yield of 70,000 plants', source: PENN, published: [0.9, 0.95], computed: () => stand(70000), tolerance: 0 },
  {
    name: 'relative yield of 46,000 plants (66 of 79 bu)',
    source: PENN,
    published: 0.83,
    computed: () => stand(46000),
    tolerance: 0.006,
  },
  {
    name: 'relative yield of 73,000 plants',
    source: 'Iowa State ICM 2008: over 90 % of the optimum',
    published: [0.9, 1],
    computed: () => stand(73000),
    tolerance: 0,
  },
  {
    name: 'relative yield of 120,000 against 160,000 plants',
    source: 'Casteel, Purdue',
    published: 1,
    computed: () => stand(120000) / stand(160000),
    tolerance: 0,
  },
];

const lodged = standability.kept(
  context({ irrigated: true, yieldGoalBushelsPerAcre: 80, rowWidthInches: 15 }, { standability: 1, height: 'tall' }),
);
const severe = suddenDeath.kept(
  context(
    { suddenDeathHistory: true, drainageShares: drained('poorly'), probeDepthInches: 7, cystEggsPer100cc: 4000 },
    { suddenDeath: 1 },
  ),
);
const mould = whiteMould.kept(
  context({ whiteMouldHistory: true, rowWidthInches: 15, yieldGoalBushelsPerAcre: 65 }, { whiteMould: 1 }),
);
const infested = { cystEggsPer100cc: 25000, cystSourceLastGrown: 'PI 88788' } as const;
const pestRatio = () =>
  cystNematode.kept(context(infested, { cystNematodeSource: 'PI 88788' })).kept.mid /
  cystNematode.kept(context(infested, { cystNematodeSource: 'Peking' })).kept.mid;
const WISCONSIN = 'University of Wisconsin: 0.25–0.50 bu/ac per 1 % mortality';

const pests: PublishedCheck[] = [
  {
    name: 'loss of a crop that lodges at R3 to R5',
    source: 'from memory, medium confidence',
    published: [0.1, 0.3],
    computed: () => 1 - lodged.kept.mid,
    tolerance: 0,
  },
  {
    name: 'sudden death takes 10 to 15 % of the susceptible where it strikes',
    source: 'Soybean research programme and farm press',
    published: [0.1, 0.15],
    computed: () => 1 - severe.kept.mid,
    tolerance: 0.03,
  },
  {
    name: 'sudden death index, incidence 40 %, severity 4.5',
    source: 'Purdue Regional SDS Test: DX = DI × DS / 9',
    published: 20,
    computed: () => suddenDeathIndex(40, 4.5),
    tolerance: 0,
  },
  {
    name: 'sudden death index, incidence 100 %, severity 9',
    source: 'Purdue Regional SDS Test: DX = DI × DS / 9',
    published: 100,
    computed: () => suddenDeathIndex(100, 9),
    tolerance: 0,
  },
  {
    name: 'white mould index of ten plants (4×0, 2×1, 2×2, 2×3)',
    source: 'Grau et al. 1982, Plant Disease 66:506',
    published: 40,
    computed: () => whiteMouldSeverityIndex([0, 0, 0, 0, 1, 1, 2, 2, 3, 3]),
    tolerance: 1e-9,
  },
  {
    name: 'white mould, 12 % dead plants, least loss',
    source: WISCONSIN,
    published: 3,
    computed: () => whiteMouldLossBushels(12).low,
    tolerance: 0,
  },
  {
    name: 'white mould, 12 % dead plants, most loss',
    source: WISCONSIN,
    published: 6,
    computed: () => whiteMouldLossBushels(12).high,
    tolerance: 0,
  },
  {
    name: 'bushels white mould takes of a susceptible variety in a mould field: 20 to 50 % dead',
    source: WISCONSIN,
    published: [5, 12.5],
    computed: () => 65 * (1 - mould.kept.mid),
    tolerance: 0,
  },
  {
    name: 'PI 88788 against Peking where nematodes are bad (58.7 against 73 and 71 bu)',
    source: 'Tylka, Iowa State, south-east Iowa',
    published: 58.7 / 72,
    computed: pestRatio,
    tolerance: 0.03,
  },
  {
    name: 'share that PI 88788 leaves of a susceptible',
    source: 'University of Missouri: 25 % (2005), 56 % (2015), 63 % (2023)',
    published: [0.25, 0.63],
    computed: () => c.cystPi88788Remains,
    tolerance: 0,
  },
  {
    name: 'Rps8 spares more than Rps1k',
    source: 'Sandhu et al. 2005; Midwest usefulness from memory',
    published: [0.05, 1],
    computed: () => geneSpares(['8'], c) - geneSpares(['1k'], c),
    tolerance: 0,
  },
  {
    name: 'Rps1k spares more than Rps1a',
    source: 'Midwest usefulness, from memory',
    published: [0.05, 1],
    computed: () => geneSpares(['1k'], c) - geneSpares(['1a'], c),
    tolerance: 0,
  },
  {
    name: 'standability of a crop almost all erect (lodging 1)',
    source: 'Mississippi Soybean Promotion Board scale; conversion from memory',
    published: 9,
    computed: () => standabilityFromLodging(1),
    tolerance: 0,
  },
  {
    name: 'standability of a crop all down (lodging 5)',
    source: 'Mississippi Soybean Promotion Board scale; conversion from memory',
    published: 1,
    computed: () => standabilityFromLodging(5),
    tolerance: 0,
  },
];

const HOSTS: [number, string][] = [
  [9, 'resistant'],
  [10, 'moderately resistant'],
  [29, 'moderately resistant'],
  [30, 'moderately susceptible'],
  [59, 'moderately susceptible'],
  [60, 'susceptible'],
];

const CHECKS = [...rows, ...stands, ...pests];

describe('plants and pests against what is published', () => {
  test.each(CHECKS)('$name ($source)', expectPublished);

  test.each(HOSTS)('a female index of %d is %s (Schmitt & Shannon 1992, from memory)', (index, words) => {
    expect(cystHostClass(index)).toBe(words);
  });

  test('no row width beats the narrow ones (Iowa State: no study with a gain for wider rows)', () => {
    for (let width = 7; width <= 40; width++) expect(at(width + 1)).toBeLessThanOrEqual(at(width));
  });

  test('narrow rows gain most in the north (Iowa State)', () => {
    expect(wideRowLoss(30, 43, MAY_8, c)).toBeGreaterThan(wideRowLoss(30, 36, MAY_8, c));
  });

  test('narrow rows gain more the later the planting (Ohio State University)', () => {
    expect(wideRowLoss(30, 40, 161, c)).toBeGreaterThan(wideRowLoss(30, 40, MAY_8, c));
  });

  test('the taller the plant, the more it lodges (open Australian data: height and lodging +0.60 to +0.80 in 8 of 8)', () => {
    const loss = (height: VarietyProfile['height']) => 1 - standability.kept(context({}, { height, standability: 4 })).kept.mid;
    expect(loss('tall')).toBeGreaterThan(loss('medium'));
    expect(loss('medium')).toBeGreaterThan(loss('short'));
  });

  test('none was silently dropped', () => {
    expect(CHECKS).toHaveLength(15 + 5 + 14);
    expect(HOSTS).toHaveLength(6);
    expect(CHECKS.every((check) => check.source.length > 10)).toBe(true);
  });
});
