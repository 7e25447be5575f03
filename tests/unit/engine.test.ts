import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { assess } from '@/features/placement/engine/assess';
import { COEFFICIENT_NAMES, COEFFICIENTS, coefficientProblem, coefficients } from '@/features/placement/engine/coefficients';
import { FACTORS } from '@/features/placement/engine/factors/index';
import { sourAcresInWords } from '@/features/placement/engine/fix-first';
import { keptSpread, logDeviationOf } from '@/features/placement/engine/numbers';
import { potentialOf } from '@/features/placement/engine/potential';
import { DRAWS, normalQuantile, shocksOf } from '@/features/placement/engine/random';
import { rank } from '@/features/placement/engine/rank';
import { holdWords } from '@/features/placement/engine/uncertainty';
import { withFacts, withLime } from '@/features/placement/engine/what-if';
import { aField, aLineUp, allAtPh, anUnknownField, aSeason, aVariety, drained, someRules } from '@/tests/support/profiles';

const season = aSeason();
const rules = someRules();
const c = coefficients();

describe('what the field can carry', () => {
  test('the goal goes before the history, the history before the state', () => {
    const years = [50, 60, 40, 70];
    expect(potentialOf(aField({ yieldGoalBushelsPerAcre: 66, yieldHistoryBushelsPerAcre: years }), c)).toMatchObject({
      bushelsPerAcre: 66,
      source: 'goal',
    });
    // The better half of the years: 70 and 60.
    expect(potentialOf(aField({ yieldGoalBushelsPerAcre: null, yieldHistoryBushelsPerAcre: years }), c)).toMatchObject({
      bushelsPerAcre: 65,
      source: 'history',
    });
    expect(potentialOf(anUnknownField(), c)).toMatchObject({ source: 'default' });
  });

  test('the less is known, the wider it is, and a default asks for the goal', () => {
    const goal = potentialOf(aField(), c);
    const history = potentialOf(aField({ yieldGoalBushelsPerAcre: null, yieldHistoryBushelsPerAcre: [50, 60, 55] }), c);
    const fallback = potentialOf(anUnknownField(), c);
    expect(goal.logDeviation).toBeLessThan(history.logDeviation);
    expect(history.logDeviation).toBeLessThan(fallback.logDeviation);
    expect(fallback.asks.map((one) => one.fact)).toEqual(['yieldGoalBushelsPerAcre']);
  });
});

describe('the table of coefficients', () => {
  test.each(COEFFICIENT_NAMES)('%s lies in its range and says what it does and why', (name) => {
    const entry = COEFFICIENTS[name];
    expect(entry.value).toBeGreaterThanOrEqual(entry.low);
    expect(entry.value).toBeLessThanOrEqual(entry.high);
    expect(entry.does.length).toBeGreaterThan(15);
    expect(entry.reason.length).toBeGreaterThan(15);
    expect(entry.unit).not.toBe('');
  });

  test('an unknown name or a value out of range is refused with the range', () => {
    expect(() => coefficients({ moonlight: 1 })).toThrow('There is no coefficient called moonlight.');
    expect(() => coefficients({ maturityEarlyLoss: 3 })).toThrow('0.03 to 0.2');
    expect(coefficientProblem('maturityEarlyLoss', Number.NaN)).toContain('must be a number');
    expect(coefficientProblem('maturityEarlyLoss', 0.12)).toBeNull();
    expect(coefficientProblem('toString', 1)).not.toBeNull();
  });

  test('a dealership’s own value changes what is expected', () => {
    const early = aVariety({ relativeMaturity: 1.5 });
    const own = someRules({ overrides: { maturityEarlyLoss: 0.2 } });
    expect(assess(aField(), early, season, own).expected).toBeLessThan(assess(aField(), early, season, rules).expected);
  });

  test('every coefficient is used somewhere in the engine', () => {
    const files = ['site', 'potential', 'evaluate', 'fix-first', 'rated', 'disease', 'explain'].map((name) => `${name}.ts`);
    const folders = {
      factors: FACTORS.map((factor) => `factors/${factor.id}.ts`),
      ground: ['acidity', 'dryness', 'layer', 'wetness'].map((name) => `ground/${name}.ts`),
    };
    const text = [...files, ...folders.factors, ...folders.ground]
      .map((file) => readFileSync(`features/placement/engine/${file}`, 'utf8'))
      .join('\n');
    expect(COEFFICIENT_NAMES.filter((name) => !text.includes(`c.${name}`))).toEqual([]);
  });
});

describe('the factors', () => {
  test('stand in ledger order, each with its own id, label and colour', () => {
    expect(FACTORS).toHaveLength(20);
    for (const key of ['id', 'label', 'color'] as const) {
      expect(new Set(FACTORS.map((factor) => factor[key])).size).toBe(20);
    }
    expect(FACTORS[0]?.id).toBe('maturity-zone');
    expect(FACTORS.at(-1)?.id).toBe('weed-programme');
  });

  test('every line of a ledger has a reason and a source', () => {
    const hard = aField({ phShares: allAtPh(5.4), drainageShares: drained('poorly'), tiled: null, probeDepthInches: 5 });
    for (const field of [hard, anUnknownField()]) {
      for (const line of assess(field, aVariety(), season, rules).ledger) {
        expect(line.reason.length).toBeGreaterThan(5);
        expect(line.source.length).toBeGreaterThan(10);
      }
    }
  });
});

describe('stops', () => {
  const lineUp = [
    aVariety({ code: 'GOOD', tolerances: ['glyphosate'] }),
    aVariety({ code: 'PLAIN' }),
    aVariety({ code: 'GONE', tolerances: ['glyphosate'], unitsOnHand: 0 }),
    aVariety({ code: 'TEST', tolerances: ['glyphosate'], release: 'test' }),
  ];

  test('a stopped variety is listed with its reason and never hidden', () => {
    const { picks, stopped } = rank(aField({ weedProgramme: ['glyphosate'] }), lineUp, season, rules);
    expect(picks.map((one) => one.code)).toEqual(['GOOD']);
    expect(stopped.map(({ code, factor, reason }) => [code, factor, reason])).toEqual([
      ['GONE', 'supply', 'sold out'],
      ['PLAIN', 'weed-programme', "not tolerant to glyphosate, which this field's weed programme needs"],
      ['TEST', 'release', 'test release, not placed'],
    ]);
  });

  test('two that come out even stand by code', () => {
    const even = [aVariety({ code: 'B', id: '1' }), aVariety({ code: 'A', id: '2' })];
    expect(rank(aField(), even, season, rules).picks.map((one) => one.code)).toEqual(['A', 'B']);
  });

  test('supply that nobody has stated stops nothing', () => {
    expect(rank(aField(), [aVariety({ unitsOnHand: null })], season, rules).stopped).toEqual([]);
  });

  test('with every variety stopped the field still has its remedies and questions', () => {
    const field = aField({ weedProgramme: ['dicamba'], phShares: allAtPh(5.6), tiled: null, drainageShares: drained('poorly') });
    const ranking = rank(field, lineUp, season, rules);
    expect(ranking.picks).toEqual([]);
    expect(ranking.stopped).toHaveLength(4);
    expect(ranking.fixFirst.map((one) => one.factor)).toEqual(['soil-ph', 'wet-feet']);
    expect(ranking.questions.map((one) => one.fact)).toContain('tiled');
  });
});

describe('fix first', () => {
  const sour = aField({
    areaAcres: 80,
    phShares: [
      { value: 5.3, share: 0.1 },
      { value: 5.8, share: 0.2 },
      { value: 6.4, share: 0.7 },
    ],
    limeTonsPerAcre: { tons: 1.8, method: 'Sikora buffer', source: 'State extension bulletin' },
  });

  test('lime: the acres, the bands, the rate, the worth there and the cost', () => {
    const [fix] = rank(sour, [aVariety()], season, rules).fixFirst;
    expect(fix?.acres).toBeCloseTo(24, 6);
    expect(fix?.remedy).toMatch(
      /^Lime the 24\.0 ac below pH 6\.0 \(8\.0 ac from 5\.0 to 5\.5 and 16\.0 ac from 5\.5 to 6\.0\): 1\.8 t\/ac by Sikora buffer, worth about \d\.\d bu\/ac there\.$/,
    );
    expect(fix?.costDollarsPerAcre).toBeCloseTo(1.8 * 35, 6);
    expect(fix?.caution).toContain('certified crop adviser');
    // What it is worth is what the engine says of the limed field, spread over the limed acres.
    const gain =
      assess(withLime(sour, 6.5, 6), aVariety(), season, rules).expected - assess(sour, aVariety(), season, rules).expected;
    expect(fix?.worthBushelsPerAcre).toBeCloseTo(gain / 0.3, 9);
  });

  test('lime without a buffer test names no rate and no cost', () => {
    const [fix] = rank({ ...sour, limeTonsPerAcre: null }, [aVariety()], season, rules).fixFirst;
    expect(fix?.remedy).toContain('rate unknown, take a buffer test');
    expect(fix?.costDollarsPerAcre).toBeNull();
  });

  test('a tight layer says when not to till', () => {
    const [fix] = rank(aField({ probeDepthInches: 6 }), [aVariety()], season, rules).fixFirst;
    expect(fix?.factor).toBe('compaction');
    expect(fix?.caution).toMatch(/^Not when wet/);
  });

  test('a sound field has nothing to fix', () => {
    expect(rank(aField(), [aVariety()], season, rules).fixFirst).toEqual([]);
  });

  test('the bands of sour ground add up to the sour ground', () => {
    expect(sourAcresInWords(aField({ phShares: allAtPh(4.8) }), 6)).toBe('80.0 ac below 5.0');
  });
});

describe('questions', () => {
  test('what is known is not asked, and the most helpful answer stands first', () => {
    expect(rank(aField(), [aVariety()], season, rules).questions).toEqual([]);
    const { questions } = rank(anUnknownField(), [aVariety()], season, rules);
    expect(questions[0]?.fact).toBe('yieldGoalBushelsPerAcre');
    const worth = questions.map((one) => one.narrowsBushels);
    expect(worth).toEqual(worth.toSorted((a, b) => b - a));
  });

  test('answering narrows the band about as much as was said', () => {
    const field = anUnknownField();
    const before = rank(field, [aVariety()], season, rules);
    const said = before.questions.find((one) => one.fact === 'yieldGoalBushelsPerAcre')!.narrowsBushels;
    const after = rank({ ...field, yieldGoalBushelsPerAcre: before.potential }, [aVariety()], season, rules).picks[0]!;
    const narrowed = before.picks[0]!.high - before.picks[0]!.low - (after.high - after.low);
    expect(narrowed).toBeCloseTo(said, 6);
  });

  test('a question about a variety names it', () => {
    const { questions } = rank(aField(), [aVariety({ code: 'OP 24', bushType: null })], season, rules);
    expect(questions[0]?.words).toBe("What is OP 24's bush type: upright, medium or bushy?");
  });
});

describe('hold', () => {
  test('two varieties alike hold about half each; one far ahead holds nearly always', () => {
    const twins = rank(aField(), [aVariety({ code: 'A' }), aVariety({ code: 'B' })], season, rules).picks;
    expect(twins[0]?.hold).toBeGreaterThan(0.42);
    expect(twins[0]?.hold).toBeLessThan(0.58);
    const wet = aField({ drainageShares: drained('very poorly'), tiled: false, yieldGoalBushelsPerAcre: 75, irrigated: true });
    const weak = aVariety({ code: 'WEAK', phytophthora: 2, standability: 2, bushType: 'upright' });
    const strong = aVariety({ code: 'STRONG', phytophthora: 9, standability: 9, bushType: 'bushy' });
    expect(rank(wet, [weak, strong], season, rules).picks[0]?.hold).toBeGreaterThan(0.97);
  });

  test('an unknown that strikes one variety and spares the other makes the lead shakier', () => {
    const lineUp = [
      aVariety({ code: 'A', phytophthora: 8, standability: 5 }),
      aVariety({ code: 'B', phytophthora: 3, standability: 7 }),
    ];
    const hold = (shares: ReturnType<typeof drained>) =>
      rank(aField({ drainageShares: shares, tiled: true }), lineUp, season, rules).picks.find((one) => one.code === 'A')!.hold;
    expect(hold(drained('poorly'))).toBeGreaterThan(hold(drained('well')));
  });

  test('trials that prove an advantage firm the lead', () => {
    const rival = aVariety({ code: 'B' });
    const hold = (changes: Parameters<typeof aVariety>[0]) =>
      rank(aField(), [aVariety({ code: 'A', trialAdvantage: 0.03, ...changes }), rival], season, rules).picks[0]!.hold;
    expect(hold({ trialAdvantageStandardError: 0.005 })).toBeGreaterThan(hold({ trialAdvantageStandardError: 0 }));
  });

  test('shocks are the normal quantiles themselves, shuffled by name', () => {
    const one = shocksOf('variety A');
    expect(one).toHaveLength(DRAWS);
    expect(one.reduce((sum, value) => sum + value, 0)).toBeCloseTo(0, 6);
    expect(one.reduce((sum, value) => sum + value * value, 0) / DRAWS).toBeCloseTo(1, 2);
    expect([...one].sort((a, b) => a - b)).toEqual([...shocksOf('variety B')].sort((a, b) => a - b));
    expect(normalQuantile(0.9)).toBeCloseTo(1.2815515655446004, 8);
    const product = one.reduce((sum, value, i) => sum + value * shocksOf('variety B')[i]!, 0) / DRAWS;
    expect(Math.abs(product)).toBeLessThan(0.08);
  });

  test('is said in words a rep can say', () => {
    expect(holdWords(0.9)).toBe('holds first in 9 of 10');
    expect(holdWords(1)).toBe('holds first nearly always');
    expect(holdWords(0.01)).toBe('hardly ever first');
  });
});

describe('bands', () => {
  test('a spread keeps the width its deviation says, and never promises more than the whole', () => {
    for (const mid of [1, 0.97, 0.6]) {
      const spread = keptSpread(mid, 0.05);
      expect(logDeviationOf(spread)).toBeCloseTo(0.05, 9);
      expect(spread.high).toBeLessThanOrEqual(1);
      expect(spread.low).toBeLessThanOrEqual(mid);
      expect(spread.high).toBeGreaterThanOrEqual(mid);
    }
  });

  test('a field of which nothing is known has a wider band than one known through', () => {
    const known = rank(aField(), aLineUp(10), season, rules).picks[0]!;
    const unknown = rank(anUnknownField(), aLineUp(10), season, rules).picks[0]!;
    expect((unknown.high - unknown.low) / unknown.expected).toBeGreaterThan(2 * ((known.high - known.low) / known.expected));
  });
});

describe('what-if', () => {
  test('changes the facts named and leaves the profile it was given', () => {
    const field = aField();
    expect(withFacts(field, { rowWidthInches: 15 }).rowWidthInches).toBe(15);
    expect(field.rowWidthInches).toBe(30);
  });

  test('every fact it can turn moves the expected yield', () => {
    const base = assess(aField(), aVariety(), season, rules).expected;
    for (const facts of [{ rowWidthInches: 15 }, { plantingDate: '2027-06-05' }, { populationSeedsPerAcre: 90000 }]) {
      expect(assess(withFacts(aField(), facts), aVariety(), season, rules).expected).not.toBeCloseTo(base, 3);
    }
  });
});
