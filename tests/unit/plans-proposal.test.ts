import { describe, expect, test } from 'vitest';
import type { Choice, PlanView } from '@/features/plans/model';
import { problemFromPlan, proposalOf, wishesSchema } from '@/features/plans/solver/from-plan';
import { aLine, aPlanView } from '../support/plan-view';

function choice(code: string, expected: number | null, relativeMaturity = 2.4): Choice {
  return { varietyId: code, code, relativeMaturity, expected, stopped: null };
}

function aScoredPlan(): PlanView {
  const lines = [
    aLine({ fieldName: 'Home 80', areaAcres: 80 }),
    aLine({ fieldName: 'East', areaAcres: 40, variety: null, lot: null, assessment: null, populationSeedsPerAcre: null }),
    aLine({ fieldName: 'New', areaAcres: 10, variety: null, lot: null, assessment: null }),
  ];
  return {
    ...aPlanView(lines),
    choices: {
      'field Home 80': [choice('CR 24', 60), choice('CR 26', 58, 2.6)],
      'field East': [choice('CR 26', 59, 2.6), choice('CR 24', 57)],
      'field New': [choice('CR 24', null)],
    },
    lots: { 'CR 24': [{ ...aLine().lot!, priceCentsPerUnit: 7000 }], 'CR 26': [] },
    supply: [{ varietyId: 'CR 24', word: 'available', unitsOnHand: 200, unitsHeldByOthers: 150 }],
  };
}

describe('the plan as a planning problem', () => {
  const asked = problemFromPlan(aScoredPlan(), wishesSchema.parse({ harvestAcresPerDay: 20, keepFieldIds: ['field Home 80'] }));

  test('an acre is worth its bushels at the price less its seed', () => {
    const home = asked.problem.value.find((one) => one.field === 'Home 80' && one.variety === 'CR 24');
    // 60 bu × $10.50 − 140,000 ÷ 140,000 units × $70.
    expect(home?.perAcre).toBeCloseTo(630 - 70, 6);
    const free = asked.problem.value.find((one) => one.field === 'Home 80' && one.variety === 'CR 26');
    expect(free?.perAcre).toBeCloseTo(58 * 10.5, 6);
    expect(asked.present).toBeCloseTo(560 * 80, 6);
  });

  test('supply is what other plans leave, unscored fields stay out, kept fields are locked, harvest spreads maturities', () => {
    expect(asked.problem.varieties).toEqual([
      { id: 'CR 24', units: 50 },
      { id: 'CR 26', units: null },
    ]);
    expect(asked.problem.fields.map((field) => field.id)).toEqual(['Home 80', 'East']);
    expect(asked.problem.locks).toEqual([{ field: 'Home 80', variety: 'CR 24' }]);
    expect(asked.problem.groups.map((group) => [group.name, group.maxAcres])).toEqual([
      ['harvest of RM 2.0–2.4', 100],
      ['harvest of RM 2.5–2.9', 100],
    ]);
  });

  test('the answer comes back in the plan’s own fields, with the gain over the plan as it stands', () => {
    const proposal = proposalOf(aScoredPlan(), asked, {
      status: 'optimal',
      objective: asked.present + 1000,
      gap: 0,
      seconds: 1,
      rows: [{ field: 'East', variety: 'CR 26', acres: 40, units: 40 }],
      binding: ['units of CR 24'],
      shadow: { 'CR 24': 11 },
      relaxation: [],
    });
    expect(proposal.gainDollars).toBeCloseTo(1000, 6);
    expect(proposal.rows).toEqual([
      { fieldId: 'field East', fieldName: 'East', varietyId: 'CR 26', code: 'CR 26', before: null },
    ]);
    expect(proposal.leftEmpty).toEqual(['Home 80', 'New']);
  });
});
