import ExcelJS from 'exceljs';
import { type NamedBytes, unpack } from './archive';
import { type DelimitedRow, MOST_ROWS } from './csv';
import { bad, good, type Outcome } from './errors';

export interface Sheet {
  name: string;
  /** Rows that hold anything, with their row numbers; dates are ISO dates, formulas their last result. */
  rows: DelimitedRow[];
}

/** A workbook is a zip of XML: far below what an upload may unpack to. */
const WORKBOOK_LIMITS = { entries: 1000, unpackedBytes: 300_000_000, ratio: 200 };
const MOST_COLUMNS = 500;

/** Is this the binary workbook of Excel 97–2003 (compound file)? */
export function isOldWorkbook(bytes: Uint8Array): boolean {
  return bytes[0] === 0xd0 && bytes[1] === 0xcf && bytes[2] === 0x11 && bytes[3] === 0xe0;
}

/** Sheets of an XLSX workbook as rows of text. The archive's own list is held to limits before anything is unpacked. */
export async function readWorkbook(file: NamedBytes): Promise<Outcome<Sheet[]>> {
  if (isOldWorkbook(file.bytes)) {
    return bad(
      `"${file.name}" is a workbook of an old kind (.xls) or locked with a password. Nothing was kept. Open it, save it as .xlsx or CSV without a password, and choose that.`,
    );
  }
  const checked = await unpack(file, (name) => /^xl\/workbook\.xml$/i.test(name), WORKBOOK_LIMITS);
  if (!checked.ok) return checked;
  if (checked.value.length === 0)
    return bad(`"${file.name}" is not a workbook. Nothing was kept. Save it again as .xlsx or CSV.`);
  const workbook = new ExcelJS.Workbook();
  try {
    // The library's type asks for a Buffer of an older Node.
    await workbook.xlsx.load(file.bytes.slice().buffer as unknown as Parameters<typeof workbook.xlsx.load>[0]);
  } catch (error) {
    const words = error instanceof Error ? error.message.slice(0, 120) : 'unknown fault';
    return bad(`"${file.name}" is damaged (${words}). Nothing was kept. Open it, save it again as .xlsx and choose that.`);
  }
  const sheets: Sheet[] = [];
  let total = 0;
  for (const sheet of workbook.worksheets) {
    const rows: DelimitedRow[] = [];
    if (sheet.columnCount > MOST_COLUMNS)
      return bad(`"${file.name}", sheet "${sheet.name}", has more than ${MOST_COLUMNS} columns. Nothing was kept.`);
    sheet.eachRow({ includeEmpty: false }, (row, line) => {
      const cells: string[] = [];
      row.eachCell({ includeEmpty: true }, (cell, column) => {
        cells[column - 1] = textOfCell(cell.value);
      });
      if (cells.some((cell) => cell)) rows.push({ line, cells: Array.from(cells, (cell) => cell ?? '') });
    });
    total += rows.length;
    if (total > MOST_ROWS)
      return bad(`"${file.name}" has more than ${MOST_ROWS.toLocaleString('en-US')} rows. Nothing was kept. Split it.`);
    if (rows.length > 0) sheets.push({ name: sheet.name, rows });
  }
  return sheets.length > 0 ? good(sheets) : bad(`"${file.name}" is empty. Nothing was kept.`);
}

function textOfCell(value: unknown): string {
  if (value === null || value === undefined) return '';
  if (typeof value === 'string') return value.trim();
  // Excel stores 6.4 as 6.4000000000000004: fifteen digits are what it shows.
  if (typeof value === 'number') return Number.isFinite(value) ? String(Number(value.toPrecision(15))) : '';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  if (value instanceof Date) return Number.isNaN(value.getTime()) ? '' : value.toISOString().slice(0, 10);
  if (typeof value === 'object') {
    const rich = value as { richText?: { text: string }[]; result?: unknown; text?: unknown; error?: unknown };
    if (Array.isArray(rich.richText))
      return rich.richText
        .map((part) => part.text)
        .join('')
        .trim();
    if (rich.result !== undefined)
      return typeof rich.result === 'object' && !(rich.result instanceof Date) ? '' : textOfCell(rich.result);
    if (rich.text !== undefined) return textOfCell(rich.text);
  }
  return '';
}
