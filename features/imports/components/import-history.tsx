'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { formatMoment } from '@/lib/dates';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import { Notice } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { STATE_WORDS, type UploadSummary } from '../model';

/** What was brought in before: what became of it, the original to download, and taking it back. */
export function ImportHistory({
  uploads,
  undo,
}: {
  uploads: UploadSummary[];
  undo: (uploadId: string) => Promise<Outcome<unknown>>;
}) {
  const router = useRouter();
  const [problem, setProblem] = useState<string | null>(null);
  const [pending, startTransition] = useTransition();
  if (uploads.length === 0) return null;
  return (
    <section className="mt-8" aria-labelledby="import-history">
      <h2 id="import-history" className="mb-3 text-xl">
        Brought in before
      </h2>
      {problem ? (
        <Notice kind="error" className="mb-3">
          {problem}
        </Notice>
      ) : null}
      <Table caption="Imports of this operation" stacked>
        <thead>
          <tr>
            <Th>File</Th>
            <Th>When, by whom</Th>
            <Th>What became of it</Th>
            <Th>
              <span className="sr-only">Take back</span>
            </Th>
          </tr>
        </thead>
        <tbody>
          {uploads.map((upload) => (
            <tr key={upload.id}>
              <Td>
                {upload.fileNames.map((name, ordinal) => (
                  <a
                    key={name}
                    href={`/api/v1/uploads/${upload.id}/file/${ordinal}`}
                    download
                    className="block underline underline-offset-4"
                  >
                    {name}
                  </a>
                ))}
              </Td>
              <Td>
                {formatMoment(upload.createdAt)}
                {upload.personName ? `, ${upload.personName}` : ''}
              </Td>
              <Td>
                <b>{STATE_WORDS[upload.state]}</b>
                {upload.outcome ? ` · ${upload.outcome}` : ''}
                {upload.problems.map((words) => (
                  <span key={words} className="block text-rust-deep">
                    {words}
                  </span>
                ))}
              </Td>
              <Td>
                {upload.state === 'kept' ? (
                  <Button
                    small
                    pending={pending}
                    onClick={() =>
                      startTransition(async () => {
                        const outcome = await undo(upload.id);
                        setProblem(outcome.ok ? null : (outcome.problems[0]?.message ?? null));
                        router.refresh();
                      })
                    }
                  >
                    Take back
                  </Button>
                ) : null}
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}
