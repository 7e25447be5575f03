'use server';

import { revalidatePath } from 'next/cache';
import { requireViewer } from '@/features/accounts/viewer';
import { discardUpload } from '@/features/imports/machine';
import type { Outcome } from '@/lib/errors';
import * as changes from './changes';
import * as imports from './import-changes';
import type { LineUpInspection } from './import-model';
import * as undoing from './import-undo';

function renew<Value>(outcome: Value): Value {
  revalidatePath('/line-up', 'layout');
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function createVariety(input: unknown): ReturnType<typeof changes.createVariety> {
  return renew(await changes.createVariety(await requireViewer(), input));
}

export async function updateVariety(input: unknown): ReturnType<typeof changes.updateVariety> {
  return renew(await changes.updateVariety(await requireViewer(), input));
}

export async function setPublished(input: unknown): Promise<Outcome<null>> {
  return renew(await changes.setPublished(await requireViewer(), input));
}

export async function archiveVariety(input: unknown): Promise<Outcome<null>> {
  return renew(await changes.archiveVariety(await requireViewer(), input));
}

export async function saveLot(input: unknown): ReturnType<typeof changes.saveLot> {
  return renew(await changes.saveLot(await requireViewer(), input));
}

export async function archiveLot(input: unknown): Promise<Outcome<null>> {
  return renew(await changes.archiveLot(await requireViewer(), input));
}

export async function inspectLineUp(input: unknown): Promise<Outcome<LineUpInspection>> {
  return imports.inspectLineUp(await requireViewer(), input);
}

export async function keepLineUp(input: unknown): ReturnType<typeof imports.keepLineUp> {
  return renew(await imports.keepLineUp(await requireViewer(), input));
}

export async function undoLineUp(uploadId: string): Promise<Outcome<null>> {
  return renew(await undoing.undoLineUp(await requireViewer(), { uploadId }));
}

export async function discardLineUp(uploadId: string): Promise<Outcome<null>> {
  return discardUpload(await requireViewer(), uploadId);
}
