import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { whatWouldMakeItFirst, whyNot } from '@/features/placement/engine/explain';
import { rank } from '@/features/placement/engine/rank';
import { aField, aLineUp, allAtPh, aSeason, aVariety, drained, someRules } from '@/tests/support/profiles';

const season = aSeason();
const rules = someRules();

describe('why not the other one', () => {
  test('the two ledgers subtracted add up to the lead, largest first', () => {
    const field = aField({ drainageShares: drained('poorly'), tiled: true });
    const { picks } = rank(field, aLineUp(12), season, rules);
    fc.assert(
      fc.property(fc.nat(11), fc.nat(11), (i, j) => {
        const { lines } = whyNot(picks[i]!, picks[j]!);
        const sum = lines.reduce((total, line) => total + line.bushels, 0);
        expect(sum).toBeCloseTo(picks[i]!.expected - picks[j]!.expected, 9);
        const sizes = lines.map((line) => Math.abs(line.bushels));
        expect(sizes).toEqual(sizes.toSorted((a, b) => b - a));
      }),
    );
  });

  test('says the number first, then where it is won and what the other takes back', () => {
    const bushy = aVariety({ code: 'OP 24B', bushType: 'bushy', standability: 5 });
    const upright = aVariety({ code: 'OP 24U', bushType: 'upright', standability: 7 });
    const { picks } = rank(aField({ rowWidthInches: 30 }), [bushy, upright], season, rules);
    expect(whyNot(picks[0]!, picks[1]!).sentence).toMatch(
      /^\d\.\d bu\/ac: OP 24B is expected ahead of OP 24U, by \d\.\d on row width; OP 24U takes back \d\.\d on standability\.$/,
    );
  });

  test('asked the wrong way round, it still names the one ahead', () => {
    const { picks } = rank(
      aField(),
      [aVariety({ code: 'A', standability: 9 }), aVariety({ code: 'B', standability: 2 })],
      season,
      rules,
    );
    expect(whyNot(picks[1]!, picks[0]!).sentence).toContain('A is expected ahead of B');
  });
});

describe('what would have to change for it to be first', () => {
  const bushy = aVariety({ code: 'BUSHY', bushType: 'bushy' });
  const upright = aVariety({ code: 'UPRIGHT', bushType: 'upright' });

  test('an upright plant behind in wide rows would be first in narrow ones', () => {
    const answer = whatWouldMakeItFirst(aField({ rowWidthInches: 30 }), [bushy, upright], season, rules, 'UPRIGHT');
    expect(answer.outcome).toBe('found');
    expect(answer.ways.map((way) => way.words)).toContain('15 in rows');
    expect(answer.sentence).toMatch(/^With \S+ in rows UPRIGHT would be first, at \d+\.\d bu\/ac, \d\.\d ahead\./);
  });

  test('each way is true: ranked on the changed field, it is first', () => {
    const answer = whatWouldMakeItFirst(aField({ rowWidthInches: 30 }), [bushy, upright], season, rules, 'UPRIGHT');
    for (const way of answer.ways.filter((one) => one.words.endsWith('in rows'))) {
      const field = aField({ rowWidthInches: Number.parseFloat(way.words) });
      const { picks } = rank(field, [bushy, upright], season, rules);
      expect(picks[0]?.code).toBe('UPRIGHT');
      expect(picks[0]?.expected).toBeCloseTo(way.expected, 9);
    }
  });

  test('lime would do where sour soil feeds the disease it falls to', () => {
    const field = aField({ phShares: allAtPh(5.2), brownStemRotHistory: true, soybeanYearsOfLastFour: 4 });
    const weak = aVariety({ code: 'WEAK', brownStemRot: 6, standability: 9 });
    const tough = aVariety({ code: 'TOUGH', brownStemRot: 9, standability: 2.4 });
    const before = rank(field, [weak, tough], season, rules).picks[0]!.code;
    expect(before).toBe('TOUGH');
    const answer = whatWouldMakeItFirst(field, [weak, tough], season, rules, 'WEAK');
    expect(answer.ways.map((way) => way.words)).toContain('lime to pH 6.5');
    expect(answer.ways.every((way) => way.leadBushels > 0)).toBe(true);
  });

  test('says plainly when nothing tried would', () => {
    const poor = aVariety({ code: 'POOR', standability: 1, phytophthora: 1, emergence: 1, drought: 1, bushType: 'medium' });
    const answer = whatWouldMakeItFirst(aField(), [poor, aVariety({ code: 'BEST', standability: 9 })], season, rules, 'POOR');
    expect(answer.outcome).toBe('none');
    expect(answer.sentence).toMatch(/^Nothing tried puts POOR first: row widths .* alone and in pairs\.$/);
  });

  test('the first is first already, and a stopped one says why', () => {
    expect(whatWouldMakeItFirst(aField(), [bushy, upright], season, rules, 'BUSHY').outcome).toBe('first');
    const gone = aVariety({ code: 'GONE', unitsOnHand: 0 });
    expect(whatWouldMakeItFirst(aField(), [bushy, gone], season, rules, 'GONE').sentence).toBe('GONE is stopped here: sold out.');
    expect(() => whatWouldMakeItFirst(aField(), [bushy], season, rules, 'nobody')).toThrow(RangeError);
  });
});
