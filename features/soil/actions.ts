'use server';

import { revalidatePath } from 'next/cache';
import { requireViewer } from '@/features/accounts/viewer';
import { discardUpload } from '@/features/imports/machine';
import type { Outcome } from '@/lib/errors';
import * as changes from './changes';
import type { SoilInspection } from './import-model';
import { inspectSoilTests as inspectTests } from './inspect';
import type { SurveyInspection } from './survey/model';
import { inspectSurvey as inspectArea } from './survey/prepare';

export async function inspectSoilTests(input: unknown): Promise<Outcome<SoilInspection>> {
  return inspectTests(await requireViewer(), input);
}

export async function inspectSurvey(input: unknown): Promise<Outcome<SurveyInspection>> {
  return inspectArea(await requireViewer(), input);
}

export async function keepSoilTests(input: unknown): ReturnType<typeof changes.keepSoilTests> {
  const outcome = await changes.keepSoilTests(await requireViewer(), input);
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function keepSurvey(input: unknown): ReturnType<typeof changes.keepSurvey> {
  const outcome = await changes.keepSurvey(await requireViewer(), input);
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function undoSoilImport(uploadId: string): ReturnType<typeof changes.undoSoilImport> {
  const outcome = await changes.undoSoilImport(await requireViewer(), { uploadId });
  revalidatePath('/fields', 'layout');
  return outcome;
}

export async function discardSoilImport(uploadId: string): Promise<Outcome<null>> {
  const outcome = await discardUpload(await requireViewer(), uploadId);
  revalidatePath('/soil/import');
  return outcome;
}
