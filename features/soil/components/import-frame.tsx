'use client';

import type { ReactNode } from 'react';
import { Button, LinkButton } from '@/lib/ui/button';
import { FileDrop, ProgressBar } from '@/lib/ui/file-drop';
import { Notice, Panel } from '@/lib/ui/page';
import type { useSoilImport } from './soil-import-steps';

/** What stands around every step of a soil import: problems, what was kept, the file button, and going on with an earlier one. */
export function ImportFrame({
  operationId,
  steps,
  drop,
  resume,
  children,
}: {
  operationId: string;
  steps: Omit<ReturnType<typeof useSoilImport<unknown>>, 'checked'>;
  drop: { label: string; accept: string; multiple: boolean; hint: string };
  resume: { uploadId: string; fileName: string } | null;
  /** The check step, when there is one. */
  children: ReactNode;
}) {
  const { sending, problems, kept, pending } = steps;
  return (
    <div className="flex flex-col gap-5">
      {problems.length > 0 ? (
        <Notice kind="error" title="Not kept">
          {problems.slice(0, 20).map((problem) => (
            <p key={problem}>{problem}</p>
          ))}
          {problems.length > 20 ? <p>And {problems.length - 20} more.</p> : null}
        </Notice>
      ) : null}
      {kept ? (
        <Notice kind="good" title={kept.words}>
          <p className="mb-3">Scores that rest on this soil are stale now; score the fields again to use it.</p>
          <div className="flex flex-wrap gap-2">
            <LinkButton kind="action" href={`/fields?operation=${operationId}`}>
              See the fields
            </LinkButton>
            <Button pending={pending} onClick={steps.undo}>
              Take this import back
            </Button>
          </div>
        </Notice>
      ) : null}
      {children ?? (
        <FileDrop
          label={drop.label}
          accept={drop.accept}
          multiple={drop.multiple}
          disabled={sending !== null || pending}
          onFiles={(files) => void steps.choose(files)}
        >
          <p>{drop.hint}</p>
        </FileDrop>
      )}
      {sending ? (
        <ProgressBar
          done={sending.done}
          total={sending.total}
          words={`Sending: ${(sending.done / 1e6).toFixed(1)} of ${(sending.total / 1e6).toFixed(1)} MB`}
        />
      ) : null}
      {pending && !sending ? <p role="status">{children ? 'Working…' : 'Reading the file…'}</p> : null}
      {resume && !children && !kept && !pending && !sending ? (
        <Panel>
          <p className="mb-3 break-words">
            <b>{resume.fileName}</b> was sent earlier and nothing of it is kept yet.
          </p>
          <Button onClick={() => steps.inspect(resume.uploadId)}>Go on with it</Button>
        </Panel>
      ) : null}
    </div>
  );
}
