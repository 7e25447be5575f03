import { describe, expect, test } from 'vitest';
import { coefficients } from '@/features/placement/engine/coefficients';
import { brownStemRot } from '@/features/placement/engine/factors/brown-stem-rot';
import { cystNematode, DAMAGE_BY_PH, eggClass } from '@/features/placement/engine/factors/cyst-nematode';
import { wetFeet } from '@/features/placement/engine/factors/wet-feet';
import { acidityOf, chlorosisScore, RELATIVE_YIELD_BY_PH } from '@/features/placement/engine/ground/acidity';
import { layerOf, SEVERITY_BY_PROBE_INCHES, SEVERITY_BY_PSI } from '@/features/placement/engine/ground/layer';
import { wetnessOf } from '@/features/placement/engine/ground/wetness';
import { DRAINAGE_CLASSES, type FieldProfile } from '@/features/placement/engine/model';
import { along } from '@/features/placement/engine/numbers';
import { siteOf } from '@/features/placement/engine/site';
import { expectPublished, type PublishedCheck } from '@/tests/support/engine-checks';
import { aField, allAtPh, aSeason, aVariety, drained, someRules } from '@/tests/support/profiles';

const c = coefficients();
const site = (changes: Partial<FieldProfile>) => siteOf(aField(changes), aSeason(), someRules());
const relativeYield = (ph: number) => along(RELATIVE_YIELD_BY_PH, ph);

const OHIO = 'Ohio Agricultural Experiment Station Special Circular 53 (1938), from memory';
const MICHIGAN = 'Michigan State University Extension (Staton 2012)';
const TRI_STATE = 'Tri-State Fertilizer Recommendations 2020, mineral soils';
const soilPh: PublishedCheck[] = (
  [
    [4.7, 0.65, 0, OHIO],
    [5.0, 0.79, 0, OHIO],
    [7.5, 0.93, 0, OHIO],
    [6.8, 1, 0.01, OHIO],
    [6.3, 1, 0, `${MICHIGAN}: optimum 6.3–6.5`],
    [6.5, 1, 0, `${MICHIGAN}: optimum 6.3–6.5`],
    [6.0, [0.95, 1], 0, `${MICHIGAN}: performs well 6.0–7.0`],
    [7.0, [0.95, 1], 0, `${MICHIGAN}: performs well 6.0–7.0`],
    [6.1, [0.97, 1], 0, TRI_STATE],
    [6.7, [0.97, 1], 0, TRI_STATE],
  ] as const
).map(([ph, published, tolerance, source]) => ({
  name: `relative yield at pH ${ph}`,
  source,
  published,
  computed: () => relativeYield(ph),
  tolerance,
}));

const susceptibleLoss = (changes: Partial<FieldProfile>) => {
  const kept = cystNematode.kept({ site: site(changes), variety: aVariety({ cystNematodeSource: 'none' }) });
  return 62 * (1 - kept.kept.mid);
};
const GRAU = 'Grau, University of Wisconsin-Madison, 26 September 2001';
const NDSU = 'NDSU thresholds for carbonate and salts, from memory; Goos, NDSU Crop & Pest Report 29 June 2017';
const score = (carbonatePercent: number, electricalConductivity: number) =>
  chlorosisScore({ c, field: aField({ carbonatePercent, electricalConductivity, ironChlorosisHistory: null }) }).score;
const brownStemLoss = (ph: number) =>
  1 -
  brownStemRot.kept({ site: site({ phShares: allAtPh(ph), brownStemRotHistory: true }), variety: aVariety({ brownStemRot: 1 }) })
    .kept.mid;

const pests: PublishedCheck[] = [
  {
    name: 'nematode damage at pH 6.0 is no more than in the low-risk range',
    source: GRAU,
    published: 1,
    computed: () => along(DAMAGE_BY_PH, 6),
    tolerance: 0,
  },
  {
    name: 'nematode damage is low risk to pH 6.5',
    source: GRAU,
    published: 1,
    computed: () => along(DAMAGE_BY_PH, 6.5),
    tolerance: 0,
  },
  {
    name: 'nematode damage has risen by pH 7.5',
    source: GRAU,
    published: [1.3, 2],
    computed: () => along(DAMAGE_BY_PH, 7.5),
    tolerance: 0,
  },
  {
    name: 'a susceptible variety loses 10 to 20 bu/ac to 12,000 eggs at pH 7.0',
    source: `${GRAU}: at 6.5 and over up to 10–20 bu/ac`,
    published: [10, 20],
    computed: () => susceptibleLoss({ cystEggsPer100cc: 12000, phShares: allAtPh(7) }),
    tolerance: 0,
  },
  {
    name: 'much carbonate lowers nematode damage (bushels saved)',
    source: 'Rogovska, Blackmer & Tylka 2005',
    published: [0.5, 20],
    computed: () =>
      susceptibleLoss({ cystEggsPer100cc: 12000, phShares: allAtPh(7.5) }) -
      susceptibleLoss({ cystEggsPer100cc: 12000, phShares: allAtPh(7.5), carbonatePercent: 10 }),
    tolerance: 0,
  },
  {
    name: 'brown stem rot takes more at pH 5.5 than at 6.5 (fraction more)',
    source: GRAU,
    published: [0.005, 0.25],
    computed: () => brownStemLoss(5.5) - brownStemLoss(6.5),
    tolerance: 0,
  },
  {
    name: 'no iron chlorosis at pH 7.0',
    source: 'Goos, NDSU Crop & Pest Report 29 June 2017',
    published: 0,
    computed: () => acidityOf(site({ phShares: allAtPh(7), ironChlorosisHistory: true })).chlorosis,
    tolerance: 0,
  },
  {
    name: 'chlorosis score: carbonate over 5 % is worse than low tests',
    source: NDSU,
    published: [0.5, 3],
    computed: () => score(6, 0.1) - score(1, 0.1),
    tolerance: 0,
  },
  {
    name: 'chlorosis score: salts over 1 dS/m are worse than low tests',
    source: NDSU,
    published: [0.5, 3],
    computed: () => score(1, 1.2) - score(1, 0.1),
    tolerance: 0,
  },
  {
    name: 'chlorosis score: both together are worst',
    source: NDSU,
    published: [0.5, 3],
    computed: () => score(6, 1.2) - score(6, 0.1),
    tolerance: 0,
  },
  {
    name: 'a unit of chlorosis score costs a fifth',
    source: 'Froehlich & Fehr 1981, from memory',
    published: 0.2,
    computed: () => c.chlorosisLossPerScore,
    tolerance: 0,
  },
];

const CORNELL = 'Cornell, Northeast Region CCA Competency Area 4';
const keptTiled = (tiled: boolean) => {
  const worst = aVariety({ phytophthora: 1, phytophthoraGenes: [] });
  return wetFeet.kept({ site: site({ drainageShares: drained('poorly'), tiled, seedTreated: false }), variety: worst }).kept.mid;
};
const ground: PublishedCheck[] = [
  {
    name: '200 psi: roots begin to suffer',
    source: CORNELL,
    published: 0,
    computed: () => along(SEVERITY_BY_PSI, 200),
    tolerance: 0,
  },
  {
    name: '300 psi is a compacted layer',
    source: CORNELL,
    published: [0.4, 1],
    computed: () => layerOf(site({ probeDepthInches: null, penetrometerPsi: 300 })).severity,
    tolerance: 0,
  },
  {
    name: '250 psi already counts',
    source: CORNELL,
    published: [0.1, 0.5],
    computed: () => layerOf(site({ probeDepthInches: null, penetrometerPsi: 250 })).severity,
    tolerance: 0,
  },
  {
    name: 'a probe pushed a foot deep finds no layer',
    source: 'common practice, no source',
    published: 0,
    computed: () => along(SEVERITY_BY_PROBE_INCHES, 12),
    tolerance: 0,
  },
  {
    name: 'tile on poorly drained ground gives 10 to 40 % more',
    source: 'Ohio and Midwest long-term results, from memory, low confidence',
    published: [0.1, 0.4],
    computed: () => keptTiled(true) / keptTiled(false) - 1,
    tolerance: 0.005,
  },
  {
    name: 'Phytophthora takes 5 to 50 % of a susceptible variety on poorly drained ground',
    source: 'Dillon & Phillips 2009',
    published: [0.05, 0.5],
    computed: () => wetnessOf(site({ drainageShares: drained('poorly'), tiled: false })).rot,
    tolerance: 0,
  },
];

const counts: [number, string][] = [
  [1, 'low'],
  [2000, 'low'],
  [2001, 'medium'],
  [12000, 'medium'],
  [12001, 'high'],
];

const CHECKS = [...soilPh, ...pests, ...ground];

describe('soil against what is published', () => {
  test.each(CHECKS)('$name ($source)', expectPublished);

  test.each(counts)('%d eggs per 100 cc are %s (Iowa State, from memory)', (eggs, words) => {
    expect(eggClass(eggs)).toBe(words);
  });

  test('the sweet spot 6.3–6.5 is the best of all pH (common practice; Michigan State University Extension)', () => {
    for (let ph = 4; ph <= 8.5; ph += 0.05) expect(relativeYield(ph)).toBeLessThanOrEqual(relativeYield(6.4));
  });

  test('each drainage class stands wetter than the one before (NRCS Soil Survey Manual ch. 3)', () => {
    const wetness = DRAINAGE_CLASSES.map((one) => wetnessOf(site({ drainageShares: drained(one), tiled: false })));
    for (let i = 1; i < wetness.length; i++) {
      expect(wetness[i]!.water).toBeGreaterThanOrEqual(wetness[i - 1]!.water);
      expect(wetness[i]!.rot).toBeGreaterThanOrEqual(wetness[i - 1]!.rot);
    }
  });

  test('none was silently dropped', () => {
    expect(CHECKS).toHaveLength(10 + 11 + 6);
    expect(counts).toHaveLength(5);
    expect(CHECKS.every((check) => check.source.length > 10)).toBe(true);
  });
});
