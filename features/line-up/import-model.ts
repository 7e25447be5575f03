import type { Column, LotColumns } from './columns';
import { COLUMNS, formatCell } from './columns';
import type { LineUpVariety, VarietyTraits } from './model';
import type { HeaderMatch, LineUpRow, RefusedRow } from './read-line-up';

export interface TraitChange {
  label: string;
  from: string;
  to: string;
}

export interface PlannedVariety {
  row: number;
  code: string;
  kind: 'new' | 'changed' | 'same';
  /** What would change, old to new; empty for a new one. */
  changes: TraitChange[];
  lotWords: string | null;
}

/** What a line-up file would do, before anything is kept. */
export interface LineUpInspection {
  headers: string[];
  /** A few cells of each column, for telling them apart. */
  samples: string[][];
  match: HeaderMatch;
  planned: PlannedVariety[];
  refused: RefusedRow[];
}

/** The traits an import would leave a variety with: what the file has a column for, and what was there otherwise. */
export function mergedTraits(row: LineUpRow, before: VarietyTraits | null): VarietyTraits {
  if (!before) return row.traits;
  const given = Object.fromEntries(
    COLUMNS.filter((column) => !column.ofLot && row.given.includes(column.key)).map((column) => [
      column.key,
      row.traits[column.key as keyof VarietyTraits],
    ]),
  );
  return { ...before, ...given, code: before.code } as VarietyTraits;
}

/** Old and new side by side, only where they differ. */
export function traitChanges(before: VarietyTraits, after: VarietyTraits): TraitChange[] {
  return COLUMNS.filter((column) => !column.ofLot && column.key !== 'code').flatMap((column) => {
    const from = formatCell(column, before[column.key as keyof VarietyTraits]);
    const to = formatCell(column, after[column.key as keyof VarietyTraits]);
    return from === to ? [] : [{ label: column.label, from: from || 'unknown', to: to || 'unknown' }];
  });
}

/** Does the row say anything of a lot? */
export function saysOfLot(lot: LotColumns): boolean {
  return Object.values(lot).some((value) => value !== null);
}

/** What a row would do to the line-up as it stands. */
export function planRow(row: LineUpRow, known: Map<string, LineUpVariety>): PlannedVariety {
  const before = known.get(row.traits.code.toLowerCase()) ?? null;
  const changes = before ? traitChanges(before, mergedTraits(row, before)) : [];
  const lot = row.lot;
  const lotWords = saysOfLot(lot)
    ? [
        `lot ${lot.lotNumber ?? 'main'}`,
        lot.unitsOnHand === null ? '' : `${lot.unitsOnHand} units`,
        lot.seedsPerLb === null ? '' : `${lot.seedsPerLb} seeds/lb`,
      ]
        .filter(Boolean)
        .join(', ')
    : null;
  return {
    row: row.row,
    code: row.traits.code,
    kind: before ? (changes.length > 0 || lotWords ? 'changed' : 'same') : 'new',
    changes,
    lotWords,
  };
}

export type { Column };
