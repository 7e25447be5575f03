'use server';

import { revalidatePath } from 'next/cache';
import { requireViewer } from '@/features/accounts/viewer';
import type { Outcome } from '@/lib/errors';
import * as scoring from './changes/score';

/** Scores every field of an operation for the season being planned, and stores the rankings. */
export async function scoreOperation(operationId: string): Promise<Outcome<{ fieldCount: number; pickCount: number }>> {
  const viewer = await requireViewer();
  const outcome = await scoring.scoreOperation(viewer, { operationId, season: viewer.season });
  revalidatePath('/fields', 'layout');
  revalidatePath('/plans', 'layout');
  return outcome;
}
