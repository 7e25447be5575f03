/**
 * CROPGRO-Soybean's published coefficients, as printed, by maturity group.
 *
 * Cultivar rows: DSSAT Foundation, dssat-csm-os, Data/Genotype/SBGRO048.CUL (commit 14576df9). Ecotype rows: SBGRO048.ECO
 * (commit 03062df4). Cardinal temperatures: SBGRO048.SPE (commit 0639d489). Read 2026-12-01.
 */

/** One maturity group. `group` −2 is 000, −1 is 00, 0 is 0 … 10. Durations in photothermal days unless named otherwise. */
export interface MaturityGroupRow {
  group: number;
  /** CSDL: critical short day length, h, below which day length does not slow development. */
  criticalDayLengthHours: number;
  /** PPSEN: slope of the response to longer days, 1/h. */
  photoperiodSensitivityPerHour: number;
  /** EM-FL, FL-SH, FL-SD, SD-PM. */
  emergenceToFlower: number;
  flowerToPod: number;
  flowerToSeed: number;
  seedToMaturity: number;
  /** R1PPO: fall of the critical day length after first flower, h. */
  criticalDayLengthFallHours: number;
  /** OPTBI, °C, and SLOBI, 1/°C: cool nights below OPTBI slow progress to first flower. */
  coolNightBaseC: number;
  coolNightSlopePerC: number;
}

type Tuple = [number, number, number, number, number, number, number, number, number, number];

//   group  CSDL   PPSEN  EM-FL FL-SH FL-SD SD-PM  R1PPO  OPTBI SLOBI
const ROWS: Tuple[] = [
  [-2, 14.6, 0.129, 15.5, 5.0, 12.0, 29.5, 0.189, 18, 0.028],
  [-1, 14.35, 0.148, 16.0, 5.0, 12.0, 30.0, 0.189, 18, 0.028],
  [0, 14.1, 0.171, 16.8, 6.0, 13.0, 30.8, 0.189, 18, 0.028],
  [1, 13.84, 0.203, 17.0, 6.0, 13.0, 31.6, 0.234, 18, 0.028],
  [2, 13.59, 0.249, 17.4, 6.0, 13.5, 32.4, 0.279, 18, 0.028],
  [3, 13.4, 0.285, 19.0, 6.0, 14.0, 33.2, 0.324, 18, 0.028],
  [4, 13.09, 0.294, 19.4, 7.0, 15.0, 34.0, 0.369, 20, 0.035],
  [5, 12.83, 0.303, 19.8, 8.0, 15.5, 34.8, 0.414, 20, 0.035],
  [6, 12.58, 0.311, 20.2, 9.0, 16.0, 35.6, 0.459, 20, 0.035],
  [7, 12.33, 0.32, 20.8, 10.0, 16.0, 36.4, 0.504, 20, 0.035],
  [8, 12.07, 0.33, 21.5, 10.0, 16.0, 37.2, 0.549, 20, 0.035],
  [9, 11.88, 0.34, 23.0, 10.0, 16.0, 37.4, 0.549, 20, 0.035],
  [10, 11.78, 0.349, 23.5, 10.0, 16.0, 37.4, 0.549, 20, 0.035],
];

export const MATURITY_GROUPS: readonly MaturityGroupRow[] = ROWS.map((row) => ({
  group: row[0],
  criticalDayLengthHours: row[1],
  photoperiodSensitivityPerHour: row[2],
  emergenceToFlower: row[3],
  flowerToPod: row[4],
  flowerToSeed: row[5],
  seedToMaturity: row[6],
  criticalDayLengthFallHours: row[7],
  coolNightBaseC: row[8],
  coolNightSlopePerC: row[9],
}));

/** PL-EM: planting to emergence, thermal days; every ecotype row. */
export const PLANTING_TO_EMERGENCE = 3.6;
/** R7 to R8: calendar days, no temperature effect; every ecotype row. */
export const R7_TO_R8_DAYS = 12;

/** Base, first and second optimum and ceiling of a trapezoid temperature response, °C (SBGRO048.SPE). */
export interface CardinalTemperatures {
  base: number;
  optimumFrom: number;
  optimumTo: number;
  ceiling: number;
}
export const VEGETATIVE: CardinalTemperatures = { base: 7, optimumFrom: 28, optimumTo: 35, ceiling: 45 };
export const EARLY_REPRODUCTIVE: CardinalTemperatures = { base: 6, optimumFrom: 26, optimumTo: 30, ceiling: 45 };
export const LATE_REPRODUCTIVE: CardinalTemperatures = { base: -15, optimumFrom: 26, optimumTo: 34, ceiling: 45 };

/**
 * SD-PM of today's varieties at RM 2.0 to 4.0: the value calibrated for modern Iowa varieties of RM 2.7 and 3.6 in the same
 * cultivar file. Outside that span no calibration is published: the raise over the printed row at the nearer end is held.
 */
export const CURRENT_SEED_TO_MATURITY = { fromRelativeMaturity: 2, toRelativeMaturity: 4, photothermalDays: 37.7 };
