/** Soil pH over the field: relative yield, sour and alkaline parts, and what chlorosis could take. */
import type { ValueShare } from '../model';
import { along, type Curve, clamp } from '../numbers';
import type { Site } from '../site';

/**
 * Relative yield of soybeans by water pH. Ends: Ohio Agricultural Experiment Station Special Circular 53 (1938; from memory:
 * 4.7 65, 5.0 79, 7.5 93). Plateau: Michigan State University Extension (optimum 6.3–6.5, performs well 6.0–7.0), Tri-State
 * Fertilizer Recommendations 2020 (6.0–6.8), and common practice.
 */
export const RELATIVE_YIELD_BY_PH: Curve = [
  [4, 0.3],
  [4.7, 0.65],
  [5, 0.79],
  [5.5, 0.88],
  [6, 0.97],
  [6.3, 1],
  [6.5, 1],
  [7, 0.99],
  [7.5, 0.93],
  [8.5, 0.81],
];
/** pH from which iron chlorosis is charged, and half a unit above it, where the untested score is reached. */
const CHLOROSIS_FROM_PH = 7.3;
/** Score grows with pH no further than this: iron is least soluble from 7.5 to 8.5 (soybean checkoff project 22001). */
const CHLOROSIS_FULL_PH = 8.3;

/** pH of a field nobody has tested (planning spread for cropland between limings). */
export const UNTESTED_PH: readonly ValueShare[] = [
  { value: 5.6, share: 0.12 },
  { value: 6, share: 0.23 },
  { value: 6.4, share: 0.35 },
  { value: 6.9, share: 0.2 },
  { value: 7.5, share: 0.1 },
];

export interface Acidity {
  shares: readonly ValueShare[];
  tested: boolean;
  /** Area-weighted relative yield, 0..1. */
  relativeYield: number;
  /** Loss on the side below 6.3 and above 6.5, fractions of yield. */
  sourLoss: number;
  alkalineLoss: number;
  /** Spread of the relative yield were each spot one scenario for the whole field: used when untested. */
  scenarioDeviation: number;
  /** Loss to chlorosis of a variety rated 1, fraction; grows only from ground above 7.3. */
  chlorosis: number;
  /** Spread of it from carbonate and salts not being tested, fraction. */
  chlorosisUnknownDeviation: number;
  shareBelow: (ph: number) => number;
  shareAbove: (ph: number) => number;
}

/**
 * Chlorosis score above 1 of the most susceptible variety at half a unit above pH 7.3, by tests: carbonate above 5 % or EC
 * above 1 dS/m high risk, both worst, below 2.5 % and 0.25 dS/m low (thresholds in use in North Dakota, from memory; carbonate and salts
 * drive it, pH alone is a poor predictor: Goos, NDSU Crop & Pest Report 29 Jun 2017). Scores are planning figures.
 */
const CHLOROSIS_SCORE = { low: 0.15, middle: 0.5, high: 1.2, both: 2.2 } as const;
const HISTORY_FACTOR = { yes: 1.5, no: 0.4 } as const;

/** Score of the most susceptible variety on alkaline ground, and its spread when carbonate or salts are not tested. */
export function chlorosisScore(site: Pick<Site, 'c' | 'field'>): { score: number; deviation: number } {
  const { carbonatePercent, electricalConductivity, ironChlorosisHistory } = site.field;
  const history = ironChlorosisHistory === null ? 1 : ironChlorosisHistory ? HISTORY_FACTOR.yes : HISTORY_FACTOR.no;
  if (carbonatePercent === null && electricalConductivity === null) {
    const score = site.c.chlorosisUntestedScore * history;
    return { score, deviation: score * (ironChlorosisHistory === null ? 0.9 : 0.5) };
  }
  const highCarbonate = (carbonatePercent ?? 0) > 5;
  const highSalts = (electricalConductivity ?? 0) > 1;
  const low = (carbonatePercent ?? 2.4) < 2.5 && (electricalConductivity ?? 0.24) < 0.25;
  const base =
    highCarbonate && highSalts
      ? CHLOROSIS_SCORE.both
      : highCarbonate || highSalts
        ? CHLOROSIS_SCORE.high
        : low
          ? CHLOROSIS_SCORE.low
          : CHLOROSIS_SCORE.middle;
  const halfTested = carbonatePercent === null || electricalConductivity === null;
  return { score: base * history, deviation: base * history * (halfTested ? 0.4 : 0.2) };
}

/** Where chlorosis scores, in the half-units of pH above 7.3 that the score is stated for. */
function chlorosisWeight(ph: number): number {
  return clamp((ph - CHLOROSIS_FROM_PH) / 0.5, 0, (CHLOROSIS_FULL_PH - CHLOROSIS_FROM_PH) / 0.5);
}

function describe(site: Site): Acidity {
  const { field, c } = site;
  const tested = field.phShares !== null && field.phShares.length > 0;
  const shares = tested ? (field.phShares as ValueShare[]) : UNTESTED_PH;
  let relativeYield = 0;
  let squares = 0;
  let sourLoss = 0;
  let alkalineLoss = 0;
  let alkaline = 0;
  let total = 0;
  for (const { value, share } of shares) {
    const kept = along(RELATIVE_YIELD_BY_PH, value);
    relativeYield += share * kept;
    squares += share * kept * kept;
    if (value < 6.4) sourLoss += share * (1 - kept);
    else alkalineLoss += share * (1 - kept);
    alkaline += share * chlorosisWeight(value);
    total += share;
  }
  relativeYield /= total;
  const { score, deviation } = chlorosisScore(site);
  const lossPerScore = (alkaline / total) * c.chlorosisLossPerScore;
  const shareWhere = (test: (ph: number) => boolean) =>
    shares.reduce((sum, one) => sum + (test(one.value) ? one.share : 0), 0) / total;
  return {
    shares,
    tested,
    relativeYield,
    sourLoss: sourLoss / total,
    alkalineLoss: alkalineLoss / total,
    scenarioDeviation: Math.sqrt(Math.max(0, squares / total - relativeYield * relativeYield)),
    chlorosis: Math.min(0.8, score * lossPerScore),
    chlorosisUnknownDeviation: deviation * lossPerScore,
    shareBelow: (ph) => shareWhere((value) => value < ph),
    shareAbove: (ph) => shareWhere((value) => value > ph),
  };
}

export function acidityOf(site: Site): Acidity {
  return site.once('acidity', describe);
}
