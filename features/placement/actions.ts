'use server';

import { revalidatePath } from 'next/cache';
import { requireViewer } from '@/features/accounts/viewer';
import { NotAllowedError, NotFoundError, type Outcome } from '@/lib/errors';
import * as rules from './changes/rules';
import * as scoring from './changes/score';
import * as stations from './changes/stations';
import * as zones from './changes/zones';
import { type InspectedZone, inspectZones as inspect } from './zone-file';

type Said = Outcome<{ words: string }>;

function words<Value>(outcome: Outcome<Value>, say: (value: Value) => string): Said {
  return outcome.ok ? { ok: true, value: { words: say(outcome.value) }, notes: outcome.notes } : outcome;
}

/** Scores every field of an operation for the season being planned, and stores the rankings. */
export async function scoreOperation(operationId: string): Promise<Outcome<{ fieldCount: number; pickCount: number }>> {
  const viewer = await requireViewer();
  const outcome = await scoring.scoreOperation(viewer, { operationId, season: viewer.season });
  revalidatePath('/fields', 'layout');
  revalidatePath('/plans', 'layout');
  return outcome;
}

/** What changes for every field when zones, rules or stations do: its stored score becomes stale. */
function everyFieldIsStale(page: string): void {
  revalidatePath(page);
  revalidatePath('/fields', 'layout');
  revalidatePath('/plans', 'layout');
}

export async function inspectZones(
  uploadId: string,
): Promise<Outcome<{ format: string; shapes: InspectedZone[]; leftOut: number }>> {
  const viewer = await requireViewer();
  try {
    return await inspect(viewer, uploadId);
  } catch (error) {
    if (error instanceof NotFoundError || error instanceof NotAllowedError)
      return { ok: false, problems: [{ message: error.message }] };
    throw error;
  }
}

export async function keepZones(input: unknown): Promise<Said> {
  const outcome = await zones.keepZones(await requireViewer(), input);
  everyFieldIsStale('/settings/zones');
  return words(
    outcome,
    ({ count }) => `${count} ${count === 1 ? 'zone' : 'zones'} kept. Scores of fields are stale until scored again.`,
  );
}

export async function addZone(input: unknown): Promise<Said> {
  const outcome = await zones.addZone(await requireViewer(), input);
  everyFieldIsStale('/settings/zones');
  return words(outcome, ({ name }) => `${name} is kept. Scores of fields are stale until scored again.`);
}

export async function changeZone(_before: Said | null, form: FormData): Promise<Said> {
  const outcome = await zones.changeZone(await requireViewer(), Object.fromEntries(form));
  everyFieldIsStale('/settings/zones');
  return words(outcome, () => 'Kept.');
}

export async function deleteZone(_before: Said | null, form: FormData): Promise<Said> {
  const outcome = await zones.deleteZone(await requireViewer(), Object.fromEntries(form));
  everyFieldIsStale('/settings/zones');
  return words(outcome, ({ name }) => `${name} is deleted.`);
}

export async function setRules(values: Record<string, number | null>): Promise<Said> {
  const outcome = await rules.setRules(await requireViewer(), { values });
  everyFieldIsStale('/settings/rules');
  return words(
    outcome,
    ({ changedCount }) =>
      `${changedCount} ${changedCount === 1 ? 'value' : 'values'} kept. Scores of fields are stale until scored again.`,
  );
}

export async function addStations(uploadId: string): Promise<Said> {
  const outcome = await stations.addStations(await requireViewer(), { uploadId });
  everyFieldIsStale('/settings/stations');
  return words(
    outcome,
    ({ count, replacedCount }) =>
      `${count} ${count === 1 ? 'station' : 'stations'} kept${replacedCount > 0 ? `, ${replacedCount} of them instead of an older file` : ''}.`,
  );
}

export async function deleteStation(_before: Said | null, form: FormData): Promise<Said> {
  const outcome = await stations.deleteStation(await requireViewer(), Object.fromEntries(form));
  everyFieldIsStale('/settings/stations');
  return words(outcome, ({ name }) => `${name} is taken out.`);
}
