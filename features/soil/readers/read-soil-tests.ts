import { createHash } from 'node:crypto';
import { isZip, type NamedBytes, unpack } from '@/lib/archive';
import { bad, good, type Outcome } from '@/lib/errors';
import { isOldWorkbook } from '@/lib/spreadsheet';
import type { MatchedColumn, SampleOptions } from './columns';
import { SOIL_READERS } from './index';
import { joinTables } from './join';
import { type ReadProblem, type ReadSample, samplesOfTable } from './samples';
import { extensionOf, type RawTable, type ReadTableOptions } from './table';

export interface ReadSoilTests {
  /** Names of the formats met, '' when no file could be read. */
  format: string;
  laboratory: string | null;
  samples: ReadSample[];
  columns: (MatchedColumn & { table: string })[];
  notes: string[];
  /** What was left out or not understood, by row where it has one. */
  problems: ReadProblem[];
  /** Asked once, because no header says it. */
  asks: { bufferMethod: boolean; phosphorusMethod: boolean; nutrientUnit: boolean };
  /** Of each table's headers, to remember how its columns were matched. */
  signatures: { table: string; signature: string; remembered: boolean }[];
}

export interface SoilReadOptions extends SampleOptions, ReadTableOptions {
  /** Columns matched by hand before, by the signature of their headers. */
  layouts?: Record<string, Record<string, string>>;
}

export const SOIL_LIMITS = { samples: 200_000, seconds: 120, memoryMegabytes: 1500 } as const;
const MOST_PROBLEMS = 1000;

const nothing = (problems: ReadProblem[]): ReadSoilTests => ({
  format: '',
  laboratory: null,
  samples: [],
  columns: [],
  notes: [],
  problems,
  asks: { bufferMethod: false, phosphorusMethod: false, nutrientUnit: false },
  signatures: [],
});

/**
 * Reads soil tests from one file or several of any known format, and joins results without places to points without results.
 * Every end is a value: what could be read, notes of what was understood, and problems with their rows. `null` is not measured;
 * depths in inches, nutrients in ppm, places in degrees (WGS 84).
 */
export async function readSoilTests(files: NamedBytes[], options: SoilReadOptions = {}): Promise<ReadSoilTests> {
  if (files.length === 0) return nothing([{ message: 'No file was chosen.' }]);
  const unpacked = await unpackAll(files);
  if (!unpacked.ok) return nothing(unpacked.problems);
  const { loose, left } = unpacked.value;

  const formats: string[] = [];
  const tables: RawTable[] = [];
  const problems: ReadProblem[] = [];
  let waiting = loose;
  for (const reader of SOIL_READERS) {
    const own = reader.takes(waiting);
    if (own.length === 0) continue;
    waiting = waiting.filter((file) => !own.includes(file));
    const read = await reader.read(own, options);
    if (!read.ok) {
      problems.push(...read.problems);
      continue;
    }
    if (read.value.length > 0) formats.push(reader.format);
    tables.push(...read.value);
  }
  const ignored = [...left, ...waiting.map((file) => file.name)];
  if (tables.length === 0) {
    if (problems.length > 0) return nothing(problems);
    return nothing([
      {
        message: `"${files[0]?.name}" holds no soil tests that can be read here. Nothing was kept. Send CSV, XLSX, Modus (XML or JSON) or a zipped point shapefile.`,
      },
    ]);
  }

  const read = tables.map((table) => {
    const signature = headerSignature(table.headers);
    const layout = options.layouts?.[signature];
    return { table, signature, remembered: layout !== undefined, ...samplesOfTable(table, withLayout(options, layout)) };
  });
  const joined = joinTables(read.map(({ table, samples }) => ({ name: table.name, samples })));
  for (const { table, problems: rows } of read) {
    problems.push(...table.problems.map((message) => ({ message: `${table.name}: ${message}` })));
    problems.push(...rows.map((one) => (read.length > 1 ? { ...one, message: `${table.name}: ${one.message}` } : one)));
  }
  problems.push(...joined.problems.map((message) => ({ message })));
  if (joined.samples.length === 0 && problems.length === 0)
    problems.push({ message: nothingFound(read.flatMap(({ table }) => table.headers)) });
  const notes = [...read.flatMap(({ table, notes: own }) => [...table.notes, ...own]), ...joined.notes];
  if (ignored.length > 0) notes.push(`Not read: ${ignored.slice(0, 8).join(', ')}${ignored.length > 8 ? ', …' : ''}.`);
  return {
    format: [...new Set(formats)].join(' + '),
    laboratory: tables.find((table) => table.laboratory)?.laboratory ?? null,
    samples: joined.samples.slice(0, SOIL_LIMITS.samples),
    columns: read.flatMap(({ table, columns }) => columns.map((column) => ({ ...column, table: table.name }))),
    notes,
    problems: shortened(problems),
    asks: {
      bufferMethod: read.some(({ asks }) => asks.bufferMethod),
      phosphorusMethod: read.some(({ asks }) => asks.phosphorusMethod),
      nutrientUnit: read.some(({ asks }) => asks.nutrientUnit),
    },
    signatures: read.map(({ table, signature, remembered }) => ({ table: table.name, signature, remembered })),
  };
}

/** The same headers have the same signature, whatever file they come in. */
export function headerSignature(headers: readonly string[]): string {
  return createHash('sha256')
    .update(headers.map((header) => header.trim().toLowerCase()).join('\u0000'))
    .digest('hex')
    .slice(0, 32);
}

/** What was chosen now goes before what was chosen for this layout before. Answers stand in a layout under "@" and their name. */
function withLayout(options: SoilReadOptions, layout: Record<string, string> | undefined): SampleOptions {
  if (!layout) return options;
  return {
    columns: options.columns ?? layout,
    bufferMethod: options.bufferMethod ?? layout['@bufferMethod'],
    phosphorusMethod: options.phosphorusMethod ?? layout['@phosphorusMethod'],
    nutrientUnit: options.nutrientUnit ?? (layout['@nutrientUnit'] === 'lb/ac' ? 'lb/ac' : undefined),
  };
}

function nothingFound(headers: string[]): string {
  const named = headers.filter(Boolean).slice(0, 12).join(', ');
  return `No column with soil results was recognised. The headers read: ${named || 'none'}. Say what each column is, or send the sheet with its header row.`;
}

function shortened(problems: ReadProblem[]): ReadProblem[] {
  if (problems.length <= MOST_PROBLEMS) return problems;
  return [
    ...problems.slice(0, MOST_PROBLEMS),
    { message: `${(problems.length - MOST_PROBLEMS).toLocaleString('en-US')} more rows have problems.` },
  ];
}

const WANTED = new Set(['csv', 'tsv', 'txt', 'tab', 'xlsx', 'xls', 'xml', 'json', 'shp', 'dbf', 'prj', 'cpg']);
/** Parts of a zipped shapefile that carry nothing that is read. */
const SILENT = new Set(['shx', 'sbn', 'sbx', 'qpj', 'qix', 'cpg', 'xml', 'fbn', 'fbx', 'ain', 'aih', 'atx', 'ixs', 'mxs']);

async function unpackAll(files: NamedBytes[]): Promise<Outcome<{ loose: NamedBytes[]; left: string[] }>> {
  const loose: NamedBytes[] = [];
  const left: string[] = [];
  for (const file of files) {
    if (file.bytes.byteLength === 0) return bad(`"${file.name}" is empty. Nothing was kept. Choose the file again.`);
    if (!isZip(file.bytes) || /^xls[xm]$/.test(extensionOf(file.name))) {
      loose.push(isZip(file.bytes) || isOldWorkbook(file.bytes) || extensionOf(file.name) !== '' ? file : named(file));
      continue;
    }
    const names: string[] = [];
    const inside = await unpack(file, (name) => {
      names.push(name);
      return WANTED.has(extensionOf(name)) && !/\.shp\.xml$/i.test(name);
    });
    if (!inside.ok) return inside;
    if (names.includes('xl/workbook.xml')) {
      loose.push({ name: `${file.name}.xlsx`, bytes: file.bytes });
      continue;
    }
    // The archive's name keeps layers of one name in two archives apart.
    loose.push(
      ...inside.value
        .filter((one) => one.bytes.byteLength > 0)
        .map((one) => ({ ...one, name: `${file.name.replace(/\.zip$/i, '')}/${one.name}` })),
    );
    left.push(...names.filter((name) => !WANTED.has(extensionOf(name)) && !SILENT.has(extensionOf(name))));
  }
  return good({ loose, left });
}

/** A file without an ending is what its first sign says. */
function named(file: NamedBytes): NamedBytes {
  const head = new TextDecoder()
    .decode(file.bytes.subarray(0, 200))
    .replace(/^\uFEFF/, '')
    .trimStart();
  const ending = head.startsWith('<') ? 'xml' : head.startsWith('{') || head.startsWith('[') ? 'json' : 'csv';
  return { ...file, name: `${file.name}.${ending}` };
}
