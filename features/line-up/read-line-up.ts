import type { VarietyProfile } from '@/features/placement/engine/model';
import { readDelimited } from '@/lib/csv';
import { bad, good, type Outcome } from '@/lib/errors';
import { COLUMNS, type Column, columnOfHeader, type LotColumns, parseCell } from './columns';
import type { VarietyTraits } from './model';

export interface LineUpRow {
  /** Row of the file, counted from 1 with the header. */
  row: number;
  traits: VarietyTraits;
  lot: LotColumns;
  /** Keys the file has a column for; the others leave what is kept as it is. */
  given: Column['key'][];
}

export interface RefusedRow {
  row: number;
  code: string | null;
  problems: string[];
}

export interface ReadLineUp {
  rows: LineUpRow[];
  refused: RefusedRow[];
  /** Codes whose maturity the file does not say: they cannot be placed. */
  withoutMaturity: string[];
}

/** Which column of the file means what: header position → column key, `null` to leave out. */
export type HeaderMatch = (Column['key'] | null)[];

const MOST_ROWS = 20_000;

/** Guesses the meaning of each header; the person corrects it. */
export function matchHeaders(headers: string[]): HeaderMatch {
  const used = new Set<string>();
  return headers.map((header) => {
    const column = columnOfHeader(header);
    if (!column || used.has(column.key)) return null;
    used.add(column.key);
    return column.key;
  });
}

const NO_LOT: LotColumns = { lotNumber: null, seedsPerLb: null, germination: null, treatment: null, unitsOnHand: null };
const UNRATED: Omit<VarietyTraits, 'code' | 'relativeMaturity'> = {
  height: null,
  bushType: null,
  standability: null,
  emergence: null,
  phytophthoraGenes: [],
  phytophthora: null,
  suddenDeath: null,
  brownStemRot: null,
  whiteMould: null,
  frogeye: null,
  stemCanker: null,
  charcoalRot: null,
  ironChlorosis: null,
  drought: null,
  cystNematodeSource: null,
  tolerances: [],
  release: 'full',
  note: null,
};

/**
 * Reads the rows of a line-up file under a header match. A row with a problem is refused with its reasons, the others stand.
 * `flipped` names rating columns whose file has 1 as the best end; they are turned so that 9 is best.
 */
export function readRows(rows: string[][], match: HeaderMatch, flipped: Column['key'][] = []): Outcome<ReadLineUp> {
  if (!match.includes('code')) return bad('No column holds the variety code. Say which one does.');
  if (rows.length - 1 > MOST_ROWS) return bad(`The file has more than ${MOST_ROWS.toLocaleString('en-US')} rows. Split it.`);
  const columns = match.map((key) => COLUMNS.find((column) => column.key === key) ?? null);
  const result: ReadLineUp = { rows: [], refused: [], withoutMaturity: [] };
  const seen = new Map<string, number>();
  rows.slice(1).forEach((cells, index) => {
    const row = index + 2;
    const values: Record<string, unknown> = {};
    const problems: string[] = [];
    columns.forEach((column, position) => {
      if (!column || (column.kind === 'maturity' && !cells[position]?.trim())) return;
      const outcome = parseCell(column, cells[position] ?? '');
      if (!outcome.ok) problems.push(...outcome.problems.map((problem) => problem.message));
      else
        values[column.key] =
          flipped.includes(column.key) && typeof outcome.value === 'number' ? 10 - outcome.value : outcome.value;
    });
    const code = (values.code as string | null) ?? null;
    if (!code) problems.unshift('The code is missing.');
    else if (values.relativeMaturity === undefined && problems.length === 0) {
      result.withoutMaturity.push(code);
      return;
    }
    const earlier = code ? seen.get(code.toLowerCase()) : undefined;
    if (earlier !== undefined) problems.push(`${code} stands in row ${earlier} already.`);
    if (code) seen.set(code.toLowerCase(), row);
    if (problems.length > 0) result.refused.push({ row, code, problems });
    else result.rows.push(assemble(row, values, match));
  });
  return good(result);
}

function assemble(row: number, values: Record<string, unknown>, match: HeaderMatch): LineUpRow {
  const given = match.filter((key): key is Column['key'] => key !== null);
  const of = (ofLot: boolean) =>
    Object.fromEntries(
      COLUMNS.filter(
        (column) => Boolean(column.ofLot) === ofLot && values[column.key] !== undefined && values[column.key] !== null,
      ).map((column) => [column.key, values[column.key]]),
    );
  return { row, traits: { ...UNRATED, ...of(false) } as VarietyTraits, lot: { ...NO_LOT, ...of(true) } as LotColumns, given };
}

/** The engine's view of one row. Supply that is not said does not stop a variety. */
export function profileOfRow(row: LineUpRow): VarietyProfile {
  const { note, ...traits } = row.traits;
  return {
    ...traits,
    id: traits.code,
    seedsPerLb: row.lot.seedsPerLb,
    germinationPercent: row.lot.germination,
    unitsOnHand: row.lot.unitsOnHand,
    trialAdvantage: 0,
    trialAdvantageStandardError: 0,
  };
}

/**
 * A whole line-up from CSV text, for the command line: headers matched by name, every bad row named. Unlike the screen's
 * import, one bad row fails the file, because nobody is there to ask.
 */
export function parseLineUpCsv(
  text: string,
): Outcome<{ varieties: VarietyProfile[]; withoutMaturity: string[]; notes: string[] }> {
  const delimited = readDelimited(new TextEncoder().encode(text), 'The line-up');
  if (!delimited.ok) return delimited;
  if (delimited.value.problems.length > 0) return bad(delimited.value.problems);
  const rows = delimited.value.rows.map((row) => row.cells);
  const headers = rows[0];
  if (!headers) return bad('The line-up file is empty.');
  const match = matchHeaders(headers);
  const read = readRows(rows, match);
  if (!read.ok) return read;
  if (read.value.refused.length > 0) {
    return bad(
      read.value.refused.map((one) => ({
        message: `Line-up row ${one.row}${one.code ? ` (${one.code})` : ''}: ${one.problems.join(' ')}`,
      })),
    );
  }
  const unknown = headers.filter((header, index) => header && match[index] === null);
  return good({
    varieties: read.value.rows.map(profileOfRow),
    withoutMaturity: read.value.withoutMaturity,
    notes: unknown.length > 0 ? [`Columns left out because their headers are not known: ${unknown.join(', ')}.`] : [],
  });
}
