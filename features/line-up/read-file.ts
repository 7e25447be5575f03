import type { NamedBytes } from '@/lib/archive';
import { isZip } from '@/lib/archive';
import { readDelimited } from '@/lib/csv';
import { bad, good, type Outcome } from '@/lib/errors';
import { isOldWorkbook, readWorkbook } from '@/lib/spreadsheet';

/** Rows of a line-up file, CSV or XLSX, as text cells. */
export async function rowsOfFile(file: NamedBytes): Promise<Outcome<string[][]>> {
  if (isZip(file.bytes) || isOldWorkbook(file.bytes)) {
    const sheets = await readWorkbook(file);
    if (!sheets.ok) return sheets;
    const sheet = sheets.value.find((one) => one.rows.length > 0);
    return sheet
      ? good(sheet.rows.map((row) => row.cells))
      : bad(`"${file.name}" has no sheet with rows in it. Nothing was kept.`);
  }
  const read = readDelimited(file.bytes, file.name);
  if (!read.ok) return read;
  // Every row of a line-up matters: one that cannot be read fails the file rather than going missing.
  if (read.value.problems.length > 0) return bad(read.value.problems);
  return good(read.value.rows.map((row) => row.cells));
}
