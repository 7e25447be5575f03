import 'server-only';
import type { Viewer } from '@/features/accounts/model';
import { readUploadFiles } from '@/features/imports/machine';
import type { Outcome } from '@/lib/errors';
import { runInWorker } from '@/lib/worker/run';
import type { ReadBoundaries } from './readers/read-boundaries';
import { BOUNDARY_LIMITS } from './readers/reader';

/** Reads the boundaries of a stored upload in a worker thread, under limits of time and memory. */
export async function readUpload(
  viewer: Viewer,
  about: { uploadId: string; crs?: string; nameColumn?: string },
): Promise<Outcome<ReadBoundaries>> {
  const files = await readUploadFiles(viewer, about.uploadId);
  return runInWorker<ReadBoundaries>(
    'read-boundaries',
    { files, options: { crs: about.crs || undefined, nameColumn: about.nameColumn || undefined } },
    { timeoutSeconds: BOUNDARY_LIMITS.seconds, memoryMegabytes: BOUNDARY_LIMITS.memoryMegabytes },
  );
}
