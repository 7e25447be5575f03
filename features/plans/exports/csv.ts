/** The plan as CSV. Pure. */
import { CAUTIONS } from '@/lib/ui/cautions';
import { columnsFor } from '../columns';
import { figuresOf, type PlanView } from '../model';

/** A cell that no spreadsheet takes for a formula (text that begins with = + - @ or a control mark gets an apostrophe), quoted where it must be. */
export function csvCell(value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  const safe = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(safe) ? `"${safe.replace(/"/g, '""')}"` : safe;
}

/** Rows of cells as CSV text, CRLF ends (RFC 4180). */
export function csvText(rows: readonly (readonly (string | number | null)[])[]): string {
  return rows.map((row) => `${row.map(csvCell).join(',')}\r\n`).join('');
}

/** One head line, one line a field, then the cautions as lines of one cell. */
export function planCsv(view: PlanView, dealershipSide: boolean): string {
  const columns = columnsFor('csv', dealershipSide);
  return csvText([
    columns.map((column) => column.fileLabel),
    ...view.lines.map((line) => {
      const figures = figuresOf(line);
      return columns.map((column) => column.value(line, figures));
    }),
    ...[CAUTIONS.yield, CAUTIONS.treatedSeed, CAUTIONS.herbicide].map((words) => [words]),
  ]);
}
