import type { NamedBytes } from '@/lib/archive';
import { isZip } from '@/lib/archive';
import { type DelimitedRow, readDelimited } from '@/lib/csv';
import { bad, good, type Outcome } from '@/lib/errors';
import { isOldWorkbook, readWorkbook } from '@/lib/spreadsheet';
import { fromHeader } from './read-line-up';

/** Rows of a line-up file, CSV or XLSX, as text cells with their lines; the header comes first. */
export async function rowsOfFile(file: NamedBytes): Promise<Outcome<DelimitedRow[]>> {
  if (isZip(file.bytes) || isOldWorkbook(file.bytes)) {
    const sheets = await readWorkbook(file);
    if (!sheets.ok) return sheets;
    const sheet = sheets.value.find((one) => one.rows.length > 0);
    return sheet ? good(fromHeader(sheet.rows)) : bad(`"${file.name}" has no sheet with rows in it. Nothing was kept.`);
  }
  const read = readDelimited(file.bytes, file.name);
  if (!read.ok) return read;
  // Every row of a line-up matters: one that cannot be read fails the file rather than going missing.
  if (read.value.problems.length > 0) return bad(read.value.problems);
  return good(fromHeader(read.value.rows));
}
