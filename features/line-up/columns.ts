import { BUSH_TYPES, CYST_SOURCES, HEIGHTS, RELEASES, TOLERANCES } from '@/features/placement/engine/model';
import { bad, good, type Outcome } from '@/lib/errors';
import type { VarietyTraits } from './model';

/**
 * The columns of a line-up: one list that the table, the form, CSV and XLSX walk. To add one: a line here, a column in the
 * table's schema, and a key in VarietyTraits.
 */
export type ColumnKind = 'text' | 'maturity' | 'rating' | 'choice' | 'genes' | 'list' | 'number';

/** What a row of a file may say beyond the traits: one lot's seed and supply. */
export interface LotColumns {
  lotNumber: string | null;
  seedsPerLb: number | null;
  germination: number | null;
  treatment: string | null;
  unitsOnHand: number | null;
}

export type RowKey = keyof VarietyTraits | keyof LotColumns;

export interface Column {
  key: RowKey;
  /** Header in CSV and XLSX. */
  header: string;
  label: string;
  /** Short head for the table. */
  short: string;
  kind: ColumnKind;
  words?: readonly string[];
  unit?: string;
  range?: readonly [number, number];
  /** Header spellings in other people's files, lower-case letters and digits only. */
  aliases: readonly string[];
  /** Belongs to a seed lot, not to the variety. */
  ofLot?: boolean;
  /** Supply: never written into a grower's file. */
  private?: boolean;
}

function rating(key: RowKey, label: string, short: string, aliases: string[]): Column {
  return { key, header: key, label, short, kind: 'rating', aliases, range: [1, 9] };
}

export const COLUMNS: readonly Column[] = [
  {
    key: 'code',
    header: 'code',
    label: 'Code',
    short: 'Code',
    kind: 'text',
    aliases: ['variety', 'name', 'varietyname', 'product', 'hybrid', 'brandvariety', 'varietycode'],
  },
  {
    key: 'relativeMaturity',
    header: 'relativeMaturity',
    label: 'Relative maturity',
    short: 'RM',
    kind: 'maturity',
    aliases: ['rm', 'maturity', 'relmat', 'maturitygroup', 'mg', 'relativemat'],
  },
  {
    key: 'height',
    header: 'height',
    label: 'Height',
    short: 'Height',
    kind: 'choice',
    words: HEIGHTS,
    aliases: ['plantheight', 'ht'],
  },
  {
    key: 'bushType',
    header: 'bushType',
    label: 'Bush type',
    short: 'Bush',
    kind: 'choice',
    words: BUSH_TYPES,
    aliases: ['bush', 'canopy', 'canopytype', 'planttype', 'growthtype'],
  },
  rating('standability', 'Standability', 'Stand', ['standing', 'lodging', 'lodgingresistance']),
  rating('emergence', 'Emergence', 'Emerg', ['emerg', 'vigor', 'seedlingvigor', 'vigour']),
  {
    key: 'phytophthoraGenes',
    header: 'phytophthoraGenes',
    label: 'Phytophthora genes (Rps)',
    short: 'Rps',
    kind: 'genes',
    aliases: ['rps', 'rpsgene', 'rpsgenes', 'prrgene', 'phytophthoragene', 'gene'],
  },
  rating('phytophthora', 'Phytophthora field tolerance', 'PRR', [
    'prr',
    'phytophthorafieldtolerance',
    'prrtolerance',
    'fieldtolerance',
    'phytophthorarootrot',
  ]),
  rating('suddenDeath', 'Sudden death syndrome', 'SDS', ['sds', 'suddendeathsyndrome']),
  rating('brownStemRot', 'Brown stem rot', 'BSR', ['bsr']),
  rating('whiteMould', 'White mould', 'WM', ['whitemold', 'wm', 'sclerotinia']),
  rating('frogeye', 'Frogeye leaf spot', 'FLS', ['frogeyeleafspot', 'fls', 'fels']),
  rating('stemCanker', 'Stem canker', 'SC', ['canker', 'southernstemcanker']),
  rating('charcoalRot', 'Charcoal rot', 'CR', ['charcoal']),
  rating('ironChlorosis', 'Iron chlorosis', 'IDC', ['idc', 'irondeficiencychlorosis', 'chlorosis']),
  rating('drought', 'Drought and root health', 'Drt', ['droughttolerance', 'roothealth']),
  {
    key: 'cystNematodeSource',
    header: 'cystNematodeSource',
    label: 'Cyst nematode source',
    short: 'SCN',
    kind: 'choice',
    words: CYST_SOURCES,
    aliases: ['scn', 'scnsource', 'cystsource', 'cyst', 'scnresistance', 'nematodesource'],
  },
  {
    key: 'tolerances',
    header: 'tolerances',
    label: 'Herbicide tolerances',
    short: 'Tolerances',
    kind: 'list',
    words: TOLERANCES,
    aliases: ['herbicide', 'herbicidetolerance', 'herbicidetolerances', 'trait', 'traits', 'herbicidetraits'],
  },
  {
    key: 'lotNumber',
    header: 'lotNumber',
    label: 'Seed lot',
    short: 'Lot',
    kind: 'text',
    aliases: ['lot', 'seedlot', 'lotno'],
    ofLot: true,
  },
  {
    key: 'seedsPerLb',
    header: 'seedsPerLb',
    label: 'Seeds per pound',
    short: 'Seeds/lb',
    kind: 'number',
    unit: 'seeds/lb',
    range: [1200, 6000],
    aliases: ['seedsperpound', 'seedslb', 'seedcount', 'seedsize'],
    ofLot: true,
  },
  {
    key: 'germination',
    header: 'germination',
    label: 'Germination',
    short: 'Germ',
    kind: 'number',
    unit: '%',
    range: [30, 100],
    aliases: ['germ', 'germinationpercent', 'germpercent', 'warmgerm'],
    ofLot: true,
  },
  {
    key: 'treatment',
    header: 'treatment',
    label: 'Seed treatment',
    short: 'Treatment',
    kind: 'text',
    aliases: ['seedtreatment', 'treated'],
    ofLot: true,
  },
  {
    key: 'unitsOnHand',
    header: 'unitsOnHand',
    label: 'Units on hand',
    short: 'Units',
    kind: 'number',
    unit: 'units',
    range: [0, 1_000_000],
    aliases: ['units', 'supply', 'onhand', 'inventory', 'quantity', 'qty'],
    ofLot: true,
    private: true,
  },
  {
    key: 'release',
    header: 'release',
    label: 'Release',
    short: 'Release',
    kind: 'choice',
    words: RELEASES,
    aliases: ['status', 'releasestatus'],
  },
  {
    key: 'note',
    header: 'note',
    label: 'Note',
    short: 'Note',
    kind: 'text',
    aliases: ['notes', 'comment', 'comments', 'remarks'],
  },
];

export type Parsed = string | number | string[] | null;

function squeezed(text: string): string {
  return text.toLowerCase().replace(/[^a-z0-9]/g, '');
}

/** The column a header means; `null` when no spelling fits. */
export function columnOfHeader(header: string): Column | null {
  const spelled = squeezed(header);
  if (!spelled) return null;
  return COLUMNS.find((column) => squeezed(column.header) === spelled || column.aliases.includes(spelled)) ?? null;
}

/**
 * Relative maturity as a number: `2.4`, and the early groups as the trade writes them, `00.7` → −0.3, `000.5` → −1.5
 * (MG 00.x → x/10 − 1, MG 000.x → x/10 − 2).
 */
export function parseRelativeMaturity(text: string): number | null {
  const written = text.trim();
  const early = /^(0{2,3})\.?(\d)?$/.exec(written);
  if (early) return Number((Number(early[2] ?? 0) / 10 - (early[1] === '00' ? 1 : 2)).toFixed(1));
  if (!/^-?\d{1,2}([.,]\d{1,2})?$/.test(written)) return null;
  const value = Number(written.replace(',', '.'));
  return value >= -2 && value <= 10 ? value : null;
}

const EMPTY = new Set(['', '-', '—', '–', 'n/a', 'na', 'nr', '.']);

/** One cell of a file or form in the column's own terms. An empty cell is unknown (`null`, or an empty list). */
export function parseCell(column: Column, raw: string): Outcome<Parsed> {
  const text = raw.trim();
  const empty = EMPTY.has(text.toLowerCase());
  switch (column.kind) {
    case 'text':
      if (empty) return good(null);
      return text.length <= 200 ? good(text) : bad(`${column.header}: at most 200 characters.`);
    case 'maturity': {
      const value = parseRelativeMaturity(text);
      return value === null
        ? bad(`${column.header}: "${text}" is not a maturity. Write a number like 2.4 (or 00.7).`)
        : good(value);
    }
    case 'choice': {
      if (empty) return good(null);
      const found = column.words?.find((word) => squeezed(word) === squeezed(text));
      return found ? good(found) : bad(`${column.header}: "${text}" is not known. Known are: ${column.words?.join(', ')}.`);
    }
    case 'genes': {
      if (empty || /^none$/i.test(text)) return good([]);
      const genes = text
        .split(/[;,/+&\s]+/)
        .filter(Boolean)
        .map((gene) => gene.replace(/^rps-?/i, '').toLowerCase());
      const odd = genes.find((gene) => !/^\d{1,2}[a-z]?$/.test(gene));
      return odd === undefined
        ? good(genes)
        : bad(`${column.header}: "${odd}" is not a gene. Write genes like 1k or 3a, with ; between them.`);
    }
    case 'list': {
      if (empty || /^(none|conventional)$/i.test(text)) return good([]);
      const words: string[] = [];
      for (const part of text
        .split(/[;/|+]|,(?!4)(?!\s*4)/)
        .map((one) => one.trim())
        .filter(Boolean)) {
        const found = column.words?.find((word) => squeezed(word) === squeezed(part));
        if (!found) return bad(`${column.header}: "${part}" is not known. Known are: ${column.words?.join(', ')}.`);
        if (!words.includes(found)) words.push(found);
      }
      return good(words);
    }
    default:
      return empty ? good(null) : parseNumber(column, text);
  }
}

function parseNumber(column: Column, text: string): Outcome<Parsed> {
  const value = Number(text.replace(/[%\s]/g, '').replace(/,(?=\d{3}\b)/g, ''));
  const [low, high] = column.range ?? [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY];
  if (!Number.isFinite(value)) return bad(`${column.header}: "${text}" is not a number.`);
  if (value < low || value > high) {
    const best = column.kind === 'rating' ? ' (9 is best)' : '';
    return bad(`${column.header}: ${text} is outside ${low}–${high.toLocaleString('en-US')}${best}.`);
  }
  return good(value);
}

/** A value as the screen and a file write it; lists with ; between. Unknown is empty. */
export function formatCell(column: Column, value: unknown): string {
  if (value === null || value === undefined) return '';
  if (Array.isArray(value)) return value.join(';');
  if (column.kind === 'maturity') return Number(value).toFixed(1);
  return String(value);
}
