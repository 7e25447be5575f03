/**
 * The text tables of a soil survey area: one line a row, bars between, text in quotation marks, no header. The order of the
 * columns stands in the area's own mstabcol.txt where that is delivered; else it is that of the public descriptions
 * (NRCS, "SSURGO Metadata – Table Column Descriptions"): horizons and components as listed by R. Hijmans in r-gis (2011),
 * 171 columns of a horizon; aggregated attributes as delivered since. Pure.
 */

/** Zero-based places of the columns that are used; negative counts from the end. */
const PLACES = {
  mapunit: { musym: 0, muname: 1, mukey: -1 },
  muaggatt: {
    slopegraddcp: 3,
    slopegradwta: 4,
    flodfreqdcd: 8,
    aws0100wta: 13,
    drclassdcd: 15,
    hydgrpdcd: 17,
    mukey: -1,
  },
  component: { comppct_r: 1, slope_r: 9, drainagecl: 23, mukey: -2, cokey: -1 },
  chorizon: { hzdept_r: 6, hzdepb_r: 9, caco3_r: 114, ph1to1h2o_r: 135, cokey: -2 },
} as const;

export type SurveyTable = keyof typeof PLACES;
export type ColumnOf<Table extends SurveyTable> = keyof (typeof PLACES)[Table] & string;

/** File names of the tables, as delivered. */
export const TABLE_FILES: Record<SurveyTable | 'columns', RegExp> = {
  mapunit: /(^|\/)mapunit\.txt$/i,
  muaggatt: /(^|\/)muaggatt\.txt$/i,
  component: /(^|\/)comp(onent)?\.txt$/i,
  chorizon: /(^|\/)chorizon\.txt$/i,
  columns: /(^|\/)mstabcol\.txt$/i,
};

/** One line as cells; bars inside quotation marks belong to the text. */
export function splitBars(line: string): string[] {
  if (!line.includes('"')) return line.split('|');
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  for (let i = 0; i < line.length; i += 1) {
    const sign = line[i];
    if (sign === '"') {
      if (quoted && line[i + 1] === '"') {
        cell += '"';
        i += 1;
      } else quoted = !quoted;
    } else if (sign === '|' && !quoted) {
      cells.push(cell);
      cell = '';
    } else cell += sign;
  }
  cells.push(cell);
  return cells;
}

/** Order of columns by table from mstabcol.txt (table, number, column, …); empty when the file is not of that shape. */
export function columnOrders(text: string | null): Map<string, string[]> {
  const orders = new Map<string, string[]>();
  for (const line of (text ?? '').split(/\r?\n/)) {
    const [table, number, column] = splitBars(line).map((cell) => cell.trim().toLowerCase());
    if (!table || !column || !/^\d+$/.test(number ?? '') || !/^[a-z0-9_]+$/.test(column)) continue;
    const order = orders.get(table) ?? [];
    order[Number(number) - 1] = column;
    orders.set(table, order);
  }
  return orders;
}

/** Rows of one table as records of the columns that are used; `wanted` keeps only rows it says yes to. */
export function tableRows<Table extends SurveyTable>(
  table: Table,
  text: string,
  orders: Map<string, string[]>,
  wanted: (row: Record<ColumnOf<Table>, string>) => boolean,
): Record<ColumnOf<Table>, string>[] {
  const order = orders.get(table);
  const places = Object.entries(PLACES[table]) as [ColumnOf<Table>, number][];
  const rows: Record<ColumnOf<Table>, string>[] = [];
  for (const line of text.split(/\r?\n/)) {
    if (line === '') continue;
    const cells = splitBars(line);
    const row = {} as Record<ColumnOf<Table>, string>;
    for (const [column, place] of places) {
      const told = order?.indexOf(column) ?? -1;
      row[column] = (cells[told >= 0 ? told : place < 0 ? cells.length + place : place] ?? '').trim();
    }
    if (wanted(row)) rows.push(row);
  }
  return rows;
}

/** A number of a survey table; `null` where the cell is empty. */
export function surveyNumber(text: string | undefined): number | null {
  if (text === undefined || text.trim() === '') return null;
  const value = Number(text);
  return Number.isFinite(value) ? value : null;
}
