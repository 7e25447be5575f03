import { XMLParser } from 'fast-xml-parser';
import { decodeText } from '@/lib/csv';
import { bad, good, type Outcome } from '@/lib/errors';
import { modusTable } from './modus';
import { extensionOf, type RawTable, type SoilReader } from './table';

/** Modus version 1, XML. */
export const modusXml: SoilReader = {
  format: 'Modus XML',
  takes: (files) => files.filter((file) => extensionOf(file.name) === 'xml'),
  async read(files): Promise<Outcome<RawTable[]>> {
    const tables: RawTable[] = [];
    for (const file of files) {
      const { text } = decodeText(file.bytes);
      // A document type can blow a file of a page up to gigabytes; no laboratory sends one.
      if (/<!DOCTYPE/i.test(text)) return bad(`"${file.name}" has a document type, which is not read here. Nothing was kept.`);
      let tree: unknown;
      try {
        tree = new XMLParser({ ignoreAttributes: false, parseTagValue: false, removeNSPrefix: true, trimValues: true }).parse(
          text,
          true,
        );
      } catch (error) {
        const words = error instanceof Error ? error.message.slice(0, 120) : 'damaged';
        return bad(`"${file.name}" is not whole XML (${words}). Nothing was kept. Export or copy it again.`);
      }
      const table = modusTable(tree, file.name);
      if (!table) return bad(`"${file.name}" holds no soil results of the Modus standard. Nothing was kept.`);
      tables.push(table);
    }
    return good(tables);
  },
};
