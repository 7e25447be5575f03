'use server';

import { revalidatePath } from 'next/cache';
import type { Viewer } from '@/features/accounts/model';
import { requireViewer } from '@/features/accounts/viewer';
import type { Outcome, Problem } from '@/lib/errors';
import * as rows from './changes/rows';
import * as links from './changes/sheet-links';
import * as steps from './changes/steps';
import type { PlanView } from './model';
import { planOf } from './queries';

/** What a form of the plan shows after its action. */
export type PlanFormState = Outcome<{ words: string }> | null;

/** After an edit: the problems, if any, and the plan as it stands now, so that the screen never guesses. */
export interface EditAnswer {
  problems: Problem[];
  words: string | null;
  view: PlanView;
}

interface Key {
  operationId: string;
  season: number;
}

async function answer<Value>(
  viewer: Viewer,
  key: Key,
  outcome: Outcome<Value>,
  words: (value: Value) => string | null = () => null,
): Promise<EditAnswer> {
  revalidatePath(`/plans/${key.operationId}/${key.season}`);
  return {
    problems: outcome.ok ? [] : outcome.problems,
    words: outcome.ok ? words(outcome.value) : null,
    view: await planOf(viewer, key.operationId, key.season),
  };
}

export async function editRow(
  input: Key & { fieldId: string; partName: string; revision: number; set: object },
): Promise<EditAnswer> {
  const viewer = await requireViewer();
  return answer(viewer, input, await rows.setRow(viewer, input));
}

export async function takeOffRow(input: Key & { fieldId: string; partName: string; revision: number }): Promise<EditAnswer> {
  const viewer = await requireViewer();
  return answer(viewer, input, await rows.removeRow(viewer, input));
}

export async function fillPlan(input: Key): Promise<EditAnswer> {
  const viewer = await requireViewer();
  return answer(viewer, input, await rows.fillFromPicks(viewer, input), ({ placed, left }) =>
    left.length === 0
      ? `${placed} fields filled.`
      : `${placed} fields filled. Left open, for want of a score or of a pick in supply: ${left.join(', ')}.`,
  );
}

export async function takeProposal(
  input: Key & { revision: number; rows: { fieldId: string; varietyId: string }[] },
): Promise<EditAnswer> {
  const viewer = await requireViewer();
  return answer(viewer, input, await rows.applyProposal(viewer, input), () => 'The proposal is on the plan.');
}

async function step(
  form: FormData,
  change: (viewer: Viewer, input: unknown) => Promise<Outcome<unknown>>,
  words: string,
): Promise<PlanFormState> {
  const viewer = await requireViewer();
  const input = Object.fromEntries(form);
  const outcome = await change(viewer, input);
  revalidatePath('/plans', 'layout');
  return outcome.ok ? { ok: true, value: { words } } : outcome;
}

export async function proposePlan(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  await requireViewer();
  return step(form, steps.propose, 'Proposed. The grower has mail, and the seed is held.');
}

export async function withdrawPlan(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  await requireViewer();
  return step(form, steps.withdraw, 'Taken back. The plan is a draft again and its seed is free.');
}

export async function reopenPlan(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  await requireViewer();
  return step(form, steps.reopen, 'Opened again as a draft. What was agreed stands in the history.');
}

export async function agreePlan(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  await requireViewer();
  return step(form, steps.agree, 'Agreed. Your rep has mail, and the seed is reserved.');
}

export async function askPlanChange(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  await requireViewer();
  return step(form, steps.askChange, 'Asked. Your rep has mail with your words.');
}

export async function commentOnPlan(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  await requireViewer();
  return step(form, steps.comment, 'Written down.');
}

/** The words carry the link: it is shown once and never kept. */
export async function makeSheetLink(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  const viewer = await requireViewer();
  const outcome = await links.makeLink(viewer, Object.fromEntries(form));
  revalidatePath('/plans', 'layout');
  return outcome.ok ? { ok: true, value: { words: outcome.value.link } } : outcome;
}

export async function revokeSheetLink(_before: PlanFormState, form: FormData): Promise<PlanFormState> {
  await requireViewer();
  return step(form, links.revokeLink, 'Revoked. The link opens nothing any more.');
}

/** Puts a pick of the field page on the plan; says what was put, or why not. */
export async function putPickOnPlan(
  key: Key & { revision: number },
  fieldId: string,
  varietyId: string,
): Promise<Outcome<{ words: string }>> {
  const viewer = await requireViewer();
  const outcome = await rows.putOnPlan(viewer, { ...key, fieldId, varietyId });
  revalidatePath(`/plans/${key.operationId}/${key.season}`);
  revalidatePath(`/fields/${fieldId}`);
  return outcome.ok ? { ok: true, value: { words: 'It is on the plan. Set its lot and seeds per acre there.' } } : outcome;
}
