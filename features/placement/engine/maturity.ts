/** Which relative maturity suits a place and a planting day. Pure tables with their sources; the factor and screens use them. */
import { along, type Curve, clamp } from './numbers';

/**
 * Centre RM for full-season planting by latitude °N, 85–97° W: synthesis from memory of the published delineations
 * (Scott & Aldrich 1970; Zhang et al. 2007; Mourtzinis & Conley 2017), tied to state anchors; ± 0.4 RM.
 */
export const MATURITY_BY_LATITUDE: Curve = [
  [31, 6.4],
  [32, 5.9],
  [33, 5.3],
  [34, 4.9],
  [35, 4.7],
  [36, 4.5],
  [37, 4.3],
  [38, 4],
  [39, 3.6],
  [40, 3.2],
  [41, 2.8],
  [42, 2.5],
  [43, 2.1],
  [44, 1.7],
  [45, 1.2],
  [46, 0.8],
  [47, 0.4],
  [48, 0],
  [49, -0.3],
];
/** Zone lines deflect downward going west (Mourtzinis & Conley 2017): earlier by this west of 97° W. */
const WEST_OF_97_EARLIER = 0.2;
/** Earlier by this above 1,500 ft, where height shortens the season. */
const HIGH_GROUND_EARLIER = 0.2;

/** Optimum RM at a place for planting in the usual weeks, without any local zone. */
export function fullSeasonMaturity(latitude: number, longitude: number, elevationFt: number | null): number {
  const west = longitude < -97 ? WEST_OF_97_EARLIER : 0;
  const high = elevationFt !== null && elevationFt > 1500 ? HIGH_GROUND_EARLIER : 0;
  return along(MATURITY_BY_LATITUDE, latitude) - west - high;
}

export interface MaturityBand {
  from: number;
  to: number;
}

/** Days of the year (common year) that the late-planting rules speak of. */
const DAY = { may25: 145, june1: 152, june10: 161, june15: 166, june30: 181, july1: 182, july10: 191 } as const;

/** Ohio Agronomy Guide (Ohio State University Extension): RM recommended when planting late. */
const OHIO_LATE: Readonly<Record<'northern' | 'central' | 'southern', readonly [MaturityBand, MaturityBand, MaturityBand]>> = {
  northern: [
    { from: 3.2, to: 3.8 },
    { from: 3.1, to: 3.5 },
    { from: 3, to: 3.3 },
  ],
  central: [
    { from: 3.4, to: 4 },
    { from: 3.3, to: 3.7 },
    { from: 3.2, to: 3.5 },
  ],
  southern: [
    { from: 3.6, to: 4.2 },
    { from: 3.5, to: 3.9 },
    { from: 3.4, to: 3.7 },
  ],
};

/** Thirds of Ohio by latitude: the guide names them without a line. */
export function ohioRegion(latitude: number): keyof typeof OHIO_LATE {
  return latitude >= 40.6 ? 'northern' : latitude >= 39.4 ? 'central' : 'southern';
}

/** The guide's row for a planting day, or `null` outside June 1 to July 10. The day that ends a row belongs to it. */
export function ohioLateBand(region: keyof typeof OHIO_LATE, plantingDay: number): MaturityBand | null {
  if (plantingDay < DAY.june1 || plantingDay > DAY.july10) return null;
  return OHIO_LATE[region][plantingDay <= DAY.june15 ? 0 : plantingDay <= DAY.june30 ? 1 : 2];
}

/** Whose rule holds when planting is late: three regions give three rules. */
export type LateRule = 'later' | 'unchanged' | 'earlier';
const LATER_STATES = ['OH', 'IN', 'KY', 'TN', 'WV', 'PA', 'NJ', 'MD', 'DE', 'VA', 'NC'];
const EARLIER_STATES = ['MN', 'ND', 'SD', 'WI', 'MI', 'NY'];

/** By state; where the state is unknown, by place. */
export function lateRuleOf(state: string | null, latitude: number, longitude: number): LateRule {
  if (state !== null) return LATER_STATES.includes(state) ? 'later' : EARLIER_STATES.includes(state) ? 'earlier' : 'unchanged';
  if (latitude >= 43.5) return 'earlier';
  return longitude > -87.5 ? 'later' : 'unchanged';
}

/**
 * Shift of the optimum RM by planting day.
 * later: middle of Ohio's table less the full-season centre there (+0.5, +0.3, +0.15), from nothing on May 25.
 * earlier: −0.5 by June 10 (University of Minnesota Extension 2024), carried on at the same pace to −0.9.
 * unchanged: nothing until June 15, then −0.5 by July 1 (Iowa State University ICM 2007: keep the variety until mid-June;
 * the size of the step after it is a planning figure).
 */
const LATE_SHIFT: Readonly<Record<LateRule, Curve>> = {
  later: [
    [DAY.may25, 0],
    [159, 0.5],
    [173, 0.3],
    [186, 0.15],
  ],
  earlier: [
    [DAY.may25, 0],
    [DAY.june10, -0.5],
    [174, -0.9],
  ],
  unchanged: [
    [DAY.june15, 0],
    [DAY.july1, -0.5],
  ],
};

export function latePlantingShift(rule: LateRule, plantingDay: number): number {
  return along(LATE_SHIFT[rule], plantingDay);
}

/** RM recommended around an optimum: −0.5 … +0.3 (the synthesis above), held to the table's ends. */
export function recommendedBand(optimum: number): MaturityBand {
  return { from: clamp(optimum - 0.5, -2, 10), to: clamp(optimum + 0.3, -2, 10) };
}
