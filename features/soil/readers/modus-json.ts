import { decodeText } from '@/lib/csv';
import { bad, good, type Outcome } from '@/lib/errors';
import { modusTable } from './modus';
import { extensionOf, type RawTable, type SoilReader } from './table';

/** Modus version 2, JSON. */
export const modusJson: SoilReader = {
  format: 'Modus JSON',
  takes: (files) => files.filter((file) => extensionOf(file.name) === 'json'),
  async read(files): Promise<Outcome<RawTable[]>> {
    const tables: RawTable[] = [];
    for (const file of files) {
      let tree: unknown;
      try {
        tree = JSON.parse(decodeText(file.bytes).text);
      } catch (error) {
        const words = error instanceof Error ? error.message.slice(0, 120) : 'damaged';
        return bad(`"${file.name}" is not whole JSON (${words}). Nothing was kept. Export or copy it again.`);
      }
      const table = modusTable(tree, file.name);
      if (!table) return bad(`"${file.name}" holds no soil results of the Modus standard. Nothing was kept.`);
      tables.push(table);
    }
    return good(tables);
  },
};
