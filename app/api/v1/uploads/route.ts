import { withViewer } from '@/features/accounts/route';
import { incomingFiles } from '@/features/imports/incoming';
import { receiveUpload } from '@/features/imports/machine';
import { uploadQuerySchema } from '@/features/imports/schemas';
import { jsonOutcome, jsonProblem } from '@/lib/http';

/** Takes in the files of an import, streamed: POST a form with files to ?kind=…&operation=…. */
export const POST = withViewer(async (viewer, request) => {
  const query = uploadQuerySchema.safeParse(Object.fromEntries(new URL(request.url).searchParams));
  if (!query.success) return jsonProblem(400, query.error.issues[0]?.message ?? 'Say what is brought in.');
  if (!request.headers.get('content-type')?.includes('multipart/form-data')) return jsonProblem(415, 'Send the files as a form.');
  const { kind, operation } = query.data;
  return jsonOutcome(
    await receiveUpload(viewer, { kind, operationId: operation ?? null, season: viewer.season }, incomingFiles(request)),
  );
});
