'use client';

import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';

/** Scores every field of an operation; says what came of it. */
export function ScoreButton({
  operationId,
  action,
  label,
  kind = 'action',
}: {
  operationId: string;
  action: (operationId: string) => Promise<Outcome<{ fieldCount: number; pickCount: number }>>;
  label: string;
  kind?: 'action' | 'plain';
}) {
  const [words, setWords] = useState<string | null>(null);
  const [pending, startTransition] = useTransition();
  return (
    <span className="inline-flex flex-wrap items-center gap-3">
      <Button
        kind={kind}
        pending={pending}
        onClick={() =>
          startTransition(async () => {
            const outcome = await action(operationId);
            setWords(
              outcome.ok
                ? `Scored ${outcome.value.fieldCount} fields against ${outcome.value.pickCount} varieties.`
                : outcome.problems.map((problem) => problem.message).join(' '),
            );
          })
        }
      >
        {pending ? 'Scoring…' : label}
      </Button>
      <span role="status">{words}</span>
    </span>
  );
}
