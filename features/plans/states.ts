/** What may happen to a plan, by whom and from where. Pure: asked by the server and by the screen alike. */
import type { Role } from '@/features/accounts/model';

export type PlanState = 'draft' | 'proposed' | 'change asked' | 'agreed' | 'planted' | 'harvested';
export type PlanStep = 'edit' | 'propose' | 'withdraw' | 'agree' | 'ask change' | 'reopen' | 'mark planted';

interface StepRule {
  from: readonly PlanState[];
  to: PlanState;
  roles: readonly Role[];
}

/**
 * draft → proposed → agreed → planted; a change asked brings it back to the rep, whose first edit makes it a draft again.
 * Planting is marked by the crew through a sheet link, so no role stands behind it.
 */
export const PLAN_STEPS: Record<PlanStep, StepRule> = {
  edit: { from: ['draft', 'change asked'], to: 'draft', roles: ['rep', 'manager'] },
  propose: { from: ['draft', 'change asked'], to: 'proposed', roles: ['rep', 'manager'] },
  withdraw: { from: ['proposed'], to: 'draft', roles: ['rep', 'manager'] },
  agree: { from: ['proposed'], to: 'agreed', roles: ['grower'] },
  'ask change': { from: ['proposed', 'agreed'], to: 'change asked', roles: ['grower'] },
  reopen: { from: ['agreed'], to: 'draft', roles: ['rep', 'manager'] },
  'mark planted': { from: ['agreed', 'planted'], to: 'planted', roles: [] },
};

/** Seed is spoken for while a plan is in one of these states; a plan that leaves them frees its units. */
export const HOLDING_STATES: readonly PlanState[] = ['proposed', 'agreed', 'planted'];

/** May a person of this role take this step from this state? */
export function mayStep(step: PlanStep, state: PlanState, role: Role): boolean {
  const rule = PLAN_STEPS[step];
  return rule.roles.includes(role) && rule.from.includes(state);
}

/** The state after a step; `null` when the step is not open from here. */
export function nextState(step: PlanStep, state: PlanState): PlanState | null {
  const rule = PLAN_STEPS[step];
  return rule.from.includes(state) ? rule.to : null;
}

/** One sentence: why the step is not open, and what to do. */
export function whyNot(step: PlanStep, state: PlanState): string {
  const instead: Record<PlanState, string> = {
    draft: 'It is a draft: it has to be proposed first.',
    proposed: step === 'edit' ? 'It is proposed to the grower: withdraw it to change it.' : 'It is already proposed.',
    'change asked': 'The grower asked for a change: change it and propose it again.',
    agreed: step === 'edit' ? 'It is agreed and frozen: reopen it to change it.' : 'It is already agreed.',
    planted: 'It is being planted.',
    harvested: 'Its season is over.',
  };
  return `This plan cannot take that step (${step}). ${instead[state]}`;
}
