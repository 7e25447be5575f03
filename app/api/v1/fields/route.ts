import { withViewer } from '@/features/accounts/route';
import { chosenOperation } from '@/features/growers/queries';
import { scoredFieldsOf } from '@/features/placement/queries';
import { fieldLine } from '@/features/placement/view';
import { good } from '@/lib/errors';
import { jsonOutcome, jsonProblem } from '@/lib/http';

/** Fields of an operation (?operation=ID, else the first in scope) with their outline, best pick and what is missing. */
export const GET = withViewer(async (viewer, request) => {
  const asked = new URL(request.url).searchParams.get('operation') ?? undefined;
  const operation = await chosenOperation(viewer, asked);
  // A list of another operation than the one asked for would be taken for it.
  if (!operation || (asked && operation.id !== asked)) return jsonProblem(404, 'No such operation.');
  const fields = await scoredFieldsOf(viewer, operation.id, viewer.season);
  return jsonOutcome(
    good({
      operation: { id: operation.id, name: operation.name },
      season: viewer.season,
      fields: fields.map((scored) => fieldLine(scored)),
    }),
  );
});
