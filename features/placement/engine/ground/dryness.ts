/** How droughty the ground is, from the water it can store, and what that takes from any variety. */
import { along, type Curve, clamp, expectation, rootSumSquares, type Scenario } from '../numbers';
import type { Site } from '../site';

/**
 * Yield lost in an average year by available water storage of the top 100 cm, inches (NRCS soil survey, aws0100): planning
 * curve; a soil that stores 10 in carries a crop through a dry fortnight at full bloom, one of 4 in does not.
 */
export const LOSS_BY_STORAGE: Curve = [
  [3, 0.13],
  [5, 0.07],
  [7, 0.03],
  [9, 0.012],
  [11, 0.004],
];
/** Storage nobody has looked up (planning spread, inches). */
const UNKNOWN_STORAGE = [
  { weight: 0.2, inches: 4.5 },
  { weight: 0.5, inches: 7.5 },
  { weight: 0.3, inches: 10 },
] as const;
/** Storage at which ground is droughty beyond question, and at which it is not at all, inches. */
const DROUGHTY_INCHES = 4;
const NOT_DROUGHTY_INCHES = 7.5;
/** Yield at which ground is low beyond question, and at which it is not, bu/ac. */
const LOW_YIELD = 35;
const NOT_LOW_YIELD = 55;

export interface Dryness {
  /** Expected loss of a variety with drought rating 5 and the optimum RM. */
  loss: number;
  /** Spread of that loss from unknown storage and irrigation alone. */
  unknownDeviation: number;
  deviation: number;
  /** 0 (holds water, or irrigated) to 1 (droughty): from storage alone. */
  index: number;
  indexDeviation: number;
  /** How much of a droughty field's penalty for short plants falls here: all of it on low-yield ground, less on better. */
  lowYield: number;
  storageKnown: boolean;
}

/** Part of the penalty for short plants that droughty ground of good yield still carries (planning). */
const LEAST_LOW_YIELD = 0.4;

function indexAt(site: Site, storageInches: number): number {
  if (site.field.irrigated) return 0;
  return clamp((NOT_DROUGHTY_INCHES - storageInches) / (NOT_DROUGHTY_INCHES - DROUGHTY_INCHES), 0, 1);
}

function describe(site: Site): Dryness {
  const { c, field } = site;
  const storage = field.availableWaterInches;
  const irrigated = field.irrigated ? c.droughtIrrigatedRemains : 1;
  const lossAt = (inches: number) => c.droughtScale * along(LOSS_BY_STORAGE, inches) * irrigated;
  const losses: Scenario[] =
    storage === null
      ? UNKNOWN_STORAGE.map((one) => ({ weight: one.weight, value: lossAt(one.inches) }))
      : [{ weight: 1, value: lossAt(storage) }];
  const indexes: Scenario[] =
    storage === null
      ? UNKNOWN_STORAGE.map((one) => ({ weight: one.weight, value: indexAt(site, one.inches) }))
      : [{ weight: 1, value: indexAt(site, storage) }];
  const loss = expectation(losses);
  const index = expectation(indexes);
  return {
    loss: loss.mean,
    unknownDeviation: loss.deviation,
    deviation: rootSumSquares(loss.deviation, c.droughtUncertainty * loss.mean),
    index: index.mean,
    indexDeviation: index.deviation,
    lowYield:
      LEAST_LOW_YIELD +
      (1 - LEAST_LOW_YIELD) * clamp((NOT_LOW_YIELD - site.potential.bushelsPerAcre) / (NOT_LOW_YIELD - LOW_YIELD), 0, 1),
    storageKnown: storage !== null,
  };
}

export function drynessOf(site: Site): Dryness {
  return site.once('dryness', describe);
}
