import { good } from '@/lib/errors';
import { serve } from '@/lib/worker/serve';
import type { PlanProblem } from '../solver/problem';
import { solvePlan } from '../solver/solve';

await serve(async ({ problem, seconds }: { problem: PlanProblem; seconds: number }, progress) =>
  good(
    await solvePlan(problem, {
      seconds,
      onProgress: (gone, allowed) =>
        progress(Math.min(Math.round(gone * 10), Math.round(allowed * 10)), Math.round(allowed * 10)),
    }),
  ),
);
