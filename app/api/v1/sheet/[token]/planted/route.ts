import { markPlanted } from '@/features/plans/sheet';
import { jsonOutcome, jsonProblem } from '@/lib/http';

/** A mark with a photo stays well under this. */
const MOST_BYTES = 2_000_000;

interface Context {
  params: Promise<{ token: string }>;
}

/** Takes one mark from the crew's phone. The token is the right to send it; no cookie is read. */
export async function POST(request: Request, { params }: Context): Promise<Response> {
  const { token } = await params;
  if (Number(request.headers.get('content-length') ?? 0) > MOST_BYTES)
    return jsonProblem(413, 'The mark is too big. Leave the photo out.');
  let input: unknown;
  try {
    const text = await request.text();
    if (text.length > MOST_BYTES) return jsonProblem(413, 'The mark is too big. Leave the photo out.');
    input = JSON.parse(text);
  } catch {
    return jsonProblem(400, 'The mark is not JSON.');
  }
  const outcome = await markPlanted(token, input);
  if (!outcome.ok && outcome.problems.some((problem) => problem.path === 'link')) {
    return jsonProblem(404, outcome.problems[0]?.message as string);
  }
  return jsonOutcome(outcome);
}
