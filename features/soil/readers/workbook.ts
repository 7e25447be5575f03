import { good, type Outcome } from '@/lib/errors';
import { isOldWorkbook, readWorkbook } from '@/lib/spreadsheet';
import { meaningOf } from './headers';
import { extensionOf, type RawTable, type SoilReader, tableFromRows } from './table';

/** XLSX workbooks; every sheet that holds a table of samples. */
export const workbook: SoilReader = {
  format: 'XLSX',
  takes: (files) => files.filter((file) => ['xlsx', 'xlsm', 'xls'].includes(extensionOf(file.name)) || isOldWorkbook(file.bytes)),
  async read(files): Promise<Outcome<RawTable[]>> {
    const tables: RawTable[] = [];
    for (const file of files) {
      const sheets = await readWorkbook(file);
      if (!sheets.ok) return sheets;
      const read = sheets.value.flatMap((sheet) => {
        const name = sheets.value.length === 1 ? file.name : `${file.name}, sheet “${sheet.name}”`;
        return tableFromRows(name, sheet.rows) ?? [];
      });
      // Notes and keys stand on sheets of their own; they know fewer than two columns.
      const known = read.filter((table) => table.headers.filter((header) => meaningOf(header)).length >= 2);
      tables.push(...(known.length > 0 ? known : read.slice(0, 1)));
    }
    return good(tables);
  },
};
