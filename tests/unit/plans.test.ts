import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { columnsFor, PLAN_COLUMNS } from '@/features/plans/columns';
import { planCsv } from '@/features/plans/exports/csv';
import { outlineOf } from '@/features/plans/exports/outline';
import { figuresOf, totalsOf } from '@/features/plans/model';
import { exactUnits, suggestedSeedsPerAcre, wholeUnits } from '@/features/plans/seed-math';
import { HOLDING_STATES, mayStep, nextState, PLAN_STEPS, type PlanState, type PlanStep } from '@/features/plans/states';
import { aBoundary, aLine, aPlanView } from '../support/plan-view';

describe('figures of a row', () => {
  test('79.6 ac at 140,000 in 15 in rows: 4.02 seeds a foot, 52 lb an acre, 79.6 units', () => {
    const figures = figuresOf(aLine());
    expect(figures.seedsPerFoot).toBeCloseTo(4.02, 2);
    expect(figures.poundsPerAcre).toBeCloseTo(51.85, 2);
    expect(figures.units).toBeCloseTo(79.6, 6);
    expect(figures.seedCostCents).toBe(493_520);
  });

  test('what is missing stays missing: no variety no rate, no row width no seeds a foot, no ledger no bushels', () => {
    expect(figuresOf(aLine({ variety: null }))).toMatchObject({ units: null, seedsPerFoot: null, expected: null, pounds: null });
    expect(figuresOf(aLine({ rowWidthInches: null })).seedsPerFoot).toBeNull();
    expect(figuresOf(aLine({ assessment: null })).expected).toBeNull();
  });

  test('a lot without a seed count is reckoned at the usual 2,800 and says so', () => {
    const line = aLine();
    const figures = figuresOf({ ...line, lot: { ...line.lot!, seedsPerLb: null } });
    expect(figures.poundsAreUsual).toBe(true);
    expect(figures.poundsPerAcre).toBeCloseTo(50, 6);
  });
});

describe('totals', () => {
  const lines = [
    aLine({ fieldName: 'Home 80', areaAcres: 79.6 }),
    aLine({ fieldName: 'East', areaAcres: 21.1 }),
    aLine({ fieldName: 'Mill Bottom', areaAcres: 68.4, code: 'CR 26' }),
    aLine({ fieldName: 'New', areaAcres: 40, variety: null, lot: null }),
  ];

  test('units are rounded up once per lot, not once per field', () => {
    const totals = totalsOf(lines);
    expect(totals.varieties.map((one) => [one.variety.code, one.units])).toEqual([
      ['CR 24', 101],
      ['CR 26', 69],
    ]);
    expect(totals.units).toBe(170);
  });

  test('acres count every field, the expected yield only those with a pick', () => {
    const totals = totalsOf(lines);
    expect(totals.acres).toBeCloseTo(209.1, 6);
    expect(totals.placedAcres).toBeCloseTo(169.1, 6);
    expect(totals.expectedPerAcre).toBeCloseTo(58.2, 6);
    expect(totals.varieties[0]?.shareOfAcres).toBeCloseTo(100.7 / 209.1, 6);
  });

  test('whole units cover the seed and never by more than one unit', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 2000, noNaN: true }), fc.integer({ min: 60_000, max: 250_000 }), (acres, rate) => {
        const exact = exactUnits(acres, rate);
        expect(wholeUnits(exact)).toBeGreaterThanOrEqual(exact - 0.001);
        expect(wholeUnits(exact) - exact).toBeLessThan(1.001);
      }),
    );
  });

  test('80 ac at 140,000 is 80 units, not 81 by arithmetic dust', () => {
    expect(wholeUnits(exactUnits(80, 140_000))).toBe(80);
    expect(wholeUnits(0.1 + 0.2 + 79.7)).toBe(80);
    expect(wholeUnits(80.01)).toBe(81);
  });
});

describe('the suggested rate', () => {
  test('goes up with narrower rows, later planting and poorer germination', () => {
    const rate = (rowWidthInches: number | null, plantingDate: string | null, germinationPercent: number | null) =>
      suggestedSeedsPerAcre({ rowWidthInches, plantingDate, germinationPercent });
    expect(rate(30, '2027-05-08', 90)).toBe(131_000);
    expect(rate(15, '2027-05-08', 90)).toBe(144_000);
    expect(rate(7.5, '2027-05-08', 90)).toBe(157_000);
    expect(rate(15, '2027-06-05', 90)).toBeGreaterThan(rate(15, '2027-05-20', 90));
    expect(rate(15, '2027-05-08', 80)).toBeGreaterThan(rate(15, '2027-05-08', 95));
    expect(rate(null, null, null)).toBe(rate(15, '2027-05-08', 90));
  });
});

describe('states of a plan', () => {
  const states: PlanState[] = ['draft', 'proposed', 'change asked', 'agreed', 'planted', 'harvested'];

  test('only a grower agrees, and only what is proposed', () => {
    for (const state of states) {
      expect(mayStep('agree', state, 'grower')).toBe(state === 'proposed');
      expect(mayStep('agree', state, 'rep')).toBe(false);
      expect(mayStep('agree', state, 'manager')).toBe(false);
    }
  });

  test('an agreed plan is changed only by opening it again or by a change asked', () => {
    const open = (Object.keys(PLAN_STEPS) as PlanStep[]).filter((step) => nextState(step, 'agreed') !== null);
    expect(open.sort()).toEqual(['ask change', 'mark planted', 'reopen']);
  });

  test('seed is held while proposed, agreed and planted, and freed by every way back', () => {
    expect(HOLDING_STATES).toEqual(['proposed', 'agreed', 'planted']);
    for (const step of ['withdraw', 'ask change', 'reopen'] as const) {
      expect(HOLDING_STATES.includes(PLAN_STEPS[step].to)).toBe(false);
    }
  });
});

describe('the columns', () => {
  test('every column is named once and stands somewhere', () => {
    expect(new Set(PLAN_COLUMNS.map((column) => column.id)).size).toBe(PLAN_COLUMNS.length);
    expect(PLAN_COLUMNS.every((column) => column.places.length > 0)).toBe(true);
  });

  test('a grower sees no price anywhere', () => {
    for (const place of ['screen', 'csv', 'xlsx', 'pdf'] as const) {
      expect(columnsFor(place, false).some((column) => column.id === 'seedCost')).toBe(false);
    }
    expect(planCsv(aPlanView(), false)).not.toMatch(/cost|4935/i);
  });

  test('the CSV has real numbers, the cautions, and no live formula', () => {
    const text = planCsv(aPlanView([aLine({ fieldName: '=HYPERLINK("http://x")', note: 'end, row "3"' })]), true);
    const [head, row] = text.split('\r\n');
    expect(head?.split(',').slice(0, 4)).toEqual(['farm', 'field', 'acres', 'variety']);
    expect(row).toContain('"\'=HYPERLINK(""http://x"")"');
    expect(row).toContain('79.6,CR 24,2.4,CR 24-71,15,140000,4.02,51.9,79.6,4127,4935.2,58.2');
    expect(row).toContain('"end, row ""3"""');
    expect(text).toContain('not a promise of yield');
  });
});

describe('the outline of a field', () => {
  test('stays in its box, keeps its shape and carries a round scale', () => {
    const outline = outlineOf(aBoundary(), 150, 120);
    const numbers = [...outline.path.matchAll(/(-?[\d.]+) (-?[\d.]+)/g)].map((match) => [Number(match[1]), Number(match[2])]);
    expect(numbers).toHaveLength(6);
    for (const [x, y] of numbers as [number, number][]) {
      expect(x).toBeGreaterThanOrEqual(0);
      expect(x).toBeLessThanOrEqual(150);
      expect(y).toBeGreaterThanOrEqual(0);
      expect(y).toBeLessThanOrEqual(120);
    }
    expect([500, 1000]).toContain(outline.scaleFeet);
  });
});
