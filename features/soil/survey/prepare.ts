import 'server-only';
import type { Viewer } from '@/features/accounts/model';
import { fieldsOf } from '@/features/fields/queries';
import { markChecked, markFailed, readUploadFiles, uploadOf } from '@/features/imports/machine';
import { bad, good, type Outcome } from '@/lib/errors';
import { runInWorker } from '@/lib/worker/run';
import { keepSurveySchema } from '../schemas';
import type { SurveyInspection } from './model';
import { SURVEY_LIMITS } from './read-survey';

/** Reads the survey of a stored upload in a worker thread and cuts it to the operation's fields. */
export async function prepareSurvey(
  viewer: Viewer,
  upload: { id: string; operationId: string },
): Promise<Outcome<SurveyInspection>> {
  const [archive, ...others] = await readUploadFiles(viewer, upload.id);
  if (!archive || others.length > 0) return bad('Send a soil survey as one zip, as it was downloaded. Nothing was kept.');
  const fields = (await fieldsOf(viewer, upload.operationId)).map(({ id, name, boundary }) => ({ id, name, geometry: boundary }));
  return runInWorker<SurveyInspection>(
    'read-survey',
    { archive, fields },
    { timeoutSeconds: SURVEY_LIMITS.seconds, memoryMegabytes: SURVEY_LIMITS.memoryMegabytes },
  );
}

/** Reads a stored survey and says what it holds for each field, without keeping any. */
export async function inspectSurvey(viewer: Viewer, input: unknown): Promise<Outcome<SurveyInspection>> {
  const parsed = keepSurveySchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((problem) => ({ message: problem.message })));
  const upload = await uploadOf(viewer, parsed.data.uploadId);
  if (!upload.operationId || upload.kind !== 'soil-survey') return bad('This import holds no soil survey.');
  if (['kept', 'undone', 'discarded'].includes(upload.state))
    return bad(`This import is ${upload.state} already. Choose the file again to bring it in once more.`);
  const prepared = await prepareSurvey(viewer, { id: upload.id, operationId: upload.operationId });
  if (!prepared.ok) {
    await markFailed(
      viewer,
      upload.id,
      prepared.problems.map((problem) => problem.message),
    );
    return prepared;
  }
  await markChecked(viewer, upload.id, { areas: prepared.value.areas, problems: prepared.value.problems }, {});
  return good(prepared.value);
}
