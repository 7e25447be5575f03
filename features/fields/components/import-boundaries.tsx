'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button, LinkButton } from '@/lib/ui/button';
import { FileDrop, ProgressBar } from '@/lib/ui/file-drop';
import { Notice, Panel } from '@/lib/ui/page';
import { sendFiles } from '@/lib/upload';
import type { BoundaryInspection } from '../import-model';
import { CheckShapes, type ShapeChoice } from './check-shapes';

export interface ImportActions {
  inspect: (input: { uploadId: string; crs?: string; nameColumn?: string }) => Promise<Outcome<BoundaryInspection>>;
  keep: (
    input: unknown,
  ) => Promise<Outcome<{ keptCount: number; replacedCount: number; areaAcres: number; operationId: string }>>;
  undo: (uploadId: string) => Promise<Outcome<{ count: number }>>;
  discard: (uploadId: string) => Promise<Outcome<null>>;
}

interface Kept {
  uploadId: string;
  words: string;
}

/** Choose a file → check every shape on the map → keep. Nothing is written before "Keep". */
export function ImportBoundaries({
  operation,
  knownFields,
  farmNames,
  actions,
  resume,
  crsChoices,
}: {
  operation: { id: string; name: string };
  knownFields: { id: string; name: string }[];
  farmNames: string[];
  actions: ImportActions;
  /** An upload that was checked before and not kept. */
  resume: { uploadId: string; fileName: string } | null;
  crsChoices: readonly { code: string; label: string }[];
}) {
  const router = useRouter();
  const [sending, setSending] = useState<{ done: number; total: number } | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const [checked, setChecked] = useState<{ uploadId: string; inspection: BoundaryInspection; crs?: string } | null>(null);
  const [kept, setKept] = useState<Kept | null>(null);
  const [pending, startTransition] = useTransition();

  const fail = (outcome: { problems: { message: string }[] }) => setProblems(outcome.problems.map((problem) => problem.message));

  function inspect(uploadId: string, options: { crs?: string; nameColumn?: string } = {}) {
    startTransition(async () => {
      setProblems([]);
      const outcome = await actions.inspect({ uploadId, ...options });
      if (outcome.ok) setChecked({ uploadId, inspection: outcome.value, crs: options.crs });
      else {
        setChecked(null);
        fail(outcome);
      }
    });
  }

  async function choose(files: File[]) {
    setProblems([]);
    setKept(null);
    setChecked(null);
    setSending({ done: 0, total: files.reduce((sum, file) => sum + file.size, 0) });
    const outcome = await sendFiles({ kind: 'boundaries', operationId: operation.id }, files, (done, total) =>
      setSending({ done, total }),
    );
    setSending(null);
    if (outcome.ok) inspect(outcome.value.uploadId);
    else fail(outcome);
  }

  function keep(shapes: ShapeChoice[]) {
    if (!checked) return;
    startTransition(async () => {
      setProblems([]);
      const outcome = await actions.keep({
        uploadId: checked.uploadId,
        crs: checked.crs,
        nameColumn: checked.inspection.nameColumn ?? undefined,
        shapes: shapes.map(({ index, name, farm, replaces }) => ({ index, name, farm: farm || null, replaces })),
      });
      if (!outcome.ok) return fail(outcome);
      const { keptCount, replacedCount, areaAcres } = outcome.value;
      setKept({
        uploadId: checked.uploadId,
        words: `${keptCount} ${keptCount === 1 ? 'field' : 'fields'} kept${replacedCount > 0 ? `, ${replacedCount} replaced` : ''}: ${areaAcres.toFixed(1)} ac.`,
      });
      setChecked(null);
      router.refresh();
    });
  }

  return (
    <div className="flex flex-col gap-5">
      {problems.length > 0 ? (
        <Notice kind="error" title="Not kept">
          {problems.map((problem) => (
            <p key={problem}>{problem}</p>
          ))}
        </Notice>
      ) : null}
      {kept ? (
        <KeptNotice
          kept={kept}
          operationId={operation.id}
          undo={actions.undo}
          onProblems={setProblems}
          onUndone={() => setKept(null)}
        />
      ) : null}
      {checked ? (
        <CheckShapes
          key={`${checked.uploadId} ${checked.crs ?? ''} ${checked.inspection.nameColumn ?? ''}`}
          inspection={checked.inspection}
          knownFields={knownFields}
          farmNames={farmNames}
          crsChoices={crsChoices}
          pending={pending}
          onOptions={(options) =>
            inspect(checked.uploadId, { crs: checked.crs, nameColumn: checked.inspection.nameColumn ?? undefined, ...options })
          }
          onKeep={keep}
          onDiscard={() =>
            startTransition(async () => {
              await actions.discard(checked.uploadId);
              setChecked(null);
              router.refresh();
            })
          }
        />
      ) : (
        <FileDrop
          label="Choose the boundary file"
          accept=".zip,.shp,.dbf,.prj,.cpg,.geojson,.json,.kml,.kmz"
          multiple
          disabled={sending !== null || pending}
          onFiles={(files) => void choose(files)}
        >
          <p>
            A zipped shapefile, GeoJSON, KML or KMZ. Up to 200 MB, 50,000 shapes, 5 million corners. Nothing is kept until you say
            so: first you see every boundary with its acres and what is wrong with it.
          </p>
        </FileDrop>
      )}
      {sending ? (
        <ProgressBar
          done={sending.done}
          total={sending.total}
          words={`Sending: ${(sending.done / 1e6).toFixed(1)} of ${(sending.total / 1e6).toFixed(1)} MB`}
        />
      ) : null}
      {pending && !sending ? <p role="status">{checked ? 'Working…' : 'Reading the file…'}</p> : null}
      {resume && !checked && !kept && !pending ? (
        <Panel>
          <p className="mb-3">
            <b>{resume.fileName}</b> was checked earlier and nothing of it is kept yet.
          </p>
          <Button onClick={() => inspect(resume.uploadId)}>Go on with it</Button>
        </Panel>
      ) : null}
    </div>
  );
}

function KeptNotice({
  kept,
  operationId,
  undo,
  onProblems,
  onUndone,
}: {
  kept: Kept;
  operationId: string;
  undo: ImportActions['undo'];
  onProblems: (problems: string[]) => void;
  onUndone: () => void;
}) {
  const router = useRouter();
  const [pending, startTransition] = useTransition();
  return (
    <Notice kind="good" title={kept.words}>
      <p className="mb-3">
        Next: say how each field is farmed, and bring in{' '}
        <Link className="underline underline-offset-4" href={`/soil/import?operation=${operationId}`}>
          soil tests
        </Link>
        . Until then what is unknown widens the range of every estimate.
      </p>
      <div className="flex flex-wrap gap-2">
        <LinkButton kind="action" href={`/fields?operation=${operationId}`}>
          See the fields
        </LinkButton>
        <LinkButton href={`/soil/import?operation=${operationId}`}>Bring in soil tests</LinkButton>
        <Button
          pending={pending}
          onClick={() =>
            startTransition(async () => {
              const outcome = await undo(kept.uploadId);
              if (outcome.ok) onUndone();
              else onProblems(outcome.problems.map((problem) => problem.message));
              router.refresh();
            })
          }
        >
          Take this import back
        </Button>
      </div>
    </Notice>
  );
}
