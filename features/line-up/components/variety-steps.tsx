'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import type { LineUpVariety } from '../model';

/** Publish, take back to draft, or take out of the line-up (asked twice). */
export function VarietySteps({
  variety,
  setPublished,
  archive,
}: {
  variety: Pick<LineUpVariety, 'id' | 'code' | 'published'>;
  setPublished: (input: unknown) => Promise<Outcome<null>>;
  archive: (input: unknown) => Promise<Outcome<null>>;
}) {
  const router = useRouter();
  const [sure, setSure] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const [pending, startTransition] = useTransition();
  const run = (work: () => Promise<Outcome<null>>, then: () => void) =>
    startTransition(async () => {
      const outcome = await work();
      setProblem(outcome.ok ? null : (outcome.problems[0]?.message ?? null));
      if (outcome.ok) then();
    });
  return (
    <>
      {problem ? (
        <span role="alert" className="self-center text-rust-deep">
          {problem}
        </span>
      ) : null}
      <Button
        pending={pending}
        onClick={() =>
          run(
            () => setPublished({ varietyId: variety.id, published: !variety.published }),
            () => router.refresh(),
          )
        }
      >
        {variety.published ? 'Back to draft' : 'Publish'}
      </Button>
      <Button
        kind="danger"
        pending={pending}
        onClick={() =>
          sure
            ? run(
                () => archive({ varietyId: variety.id }),
                () => router.push('/line-up'),
              )
            : setSure(true)
        }
      >
        {sure ? `Yes, take ${variety.code} out` : 'Take out of the line-up'}
      </Button>
    </>
  );
}
