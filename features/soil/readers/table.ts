/** The face every format of soil tests shows: a table of text under headers. Pure. */
import type { NamedBytes } from '@/lib/archive';
import type { DelimitedRow } from '@/lib/csv';
import type { Outcome } from '@/lib/errors';
import { meaningOf, squeeze } from './headers';
import type { Meaning } from './meanings';

/** One table of a file: a sheet, a layer, a report. */
export interface RawTable {
  /** Where it stands: the file's name, and the sheet's or layer's. */
  name: string;
  headers: string[];
  /** Line of the file of each row, and its cells in the order of the headers. */
  rows: DelimitedRow[];
  /** Meanings the format itself says (Modus, shapefile points); the lexicon is asked for the others. */
  meanings?: (Meaning | null)[];
  laboratory: string | null;
  notes: string[];
  problems: string[];
}

/** One file format behind one face. To add a format: one file with one of these, and a line in index.ts. */
export interface SoilReader {
  /** Name of the format as people know it. */
  format: string;
  /** The files of `files` that this reader takes; a shapefile takes several at once. */
  takes(files: NamedBytes[]): NamedBytes[];
  read(files: NamedBytes[], options: ReadTableOptions): Promise<Outcome<RawTable[]>>;
}

export interface ReadTableOptions {
  /** 'EPSG:26915', 'EPSG:4326', …: for points that do not say their coordinate system. */
  crs?: string;
}

/** `folder/Fields.SHP` → `shp`. */
export function extensionOf(name: string): string {
  return /\.([a-z0-9]+)$/i.exec(name)?.[1]?.toLowerCase() ?? '';
}

/** How far down a header may stand under titles. */
const HEADER_ROWS = 60;

function meaningsIn(cells: string[]): number {
  return new Set(cells.flatMap((cell) => meaningOf(cell)?.meaning ?? [])).size;
}

function isBlank(cells: string[]): boolean {
  return cells.every((cell) => cell.trim() === '');
}

/** A row of units under the header: "%, ppm, meq/100 g". */
function isUnitRow(cells: string[]): boolean {
  const filled = cells.filter((cell) => cell.trim() !== '');
  return filled.length > 0 && filled.every((cell) => squeeze(cell).unit !== null && squeeze(cell).words === '');
}

function looksLikeData(cells: string[]): boolean {
  const filled = cells.filter((cell) => cell.trim() !== '');
  return filled.filter((cell) => /^[<>]?\s*-?\d+([.,]\d+)?\s*[a-z%*]{0,3}$/i.test(cell.trim())).length > filled.length / 3;
}

/** Group titles over several columns stand in the first of them only. */
function filledForward(cells: string[], width: number): string[] {
  let last = '';
  return Array.from({ length: width }, (_, index) => {
    last = cells[index]?.trim() ? (cells[index] as string) : last;
    return last;
  });
}

/** Where the header is among the first rows: the row, or the two rows together, that name the most things. */
function findHeader(rows: DelimitedRow[]): { index: number; height: 1 | 2; cells: string[] } | null {
  let best = { index: -1, height: 1 as 1 | 2, cells: [] as string[], score: 0 };
  const last = Math.min(rows.length, HEADER_ROWS);
  for (let index = 0; index < last; index += 1) {
    const cells = (rows[index] as DelimitedRow).cells;
    const score = meaningsIn(cells);
    // A row that says as much alone as with the one above needs it not.
    if (score > best.score || (score > 0 && score === best.score && best.height === 2 && best.index === index - 1))
      best = { index, height: 1, cells, score };
    const under = rows[index + 1]?.cells;
    if (!under || looksLikeData(under) || isBlank(under) || isBlank(cells)) continue;
    const width = Math.max(cells.length, under.length);
    for (const upper of [Array.from({ length: width }, (_, at) => cells[at] ?? ''), filledForward(cells, width)]) {
      const joined = upper.map((cell, at) => [cell, under[at] ?? ''].filter((part) => part.trim()).join(' '));
      const both = meaningsIn(joined);
      if (both > best.score) best = { index, height: 2, cells: joined, score: both };
    }
  }
  return best.score > 0 ? best : null;
}

/** Headers must be told apart by name: a second "pH" becomes "pH (2)". */
export function uniqueHeaders(cells: string[], width: number): string[] {
  const seen = new Map<string, number>();
  return Array.from({ length: width }, (_, index) => {
    const text = (cells[index] ?? '').replace(/\s+/g, ' ').trim().slice(0, 120);
    const count = (seen.get(text) ?? 0) + 1;
    seen.set(text, count);
    return count === 1 || text === '' ? text : `${text} (${count})`;
  });
}

/** A laboratory's name among the title rows. */
function laboratoryIn(rows: DelimitedRow[]): string | null {
  for (const cell of rows.flatMap((row) => row.cells)) {
    const named = /^\s*lab(?:oratory)?(?: name)?\s*[:=]\s*(.+)$/i.exec(cell);
    if (named) return (named[1] as string).trim().slice(0, 120);
  }
  const cell = rows.flatMap((row) => row.cells).find((one) => /\blab(s|oratory|oratories)?\b/i.test(one) && one.length < 120);
  return cell?.trim() ?? null;
}

/**
 * A table from the rows of a sheet: titles above the header are taken off, blank columns are left out, a header in two rows
 * is joined. Without a known header the first row with text in most columns stands for it, so that a person can match it.
 */
export function tableFromRows(
  name: string,
  rows: DelimitedRow[],
  notes: string[] = [],
  problems: string[] = [],
): RawTable | null {
  if (rows.length === 0) return null;
  const found = findHeader(rows);
  const width = rows.reduce((most, row) => Math.max(most, row.cells.length), 0);
  const fallback = rows.findIndex((row) => row.cells.filter((cell) => cell.trim()).length > width / 2);
  const index = found?.index ?? Math.max(0, fallback);
  let cells = found?.cells ?? (rows[index] as DelimitedRow).cells;
  let start = index + (found?.height ?? 1);
  const units = rows[start]?.cells;
  if (units && isUnitRow(units)) {
    cells = Array.from({ length: width }, (_, at) => [cells[at] ?? '', units[at] ?? ''].filter((part) => part.trim()).join(' '));
    start += 1;
  }
  const body = rows.slice(start).filter((row) => !isBlank(row.cells));
  const columns = Array.from({ length: width }, (_, at) => at).filter(
    (at) => (cells[at] ?? '').trim() !== '' || body.some((row) => (row.cells[at] ?? '').trim() !== ''),
  );
  const titles = rows.slice(0, index);
  return {
    name,
    headers: uniqueHeaders(
      columns.map((at) => cells[at]?.trim() || `Column ${at + 1}`),
      columns.length,
    ),
    rows: body.map((row) => ({ line: row.line, cells: columns.map((at) => row.cells[at] ?? '') })),
    laboratory: laboratoryIn(titles),
    notes:
      titles.length > 0
        ? [...notes, `${name}: the header is in row ${rows[index]?.line}; what stands above it was read as title.`]
        : notes,
    problems,
  };
}
