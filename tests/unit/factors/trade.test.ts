import { describe, expect, test } from 'vitest';
import { assess } from '@/features/placement/engine/assess';
import type { FactorId, FieldProfile, VarietyProfile } from '@/features/placement/engine/model';
import { rank } from '@/features/placement/engine/rank';
import { dayOfYear } from '@/lib/dates';
import { aField, aSeason, aVariety, someRules } from '@/tests/support/profiles';

const season = aSeason();
const rules = someRules();
const first = (field: FieldProfile, ...varieties: VarietyProfile[]) => rank(field, varieties, season, rules).picks[0]!.code;
const expected = (field: FieldProfile, variety: VarietyProfile) => assess(field, variety, season, rules).expected;
const line = (field: FieldProfile, variety: VarietyProfile, factor: FactorId) =>
  assess(field, variety, season, rules).ledger.find((one) => one.factor === factor)?.bushels ?? 0;

const upright = aVariety({ code: 'UPRIGHT', bushType: 'upright' });
const medium = aVariety({ code: 'MEDIUM', bushType: 'medium' });
const bushy = aVariety({ code: 'BUSHY', bushType: 'bushy' });
const short = aVariety({ code: 'SHORT', height: 'short' });
const tall = aVariety({ code: 'TALL', height: 'tall' });
const droughty = aField({ availableWaterInches: 4, yieldGoalBushelsPerAcre: 36 });

/** What the trade holds and no paper in hand says: common practice, no source. */
describe('facts of the trade (common practice, no source)', () => {
  test('in wide rows the bushy plant wins, then the medium, then the upright', () => {
    expect(rank(aField({ rowWidthInches: 30 }), [upright, medium, bushy], season, rules).picks.map((one) => one.code)).toEqual([
      'BUSHY',
      'MEDIUM',
      'UPRIGHT',
    ]);
  });

  test('in narrow rows the upright plant pays', () => {
    expect(rank(aField({ rowWidthInches: 15 }), [bushy, medium, upright], season, rules).picks.map((one) => one.code)).toEqual([
      'UPRIGHT',
      'MEDIUM',
      'BUSHY',
    ]);
  });

  test('a plant short on height belongs on high-yield ground', () => {
    expect(first(aField({ yieldGoalBushelsPerAcre: 78 }), short, tall)).toBe('SHORT');
    expect(line(aField({ yieldGoalBushelsPerAcre: 78 }), short, 'height')).toBe(0);
  });

  test('on droughty, low-yield ground the short plant loses to the tall one', () => {
    expect(first(droughty, short, tall)).toBe('TALL');
  });

  test('a tall plant on rich or irrigated ground pays through standability, not through height', () => {
    const irrigated = aField({ irrigated: true, yieldGoalBushelsPerAcre: 78 });
    expect(line(irrigated, tall, 'standability')).toBeLessThan(line(irrigated, short, 'standability'));
    expect(line(irrigated, tall, 'height')).toBe(0);
    expect(first(irrigated, short, tall)).toBe('SHORT');
  });

  test('what stands well is what you irrigate: standing is worth more under irrigation', () => {
    const stands = aVariety({ standability: 9 });
    const falls = aVariety({ standability: 3 });
    const gain = (irrigated: boolean) => expected(aField({ irrigated }), stands) - expected(aField({ irrigated }), falls);
    expect(gain(true)).toBeGreaterThan(1.3 * gain(false));
  });

  test('early maturity goes where wheat or a cover crop follows', () => {
    const early = aVariety({ code: 'EARLY', relativeMaturity: 2.2 });
    const full = aVariety({ code: 'FULL', relativeMaturity: 2.7 });
    expect(first(aField(), early, full)).toBe('FULL');
    expect(first(aField({ mustBeOffBy: '2027-09-22' }), early, full)).toBe('EARLY');
  });

  test('a tenth of relative maturity is about a day', () => {
    const r7 = (relativeMaturity: number) =>
      dayOfYear(assess(aField(), aVariety({ relativeMaturity }), season, rules).season.r7!);
    expect((r7(2.9) - r7(1.9)) / 10).toBeGreaterThan(0.8);
    expect((r7(2.9) - r7(1.9)) / 10).toBeLessThan(1.6);
  });

  test('a probe that a person can push a foot deep means no compaction to speak of', () => {
    expect(line(aField({ probeDepthInches: 12 }), medium, 'compaction')).toBe(0);
    expect(line(aField({ probeDepthInches: 18 }), medium, 'compaction')).toBe(0);
    expect(line(aField({ probeDepthInches: 6 }), medium, 'compaction')).toBeLessThan(-1);
  });

  test('tolerant varieties go on wet ground', () => {
    const wet = aField({ drainageShares: [{ class: 'poorly', share: 1 }], tiled: false });
    expect(first(wet, aVariety({ code: 'WEAK', phytophthora: 3 }), aVariety({ code: 'TOUGH', phytophthora: 8 }))).toBe('TOUGH');
  });
});
