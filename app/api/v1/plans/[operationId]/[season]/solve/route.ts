import { may } from '@/features/accounts/rights';
import { withViewer } from '@/features/accounts/route';
import { planOf } from '@/features/plans/queries';
import { problemFromPlan, proposalOf, wishesSchema } from '@/features/plans/solver/from-plan';
import type { PlanSolution } from '@/features/plans/solver/problem';
import { jsonOutcome, jsonProblem } from '@/lib/http';
import { runInWorker } from '@/lib/worker/run';

/** What the solver is given on a page that somebody waits at. */
const SECONDS = 11;

interface Context {
  params: Promise<{ operationId: string; season: string }>;
}

/**
 * Solves the plan within the wishes sent, in a thread of its own. Answers a line of JSON each: `{progress:[done,total]}` as
 * it goes on, then `{proposal}` or `{problems}`. Leaving the request ends the work. Nothing is written.
 */
export const POST = withViewer<Context>(async (viewer, request, { params }) => {
  const { operationId, season } = await params;
  if (!/^20\d\d$/.test(season)) return jsonProblem(404, 'No such season.');
  if (!may(viewer, 'plan', 'change')) return jsonProblem(403, 'Your account may not propose plans.');
  const view = await planOf(viewer, operationId, Number(season));
  const wishes = wishesSchema.safeParse(await request.json().catch(() => null));
  if (!wishes.success) {
    return jsonOutcome({
      ok: false,
      problems: wishes.error.issues.map((issue) => ({ message: issue.message, path: issue.path.join('.') })),
    });
  }
  const asked = problemFromPlan(view, wishes.data);
  if (asked.problem.fields.length === 0) return jsonProblem(409, 'No field is scored yet. Score the fields first.');
  const encoder = new TextEncoder();
  const stream = new ReadableStream({
    async start(controller) {
      const say = (line: unknown) => {
        try {
          controller.enqueue(encoder.encode(`${JSON.stringify(line)}\n`));
        } catch {
          // The page was left; the signal ends the work.
        }
      };
      const outcome = await runInWorker<PlanSolution>(
        'solve',
        { problem: asked.problem, seconds: SECONDS },
        {
          timeoutSeconds: SECONDS * 3,
          memoryMegabytes: 800,
          onProgress: (done, total) => say({ progress: [done, total] }),
          signal: request.signal,
        },
      );
      say(outcome.ok ? { proposal: proposalOf(view, asked, outcome.value) } : { problems: outcome.problems });
      controller.close();
    },
  });
  return new Response(stream, { headers: { 'Content-Type': 'application/x-ndjson', 'Cache-Control': 'no-store' } });
});
