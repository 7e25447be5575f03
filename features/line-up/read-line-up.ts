import type { VarietyProfile } from '@/features/placement/engine/model';
import { type DelimitedRow, readDelimited } from '@/lib/csv';
import { bad, good, type Outcome } from '@/lib/errors';
import { formatCell, isEmptyCell, parseCell } from './cells';
import { COLUMNS, type Column, columnOfHeader, type LotColumns } from './columns';
import type { VarietyTraits } from './model';

/** Traits as a row says them: its maturity may be left to what the line-up knows already. */
export type RowTraits = Omit<VarietyTraits, 'relativeMaturity'> & { relativeMaturity: number | null };

/** One variety of a file, with each of its lots: a file has a row a lot. */
export interface LineUpRow {
  /** Line of the file where the variety stands first. */
  row: number;
  traits: RowTraits;
  lots: LotColumns[];
  /** Keys the file says something of; the others leave what is kept as it is. */
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
}

/** Which column of the file means what: header position → column key, `null` to leave out. */
export type HeaderMatch = (Column['key'] | null)[];

const MOST_ROWS = 20_000;
/** Titles above the header are looked for this far down. */
const MOST_TITLE_ROWS = 10;

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

/** A file without the title rows above its header: the header is the row of the first few whose cells are known best. */
export function fromHeader(rows: DelimitedRow[]): DelimitedRow[] {
  const known = rows.slice(0, MOST_TITLE_ROWS).map((row) => matchHeaders(row.cells).filter(Boolean).length);
  const best = Math.max(0, ...known);
  return best < 2 ? rows : rows.slice(known.indexOf(best));
}

const NO_LOT: LotColumns = {
  lotNumber: null,
  seedsPerLb: null,
  germination: null,
  treatment: null,
  unitSizeSeeds: null,
  unitsOnHand: null,
  priceDollarsPerUnit: null,
};
const UNKNOWN: Omit<RowTraits, 'code'> = {
  relativeMaturity: null,
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
 * Reads the rows of a line-up file (header first) under a header match. A row with a problem is refused with its reasons, the others
 * stand; further rows of a variety add lots to it. `flipped` names rating columns whose file has 1 as the best end; they are
 * turned so that 9 is best.
 */
export function readRows(rows: DelimitedRow[], match: HeaderMatch, flipped: Column['key'][] = []): Outcome<ReadLineUp> {
  if (!match.includes('code')) return bad('No column holds the variety code. Say which one does.');
  if (rows.length - 1 > MOST_ROWS) return bad(`The file has more than ${MOST_ROWS.toLocaleString('en-US')} rows. Split it.`);
  const columns = match.map((key) => COLUMNS.find((column) => column.key === key) ?? null);
  const read = new Map<string, LineUpRow>();
  const refused: RefusedRow[] = [];
  for (const { line, cells } of rows.slice(1)) {
    const values: Values = {};
    const problems: string[] = [];
    columns.forEach((column, position) => {
      const cell = cells[position] ?? '';
      if (!column || isEmptyCell(cell)) return;
      const outcome = parseCell(column, cell);
      if (!outcome.ok) problems.push(...outcome.problems.map((problem) => problem.message));
      else values[column.key] = turned(column, outcome.value, flipped);
    });
    const code = (values.code as string | undefined) ?? null;
    if (!code) problems.unshift('The code is missing.');
    const key = (code ?? '').toLowerCase();
    const earlier = read.get(key);
    if (earlier && problems.length === 0) problems.push(...(addLot(earlier, values) ?? []));
    else if (problems.length === 0) read.set(key, firstRow(line, values));
    if (problems.length > 0) refused.push({ row: line, code, problems });
  }
  return good({ rows: [...read.values()], refused });
}

type Values = Partial<Record<Column['key'], unknown>>;

function turned(column: Column, value: unknown, flipped: Column['key'][]): unknown {
  return column.kind === 'rating' && typeof value === 'number' && flipped.includes(column.key) ? 10 - value : value;
}

function ofKind(values: Values, ofLot: boolean): Values {
  const columns = COLUMNS.filter((column) => Boolean(column.ofLot) === ofLot && values[column.key] !== undefined);
  return Object.fromEntries(columns.map((column) => [column.key, values[column.key]]));
}

function firstRow(line: number, values: Values): LineUpRow {
  const lot = ofKind(values, true);
  return {
    row: line,
    traits: { ...UNKNOWN, ...ofKind(values, false) } as RowTraits,
    lots: Object.keys(lot).length > 0 ? [{ ...NO_LOT, ...lot } as LotColumns] : [],
    given: Object.keys(values) as Column['key'][],
  };
}

/** Adds a further row of a variety as a lot; answers why not, when it is no further lot or says otherwise of the variety. */
function addLot(row: LineUpRow, values: Values): string[] | null {
  const { row: line, traits } = row;
  const { code } = traits;
  const lot = { ...NO_LOT, ...ofKind(values, true) } as LotColumns;
  if (lot.lotNumber === null || row.lots.some((one) => one.lotNumber === null))
    return [`${code} stands in row ${line} already. Two rows of a variety are two lots: number both.`];
  const number = lot.lotNumber.toLowerCase();
  if (row.lots.some((one) => one.lotNumber?.toLowerCase() === number))
    return [`${code} stands in row ${line} already, and its lot ${lot.lotNumber} too.`];
  const otherwise = COLUMNS.filter(
    (column) =>
      !column.ofLot &&
      column.key !== 'code' &&
      values[column.key] !== undefined &&
      formatCell(column, values[column.key]) !== formatCell(column, row.traits[column.key as keyof RowTraits]),
  );
  if (otherwise.length > 0)
    return [`${code} stands in row ${line} with another ${otherwise.map((column) => column.header).join(', ')}.`];
  row.lots.push(lot);
  return null;
}

/**
 * The engine's view of one variety of a file; `null` without a maturity. Supply that is not said does not stop a variety. Units are
 * summed over lots, the seed is that of the first lot with units.
 */
export function profileOfRow({ traits: { note, relativeMaturity, ...traits }, lots }: LineUpRow): VarietyProfile | null {
  if (relativeMaturity === null) return null;
  const said = lots.map((lot) => lot.unitsOnHand).filter((units) => units !== null);
  const lead = lots.find((lot) => (lot.unitsOnHand ?? 1) > 0) ?? lots[0];
  return {
    ...traits,
    relativeMaturity,
    id: traits.code,
    seedsPerLb: lead?.seedsPerLb ?? null,
    germinationPercent: lead?.germination ?? null,
    unitsOnHand: said.length > 0 ? said.reduce((total, units) => total + units, 0) : null,
    trialAdvantage: 0,
    trialAdvantageStandardError: 0,
  };
}

/**
 * A whole line-up from CSV text, for the command line: headers matched by name, every bad row named. Unlike the screen's
 * import, one bad row fails the file, because nobody is there to ask. `withoutMaturity` names the codes that cannot be placed.
 */
export function parseLineUpCsv(
  text: string,
): Outcome<{ varieties: VarietyProfile[]; withoutMaturity: string[]; notes: string[] }> {
  const delimited = readDelimited(new TextEncoder().encode(text), 'The line-up');
  if (!delimited.ok) return delimited;
  if (delimited.value.problems.length > 0) return bad(delimited.value.problems);
  const rows = fromHeader(delimited.value.rows);
  const headers = rows[0]?.cells;
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
    varieties: read.value.rows.map(profileOfRow).filter((profile) => profile !== null),
    withoutMaturity: read.value.rows.filter((row) => row.traits.relativeMaturity === null).map((row) => row.traits.code),
    notes: unknown.length > 0 ? [`Columns left out because their headers are not known: ${unknown.join(', ')}.`] : [],
  });
}
