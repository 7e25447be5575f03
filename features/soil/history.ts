/** Soil tests of a field year by year, and where they stand now. Pure. */
import { groupBy } from '@/lib/group';
import type { SoilSample } from './model';

/** Mean, lowest and highest of what was measured, and in how many samples. */
export interface SoilFigure {
  mean: number;
  low: number;
  high: number;
  count: number;
}

export const SUMMARY_FIGURES = [
  'ph',
  'saltPh',
  'bufferPh',
  'organicMatterPercent',
  'cationExchangeCapacity',
  'phosphorusPpm',
  'potassiumPpm',
  'carbonatePercent',
  'electricalConductivity',
  'cystEggsPer100cc',
] as const;
export type SummaryFigure = (typeof SUMMARY_FIGURES)[number];

export interface SoilYear {
  /** `null`: samples without a date. */
  year: number | null;
  sampleCount: number;
  /** Samples with a place; the others are field averages. */
  pointCount: number;
  laboratories: string[];
  bufferMethods: string[];
  phosphorusMethods: string[];
  figures: Record<SummaryFigure, SoilFigure | null>;
}

/** Subsoil samples are another story than the topsoil that lime and fertiliser change. */
const SUBSOIL_INCHES = 12;

function figureOf(values: number[]): SoilFigure | null {
  if (values.length === 0) return null;
  const sum = values.reduce((total, value) => total + value, 0);
  return { mean: sum / values.length, low: Math.min(...values), high: Math.max(...values), count: values.length };
}

function named(values: (string | null)[]): string[] {
  return [...new Set(values.filter((value) => value !== null))].sort();
}

/** Topsoil samples by the year they were taken in, newest first; undated ones last. pH is the plain mean of the readings. */
export function soilHistory(samples: readonly SoilSample[]): SoilYear[] {
  const topsoil = samples.filter((sample) => (sample.depthFromInches ?? 0) < SUBSOIL_INCHES);
  const years = [...groupBy(topsoil, (sample) => (sample.sampledOn ? Number(sample.sampledOn.slice(0, 4)) : null))];
  return years
    .map(([year, own]) => ({
      year,
      sampleCount: own.length,
      pointCount: own.filter((sample) => sample.longitude !== null).length,
      laboratories: named(own.map((sample) => sample.laboratory)),
      bufferMethods: named(own.map((sample) => sample.bufferMethod)),
      phosphorusMethods: named(own.map((sample) => sample.phosphorusMethod)),
      figures: Object.fromEntries(
        SUMMARY_FIGURES.map((name) => [name, figureOf(own.flatMap((sample) => sample[name] ?? []))]),
      ) as SoilYear['figures'],
    }))
    .sort((one, other) => (other.year ?? Number.NEGATIVE_INFINITY) - (one.year ?? Number.NEGATIVE_INFINITY));
}
