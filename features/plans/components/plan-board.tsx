'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { Button } from '@/lib/ui/button';
import { Notice } from '@/lib/ui/page';
import type { EditAnswer } from '../actions';
import { type PlanLine, type PlanView, totalsOf } from '../model';
import { PlanFigures } from './plan-figures';
import { PlanCards, PlanTable } from './plan-table';
import { VarietyCards } from './variety-cards';

export interface BoardActions {
  editRow: (input: {
    operationId: string;
    season: number;
    fieldId: string;
    partName: string;
    revision: number;
    set: object;
  }) => Promise<EditAnswer>;
  takeOffRow: (input: {
    operationId: string;
    season: number;
    fieldId: string;
    partName: string;
    revision: number;
  }) => Promise<EditAnswer>;
  fillPlan: (input: { operationId: string; season: number }) => Promise<EditAnswer>;
}

type Edit = { kind: 'set'; fieldId: string; partName: string; set: Record<string, unknown> };

/** The planning table with its figures and variety cards. Edits show at once, go to the server one after another, and give way to what the server answers. */
export function PlanBoard({
  view: given,
  dealershipSide,
  editable,
  actions,
}: {
  view: PlanView;
  dealershipSide: boolean;
  editable: boolean;
  actions: BoardActions;
}) {
  const [view, setView] = useState(given);
  const [problems, setProblems] = useState<string[]>([]);
  const [words, setWords] = useState<string | null>(null);
  const [busy, setBusy] = useState(0);
  const [undo, setUndo] = useState<Edit[]>([]);
  const [redo, setRedo] = useState<Edit[]>([]);
  const latest = useRef(given);
  const queue = useRef<Promise<unknown>>(Promise.resolve());

  useEffect(() => {
    if (given.revision >= latest.current.revision) {
      latest.current = given;
      setView(given);
    }
  }, [given]);

  /** One edit after another: each is sent with the revision that the one before it brought back. */
  const send = useCallback((run: (now: PlanView) => Promise<EditAnswer>): Promise<boolean> => {
    setBusy((count) => count + 1);
    const mine = queue.current.then(async () => {
      try {
        const answer = await run(latest.current);
        latest.current = answer.view;
        setView(answer.view);
        setProblems(answer.problems.map((problem) => problem.message));
        setWords(answer.words);
        return answer.problems.length === 0;
      } catch {
        setView(latest.current);
        setProblems(['Hilum could not be reached. The change was not kept; look at your connection and try again.']);
        return false;
      } finally {
        setBusy((count) => count - 1);
      }
    });
    queue.current = mine;
    return mine;
  }, []);

  const apply = useCallback(
    (edit: Edit): Promise<boolean> => {
      setView((now) => optimistic(now, edit));
      return send((now) =>
        actions.editRow({
          operationId: now.operationId,
          season: now.season,
          fieldId: edit.fieldId,
          partName: edit.partName,
          revision: now.revision,
          set: edit.set,
        }),
      );
    },
    [actions, send],
  );

  const set = async (line: PlanLine, changes: Record<string, unknown>) => {
    const back: Edit = { kind: 'set', fieldId: line.fieldId, partName: line.partName, set: inverse(line, changes) };
    if (await apply({ ...back, set: changes })) {
      setUndo((stack) => [...stack.slice(-49), back]);
      setRedo([]);
    }
  };

  const remove = async (line: PlanLine) => {
    const back: Edit = { kind: 'set', fieldId: line.fieldId, partName: '', set: inverse(line, { varietyId: null }) };
    const kept = await send((now) =>
      actions.takeOffRow({
        operationId: now.operationId,
        season: now.season,
        fieldId: line.fieldId,
        partName: line.partName,
        revision: now.revision,
      }),
    );
    if (kept && line.partName === '') setUndo((stack) => [...stack.slice(-49), back]);
  };

  const step = useCallback(
    async (from: Edit[], setFrom: typeof setUndo, setTo: typeof setRedo) => {
      const edit = from.at(-1);
      if (!edit) return;
      const line = latest.current.lines.find((one) => one.fieldId === edit.fieldId && one.partName === edit.partName);
      if (!line) return;
      const back: Edit = { ...edit, set: inverse(line, edit.set) };
      setFrom((stack) => stack.slice(0, -1));
      if (await apply(edit)) setTo((stack) => [...stack, back]);
    },
    [apply],
  );

  useEffect(() => {
    if (!editable) return;
    const onKey = (event: KeyboardEvent) => {
      if (!(event.ctrlKey || event.metaKey) || !/^[zy]$/i.test(event.key)) return;
      if (event.target instanceof HTMLElement && event.target.closest('textarea, form')) return;
      event.preventDefault();
      if (event.key.toLowerCase() === 'y' || event.shiftKey) void step(redo, setRedo, setUndo);
      else void step(undo, setUndo, setRedo);
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [editable, redo, undo, step]);

  const edit = editable ? { set, remove } : null;
  const open = view.lines.filter((line) => !line.variety).length;
  return (
    <div className="flex flex-col gap-4">
      <div className="flex flex-wrap items-end justify-between gap-4">
        <PlanFigures totals={view.totals} dealershipSide={dealershipSide} />
        {editable ? (
          <div className="no-print flex flex-wrap items-center gap-2">
            <span aria-live="polite" className="text-mute">
              {busy > 0 ? 'Saving…' : view.planId ? 'Saved' : ''}
            </span>
            <Button small disabled={undo.length === 0} onClick={() => step(undo, setUndo, setRedo)} title="Ctrl+Z">
              Undo
            </Button>
            <Button small disabled={redo.length === 0} onClick={() => step(redo, setRedo, setUndo)} title="Ctrl+Shift+Z">
              Redo
            </Button>
            {open > 0 ? (
              <Button small onClick={() => send((now) => actions.fillPlan({ operationId: now.operationId, season: now.season }))}>
                Fill {open} {open === 1 ? 'field' : 'fields'} from picks
              </Button>
            ) : null}
          </div>
        ) : null}
      </div>
      {problems.length > 0 ? (
        <Notice kind="error" title="Not kept">
          {problems.map((problem) => (
            <p key={problem}>{problem}</p>
          ))}
        </Notice>
      ) : null}
      {words ? <Notice kind="good">{words}</Notice> : null}
      <PlanTable view={view} dealershipSide={dealershipSide} edit={edit} />
      <PlanCards view={view} dealershipSide={dealershipSide} edit={edit} />
      <VarietyCards view={view} dealershipSide={dealershipSide} />
    </div>
  );
}

/** The row before, as the set of what would bring it back. */
function inverse(line: PlanLine, changes: Record<string, unknown>): Record<string, unknown> {
  const before: Record<string, unknown> = {
    varietyId: line.variety?.id ?? null,
    seedLotId: line.lot?.id ?? null,
    populationSeedsPerAcre: line.populationSeedsPerAcre,
    rowWidthInches: line.rowWidthInches,
    locked: line.locked,
    note: line.note,
  };
  // A variety brings its lot and rate along, so they come back with it.
  const names =
    'varietyId' in changes ? ['varietyId', 'seedLotId', 'populationSeedsPerAcre', 'rowWidthInches'] : Object.keys(changes);
  return Object.fromEntries(names.map((name) => [name, before[name]]));
}

/** The plan as it will most likely be, until the server says. */
function optimistic(view: PlanView, edit: Edit): PlanView {
  const lines = view.lines.map((line) => {
    if (line.fieldId !== edit.fieldId || line.partName !== edit.partName) return line;
    const next: PlanLine = { ...line };
    if ('varietyId' in edit.set) {
      const choice = (view.choices[line.fieldId] ?? []).find((one) => one.varietyId === edit.set.varietyId);
      next.variety = choice ? { id: choice.varietyId, code: choice.code, relativeMaturity: choice.relativeMaturity } : null;
      next.lot = choice ? (view.lots[choice.varietyId]?.[0] ?? null) : null;
      next.assessment = null;
      next.runnerUp = null;
    }
    if ('seedLotId' in edit.set && next.variety) {
      next.lot = view.lots[next.variety.id]?.find((lot) => lot.id === edit.set.seedLotId) ?? null;
    }
    if ('populationSeedsPerAcre' in edit.set) next.populationSeedsPerAcre = edit.set.populationSeedsPerAcre as number | null;
    if ('rowWidthInches' in edit.set) next.rowWidthInches = edit.set.rowWidthInches as number | null;
    return next;
  });
  return { ...view, lines, totals: totalsOf(lines) };
}
