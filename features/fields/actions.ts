'use server';

import { revalidatePath } from 'next/cache';
import { requireViewer } from '@/features/accounts/viewer';
import { discardUpload } from '@/features/imports/machine';
import type { Outcome } from '@/lib/errors';
import * as changes from './changes';
import type { BoundaryInspection } from './import-model';
import { inspectBoundaries as inspect } from './inspect';

export async function inspectBoundaries(input: {
  uploadId: string;
  crs?: string;
  nameColumn?: string;
}): Promise<Outcome<BoundaryInspection>> {
  return inspect(await requireViewer(), input);
}

export async function keepBoundaries(input: unknown): ReturnType<typeof changes.keepBoundaries> {
  const outcome = await changes.keepBoundaries(await requireViewer(), input);
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function undoBoundaries(uploadId: string): ReturnType<typeof changes.undoBoundaries> {
  const outcome = await changes.undoBoundaries(await requireViewer(), { uploadId });
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function discardBoundaries(uploadId: string): Promise<Outcome<null>> {
  const outcome = await discardUpload(await requireViewer(), uploadId);
  revalidatePath('/fields/import');
  return outcome;
}

export async function saveFacts(input: unknown): Promise<Outcome<null>> {
  const outcome = await changes.saveFacts(await requireViewer(), input);
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function copyFacts(input: unknown): Promise<Outcome<{ count: number }>> {
  const outcome = await changes.copyFacts(await requireViewer(), input);
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function renameField(input: unknown): Promise<Outcome<null>> {
  const outcome = await changes.renameField(await requireViewer(), input);
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function archiveField(input: unknown): Promise<Outcome<null>> {
  const outcome = await changes.archiveField(await requireViewer(), input);
  revalidatePath('/fields', 'layout');
  return outcome;
}
