import { COEFFICIENT_NAMES, COEFFICIENTS, coefficientProblem } from './engine/coefficients';
import type { Coefficient } from './engine/coefficients/coefficient';
import { FIX_COEFFICIENTS } from './engine/coefficients/fixes';
import { PEST_COEFFICIENTS } from './engine/coefficients/pests';
import { PLANT_COEFFICIENTS } from './engine/coefficients/plant';
import { SEASON_COEFFICIENTS } from './engine/coefficients/season';
import { SOIL_COEFFICIENTS } from './engine/coefficients/soil';

/** One planning coefficient that a manager may change. */
export interface Rule extends Coefficient {
  name: string;
  words: string;
}

const GROUPS: readonly { title: string; table: Record<string, Coefficient> }[] = [
  { title: 'Season and maturity', table: SEASON_COEFFICIENTS },
  { title: 'Soil and water', table: SOIL_COEFFICIENTS },
  { title: 'Plant and stand', table: PLANT_COEFFICIENTS },
  { title: 'Pests and diseases', table: PEST_COEFFICIENTS },
  { title: 'Fix first', table: FIX_COEFFICIENTS },
];

/** `maturityEarlyLoss` as people read it: "maturity early loss". */
export function coefficientWords(name: string): string {
  return name
    .replace(/([a-z])([A-Z0-9])/g, '$1 $2')
    .replace(/(\d)([A-Z])/g, '$1 $2')
    .toLowerCase()
    .replace(/\bph\b/g, 'pH')
    .replace(/\brm\b/g, 'RM');
}

/** Coefficients that managers may change, by subject, in the order of the engine's table. */
export const RULE_GROUPS: readonly { title: string; rules: readonly Rule[] }[] = GROUPS.map(({ title, table }) => ({
  title,
  rules: COEFFICIENT_NAMES.filter((name) => name in table && COEFFICIENTS[name].changeable).map((name) => ({
    ...COEFFICIENTS[name],
    name,
    words: coefficientWords(name),
  })),
}));

/**
 * A dealership's own values that the engine takes today. One that an engine of another version no longer knows, or whose range
 * has moved, is passed over rather than letting every page fail.
 */
export function usableOverrides(rows: readonly { name: string; value: number }[]): Record<string, number> {
  return Object.fromEntries(
    rows
      .filter(({ name, value }) => coefficientProblem(name, value) === null)
      .map(({ name, value }) => [name, value] as const)
      .sort(([one], [other]) => (one < other ? -1 : 1)),
  );
}
