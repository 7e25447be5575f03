'use client';

import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button } from '@/lib/ui/button';
import { FileDrop, ProgressBar } from '@/lib/ui/file-drop';
import { Notice } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { sendFiles } from '@/lib/upload';
import type { MaturityZone } from '../zones';

interface Shape {
  index: number;
  name: string;
  outline: MaturityZone['geometry'];
  relativeMaturityFrom: number | null;
  relativeMaturityTo: number | null;
}

type Said = Outcome<{ words: string }>;

export interface ZoneFileActions {
  inspect: (uploadId: string) => Promise<Outcome<{ format: string; shapes: Shape[]; leftOut: number }>>;
  keep: (input: unknown) => Promise<Said>;
}

const BOX = 'min-h-11 w-full border border-ink/40 bg-white px-2 lg:min-h-9';

/** Zones from a file: choose it, give each shape its range, keep. Nothing is written before "Keep". */
export function ZoneFile({ actions, onDone }: { actions: ZoneFileActions; onDone: (outcome: Said) => void }) {
  const [sending, setSending] = useState<{ done: number; total: number } | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const [checked, setChecked] = useState<{ uploadId: string; shapes: Shape[]; leftOut: number } | null>(null);
  const [pending, startTransition] = useTransition();
  const fail = (outcome: { problems: { message: string }[] }) => setProblems(outcome.problems.map((one) => one.message));

  async function choose(files: File[]) {
    setProblems([]);
    setChecked(null);
    setSending({ done: 0, total: files.reduce((sum, file) => sum + file.size, 0) });
    const sent = await sendFiles({ kind: 'maturity-zones', operationId: null }, files, (done, total) =>
      setSending({ done, total }),
    );
    setSending(null);
    if (!sent.ok) return fail(sent);
    startTransition(async () => {
      const outcome = await actions.inspect(sent.value.uploadId);
      if (outcome.ok) setChecked({ uploadId: sent.value.uploadId, ...outcome.value });
      else fail(outcome);
    });
  }

  function keep(form: FormData) {
    if (!checked) return;
    const shapes = checked.shapes
      .filter((shape) => form.get(`keep-${shape.index}`) === 'on')
      .map((shape) => ({
        index: shape.index,
        name: form.get(`name-${shape.index}`),
        relativeMaturityFrom: form.get(`from-${shape.index}`) || null,
        relativeMaturityTo: form.get(`to-${shape.index}`) || null,
      }));
    const unset = shapes.find((shape) => shape.relativeMaturityFrom === null || shape.relativeMaturityTo === null);
    if (unset) return setProblems([`${unset.name} has no range yet. Give RM from and to, or leave it out.`]);
    startTransition(async () => {
      const outcome = await actions.keep({ uploadId: checked.uploadId, shapes });
      if (outcome.ok) {
        setChecked(null);
        setProblems([]);
        onDone(outcome);
      } else fail(outcome);
    });
  }

  return (
    <details className="border border-line bg-paper p-4" open={checked !== null || undefined}>
      <summary className="cursor-pointer font-display font-bold text-lg">Zones from a file</summary>
      <div className="flex flex-col gap-3 pt-3">
        {problems.length > 0 ? (
          <Notice kind="error" title="Not kept">
            {problems.map((problem) => (
              <p key={problem}>{problem}</p>
            ))}
          </Notice>
        ) : null}
        <FileDrop
          label="Choose a zone file"
          accept=".zip,.geojson,.json,.kml,.kmz"
          disabled={pending || sending !== null}
          onFiles={choose}
        >
          A zipped shapefile, GeoJSON, KML or KMZ. You give each shape its range before anything is kept.
        </FileDrop>
        {sending ? <ProgressBar done={sending.done} total={sending.total} words="Sending the file" /> : null}
        {checked ? (
          <form
            onSubmit={(event) => {
              event.preventDefault();
              keep(new FormData(event.currentTarget));
            }}
            className="flex flex-col gap-3"
          >
            {checked.leftOut > 0 ? <p>{checked.leftOut} shapes hold no ground and are left out.</p> : null}
            <Table caption="Shapes of the file">
              <thead>
                <tr>
                  <Th>Keep</Th>
                  <Th>Name</Th>
                  <Th>RM from</Th>
                  <Th>to</Th>
                </tr>
              </thead>
              <tbody>
                {checked.shapes.map((shape) => (
                  <tr key={shape.index}>
                    <Td>
                      <input
                        type="checkbox"
                        name={`keep-${shape.index}`}
                        defaultChecked
                        aria-label={`Keep ${shape.name}`}
                        className="size-5 accent-bloom"
                      />
                    </Td>
                    <Td>
                      <input
                        name={`name-${shape.index}`}
                        defaultValue={shape.name}
                        aria-label={`Name of shape ${shape.index + 1}`}
                        className={BOX}
                      />
                    </Td>
                    <Td>
                      <input
                        name={`from-${shape.index}`}
                        defaultValue={shape.relativeMaturityFrom ?? ''}
                        inputMode="decimal"
                        aria-label={`RM from, ${shape.name}`}
                        className={`${BOX} max-w-16`}
                      />
                    </Td>
                    <Td>
                      <input
                        name={`to-${shape.index}`}
                        defaultValue={shape.relativeMaturityTo ?? ''}
                        inputMode="decimal"
                        aria-label={`RM to, ${shape.name}`}
                        className={`${BOX} max-w-16`}
                      />
                    </Td>
                  </tr>
                ))}
              </tbody>
            </Table>
            <div className="flex gap-2">
              <Button type="submit" kind="action" pending={pending}>
                Keep the zones
              </Button>
              <Button onClick={() => setChecked(null)}>Leave it</Button>
            </div>
          </form>
        ) : null}
      </div>
    </details>
  );
}
