import { describe, expect, test } from 'vitest';
import { UNKNOWN_FACTS } from '@/features/fields/model';
import { FACTOR_COLOURS, PICK_COLOURS, pickColours } from '@/features/placement/components/factor-colours';
import { COEFFICIENTS } from '@/features/placement/engine/coefficients';
import { FACTORS } from '@/features/placement/engine/factors';
import { rank } from '@/features/placement/engine/rank';
import { canonicalJson, hashOfInputs, hashOfShared, type SharedInputs, supplyForRanking } from '@/features/placement/inputs';
import { coefficientWords, RULE_GROUPS, usableOverrides } from '@/features/placement/rules';
import { comparedIds, fieldLine, holdWords, layerOf, missingOf, missingWords } from '@/features/placement/view';
import { boxOutline, rangeIn, rangeWords, simplerOutline, zoneAt } from '@/features/placement/zones';
import { aField, aSeason, aVariety, someRules } from '../support/profiles';

describe('what a list says of a field', () => {
  test('what is missing is named in the order a grower is asked, soil tests first', () => {
    expect(missingOf(UNKNOWN_FACTS, 0, false)[0]).toBe('soil tests');
    expect(missingOf(UNKNOWN_FACTS, 12, false)).not.toContain('soil tests');
    expect(missingOf(UNKNOWN_FACTS, 0, true)).not.toContain('drainage');
    expect(missingWords([])).toBe('nothing');
    expect(missingWords(['a', 'b', 'c', 'd', 'e'])).toBe('a, b, c and 2 more');
  });

  test('how firmly a pick holds is a word and a number, and never a promise', () => {
    expect(holdWords(0.93)).toBe('firm, first in 9 of 10');
    expect(holdWords(0.999)).toBe('firm, first in nearly 10 of 10');
    expect(holdWords(0.02)).toBe('a toss-up, first in fewer than 1 of 10');
  });

  test('a field that was never scored has no pick, no figure and is not called stale', () => {
    const field = {
      id: 'f',
      operationId: 'o',
      farmId: null,
      farmName: null,
      name: 'Home 80',
      boundary: boxOutline({ west: -93.5, south: 42, east: -93.49, north: 42.01 }),
      areaAcres: 80,
      latitude: 42,
      longitude: -93.5,
      state: 'IA',
      elevationFt: null,
    };
    const line = fieldLine({ field, facts: UNKNOWN_FACTS, soilSampleCount: 0, hasSurvey: false, score: null });
    expect(line).toMatchObject({ pickCode: null, expected: null, stale: false, scored: false });
  });

  test('an address asks for a layer or for varieties that exist; anything else falls back', () => {
    expect(layerOf('ph')).toBe('ph');
    expect(layerOf('<script>')).toBe('picks');
    const ranking = rank(
      aField(),
      ['a', 'b', 'c', 'd', 'e'].map((id) => aVariety({ id, code: id })),
      aSeason(),
      someRules(),
    );
    expect(comparedIds('e,b', ranking)).toEqual(['e', 'b']);
    expect(comparedIds('e,e', ranking)).toHaveLength(3);
    expect(comparedIds('a,b,c,d,e', ranking)).toHaveLength(4);
    expect(comparedIds('nobody,else', ranking)).toHaveLength(3);
  });
});

describe('colours', () => {
  test('every factor has one colour and no two share it', () => {
    for (const factor of FACTORS) expect(FACTOR_COLOURS[factor.id], factor.id).toMatch(/^#[0-9a-f]{6}$/);
    expect(new Set(Object.values(FACTOR_COLOURS)).size).toBe(Object.keys(FACTOR_COLOURS).length);
  });

  test('the picks used most have colours of their own', () => {
    const colours = pickColours(['B', 'A', 'B', 'C']);
    expect(colours.get('B')).toBe(PICK_COLOURS[0]);
    expect(new Set(colours.values()).size).toBe(3);
  });
});

describe('when a score is stale', () => {
  const shared: SharedInputs = {
    season: 2027,
    varieties: [{ ...aVariety({ id: 'v', code: 'CR 21' }), unitsOnHand: 40 }],
    zones: [],
    overrides: {},
    stations: [],
  };
  const inputs = {
    field: {
      id: 'f',
      operationId: 'o',
      farmId: null,
      farmName: 'Home farm',
      name: 'Home 80',
      boundary: boxOutline({ west: -93.5, south: 42, east: -93.49, north: 42.01 }),
      areaAcres: 80,
      latitude: 42,
      longitude: -93.5,
      state: 'IA',
      elevationFt: null,
    },
    facts: UNKNOWN_FACTS,
    samples: [],
    mapUnits: [],
    weather: null,
  };

  test('the same inputs in another order of keys give the same hash', () => {
    expect(canonicalJson({ b: 1, a: { d: [2, null], c: undefined } })).toBe('{"a":{"d":[2,null]},"b":1}');
    expect(hashOfInputs(inputs, hashOfShared(shared))).toBe(
      hashOfInputs(
        { ...inputs, facts: Object.fromEntries(Object.entries(UNKNOWN_FACTS).reverse()) as typeof UNKNOWN_FACTS },
        hashOfShared(shared),
      ),
    );
  });

  test('another name of the field or fewer units on hand change nothing; a fact, a zone, a rule or selling out do', () => {
    const hash = hashOfInputs(inputs, hashOfShared(shared));
    const variety = shared.varieties[0] as (typeof shared.varieties)[0];
    expect(hashOfInputs({ ...inputs, field: { ...inputs.field, name: 'Home Eighty' } }, hashOfShared(shared))).toBe(hash);
    expect(hashOfInputs(inputs, hashOfShared({ ...shared, varieties: [{ ...variety, unitsOnHand: 12 }] }))).toBe(hash);
    expect(hashOfInputs(inputs, hashOfShared({ ...shared, varieties: [{ ...variety, unitsOnHand: 0 }] }))).not.toBe(hash);
    expect(hashOfInputs({ ...inputs, facts: { ...UNKNOWN_FACTS, rowWidthInches: 15 } }, hashOfShared(shared))).not.toBe(hash);
    expect(hashOfInputs(inputs, hashOfShared({ ...shared, overrides: { maturityEarlyLoss: 0.12 } }))).not.toBe(hash);
  });

  test('what leaves the server of supply is sold out or nothing', () => {
    expect(supplyForRanking(aVariety({ unitsOnHand: 812 })).unitsOnHand).toBeNull();
    expect(supplyForRanking(aVariety({ unitsOnHand: null })).unitsOnHand).toBeNull();
    expect(supplyForRanking(aVariety({ unitsOnHand: 0 })).unitsOnHand).toBe(0);
  });
});

describe('placement rules', () => {
  test('every coefficient that may be changed is on the page once, with words, and no other', () => {
    const listed = RULE_GROUPS.flatMap((group) => group.rules.map((rule) => rule.name));
    const changeable = Object.entries(COEFFICIENTS).filter(([, entry]) => entry.changeable);
    expect([...listed].sort()).toEqual(changeable.map(([name]) => name).sort());
    expect(coefficientWords('limeBelowPh')).toBe('lime below pH');
    expect(coefficientWords('maturityEarlyLoss')).toBe('maturity early loss');
  });

  test('values out of range or unknown are not handed to the engine', () => {
    expect(
      usableOverrides([
        { name: 'maturityLateLoss', value: 0.08 },
        { name: 'maturityEarlyLoss', value: 7 },
        { name: 'gone', value: 1 },
      ]),
    ).toEqual({ maturityLateLoss: 0.08 });
  });
});

describe('maturity zones', () => {
  const county = { name: 'county', geometry: boxOutline({ west: -94, south: 42, east: -93, north: 43 }) };
  const bottoms = { name: 'bottoms', geometry: boxOutline({ west: -93.6, south: 42.4, east: -93.4, north: 42.6 }) };

  test('where zones lie over each other the smaller one counts, in whatever order they stand', () => {
    expect(zoneAt([county, bottoms], -93.5, 42.5)?.name).toBe('bottoms');
    expect(zoneAt([bottoms, county], -93.5, 42.5)?.name).toBe('bottoms');
    expect(zoneAt([bottoms, county], -93.9, 42.1)?.name).toBe('county');
    expect(zoneAt([bottoms, county], -90, 42.1)).toBeNull();
  });

  test('a range is read out of the words of a file when it says one', () => {
    expect(rangeIn('North, RM 2.1–2.5')).toEqual({ from: 2.1, to: 2.5 });
    expect(rangeIn('Zone 2.3')).toEqual({ from: 2.1, to: 2.5 });
    expect(rangeIn('Zone 4 of 2027, 12.25 ac')).toBeNull();
    expect(rangeWords({ relativeMaturityFrom: 2, relativeMaturityTo: 2.45 })).toBe('RM 2.0–2.5');
  });

  test('a line of ten thousand corners is thinned, a simple one stays as it was drawn', () => {
    expect(simplerOutline(county.geometry)).toBe(county.geometry);
    const ring = Array.from({ length: 10_001 }, (_, index) => {
      const angle = ((index % 10_000) / 10_000) * 2 * Math.PI;
      return [-93 + 0.5 * Math.cos(angle), 42 + 0.5 * Math.sin(angle)];
    });
    const thinned = simplerOutline({ type: 'Polygon', coordinates: [ring] });
    expect((thinned.coordinates[0] as number[][]).length).toBeLessThan(500);
  });
});
