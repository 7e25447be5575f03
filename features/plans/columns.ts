/** The one list of the plan's columns: the screen, the CSV, the workbook and the PDF walk it. Pure. */
import { formatAcres, formatBushels, formatDollars, formatNumber, formatTenth } from '@/lib/format';
import { type LineFigures, lineName, type PlanLine, type PlanTotals } from './model';

export type PlanPlace = 'screen' | 'csv' | 'xlsx' | 'pdf';

export interface PlanColumn {
  id: string;
  /** Head on the screen and in the PDF, with its unit. */
  label: string;
  /** Head in files, one word a program can read, with its unit. */
  fileLabel: string;
  numeric: boolean;
  places: readonly PlanPlace[];
  /** Only for the dealership's own people: prices. */
  dealershipOnly?: boolean;
  /** Relative width on paper. */
  width: number;
  /** Raw value for files; `null` leaves the cell empty. */
  value: (line: PlanLine, figures: LineFigures) => string | number | null;
  /** As people read it. */
  text: (line: PlanLine, figures: LineFigures) => string;
  /** The cell of the line "All fields", where there is one. */
  total?: (totals: PlanTotals) => string;
  /** Decimals a file keeps; a workbook sums the column where `summed`. */
  digits?: number;
  summed?: boolean;
}

const ALL: readonly PlanPlace[] = ['screen', 'csv', 'xlsx', 'pdf'];
const FILES: readonly PlanPlace[] = ['csv', 'xlsx'];

function round(value: number | null, digits: number): number | null {
  return value === null ? null : Number(value.toFixed(digits));
}

function column(one: Omit<PlanColumn, 'value' | 'text'> & Partial<Pick<PlanColumn, 'value' | 'text'>>): PlanColumn {
  const value = one.value ?? (() => null);
  return { ...one, value, text: one.text ?? ((line, figures) => String(value(line, figures) ?? '')) };
}

export const PLAN_COLUMNS: readonly PlanColumn[] = [
  column({
    id: 'farm',
    label: 'Farm',
    fileLabel: 'farm',
    numeric: false,
    places: FILES,
    width: 2,
    value: (line) => line.farmName,
  }),
  column({
    id: 'field',
    label: 'Field',
    fileLabel: 'field',
    numeric: false,
    places: ALL,
    width: 3,
    value: lineName,
    total: () => 'All fields',
  }),
  column({
    id: 'acres',
    label: 'Acres',
    fileLabel: 'acres',
    numeric: true,
    places: ALL,
    width: 1.2,
    digits: 2,
    summed: true,
    value: (line) => round(line.areaAcres, 2),
    text: (line) => formatAcres(line.areaAcres),
    total: (totals) => formatAcres(totals.acres),
  }),
  column({
    id: 'variety',
    label: 'Variety',
    fileLabel: 'variety',
    numeric: false,
    places: ALL,
    width: 2,
    value: (line) => line.variety?.code ?? null,
    text: (line) => line.variety?.code ?? '—',
  }),
  column({
    id: 'relativeMaturity',
    label: 'RM',
    fileLabel: 'relativeMaturity',
    numeric: true,
    places: ['csv', 'xlsx', 'pdf'],
    width: 0.9,
    digits: 1,
    value: (line) => round(line.variety?.relativeMaturity ?? null, 1),
    text: (line) => formatTenth(line.variety?.relativeMaturity),
  }),
  column({
    id: 'lot',
    label: 'Lot',
    fileLabel: 'lot',
    numeric: false,
    places: ALL,
    width: 1.8,
    value: (line) => line.lot?.lotNumber ?? null,
    text: (line) => line.lot?.lotNumber ?? '',
  }),
  column({
    id: 'rowWidth',
    label: 'Rows, in',
    fileLabel: 'rowWidthInches',
    numeric: true,
    places: ALL,
    width: 1.1,
    digits: 1,
    value: (line) => line.rowWidthInches,
    text: (line) => (line.rowWidthInches === null ? '' : String(line.rowWidthInches)),
  }),
  column({
    id: 'population',
    label: 'Seeds/ac, 000',
    fileLabel: 'seedsPerAcre',
    numeric: true,
    places: ALL,
    width: 1.5,
    digits: 0,
    value: (line) => (line.variety ? line.populationSeedsPerAcre : null),
    text: (line) => (line.variety && line.populationSeedsPerAcre !== null ? thousands(line.populationSeedsPerAcre) : ''),
  }),
  column({
    id: 'seedsPerFoot',
    label: 'Seeds/ft',
    fileLabel: 'seedsPerFoot',
    numeric: true,
    places: ALL,
    width: 1.2,
    digits: 2,
    value: (_line, figures) => round(figures.seedsPerFoot, 2),
    text: (_line, figures) => (figures.seedsPerFoot === null ? '' : formatNumber(figures.seedsPerFoot, 2)),
  }),
  column({
    id: 'poundsPerAcre',
    label: 'lb/ac',
    fileLabel: 'poundsPerAcre',
    numeric: true,
    places: ALL,
    width: 1,
    digits: 1,
    value: (_line, figures) => round(figures.poundsPerAcre, 1),
    text: (_line, figures) =>
      figures.poundsPerAcre === null ? '' : `${figures.poundsAreUsual ? '~' : ''}${formatNumber(figures.poundsPerAcre)}`,
  }),
  column({
    id: 'units',
    label: 'Units',
    fileLabel: 'units',
    numeric: true,
    places: ALL,
    width: 1.1,
    digits: 2,
    summed: true,
    value: (_line, figures) => round(figures.units, 2),
    text: (_line, figures) => (figures.units === null ? '' : formatNumber(figures.units, 1)),
    total: (totals) => formatNumber(totals.units),
  }),
  column({
    id: 'pounds',
    label: 'Pounds',
    fileLabel: 'pounds',
    numeric: true,
    places: FILES,
    width: 1.2,
    digits: 0,
    summed: true,
    value: (_line, figures) => round(figures.pounds, 0),
  }),
  column({
    id: 'seedCost',
    label: 'Seed, $',
    fileLabel: 'seedCostDollars',
    numeric: true,
    places: ['screen', 'xlsx', 'csv'],
    dealershipOnly: true,
    width: 1.2,
    digits: 2,
    summed: true,
    value: (_line, figures) => (figures.seedCostCents === null ? null : figures.seedCostCents / 100),
    text: (_line, figures) => (figures.seedCostCents === null ? '' : formatDollars(figures.seedCostCents)),
    total: (totals) => (totals.seedCostCents === null ? '' : formatDollars(totals.seedCostCents)),
  }),
  column({
    id: 'expected',
    label: 'bu/ac',
    fileLabel: 'expectedBushelsPerAcre',
    numeric: true,
    places: ALL,
    width: 1.1,
    digits: 1,
    value: (_line, figures) => round(figures.expected, 1),
    text: (_line, figures) => (figures.expected === null ? '' : formatBushels(figures.expected)),
    total: (totals) => formatBushels(totals.expectedPerAcre),
  }),
  column({
    id: 'low',
    label: 'Low',
    fileLabel: 'lowBushelsPerAcre',
    numeric: true,
    places: FILES,
    width: 1,
    digits: 1,
    value: (line) => round(line.assessment?.low ?? null, 1),
  }),
  column({
    id: 'high',
    label: 'High',
    fileLabel: 'highBushelsPerAcre',
    numeric: true,
    places: FILES,
    width: 1,
    digits: 1,
    value: (line) => round(line.assessment?.high ?? null, 1),
  }),
  column({
    id: 'runnerUp',
    label: 'Runner-up',
    fileLabel: 'runnerUp',
    numeric: false,
    places: ['screen', 'csv', 'xlsx'],
    width: 1.8,
    value: (line) => line.runnerUp?.code ?? null,
    text: (line) => (line.runnerUp ? `${line.runnerUp.code} ${signed(line.runnerUp.differenceBushels)}` : ''),
  }),
  column({
    id: 'note',
    label: 'Note',
    fileLabel: 'note',
    numeric: false,
    places: FILES,
    width: 3,
    value: (line) => line.note,
  }),
];

/** The columns of a place that this reader may see. */
export function columnsFor(place: PlanPlace, dealershipSide: boolean): PlanColumn[] {
  return PLAN_COLUMNS.filter((one) => one.places.includes(place) && (dealershipSide || !one.dealershipOnly));
}

/** Seeds in thousands, `140` or `137.5`. */
export function thousands(seedsPerAcre: number): string {
  return formatNumber(seedsPerAcre / 1000, seedsPerAcre % 1000 === 0 ? 0 : 1);
}

/** `+0.4` or `−0.6`. */
export function signed(bushels: number): string {
  return `${bushels > 0.05 ? '+' : ''}${formatBushels(bushels)}`;
}
