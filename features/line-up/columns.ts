import { BUSH_TYPES, CYST_SOURCES, HEIGHTS, RELEASES, TOLERANCES } from '@/features/placement/engine/model';
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
  unitSizeSeeds: number | null;
  unitsOnHand: number | null;
  priceDollarsPerUnit: number | null;
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
  /** Most characters of a text. */
  longest?: number;
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
    longest: 40,
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
    longest: 60,
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
    key: 'unitSizeSeeds',
    header: 'unitSizeSeeds',
    label: 'Seeds in a unit',
    short: 'Unit',
    kind: 'number',
    unit: 'seeds',
    range: [1000, 1_000_000],
    aliases: ['unitsize', 'seedsperunit', 'seedsunit'],
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
    key: 'priceDollarsPerUnit',
    header: 'priceDollarsPerUnit',
    label: 'Price a unit',
    short: 'Price',
    kind: 'number',
    unit: '$',
    range: [0, 1000],
    aliases: ['price', 'priceperunit', 'unitprice', 'dollarsperunit'],
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
    longest: 1000,
    aliases: ['notes', 'comment', 'comments', 'remarks'],
  },
];

/** A word without case, spaces and signs, for comparing spellings. */
export function squeezed(text: string): string {
  return text.toLowerCase().replace(/[^a-z0-9]/g, '');
}

/** The column a header means; `null` when no spelling fits. */
export function columnOfHeader(header: string): Column | null {
  const spelled = squeezed(header);
  if (!spelled) return null;
  return COLUMNS.find((column) => squeezed(column.header) === spelled || column.aliases.includes(spelled)) ?? null;
}
