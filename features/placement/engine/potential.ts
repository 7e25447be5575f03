/** What the field can carry, Y0: the grower's goal; else its better years; else the state's figure with a wide band. */
import type { Coefficients } from './coefficients';
import type { AskedQuestion, Assessment, FieldProfile } from './model';
import { ask } from './words';

/**
 * What good ground of the state carries, bu/ac: ten per cent over the state's average soybean yield of about 2018–2023
 * (USDA NASS, from memory, rounded to 1 bu). Used only when a field has neither goal nor history.
 */
// biome-ignore format: a table is read by its columns
const STATE_POTENTIAL: Readonly<Record<string, number>> = {
  AL: 43, AR: 56, DE: 50, GA: 46, IA: 65, IL: 68, IN: 65, KS: 45, KY: 56, LA: 54, MD: 52, MI: 53, MN: 55, MO: 54, MS: 58,
  NC: 42, ND: 39, NE: 64, NJ: 48, NY: 54, OH: 62, OK: 32, PA: 55, SC: 38, SD: 49, TN: 53, TX: 35, VA: 47, WI: 57, WV: 55,
};
/** Elsewhere, and where the state is unknown. */
const OTHER_POTENTIAL = 52;

export interface Potential {
  bushelsPerAcre: number;
  source: Assessment['potentialSource'];
  logDeviation: number;
  asks: AskedQuestion[];
}

/**
 * Y0 in bu/ac. History: the mean of the better half of the years, because a plain mean already holds the losses that the
 * ledger is about to charge; its deviation shrinks with the root of the number of years.
 */
export function potentialOf(field: FieldProfile, c: Coefficients): Potential {
  const goal = field.yieldGoalBushelsPerAcre;
  if (goal !== null && goal > 0) {
    return { bushelsPerAcre: goal, source: 'goal', logDeviation: c.potentialGoalDeviation, asks: [] };
  }
  const years = field.yieldHistoryBushelsPerAcre.filter((bushels) => bushels > 0).sort((a, b) => b - a);
  if (years.length > 0) {
    const better = years.slice(0, Math.ceil(years.length / 2));
    const bushelsPerAcre = better.reduce((sum, bushels) => sum + bushels, 0) / better.length;
    const logDeviation = Math.max(c.potentialGoalDeviation, c.potentialHistoryDeviation / Math.sqrt(better.length));
    return { bushelsPerAcre, source: 'history', logDeviation, asks: [] };
  }
  const state = STATE_POTENTIAL[field.state ?? ''] ?? OTHER_POTENTIAL;
  const logDeviation = c.potentialDefaultDeviation;
  return {
    bushelsPerAcre: state * (field.irrigated ? 1 + c.irrigatedDefaultGain : 1),
    source: 'default',
    logDeviation,
    asks: [
      ask(
        'yieldGoalBushelsPerAcre',
        'What yield do you aim for on this field, in bu/ac?',
        Math.sqrt(logDeviation ** 2 - c.potentialGoalDeviation ** 2) || 0,
      ),
    ],
  };
}
