'use client';

import { type KeyboardEvent, useEffect, useState } from 'react';
import { formatBushels, formatTenth } from '@/lib/format';
import type { Choice, PlanLine, PlanLot } from '../model';
import { lineName } from '../model';

const BOX =
  'min-h-11 w-full border border-ink/30 bg-white px-2 py-0.5 hover:border-ink focus:border-bloom lg:min-h-8 disabled:border-transparent';

export interface CellProps {
  line: PlanLine;
  onSet: (set: Record<string, unknown>) => void;
}

/** Moves to the same cell of the row above or below. Ctrl or ⌘ with an arrow works in every cell, so that a list keeps its own arrows. */
export function onGridKey(event: KeyboardEvent<HTMLElement>): void {
  const list = event.currentTarget instanceof HTMLSelectElement;
  const step = event.key === 'ArrowDown' || (event.key === 'Enter' && !list) ? 1 : event.key === 'ArrowUp' ? -1 : 0;
  if (step === 0 || (list && !event.ctrlKey && !event.metaKey)) return;
  const cells = [...document.querySelectorAll<HTMLElement>(`[data-cell="${event.currentTarget.dataset.cell}"]`)].filter(
    (cell) => cell.offsetParent !== null,
  );
  const next = cells[cells.indexOf(event.currentTarget) + step];
  if (!next) return;
  event.preventDefault();
  next.focus();
  if (next instanceof HTMLInputElement) next.select();
}

/** Varieties, ranked picks first; type to search. What is stopped says why and cannot be chosen. */
export function VarietyCell({ line, onSet, choices, place }: CellProps & { choices: Choice[]; place: string }) {
  const ranked = choices.filter((choice) => choice.expected !== null);
  const unranked = choices.filter((choice) => choice.expected === null && choice.stopped === null);
  const stopped = choices.filter((choice) => choice.stopped !== null);
  const known = choices.some((choice) => choice.varietyId === line.variety?.id);
  return (
    <select
      aria-label={`Variety on ${lineName(line)}`}
      data-cell={`${place}-variety`}
      className={`${BOX} font-semibold`}
      value={line.variety?.id ?? ''}
      onKeyDown={onGridKey}
      onChange={(event) => onSet({ varietyId: event.target.value || null })}
    >
      <option value="">—</option>
      {line.variety && !known ? <option value={line.variety.id}>{line.variety.code}</option> : null}
      {ranked.length > 0 ? (
        <optgroup label="Picks, best first">
          {ranked.map((choice) => (
            <option key={choice.varietyId} value={choice.varietyId}>
              {choice.code} · RM {formatTenth(choice.relativeMaturity)} · {formatBushels(choice.expected)} bu
            </option>
          ))}
        </optgroup>
      ) : null}
      {unranked.length > 0 ? (
        <optgroup label="Not scored here">
          {unranked.map((choice) => (
            <option key={choice.varietyId} value={choice.varietyId}>
              {choice.code} · RM {formatTenth(choice.relativeMaturity)}
            </option>
          ))}
        </optgroup>
      ) : null}
      {stopped.length > 0 ? (
        <optgroup label="Stopped here">
          {stopped.map((choice) => (
            <option key={choice.varietyId} value={choice.varietyId} disabled>
              {choice.code} – {choice.stopped}
            </option>
          ))}
        </optgroup>
      ) : null}
    </select>
  );
}

/** The lots of the row's variety. */
export function LotCell({ line, onSet, lots, place }: CellProps & { lots: PlanLot[]; place: string }) {
  if (!line.variety) return null;
  const known = lots.some((lot) => lot.id === line.lot?.id);
  return (
    <select
      aria-label={`Seed lot on ${lineName(line)}`}
      data-cell={`${place}-lot`}
      className={BOX}
      value={line.lot?.id ?? ''}
      onKeyDown={onGridKey}
      onChange={(event) => onSet({ seedLotId: event.target.value || null })}
    >
      <option value="">any lot</option>
      {line.lot && !known ? <option value={line.lot.id}>{line.lot.lotNumber}</option> : null}
      {lots.map((lot) => (
        <option key={lot.id} value={lot.id}>
          {lot.lotNumber}
        </option>
      ))}
    </select>
  );
}

/** A number that is sent when the cell is left or Enter is pressed; Escape puts it back. */
export function NumberCell({
  line,
  onSet,
  place,
  name,
  label,
  value,
  scale = 1,
}: CellProps & {
  place: string;
  /** Name of the fact it sets. */
  name: 'populationSeedsPerAcre' | 'rowWidthInches';
  label: string;
  value: number | null;
  /** The screen shows value ÷ scale. */
  scale?: number;
}) {
  const shown = value === null ? '' : String(value / scale);
  const [text, setText] = useState(shown);
  useEffect(() => setText(shown), [shown]);
  const send = () => {
    if (text.trim() === shown) return;
    const number = text.trim() === '' ? null : Math.round(Number(text.replace(',', '.')) * scale * 100) / 100;
    onSet({ [name]: number });
  };
  return (
    <input
      aria-label={`${label} on ${lineName(line)}`}
      data-cell={`${place}-${name}`}
      className={`${BOX} text-right`}
      inputMode="decimal"
      value={text}
      onChange={(event) => setText(event.target.value)}
      onBlur={send}
      onKeyDown={(event) => {
        if (event.key === 'Escape') setText(shown);
        if (event.key === 'Enter') send();
        onGridKey(event);
      }}
    />
  );
}
