'use server';

import { revalidatePath } from 'next/cache';
import { redirect } from 'next/navigation';
import { requireViewer } from '@/features/accounts/viewer';
import type { Outcome } from '@/lib/errors';
import type { ActionState } from '@/lib/ui/action-form';
import * as assignments from './changes/assignments';
import * as farms from './changes/farms';
import * as operations from './changes/operations';

function said<Value>(outcome: Outcome<Value>, words: string): ActionState {
  if (!outcome.ok) return outcome;
  revalidatePath('/growers', 'layout');
  revalidatePath('/settings/people');
  return { ok: true, value: { words } };
}

export async function createOperation(_before: ActionState, form: FormData): Promise<ActionState> {
  const outcome = await operations.createOperation(await requireViewer(), Object.fromEntries(form));
  if (!outcome.ok) return outcome;
  revalidatePath('/growers', 'layout');
  redirect(`/growers/${outcome.value.operationId}`);
}

export async function changeOperation(_before: ActionState, form: FormData): Promise<ActionState> {
  return said(await operations.changeOperation(await requireViewer(), Object.fromEntries(form)), 'Kept.');
}

export async function archiveOperation(_before: ActionState, form: FormData): Promise<ActionState> {
  const words = 'Archived. It is in no list now; nothing of it is lost.';
  return said(await operations.archiveOperation(await requireViewer(), Object.fromEntries(form)), words);
}

export async function restoreOperation(_before: ActionState, form: FormData): Promise<ActionState> {
  return said(await operations.restoreOperation(await requireViewer(), Object.fromEntries(form)), 'The operation is back.');
}

export async function assignPerson(_before: ActionState, form: FormData): Promise<ActionState> {
  return said(await assignments.assignPerson(await requireViewer(), Object.fromEntries(form)), 'Assigned.');
}

export async function unassignPerson(_before: ActionState, form: FormData): Promise<ActionState> {
  return said(await assignments.unassignPerson(await requireViewer(), Object.fromEntries(form)), 'Taken off.');
}

export async function addFarm(_before: ActionState, form: FormData): Promise<ActionState> {
  return said(await farms.addFarm(await requireViewer(), Object.fromEntries(form)), 'The farm is added.');
}

export async function renameFarm(_before: ActionState, form: FormData): Promise<ActionState> {
  return said(await farms.renameFarm(await requireViewer(), Object.fromEntries(form)), 'Renamed.');
}
