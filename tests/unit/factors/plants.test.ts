import { describe, expect, test } from 'vitest';
import { emergence } from '@/features/placement/engine/factors/emergence';
import { height } from '@/features/placement/engine/factors/height';
import { closureDays, rowWidth } from '@/features/placement/engine/factors/row-width';
import { standability } from '@/features/placement/engine/factors/standability';
import type { FieldProfile, VarietyProfile } from '@/features/placement/engine/model';
import { siteOf } from '@/features/placement/engine/site';
import { aField, aSeason, aVariety, someRules } from '@/tests/support/profiles';

const on = (field: Partial<FieldProfile>, variety: Partial<VarietyProfile> = {}) => ({
  site: siteOf(aField(field), aSeason(), someRules()),
  variety: aVariety(variety),
});

describe('row width', () => {
  test('wide rows cost any plant (field); what the bush type adds is match', () => {
    const bushy = rowWidth.kept(on({ rowWidthInches: 30 }, { bushType: 'bushy' }));
    const upright = rowWidth.kept(on({ rowWidthInches: 30 }, { bushType: 'upright' }));
    expect(bushy.field.mid).toBe(upright.field.mid);
    expect(bushy.field.mid).toBeCloseTo(0.97, 9);
    expect(bushy.match.mid).toBe(1);
    expect(upright.match.mid).toBeCloseTo(0.93 / 0.97, 9);
  });

  test('says by when the canopy closes', () => {
    const kept = rowWidth.kept(on({ rowWidthInches: 30, plantingDate: '2027-05-08' }, { bushType: 'bushy' }));
    expect(kept.reason).toBe('30 in rows, bushy plant closes them by 6 Jul');
    expect(closureDays(30, 'bushy', 128)).toBe(59);
    expect(closureDays(7.5, 'upright', 128)).toBeGreaterThan(closureDays(7.5, 'bushy', 128));
  });

  test('an unknown row width takes a spread of widths and asks', () => {
    const kept = rowWidth.kept(on({ rowWidthInches: null }));
    expect(kept.kept.mid).toBeLessThan(rowWidth.kept(on({ rowWidthInches: 15 })).kept.mid);
    expect(kept.kept.mid).toBeGreaterThan(rowWidth.kept(on({ rowWidthInches: 30 })).kept.mid);
    expect(kept.asks.map((one) => one.fact)).toEqual(['rowWidthInches']);
  });
});

describe('standability', () => {
  const lost = (field: Partial<FieldProfile>, variety: Partial<VarietyProfile> = {}) =>
    1 - standability.kept(on(field, { standability: 4, ...variety })).kept.mid;

  test('a 9 loses nothing, a 1 loses the whole pressure', () => {
    expect(lost({}, { standability: 9 })).toBe(0);
    expect(lost({}, { standability: 1 })).toBeCloseTo(2 * lost({}, { standability: 5 }), 9);
  });

  test('yield, irrigation, narrow rows and thick stands each raise it', () => {
    expect(lost({ yieldGoalBushelsPerAcre: 80 })).toBeGreaterThan(lost({ yieldGoalBushelsPerAcre: 50 }));
    expect(lost({ irrigated: true })).toBeGreaterThan(lost({ irrigated: false }));
    expect(lost({ rowWidthInches: 15 })).toBeGreaterThan(lost({ rowWidthInches: 30 }));
    expect(lost({ populationSeedsPerAcre: 180000 })).toBeGreaterThan(lost({ populationSeedsPerAcre: 120000 }));
  });
});

describe('height', () => {
  test('costs a short plant on droughty, low-yield ground and nothing on rich or irrigated ground', () => {
    const kept = (field: Partial<FieldProfile>) => height.kept(on(field, { height: 'short' })).kept.mid;
    expect(kept({ availableWaterInches: 3.5, yieldGoalBushelsPerAcre: 34 })).toBeCloseTo(0.95, 9);
    expect(kept({ availableWaterInches: 10, yieldGoalBushelsPerAcre: 65 })).toBe(1);
    expect(kept({ availableWaterInches: 3.5, yieldGoalBushelsPerAcre: 34, irrigated: true })).toBe(1);
  });
});

describe('emergence', () => {
  const kept = (field: Partial<FieldProfile>, variety: Partial<VarietyProfile> = {}) => emergence.kept(on(field, variety));

  test('a cold seedbed, a crust and no-till corn stubble each make the rating matter more', () => {
    const weak = { emergence: 3 };
    const base = kept({ plantingDate: '2027-05-20' }, weak).match.mid;
    expect(kept({ plantingDate: '2027-04-20' }, weak).match.mid).toBeLessThan(base);
    expect(kept({ plantingDate: '2027-05-20', crustingSoil: true }, weak).match.mid).toBeLessThan(base);
    expect(kept({ plantingDate: '2027-05-20', tillage: 'no-till', lastCrop: 'corn' }, weak).match.mid).toBeLessThan(base);
  });

  test('too few seeds leave too few plants, whatever the rating', () => {
    expect(kept({ populationSeedsPerAcre: 140000 }, { emergence: 9 }).field.mid).toBe(1);
    expect(kept({ populationSeedsPerAcre: 70000 }, { emergence: 9 }).field.mid).toBeLessThan(0.95);
  });

  test('planted in June, the same seeds are too few', () => {
    expect(kept({ populationSeedsPerAcre: 140000, plantingDate: '2027-06-15' }).kept.mid).toBeLessThan(
      kept({ populationSeedsPerAcre: 180000, plantingDate: '2027-06-15' }).kept.mid,
    );
  });

  test('says how many plants stand from how many seeds', () => {
    expect(kept({}).detail).toMatch(/^\d+,000 plants\/ac from 140,000 seeds, 90 % germination$/);
  });
});
