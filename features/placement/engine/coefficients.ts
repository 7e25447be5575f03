/**
 * The one table of named numbers that no source fixes outright. A manager may change those marked `changeable`, within range.
 * Curves read from a publication (pH, planting date, stand, freeze…) stand beside the factor that uses them, with their source.
 */
import type { Coefficient } from './coefficients/coefficient';
import { FIX_COEFFICIENTS } from './coefficients/fixes';
import { PEST_COEFFICIENTS } from './coefficients/pests';
import { PLANT_COEFFICIENTS } from './coefficients/plant';
import { SEASON_COEFFICIENTS } from './coefficients/season';
import { SOIL_COEFFICIENTS } from './coefficients/soil';

export const COEFFICIENTS = {
  ...SEASON_COEFFICIENTS,
  ...SOIL_COEFFICIENTS,
  ...PLANT_COEFFICIENTS,
  ...PEST_COEFFICIENTS,
  ...FIX_COEFFICIENTS,
} as const satisfies Record<string, Coefficient>;

export type CoefficientName = keyof typeof COEFFICIENTS;
export type Coefficients = Readonly<Record<CoefficientName, number>>;

/** Every name of the table, in its order. */
export const COEFFICIENT_NAMES = Object.keys(COEFFICIENTS) as CoefficientName[];

/** The table's entry, or `null` when there is none of that name. */
export function coefficientNamed(name: string): Coefficient | null {
  return Object.hasOwn(COEFFICIENTS, name) ? COEFFICIENTS[name as CoefficientName] : null;
}

/** What is wrong with setting a coefficient to a value, in words; `null` when it may be set. */
export function coefficientProblem(name: string, value: number): string | null {
  const entry = coefficientNamed(name);
  if (!entry) return `There is no coefficient called ${name}.`;
  if (!Number.isFinite(value)) return `${name} must be a number between ${entry.low} and ${entry.high} ${entry.unit}.`;
  if (value < entry.low || value > entry.high) {
    return `${name} ${value} is outside ${entry.low} to ${entry.high} ${entry.unit}.`;
  }
  return null;
}

const DEFAULTS: Coefficients = Object.freeze(
  Object.fromEntries(COEFFICIENT_NAMES.map((name) => [name, COEFFICIENTS[name].value])) as Record<CoefficientName, number>,
);

/** The table's values with a dealership's own laid over. Throws RangeError for an unknown name or a value out of range. */
export function coefficients(overrides: Record<string, number> = {}): Coefficients {
  const names = Object.keys(overrides);
  if (names.length === 0) return DEFAULTS;
  for (const name of names) {
    const problem = coefficientProblem(name, overrides[name] as number);
    if (problem) throw new RangeError(problem);
  }
  return { ...DEFAULTS, ...overrides };
}
