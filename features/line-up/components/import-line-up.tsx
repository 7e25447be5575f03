'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import type { Outcome } from '@/lib/errors';
import { Button, LinkButton } from '@/lib/ui/button';
import { FileDrop, ProgressBar } from '@/lib/ui/file-drop';
import { CheckField } from '@/lib/ui/form';
import { Notice, Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import { sendFiles } from '@/lib/upload';
import { COLUMNS } from '../columns';
import type { LineUpInspection } from '../import-model';

export interface LineUpImportActions {
  inspect: (input: unknown) => Promise<Outcome<LineUpInspection>>;
  keep: (input: unknown) => Promise<Outcome<{ added: number; changed: number; same: number }>>;
  discard: (uploadId: string) => Promise<Outcome<null>>;
}

/** Choose a file → match its columns → see what would change → keep. */
export function ImportLineUp({ actions }: { actions: LineUpImportActions }) {
  const router = useRouter();
  const [sending, setSending] = useState<{ done: number; total: number } | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const [checked, setChecked] = useState<{ uploadId: string; inspection: LineUpInspection; flipped: string[] } | null>(null);
  const [publish, setPublish] = useState(true);
  const [words, setWords] = useState<string | null>(null);
  const [pending, startTransition] = useTransition();
  const fail = (outcome: { problems: { message: string }[] }) => setProblems(outcome.problems.map((problem) => problem.message));

  function inspect(uploadId: string, options: { match?: (string | null)[]; flipped?: string[] } = {}) {
    startTransition(async () => {
      setProblems([]);
      const outcome = await actions.inspect({ uploadId, ...options });
      if (outcome.ok) setChecked({ uploadId, inspection: outcome.value, flipped: options.flipped ?? [] });
      else fail(outcome);
    });
  }

  async function choose(files: File[]) {
    setProblems([]);
    setWords(null);
    setChecked(null);
    setSending({ done: 0, total: 1 });
    const outcome = await sendFiles({ kind: 'line-up', operationId: null }, files.slice(0, 1), (done, total) =>
      setSending({ done, total }),
    );
    setSending(null);
    if (outcome.ok) inspect(outcome.value.uploadId);
    else fail(outcome);
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
      {words ? (
        <Notice kind="good" title={words}>
          <LinkButton href="/line-up" className="mt-2">
            See the line-up
          </LinkButton>
        </Notice>
      ) : null}
      {checked ? (
        <>
          <Match
            inspection={checked.inspection}
            flipped={checked.flipped}
            pending={pending}
            onChange={(match, flipped) => inspect(checked.uploadId, { match, flipped })}
          />
          <Effects inspection={checked.inspection} />
          <CheckField
            label="Publish the new ones at once"
            hint="Unticked, they come in as drafts."
            checked={publish}
            onChange={(event) => setPublish(event.target.checked)}
          />
          <div className="flex flex-wrap gap-2">
            <Button
              kind="action"
              pending={pending}
              disabled={checked.inspection.planned.length === 0}
              onClick={() =>
                startTransition(async () => {
                  const outcome = await actions.keep({
                    uploadId: checked.uploadId,
                    match: checked.inspection.match,
                    flipped: checked.flipped,
                    publish,
                  });
                  if (!outcome.ok) return fail(outcome);
                  setWords(`${outcome.value.added} added, ${outcome.value.changed} changed, ${outcome.value.same} as they were.`);
                  setChecked(null);
                  router.refresh();
                })
              }
            >
              Keep {checked.inspection.planned.length} {checked.inspection.planned.length === 1 ? 'row' : 'rows'}
            </Button>
            <Button
              pending={pending}
              onClick={() =>
                startTransition(async () => {
                  await actions.discard(checked.uploadId);
                  setChecked(null);
                  router.refresh();
                })
              }
            >
              Keep nothing
            </Button>
          </div>
        </>
      ) : (
        <FileDrop
          label="Choose the line-up file"
          accept=".csv,.txt,.tsv,.xlsx"
          disabled={sending !== null || pending}
          onFiles={(files) => void choose(files)}
        >
          <p>
            CSV or XLSX with a header row; a row a seed lot. A new variety needs its code and maturity, a known one its code.
            Known varieties are changed by code, new ones added; a sheet of codes, lots and units alone brings the supply up to
            date. An empty cell leaves what is kept. Nothing is kept until you have seen what would change.
          </p>
        </FileDrop>
      )}
      {sending ? <ProgressBar done={sending.done} total={sending.total} words="Sending…" /> : null}
      {pending ? <p role="status">Working…</p> : null}
    </div>
  );
}

function Match({
  inspection,
  flipped,
  pending,
  onChange,
}: {
  inspection: LineUpInspection;
  flipped: string[];
  pending: boolean;
  onChange: (match: (string | null)[], flipped: string[]) => void;
}) {
  const { headers, match, samples } = inspection;
  return (
    <Table caption="What each column of the file means" stacked>
      <thead>
        <tr>
          <Th>Column of the file</Th>
          <Th>For example</Th>
          <Th>Means</Th>
          <Th>Scale</Th>
        </tr>
      </thead>
      <tbody>
        {headers.map((header, index) => {
          const key = match[index] ?? null;
          const column = COLUMNS.find((one) => one.key === key);
          return (
            // biome-ignore lint/suspicious/noArrayIndexKey: a column is its position.
            <tr key={index}>
              <Td className="font-semibold">{header || '(no header)'}</Td>
              <Td className="text-mute">{samples[index]?.filter(Boolean).join(', ')}</Td>
              <Td>
                <select
                  aria-label={`Meaning of ${header || `column ${index + 1}`}`}
                  className="min-h-11 border border-ink/40 bg-white px-2 lg:min-h-8"
                  disabled={pending}
                  value={key ?? ''}
                  onChange={(event) =>
                    onChange(
                      match.map((one, at) =>
                        at === index ? event.target.value || null : one === event.target.value ? null : one,
                      ),
                      flipped,
                    )
                  }
                >
                  <option value="">(left out)</option>
                  {COLUMNS.map((one) => (
                    <option key={one.key} value={one.key}>
                      {one.label}
                    </option>
                  ))}
                </select>
              </Td>
              <Td>
                {column?.kind === 'rating' ? (
                  <label className="flex items-center gap-2">
                    <input
                      type="checkbox"
                      className="size-5 accent-bloom lg:size-4"
                      disabled={pending}
                      checked={flipped.includes(column.key)}
                      onChange={(event) =>
                        onChange(
                          match,
                          event.target.checked ? [...flipped, column.key] : flipped.filter((one) => one !== column.key),
                        )
                      }
                    />
                    1 is best in this file
                  </label>
                ) : null}
              </Td>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}

function Effects({ inspection }: { inspection: LineUpInspection }) {
  const { planned, refused } = inspection;
  const count = (kind: string) => planned.filter((one) => one.kind === kind).length;
  return (
    <section aria-labelledby="effects">
      <h2 id="effects" className="mb-2 text-xl">
        {count('new')} new, {count('changed')} changed, {count('same')} as they are, {refused.length} refused
      </h2>
      <Table caption="What the file would do" stacked>
        <thead>
          <tr>
            <Th>Variety</Th>
            <Th>What happens</Th>
            <Th>What changes</Th>
          </tr>
        </thead>
        <tbody>
          {refused.map((one) => (
            <tr key={`refused ${one.row} ${one.code}`}>
              <Td className="font-semibold">{one.code ?? '(no code)'}</Td>
              <Td>
                <Tag kind="error">refused{one.row > 0 ? `, row ${one.row}` : ''}</Tag>
              </Td>
              <Td>{one.problems.join(' ')}</Td>
            </tr>
          ))}
          {planned.map((one) => (
            <tr key={one.row}>
              <Td className="font-semibold">{one.code}</Td>
              <Td>
                <Tag kind={one.kind === 'new' ? 'good' : one.kind === 'changed' ? 'attention' : 'plain'}>
                  {one.kind === 'same' ? 'as it is' : one.kind}
                </Tag>
              </Td>
              <Td>{one.changes.map((change) => `${change.label}: ${change.from} → ${change.to}`).join('; ')}</Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}
