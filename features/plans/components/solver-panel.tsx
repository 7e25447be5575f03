'use client';

import { type FormEvent, useRef, useState } from 'react';
import { formatDollars, formatPercent } from '@/lib/format';
import { Button } from '@/lib/ui/button';
import { CheckField, TextField } from '@/lib/ui/form';
import { Notice } from '@/lib/ui/page';
import type { EditAnswer } from '../actions';
import { lineName, type PlanLine } from '../model';
import type { Proposal } from '../solver/from-plan';
import { Step } from './plan-steps';

interface Props {
  operationId: string;
  season: number;
  revision: number;
  lines: Pick<PlanLine, 'fieldId' | 'fieldName' | 'partName' | 'variety' | 'locked'>[];
  take: (input: {
    operationId: string;
    season: number;
    revision: number;
    rows: { fieldId: string; varietyId: string }[];
  }) => Promise<EditAnswer>;
}

/** Wishes in, a proposal out: what it gains, what holds it back, what one more unit would be worth. Nothing is changed until it is taken. */
export function SolverPanel({ operationId, season, revision, lines, take }: Props) {
  const [progress, setProgress] = useState<number | null>(null);
  const [proposal, setProposal] = useState<Proposal | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const [taken, setTaken] = useState(false);
  const abort = useRef<AbortController | null>(null);

  const solve = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const number = (name: string) => (String(form.get(name)).trim() === '' ? null : String(form.get(name)));
    setProblems([]);
    setProposal(null);
    setTaken(false);
    setProgress(0);
    abort.current = new AbortController();
    try {
      const answer = await fetch(`/api/v1/plans/${operationId}/${season}/solve`, {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        signal: abort.current.signal,
        body: JSON.stringify({
          maxSharePercent: number('maxSharePercent') ?? 100,
          minAcresPerVariety: number('minAcresPerVariety') ?? 0,
          maxVarieties: number('maxVarieties'),
          harvestAcresPerDay: number('harvestAcresPerDay'),
          keepFieldIds: form.getAll('keep'),
        }),
      });
      if (!answer.ok || !answer.body) {
        const words = await answer.json().catch(() => null);
        setProblems((words?.problems ?? []).map((problem: { message: string }) => problem.message));
        return;
      }
      for await (const line of linesOf(answer.body)) {
        if (line.progress) setProgress(line.progress[1] > 0 ? line.progress[0] / line.progress[1] : 0);
        if (line.proposal) setProposal(line.proposal);
        if (line.problems) setProblems(line.problems.map((problem) => problem.message));
      }
    } catch (error) {
      if ((error as Error).name !== 'AbortError') setProblems(['Hilum could not be reached. Nothing was changed.']);
    } finally {
      setProgress(null);
    }
  };

  const takeIt = async () => {
    if (!proposal) return;
    const answer = await take({
      operationId,
      season,
      revision,
      rows: proposal.rows.map(({ fieldId, varietyId }) => ({ fieldId, varietyId })),
    });
    setProblems(answer.problems.map((problem) => problem.message));
    setTaken(answer.problems.length === 0);
  };

  const placed = lines.filter((line) => line.variety && line.partName === '');
  return (
    <Step label="Solve">
      <form onSubmit={solve} className="flex flex-col gap-3">
        <div className="grid grid-cols-2 gap-3">
          <TextField name="maxSharePercent" label="Most in one variety" unit="%" defaultValue="50" inputMode="decimal" />
          <TextField name="minAcresPerVariety" label="Fewest acres each" unit="ac" defaultValue="40" inputMode="decimal" />
          <TextField name="maxVarieties" label="Most varieties" inputMode="numeric" />
          <TextField name="harvestAcresPerDay" label="Harvest a day" unit="ac" inputMode="decimal" />
        </div>
        {placed.length > 0 ? (
          <details>
            <summary className="cursor-pointer py-1">Keep some fields as they are</summary>
            <div className="max-h-52 overflow-auto">
              {placed.map((line) => (
                <CheckField
                  key={line.fieldId}
                  name="keep"
                  value={line.fieldId}
                  defaultChecked={line.locked}
                  label={`${lineName(line)}: ${line.variety?.code}`}
                />
              ))}
            </div>
          </details>
        ) : null}
        <div className="flex gap-2">
          <Button type="submit" kind="action" pending={progress !== null}>
            Propose by solver
          </Button>
          {progress !== null ? <Button onClick={() => abort.current?.abort()}>Stop</Button> : null}
        </div>
      </form>
      {progress !== null ? (
        <progress className="mt-3 w-full" max={1} value={progress} aria-label="Solving">
          {formatPercent(progress)}
        </progress>
      ) : null}
      {problems.length > 0 ? (
        <Notice kind="error" className="mt-3">
          {problems.map((problem) => (
            <p key={problem}>{problem}</p>
          ))}
        </Notice>
      ) : null}
      {taken ? (
        <Notice kind="good" className="mt-3">
          The proposal is on the plan.
        </Notice>
      ) : null}
      {proposal && !taken ? <ProposalResult proposal={proposal} take={takeIt} /> : null}
    </Step>
  );
}

function ProposalResult({ proposal, take }: { proposal: Proposal; take: () => Promise<void> }) {
  const [busy, setBusy] = useState(false);
  if (proposal.status === 'infeasible') {
    return (
      <Notice kind="attention" title="These wishes clash" className="mt-3">
        <p>The smallest giving way that lets them stand together:</p>
        <ul className="list-disc pl-5">
          {proposal.relaxation.map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
      </Notice>
    );
  }
  const changed = proposal.rows.filter((row) => row.before !== row.code);
  return (
    <div className="mt-4 flex max-h-[28rem] flex-col gap-3 overflow-auto border-t border-line pt-3">
      <p className="font-display text-xl font-bold">
        {proposal.gainDollars >= 0 ? '+' : '−'}
        {formatDollars(Math.round(Math.abs(proposal.gainDollars)) * 100)}{' '}
        {proposal.gainDollars >= 0
          ? 'over the plan as it stands'
          : 'against the plan as it stands, which does not keep these wishes'}
      </p>
      <p className="text-mute">
        Bushels at the dealership’s price, less seed.{' '}
        {proposal.gap < 1e-6 ? 'Proven best.' : `Within ${formatPercent(proposal.gap, 2)} of the best there can be.`}
      </p>
      {changed.length === 0 ? (
        <p>The plan as it stands is already the proposal.</p>
      ) : (
        <ul className="border-t border-line">
          {changed.map((row) => (
            <li key={row.fieldId} className="flex justify-between gap-3 border-b border-line py-1">
              <span>{row.fieldName}</span>
              <span>
                <span className="text-mute">{row.before ?? 'none'} to</span> <strong>{row.code}</strong>
              </span>
            </li>
          ))}
        </ul>
      )}
      {proposal.leftEmpty.length > 0 ? <p>Left empty: {proposal.leftEmpty.join(', ')}.</p> : null}
      {proposal.binding.length > 0 ? <p>What holds it back: {proposal.binding.join('; ')}.</p> : null}
      {proposal.shadow.length > 0 ? (
        <p>
          One more unit is worth:{' '}
          {proposal.shadow.map((one) => `${one.code} ${formatDollars(Math.round(one.dollarsPerUnit * 100), 2)}`).join(', ')}.
        </p>
      ) : null}
      {changed.length > 0 ? (
        <Button
          kind="action"
          pending={busy}
          onClick={async () => {
            setBusy(true);
            await take();
            setBusy(false);
          }}
        >
          Put it on the plan
        </Button>
      ) : null}
    </div>
  );
}

interface Line {
  progress?: [number, number];
  proposal?: Proposal;
  problems?: { message: string }[];
}

/** Lines of JSON as they come in. */
async function* linesOf(body: ReadableStream<Uint8Array>): AsyncGenerator<Line> {
  const reader = body.getReader();
  const decoder = new TextDecoder();
  let rest = '';
  for (;;) {
    const { done, value } = await reader.read();
    rest += decoder.decode(value, { stream: !done });
    const lines = rest.split('\n');
    rest = lines.pop() ?? '';
    for (const line of lines) if (line) yield JSON.parse(line) as Line;
    if (done) return;
  }
}
