/** A killing freeze (28 °F) against the season line: chance, expected loss, and the curve to draw. */
import type { ClimateForPlace } from './model';

/** Year-to-year standard deviation of a variety's stages, days: how far R7 moves about its date on normals. */
export const STAGE_STANDARD_DEVIATION_DAYS = 5;

/**
 * Yield lost to a killing freeze at a stage, fraction. R5 to R8: Saliba et al. 1982, Crop Science 22:73-78, in Kansas State
 * University MF-2234 (1996); linear between. R3: a plant killed while its pods hold no seed leaves nothing to combine.
 */
export const FREEZE_LOSS = { r3: 1, r5: 0.65, r6: 0.37, r7: 0.11, r8: 0 } as const;

/** Days of the year of the stages that freeze loss is read between; `null`: not reached before the year ends. */
export interface FreezeStages {
  r3: number | null;
  r5: number | null;
  r6: number | null;
  r7: number | null;
  r8: number | null;
}

/** Standard normal distribution function (Abramowitz & Stegun 7.1.26, error below 1.5e-7). */
export function normalCdf(z: number): number {
  const t = 1 / (1 + (0.3275911 * Math.abs(z)) / Math.SQRT2);
  const tail =
    0.5 *
    t *
    (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429)))) *
    Math.exp((-z * z) / 2);
  return z >= 0 ? 1 - tail : tail;
}

function normalDensity(z: number): number {
  return Math.exp((-z * z) / 2) / Math.sqrt(2 * Math.PI);
}

/** Loss, fraction, of a freeze on a day of the year; 1 before R3, 0 after R8. Stages never reached count as never. */
export function freezeLossOnDay(stages: FreezeStages, day: number): number {
  const knots = lossKnots(stages);
  const first = knots[0];
  if (!first || day <= first.day) return 1;
  for (let i = 1; i < knots.length; i++) {
    const a = knots[i - 1] as LossKnot;
    const b = knots[i] as LossKnot;
    if (day <= b.day) return b.day === a.day ? b.loss : a.loss + ((b.loss - a.loss) * (day - a.day)) / (b.day - a.day);
  }
  return (knots[knots.length - 1] as LossKnot).loss;
}

interface LossKnot {
  day: number;
  loss: number;
}

function lossKnots(stages: FreezeStages): LossKnot[] {
  return (['r3', 'r5', 'r6', 'r7', 'r8'] as const).flatMap((stage) => {
    const day = stages[stage];
    return day === null ? [] : [{ day, loss: FREEZE_LOSS[stage] }];
  });
}

/** Spread of (freeze date − stage shift): the two vary independently. */
function jointDeviation(climate: ClimateForPlace): number {
  return Math.hypot(climate.freezeStandardDeviationDays, STAGE_STANDARD_DEVIATION_DAYS);
}

/** Chance, 0…1, that the first killing freeze comes before a stage whose date on normals is `stageDay`; 1 for `null`. */
export function chanceOfFreezeBefore(climate: ClimateForPlace, stageDay: number | null): number {
  if (stageDay === null) return 1;
  return normalCdf((stageDay - climate.firstKillingFreezeDayOfYear) / jointDeviation(climate));
}

/**
 * Chance of a freeze before R7, and the loss expected over the joint spread of freeze date and stage. In a year the whole
 * line of stages shifts together, so only the difference of two normal variables counts, and the loss, which is straight
 * between stages, integrates exactly: E = Σ over pieces of ∫(a + b·x)φ(x)dx.
 */
export function freezeRisk(
  climate: ClimateForPlace,
  stages: FreezeStages,
): { chanceBeforeR7: number; expectedLossFraction: number } {
  const knots = lossKnots(stages);
  const deviation = jointDeviation(climate);
  const median = climate.firstKillingFreezeDayOfYear;
  const first = knots[0];
  if (!first) return { chanceBeforeR7: 1, expectedLossFraction: 1 };
  let from = (first.day - median) / deviation;
  let cdfFrom = normalCdf(from);
  let densityFrom = normalDensity(from);
  let expected = cdfFrom; // everything is lost before R3
  for (let i = 1; i < knots.length; i++) {
    const a = knots[i - 1] as LossKnot;
    const b = knots[i] as LossKnot;
    const to = (b.day - median) / deviation;
    const cdfTo = normalCdf(to);
    const densityTo = normalDensity(to);
    if (b.day > a.day) {
      const slope = (b.loss - a.loss) / (to - from); // per standard deviation
      expected += (a.loss - slope * from) * (cdfTo - cdfFrom) + slope * (densityFrom - densityTo);
    }
    from = to;
    cdfFrom = cdfTo;
    densityFrom = densityTo;
  }
  expected += (knots[knots.length - 1] as LossKnot).loss * (1 - cdfFrom);
  return {
    chanceBeforeR7: chanceOfFreezeBefore(climate, stages.r7),
    expectedLossFraction: Math.max(0, Math.min(1, expected)),
  };
}

/**
 * The freeze curve: for every day of the year from `fromDay` to `toDay`, the chance of the first killing freeze on that day
 * (density, per day) and by that day. The stage's own spread is left out: this is the weather alone.
 */
export function freezeCurve(
  climate: ClimateForPlace,
  fromDay: number,
  toDay: number,
): { day: number; density: number; chanceBy: number }[] {
  const deviation = Math.max(climate.freezeStandardDeviationDays, 0.5);
  return Array.from({ length: Math.max(0, toDay - fromDay + 1) }, (_, index) => {
    const day = fromDay + index;
    const z = (day - climate.firstKillingFreezeDayOfYear) / deviation;
    return { day, density: normalDensity(z) / deviation, chanceBy: normalCdf(z) };
  });
}
