import { readDelimited } from '@/lib/csv';
import { good, type Outcome } from '@/lib/errors';
import { extensionOf, type RawTable, type SoilReader, tableFromRows } from './table';

const EXTENSIONS = new Set(['csv', 'tsv', 'txt', 'tab', 'dat']);

/** CSV, TSV and other delimited text, in any of the usual encodings. */
export const delimited: SoilReader = {
  format: 'CSV',
  takes: (files) => files.filter((file) => EXTENSIONS.has(extensionOf(file.name))),
  async read(files): Promise<Outcome<RawTable[]>> {
    const tables: RawTable[] = [];
    for (const file of files) {
      const read = readDelimited(file.bytes, file.name);
      if (!read.ok) return read;
      const { rows, notes, problems } = read.value;
      const table = tableFromRows(
        file.name,
        rows,
        notes,
        problems.map((problem) => problem.message),
      );
      if (table) tables.push(table);
    }
    return good(tables);
  },
};
