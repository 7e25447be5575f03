import { parse } from 'csv-parse/sync';
import { bad, good, type Outcome, type Problem } from './errors';

/** Delimited text in and out. Reading finds out the encoding and the delimiter; writing keeps formulas harmless. */

export interface DelimitedRow {
  /** Line of the file, counted from 1. */
  line: number;
  cells: string[];
}

export interface Delimited {
  rows: DelimitedRow[];
  delimiter: string;
  encoding: string;
  notes: string[];
  /** Lines that could not be read; the others were. */
  problems: Problem[];
}

export const MOST_ROWS = 200_000;
const MOST_COLUMNS = 500;
const DELIMITERS = ['\t', ';', '|', ','] as const;

/** Text of a file: UTF-8, UTF-16 with or without its mark, or the Windows code page that old exports come in. */
export function decodeText(bytes: Uint8Array): { text: string; encoding: string } {
  const decode = (label: string, from = bytes) => new TextDecoder(label).decode(from).replace(/^\uFEFF/, '');
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return { text: decode('utf-16le'), encoding: 'UTF-16' };
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return { text: decode('utf-16be'), encoding: 'UTF-16' };
  const head = bytes.subarray(0, 2000);
  const nulls = (from: 0 | 1) => head.filter((byte, at) => byte === 0 && at % 2 === from).length;
  const [evenNulls, oddNulls] = [nulls(0), nulls(1)];
  // Western text in UTF-16 has a zero in every other byte.
  if (oddNulls > head.length * 0.3 && evenNulls === 0) return { text: decode('utf-16le'), encoding: 'UTF-16' };
  if (evenNulls > head.length * 0.3 && oddNulls === 0) return { text: decode('utf-16be'), encoding: 'UTF-16' };
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(bytes).replace(/^\uFEFF/, ''), encoding: 'UTF-8' };
  } catch {
    return { text: decode('windows-1252'), encoding: 'Windows-1252' };
  }
}

/**
 * The sign that stands between cells: the one whose count most lines agree on, the header among them. A comma may also be a decimal
 * sign, and a semicolon may stand inside a list, but neither comes equally often in header and rows. Ties go to tabs, then semicolons.
 */
export function delimiterOf(text: string): string {
  const lines = text
    .slice(0, 200_000)
    // A quoted cell may hold line ends and every sign: it is set aside whole before lines are counted.
    .replace(/(^|[\t;|,\r\n])"(?:[^"]|"")*"(?=[\t;|,\r\n]|$)/g, '$1')
    .split(/\r\n|\r|\n/)
    .filter((line) => line.trim() !== '')
    .slice(0, 60)
    .map((line) => line.replace(/"[^"]*"/g, ''));
  const agreement = DELIMITERS.map((delimiter) => {
    const lineCounts = new Map<number, number>();
    for (const line of lines) {
      const count = line.split(delimiter).length - 1;
      if (count > 0) lineCounts.set(count, (lineCounts.get(count) ?? 0) + 1);
    }
    return Math.max(0, ...lineCounts.values());
  });
  const most = Math.max(...agreement);
  return most === 0 ? ',' : (DELIMITERS[agreement.indexOf(most)] ?? ',');
}

function looksBinary(text: string): boolean {
  const head = text.slice(0, 4000);
  let odd = 0;
  for (let i = 0; i < head.length; i += 1) {
    const code = head.charCodeAt(i);
    if ((code < 32 && code !== 9 && code !== 10 && code !== 13 && code !== 12) || code === 0xfffd) odd += 1;
  }
  return odd > Math.max(2, head.length * 0.05);
}

const BASE = { skip_empty_lines: true, relax_column_count: true, trim: true, info: true } as const;
type Record_ = { record: string[]; info: { lines: number } };

/**
 * Rows of delimited text with their line numbers. A quotation mark out of place costs its own line and no other: the line is
 * read as it stands where its columns still count, else left out and named. Fails for what is no text and beyond 200,000 rows.
 */
export function readDelimited(bytes: Uint8Array, name: string): Outcome<Delimited> {
  const { text, encoding } = decodeText(bytes);
  if (looksBinary(text)) return bad(`"${name}" is not text. Nothing was kept. Export it again as CSV or XLSX.`);
  const delimiter = delimiterOf(text);
  const notes: string[] = [];
  const problems: Problem[] = [];
  let rows: DelimitedRow[];
  try {
    const records = parse(text, { ...BASE, delimiter, to: MOST_ROWS + 1000 }) as unknown as Record_[];
    rows = records.map(({ record, info }) => ({ line: info.lines, cells: record }));
  } catch {
    rows = lineByLine(text, delimiter, notes, problems);
  }
  if (rows.length > MOST_ROWS)
    return bad(`"${name}" has more than ${MOST_ROWS.toLocaleString('en-US')} rows. Nothing was kept. Split it.`);
  const wide = rows.find((row) => row.cells.length > MOST_COLUMNS);
  if (wide) return bad(`"${name}" has more than ${MOST_COLUMNS} columns in line ${wide.line}. Nothing was kept.`);
  return good({ rows, delimiter, encoding, notes, problems });
}

function lineByLine(text: string, delimiter: string, notes: string[], problems: Problem[]): DelimitedRow[] {
  const rows: DelimitedRow[] = [];
  const lines = text.split(/\r\n|\r|\n/);
  for (let i = 0; i < lines.length && rows.length <= MOST_ROWS; i += 1) {
    const content = lines[i] as string;
    if (content.trim() === '') continue;
    const line = i + 1;
    const strict = cellsOf(content, delimiter, false);
    if (strict) {
      rows.push({ line, cells: strict });
      continue;
    }
    const relaxed = cellsOf(content, delimiter, true);
    const width = rows.at(-1)?.cells.length;
    if (relaxed && width !== undefined && relaxed.length === width) {
      rows.push({ line, cells: relaxed });
      if (notes.length < 50) notes.push(`Line ${line}: a quotation mark is out of place; the line was read as it stands.`);
    } else if (problems.length < 1000) {
      problems.push({
        message: `Line ${line}: a quotation mark is out of place, so the line was left out. Mend it in the file.`,
      });
    }
  }
  return rows;
}

function cellsOf(content: string, delimiter: string, relaxed: boolean): string[] | null {
  try {
    const [found] = parse(content, { ...BASE, delimiter, relax_quotes: relaxed }) as unknown as Record_[];
    return found?.record ?? null;
  } catch {
    return null;
  }
}

/** A cell that no spreadsheet takes for a formula: text that begins with = + - @ or a control sign gets an apostrophe; quoted where it must be. */
export function csvCell(value: string | number | null | undefined): string {
  if (value === null || value === undefined) return '';
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : '';
  const safe = /^[=+\-@\t\r]/.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(safe) ? `"${safe.replace(/"/g, '""')}"` : safe;
}

/** Rows of cells as CSV text with CRLF ends (RFC 4180). */
export function csvLines(rows: readonly (readonly (string | number | null | undefined)[])[]): string {
  return rows.map((row) => `${row.map(csvCell).join(',')}\r\n`).join('');
}
