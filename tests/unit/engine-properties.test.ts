import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { assess } from '@/features/placement/engine/assess';
import { FACTORS } from '@/features/placement/engine/factors/index';
import {
  BUSH_TYPES,
  CYST_SOURCES,
  DRAINAGE_CLASSES,
  type FieldProfile,
  FLOODING_FREQUENCIES,
  HEIGHTS,
  TILLAGES,
  type VarietyProfile,
} from '@/features/placement/engine/model';
import { logDeviationOf } from '@/features/placement/engine/numbers';
import { DRAWS, shocksOf } from '@/features/placement/engine/random';
import { ordered, rank } from '@/features/placement/engine/rank';
import { siteOf } from '@/features/placement/engine/site';
import { withLime, withTile } from '@/features/placement/engine/what-if';
import { aField, aSeason, aVariety, someRules } from '@/tests/support/profiles';

const season = aSeason();
const rules = someRules();

function maybe<T>(arbitrary: fc.Arbitrary<T>): fc.Arbitrary<T | null> {
  return fc.option(arbitrary, { nil: null, freq: 3 });
}

/** Shares that sum to 1, of values drawn from an arbitrary. */
function sharesOf<T>(value: fc.Arbitrary<T>): fc.Arbitrary<{ value: T; share: number }[]> {
  return fc.array(fc.record({ value, weight: fc.integer({ min: 1, max: 9 }) }), { minLength: 1, maxLength: 6 }).map((list) => {
    const total = list.reduce((sum, one) => sum + one.weight, 0);
    return list.map((one) => ({ value: one.value, share: one.weight / total }));
  });
}

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const plantings = fc
  .integer({ min: 0, max: 75 })
  .map((days) => new Date(Date.UTC(2027, 3, 15 + days)).toISOString().slice(0, 10));

const anyField: fc.Arbitrary<FieldProfile> = fc
  .record({
    latitude: number(33, 48),
    state: maybe(fc.constantFrom('IA', 'OH', 'MN', 'NE', 'MS')),
    yieldGoalBushelsPerAcre: maybe(number(25, 95)),
    yieldHistoryBushelsPerAcre: fc.array(number(20, 90), { maxLength: 6 }),
    rowWidthInches: maybe(number(6, 40)),
    plantingDate: maybe(plantings),
    populationSeedsPerAcre: maybe(number(0, 240000)),
    seedTreated: maybe(fc.boolean()),
    tillage: maybe(fc.constantFrom(...TILLAGES)),
    irrigated: maybe(fc.boolean()),
    lastCrop: maybe(fc.constantFrom('corn', 'soybean', 'wheat')),
    soybeanYearsOfLastFour: maybe(fc.integer({ min: 0, max: 4 })),
    mustBeOffBy: maybe(fc.constantFrom('2027-09-15', '2027-10-01')),
    drainageShares: maybe(
      sharesOf(fc.constantFrom(...DRAINAGE_CLASSES)).map((list) => list.map((one) => ({ class: one.value, share: one.share }))),
    ),
    tiled: maybe(fc.boolean()),
    floodingFrequency: maybe(fc.constantFrom(...FLOODING_FREQUENCIES)),
    availableWaterInches: maybe(number(1, 14)),
    probeDepthInches: maybe(number(1, 20)),
    penetrometerPsi: maybe(number(50, 600)),
    phShares: maybe(sharesOf(number(4.2, 8.6))),
    carbonatePercent: maybe(number(0, 20)),
    electricalConductivity: maybe(number(0, 3)),
    cystEggsPer100cc: maybe(number(0, 40000)),
    cystSourceLastGrown: maybe(fc.constantFrom(...CYST_SOURCES)),
    whiteMouldHistory: maybe(fc.boolean()),
    suddenDeathHistory: maybe(fc.boolean()),
    brownStemRotHistory: maybe(fc.boolean()),
    frogeyeHistory: maybe(fc.boolean()),
    ironChlorosisHistory: maybe(fc.boolean()),
    crustingSoil: maybe(fc.boolean()),
  })
  .map((facts) => aField(facts));

const RATINGS = [
  'standability',
  'emergence',
  'phytophthora',
  'suddenDeath',
  'brownStemRot',
  'whiteMould',
  'frogeye',
  'stemCanker',
  'charcoalRot',
  'ironChlorosis',
  'drought',
] as const;
const rating = maybe(number(1, 9));

const anyVariety: fc.Arbitrary<VarietyProfile> = fc
  .record({
    relativeMaturity: number(0, 5.5),
    height: maybe(fc.constantFrom(...HEIGHTS)),
    bushType: maybe(fc.constantFrom(...BUSH_TYPES)),
    phytophthoraGenes: fc.subarray(['1a', '1c', '1k', '3a', '8']),
    cystNematodeSource: maybe(fc.constantFrom(...CYST_SOURCES)),
    germinationPercent: maybe(number(0, 100)),
    trialAdvantage: number(-0.1, 0.1),
    trialAdvantageStandardError: number(0, 0.05),
    ...(Object.fromEntries(RATINGS.map((name) => [name, rating])) as Record<(typeof RATINGS)[number], typeof rating>),
  })
  .map((traits) => aVariety(traits));

const anyLineUp = fc
  .array(anyVariety, { minLength: 1, maxLength: 8 })
  .map((list) => list.map((one, i) => ({ ...one, id: `v${i}`, code: `V ${i}` })));

const expected = (field: FieldProfile, variety: VarietyProfile) => assess(field, variety, season, rules).expected;
const TINY = 1e-9;

describe('whatever the field and the variety', () => {
  test('potential, ledger, gathered sum and trials add up to what is expected', () => {
    fc.assert(
      fc.property(anyField, anyVariety, (field, variety) => {
        const one = assess(field, variety, season, rules);
        const lines = one.ledger.reduce((sum, line) => sum + line.bushels, 0);
        expect(Math.abs(one.potential + lines + one.gatheredBushels + one.trialBushels - one.expected)).toBeLessThan(1e-9);
      }),
    );
  });

  test("a line's field part and match part add up to the line, and neither is a gain", () => {
    fc.assert(
      fc.property(anyField, anyVariety, (field, variety) => {
        for (const line of assess(field, variety, season, rules).ledger) {
          expect(line.fieldBushels + line.matchBushels).toBeCloseTo(line.bushels, 9);
          expect(line.fieldBushels).toBeLessThanOrEqual(TINY);
          expect(line.matchBushels).toBeLessThanOrEqual(TINY);
        }
      }),
    );
  });

  test('each factor keeps field × match, with its 10th percentile under and its 90th over the middle', () => {
    fc.assert(
      fc.property(anyField, anyVariety, (field, variety) => {
        const site = siteOf(field, season, rules);
        for (const factor of FACTORS) {
          const one = factor.kept({ site, variety });
          expect(one.kept.mid).toBeCloseTo(one.field.mid * one.match.mid, 12);
          for (const { low, mid, high } of [one.kept, one.field, one.match]) {
            expect(low > 0 && low <= mid && mid <= high && high <= 1 + TINY, factor.id).toBe(true);
          }
          const ofMatch = Math.hypot(one.sharedLogSlope, one.ownLogDeviation);
          expect(logDeviationOf(one.match)).toBeCloseTo(ofMatch, 9);
          for (const question of one.asks) expect(question.logDeviation).toBeGreaterThanOrEqual(0);
        }
      }),
    );
  });

  test('hold is what working out every draw in full gives', () => {
    fc.assert(
      fc.property(anyField, anyLineUp, (field, lineUp) => {
        const { picks } = ordered(siteOf(field, season, rules), lineUp);
        const shared = FACTORS.map((factor) => shocksOf(`factor ${factor.id}`));
        const wins = picks.map(() => 0);
        for (let draw = 0; draw < DRAWS; draw++) {
          const scores = picks.map((one) => {
            const own = one.ownLogDeviation * shocksOf(`variety ${one.variety.id}`)[draw]!;
            const moved = shared.reduce((sum, shocks, f) => sum + one.slopes[f]! * shocks[draw]!, 0);
            return Math.log(one.assessment.expected) + own + moved;
          });
          const winner = scores.indexOf(Math.max(...scores));
          wins[winner] = wins[winner]! + 1;
        }
        const hold = rank(field, lineUp, season, rules).picks.map((one) => one.hold * DRAWS);
        // A draw in which two come out even to the last digit may fall either way.
        hold.forEach((count, i) => void expect(Math.abs(count - wins[i]!)).toBeLessThanOrEqual(1));
      }),
      { numRuns: 25 },
    );
  });

  test('the band holds the expected yield, and every number is finite', () => {
    fc.assert(
      fc.property(anyField, anyVariety, (field, variety) => {
        const one = assess(field, variety, season, rules);
        expect(one.low).toBeLessThanOrEqual(one.expected);
        expect(one.high).toBeGreaterThanOrEqual(one.expected);
        for (const value of [one.expected, one.low, one.high, one.fieldLogDeviation, one.varietyLogDeviation]) {
          expect(Number.isFinite(value)).toBe(true);
        }
        expect(one.low).toBeGreaterThan(0);
      }),
    );
  });

  test.each(RATINGS)('a better %s rating never lowers the expected yield', (name) => {
    fc.assert(
      fc.property(anyField, anyVariety, number(1, 9), number(1, 9), (field, variety, a, b) => {
        const worse = expected(field, { ...variety, [name]: Math.min(a, b) });
        const better = expected(field, { ...variety, [name]: Math.max(a, b) });
        expect(better).toBeGreaterThanOrEqual(worse - TINY);
      }),
      { numRuns: 60 },
    );
  });

  test.each(RATINGS)('a %s rating that is not known counts as a 5', (name) => {
    fc.assert(
      fc.property(anyField, anyVariety, (field, variety) => {
        expect(expected(field, { ...variety, [name]: null })).toBeCloseTo(expected(field, { ...variety, [name]: 5 }), 9);
      }),
      { numRuns: 20 },
    );
  });

  test('a rating that is not known never narrows the band', () => {
    fc.assert(
      fc.property(anyField, anyVariety, fc.constantFrom(...RATINGS), (field, variety, name) => {
        const known = assess(field, { ...variety, [name]: 5 }, season, rules);
        const unknown = assess(field, { ...variety, [name]: null }, season, rules);
        expect(unknown.varietyLogDeviation).toBeGreaterThanOrEqual(known.varietyLogDeviation - TINY);
      }),
    );
  });

  test('more lime never hurts below pH 6.3', () => {
    fc.assert(
      fc.property(
        anyField,
        anyVariety,
        sharesOf(number(4.2, 8.6)),
        number(4.2, 6.3),
        number(4.2, 6.3),
        (field, variety, phShares, a, b) => {
          const sour = { ...field, phShares };
          const less = withLime(sour, Math.min(a, b));
          const more = withLime(sour, Math.max(a, b));
          expect(expected(more, variety)).toBeGreaterThanOrEqual(expected(less, variety) - TINY);
        },
      ),
    );
  });

  test('tile never lowers the expected yield, and never takes all of wet feet away', () => {
    fc.assert(
      fc.property(anyField, anyVariety, (field, variety) => {
        const without = expected({ ...field, tiled: false }, variety);
        expect(expected(withTile(field), variety)).toBeGreaterThanOrEqual(without - TINY);
      }),
    );
  });

  test('the order of the line-up changes nothing', () => {
    fc.assert(
      fc.property(anyField, anyLineUp, (field, lineUp) => {
        expect(rank(field, lineUp.toReversed(), season, rules)).toEqual(rank(field, lineUp, season, rules));
      }),
      { numRuns: 40 },
    );
  });

  test('the same inputs give the same bytes, and survive being stored', () => {
    fc.assert(
      fc.property(anyField, anyLineUp, (field, lineUp) => {
        const once = JSON.stringify(rank(field, lineUp, season, rules));
        expect(JSON.stringify(rank(structuredClone(field), structuredClone(lineUp), season, rules))).toBe(once);
        expect(JSON.parse(once)).toEqual(rank(field, lineUp, season, rules));
      }),
      { numRuns: 30 },
    );
  });

  test('holds are shares of one whole, and picks stand best first', () => {
    fc.assert(
      fc.property(anyField, anyLineUp, (field, lineUp) => {
        const { picks } = rank(field, lineUp, season, rules);
        const sum = picks.reduce((total, one) => total + one.hold, 0);
        expect(sum).toBeCloseTo(1, 9);
        for (let i = 1; i < picks.length; i++) expect(picks[i]!.expected).toBeLessThanOrEqual(picks[i - 1]!.expected);
      }),
      { numRuns: 40 },
    );
  });

  test('assessing one variety gives what ranking all of them gives', () => {
    fc.assert(
      fc.property(anyField, anyLineUp, (field, lineUp) => {
        for (const { hold, ...pick } of rank(field, lineUp, season, rules).picks) {
          expect(hold).toBeGreaterThanOrEqual(0);
          expect(assess(field, lineUp.find((one) => one.id === pick.varietyId)!, season, rules)).toEqual(pick);
        }
      }),
      { numRuns: 20 },
    );
  });

  test('no remedy is worth less than nothing, nor covers more than the field', () => {
    fc.assert(
      fc.property(anyField, anyLineUp, (field, lineUp) => {
        for (const fix of rank(field, lineUp, season, rules).fixFirst) {
          expect(fix.worthBushelsPerAcre).toBeGreaterThan(0);
          expect(fix.acres).toBeLessThanOrEqual(field.areaAcres + 1e-9);
        }
      }),
      { numRuns: 40 },
    );
  });

  test('no answer narrows a band by less than nothing or by more than its width', () => {
    fc.assert(
      fc.property(anyField, anyLineUp, (field, lineUp) => {
        const { questions, picks } = rank(field, lineUp, season, rules);
        const width = picks[0]!.high - picks[0]!.low;
        for (const question of questions) {
          expect(question.narrowsBushels).toBeGreaterThanOrEqual(0);
          expect(question.narrowsBushels).toBeLessThanOrEqual(width);
        }
      }),
      { numRuns: 40 },
    );
  });
});
