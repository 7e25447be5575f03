import { describe, expect, test } from 'vitest';
import { coefficients } from '@/features/placement/engine/coefficients';
import { cystNematode, sourceRemains } from '@/features/placement/engine/factors/cyst-nematode';
import { FACTORS } from '@/features/placement/engine/factors/index';
import { weedProgramme } from '@/features/placement/engine/factors/weed-programme';
import type { FactorId, FieldProfile, VarietyProfile } from '@/features/placement/engine/model';
import { siteOf } from '@/features/placement/engine/site';
import { aField, allAtPh, anUnknownField, aSeason, aVariety, drained, someRules } from '@/tests/support/profiles';

const on = (field: Partial<FieldProfile>, variety: Partial<VarietyProfile> = {}) => ({
  site: siteOf(aField(field), aSeason({ latitude: field.latitude ?? 42 }), someRules()),
  variety: aVariety(variety),
});
const lost = (id: FactorId, field: Partial<FieldProfile>, variety: Partial<VarietyProfile> = {}) =>
  1 - FACTORS.find((factor) => factor.id === id)!.kept(on(field, variety)).kept.mid;

describe('cyst nematode', () => {
  test('the more eggs, the more is lost; resistance keeps most of it', () => {
    const loss = (cystEggsPer100cc: number, cystNematodeSource: VarietyProfile['cystNematodeSource']) =>
      lost('cyst-nematode', { cystEggsPer100cc }, { cystNematodeSource });
    expect(loss(0, 'none')).toBe(0);
    expect(loss(12000, 'none')).toBeGreaterThan(loss(2000, 'none'));
    expect(loss(12000, 'PI 88788')).toBeLessThan(loss(12000, 'none'));
    expect(loss(12000, 'Peking')).toBeLessThan(loss(12000, 'PI 88788'));
  });

  test('the same source twice running loses some of its hold', () => {
    const c = coefficients();
    expect(sourceRemains('PI 88788', 'PI 88788', c)).toBeGreaterThan(sourceRemains('PI 88788', 'Peking', c));
    expect(cystNematode.kept(on({ cystEggsPer100cc: 6000, cystSourceLastGrown: 'PI 88788' })).detail).toBe(
      'the same source as last time',
    );
  });

  test('a source that is not said lies between none and PI 88788, and is asked', () => {
    const loss = (cystNematodeSource: VarietyProfile['cystNematodeSource']) =>
      lost('cyst-nematode', { cystEggsPer100cc: 8000 }, { cystNematodeSource });
    expect(loss(null)).toBeGreaterThan(loss('PI 88788'));
    expect(loss(null)).toBeLessThan(loss('none'));
    const asks = cystNematode.kept(on({ cystEggsPer100cc: 8000 }, { cystNematodeSource: null })).asks;
    expect(asks.map((one) => one.fact)).toEqual(['cystNematodeSource']);
  });
});

describe('diseases', () => {
  test.each([
    ['sudden-death', { suddenDeathHistory: true }, { suddenDeathHistory: false }],
    ['brown-stem-rot', { brownStemRotHistory: true }, { brownStemRotHistory: false }],
    ['white-mould', { whiteMouldHistory: true }, { whiteMouldHistory: false }],
    ['frogeye', { frogeyeHistory: true }, { frogeyeHistory: false }],
  ] as const)('%s: a field that has had it loses more; an unknown one lies between and asks', (id, has, hasNot) => {
    const [fact] = Object.keys(has) as [keyof FieldProfile];
    expect(lost(id, has)).toBeGreaterThan(2 * lost(id, hasNot));
    expect(lost(id, { [fact]: null })).toBeGreaterThan(lost(id, hasNot));
    expect(lost(id, { [fact]: null })).toBeLessThan(lost(id, has));
    const asks = FACTORS.find((factor) => factor.id === id)!.kept(on({ [fact]: null })).asks;
    expect(asks.map((one) => one.fact)).toContain(fact);
  });

  test('sudden death: wet ground, a tight layer, early planting and nematodes each raise it', () => {
    const base = lost('sudden-death', {});
    expect(lost('sudden-death', { drainageShares: drained('poorly') })).toBeGreaterThan(base);
    expect(lost('sudden-death', { probeDepthInches: 6 })).toBeGreaterThan(base);
    expect(lost('sudden-death', { plantingDate: '2027-04-22' })).toBeGreaterThan(base);
    expect(lost('sudden-death', { cystEggsPer100cc: 6000 })).toBeGreaterThan(base);
  });

  test('brown stem rot: sour soil and soybeans too often raise it', () => {
    expect(lost('brown-stem-rot', { phShares: allAtPh(5.4) })).toBeGreaterThan(
      lost('brown-stem-rot', { phShares: allAtPh(6.6) }),
    );
    expect(lost('brown-stem-rot', { soybeanYearsOfLastFour: 4 })).toBeGreaterThan(
      lost('brown-stem-rot', { soybeanYearsOfLastFour: 1 }),
    );
  });

  test('white mould: narrow rows, thick stands, rich ground and bushy plants raise it', () => {
    const field = { whiteMouldHistory: true, rowWidthInches: 30 };
    const base = lost('white-mould', field);
    expect(lost('white-mould', { ...field, rowWidthInches: 15 })).toBeGreaterThan(base);
    expect(lost('white-mould', { ...field, populationSeedsPerAcre: 180000 })).toBeGreaterThan(base);
    expect(lost('white-mould', { ...field, yieldGoalBushelsPerAcre: 80 })).toBeGreaterThan(base);
    expect(lost('white-mould', field, { bushType: 'bushy' })).toBeGreaterThan(base);
    expect(lost('white-mould', field, { bushType: 'upright' })).toBeLessThan(base);
  });

  test('white mould belongs to cool bloom, frogeye, stem canker and charcoal rot to the south', () => {
    const unknown = { whiteMouldHistory: null, frogeyeHistory: null };
    expect(lost('white-mould', { ...unknown, latitude: 44 })).toBeGreaterThan(lost('white-mould', { ...unknown, latitude: 36 }));
    for (const id of ['frogeye', 'stem-canker', 'charcoal-rot'] as const) {
      expect(lost(id, { ...unknown, latitude: 36, availableWaterInches: 4 })).toBeGreaterThan(
        lost(id, { ...unknown, latitude: 44, availableWaterInches: 4 }),
      );
    }
  });

  test('charcoal rot belongs to droughty ground', () => {
    expect(lost('charcoal-rot', { availableWaterInches: 4 })).toBeGreaterThan(
      3 * lost('charcoal-rot', { availableWaterInches: 10 }),
    );
  });

  test('nothing known is never taken for nothing wrong', () => {
    const kept = FACTORS.map((factor) => ({
      id: factor.id,
      mid: factor.kept({ site: siteOf(anUnknownField(), aSeason(), someRules()), variety: aVariety({ relativeMaturity: 2.2 }) })
        .kept.mid,
    }));
    const free = kept.filter((one) => one.mid === 1).map((one) => one.id);
    expect(free).toEqual(['must-be-off-by', 'weed-programme']);
  });
});

describe('weed programme', () => {
  const programme = (weedProgramme: FieldProfile['weedProgramme'], tolerances: VarietyProfile['tolerances']) =>
    FACTORS.find((factor) => factor.id === 'weed-programme')!.kept(on({ weedProgramme }, { tolerances }));

  test('a missing tolerance stops the variety and names what is missing', () => {
    expect(programme(['glyphosate', 'dicamba'], ['glyphosate', '2,4-D']).stop).toBe(
      "not tolerant to dicamba, which this field's weed programme needs",
    );
    expect(programme(['glyphosate'], ['glyphosate', 'glufosinate']).stop).toBeNull();
  });

  test('dicamba and 2,4-D tolerance are not each other', () => {
    expect(programme(['2,4-D'], ['dicamba']).stop).not.toBeNull();
    expect(programme(['dicamba'], ['2,4-D']).stop).not.toBeNull();
  });

  test('an unknown programme stops nothing and is asked; one that asks for nothing takes a conventional variety', () => {
    expect(programme(null, []).stop).toBeNull();
    expect(programme(null, []).asks[0]?.fact).toBe('weedProgramme');
    expect(programme([], []).stop).toBeNull();
    expect(weedProgramme.kept(on({ weedProgramme: [] })).kept.mid).toBe(1);
  });
});
