import { describe, expect, test } from 'vitest';
import { freeze } from '@/features/placement/engine/factors/freeze';
import { maturityZone } from '@/features/placement/engine/factors/maturity-zone';
import { mustBeOffBy } from '@/features/placement/engine/factors/must-be-off-by';
import { plantingDate } from '@/features/placement/engine/factors/planting-date';
import { latePlantingShift, lateRuleOf } from '@/features/placement/engine/maturity';
import type { FieldProfile, PlacementRules, VarietyProfile } from '@/features/placement/engine/model';
import { siteOf } from '@/features/placement/engine/site';
import { aField, aSeason, aVariety, someRules } from '@/tests/support/profiles';

const on = (field: Partial<FieldProfile>, variety: Partial<VarietyProfile> = {}, rules: Partial<PlacementRules> = {}) => ({
  site: siteOf(aField(field), aSeason(), someRules(rules)),
  variety: aVariety(variety),
});
const zone = { name: 'Home', relativeMaturityFrom: 2.2, relativeMaturityTo: 2.8 };

describe('maturity zone', () => {
  test('a dealership’s zone over the field goes before the latitude table', () => {
    expect(maturityZone.kept(on({}, { relativeMaturity: 2.5 }, { zone })).kept.mid).toBe(1);
    expect(maturityZone.kept(on({}, { relativeMaturity: 2.5 }, { zone })).detail).toBe('by zone Home');
    const south = { ...zone, relativeMaturityFrom: 3.2, relativeMaturityTo: 3.8 };
    expect(maturityZone.kept(on({}, { relativeMaturity: 2.5 }, { zone: south })).kept.mid).toBeCloseTo(0.9, 9);
  });

  test('early costs more than late, and the square of the distance counts', () => {
    const lost = (relativeMaturity: number) => 1 - maturityZone.kept(on({}, { relativeMaturity }, { zone })).kept.mid;
    expect(lost(2.0)).toBeCloseTo(0.1 * 0.25, 9);
    expect(lost(3.0)).toBeCloseTo(0.06 * 0.25, 9);
    expect(lost(1.5)).toBeCloseTo(4 * lost(2.0), 9);
  });

  test('late planting moves the optimum by the region’s rule', () => {
    const june10 = 161;
    expect(latePlantingShift(lateRuleOf('MN', 45, -95), june10)).toBeLessThan(0);
    expect(latePlantingShift(lateRuleOf('OH', 40, -83), june10)).toBeGreaterThan(0);
    expect(latePlantingShift(lateRuleOf('IA', 42, -93), june10)).toBe(0);
    expect(latePlantingShift(lateRuleOf('IA', 42, -93), 182)).toBeLessThan(0);
  });

  test('without a state the place decides whose rule holds', () => {
    expect(lateRuleOf(null, 46, -96)).toBe('earlier');
    expect(lateRuleOf(null, 40, -83)).toBe('later');
    expect(lateRuleOf(null, 41, -94)).toBe('unchanged');
  });
});

describe('freeze', () => {
  test('a late variety planted late loses more, and that part is its own', () => {
    const late = { plantingDate: '2027-06-25' };
    const own = freeze.kept(on(late, { relativeMaturity: 3.4 }));
    expect(own.kept.mid).toBeLessThan(freeze.kept(on(late, { relativeMaturity: 1.8 })).kept.mid);
    expect(own.match.mid).toBeLessThan(1);
    expect(own.reason).toMatch(/^R7 on \d+ \w{3}, freeze before then/);
  });

  test('planted in May, a fitting variety hardly knows freeze', () => {
    expect(freeze.kept(on({}, { relativeMaturity: 2.4 })).kept.mid).toBeGreaterThan(0.999);
  });

  test('an unknown planting day is assumed, widens the band and is asked for', () => {
    const kept = freeze.kept(on({ plantingDate: null }, { relativeMaturity: 3.6 }));
    expect(kept.detail).toContain('assumed');
    expect(kept.asks.map((one) => one.fact)).toEqual(['plantingDate']);
    const known = freeze.kept(on({ plantingDate: '2027-05-08' }, { relativeMaturity: 3.6 }));
    expect(kept.kept.high - kept.kept.low).toBeGreaterThan(known.kept.high - known.kept.low);
  });
});

describe('planting date', () => {
  test('is wholly the field’s', () => {
    const kept = plantingDate.kept(on({ plantingDate: '2027-06-10' }));
    expect(kept.field.mid).toBeCloseTo(0.88, 9);
    expect(kept.match.mid).toBe(1);
    expect(kept.reason).toBe('planted 10 Jun');
  });
});

describe('must be off by', () => {
  const field = { mustBeOffBy: '2027-09-22', yieldGoalBushelsPerAcre: 60 };

  test('charges the grower’s own figure by the chance of missing the date', () => {
    const never = mustBeOffBy.kept(on({ ...field, mustBeOffBy: '2027-11-20' }));
    expect(never.kept.mid).toBeCloseTo(1, 6);
    const surely = mustBeOffBy.kept(on({ ...field, mustBeOffBy: '2027-08-15', mustBeOffChargeBushelsPerAcre: 6 }));
    expect(60 * (1 - surely.kept.mid)).toBeCloseTo(6, 6);
    const unnamed = mustBeOffBy.kept(on({ ...field, mustBeOffBy: '2027-08-15' }));
    expect(60 * (1 - unnamed.kept.mid)).toBeCloseTo(3, 6);
  });

  test('the later the variety, the likelier the miss', () => {
    const kept = (relativeMaturity: number) => mustBeOffBy.kept(on(field, { relativeMaturity })).kept.mid;
    expect(kept(1.8)).toBeGreaterThan(kept(2.4));
    expect(kept(2.4)).toBeGreaterThan(kept(3));
  });

  test('nothing follows: nothing is charged and nothing asked', () => {
    const kept = mustBeOffBy.kept(on({ mustBeOffBy: null }));
    expect(kept.kept).toEqual({ low: 1, mid: 1, high: 1 });
    expect(kept.asks).toEqual([]);
  });
});
