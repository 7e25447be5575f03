import { celsiusFromFahrenheit } from '@/lib/units';
import type { ClimateForPlace, StationUsed } from './model';
import { STATIONS, type Station } from './normals';

/** Stations that a place is estimated from, at most. */
const NEAREST_STATIONS = 6;
/** A station nearer than this counts as this near, so that one next door does not silence the rest entirely. */
const NEAREST_DISTANCE_MILES = 1;
/** Cooling with height, °F per 1,000 ft: the average environmental lapse rate (6.4 °C/km). */
const LAPSE_FAHRENHEIT_PER_1000_FT = 3.5;
/** First 28 °F comes earlier, last 32 °F later with height, days per 1,000 ft: least squares on the 158 stations' normals. */
const FIRST_FREEZE_DAYS_PER_1000_FT = -7.84;
const LAST_FROST_DAYS_PER_1000_FT = 7.18;
/**
 * Year-to-year standard deviation of the freeze date, days: first 32 °F at 10 % and 90 % in 31 Iowa counties stand 12.8 and
 * 13.8 days from the mean (Iowa State University Extension, "Frost dates for Iowa", 1950-2021).
 */
const FREEZE_STANDARD_DEVIATION_DAYS = 10;
const EARTH_RADIUS_MILES = 3958.8;

const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
export const DAYS_OF_NORMAL_YEAR = 365;

/** Great-circle distance, miles (haversine). */
export function distanceMiles(latitudeA: number, longitudeA: number, latitudeB: number, longitudeB: number): number {
  const radians = Math.PI / 180;
  const a =
    Math.sin(((latitudeB - latitudeA) * radians) / 2) ** 2 +
    Math.cos(latitudeA * radians) * Math.cos(latitudeB * radians) * Math.sin(((longitudeB - longitudeA) * radians) / 2) ** 2;
  return 2 * EARTH_RADIUS_MILES * Math.asin(Math.min(1, Math.sqrt(a)));
}

/** For each day of the year: which two mid-month knots it lies between, and how far. The year is a ring. */
const DAY_WEIGHTS = dayWeights();

function dayWeights(): { before: number; after: number; fraction: number }[] {
  const middles: number[] = [];
  let start = 0;
  for (const days of MONTH_DAYS) {
    middles.push(start + days / 2);
    start += days;
  }
  return Array.from({ length: DAYS_OF_NORMAL_YEAR }, (_, day) => {
    const middle = day + 0.5;
    let before = 11;
    for (let month = 0; month < 12; month++) if (middle >= (middles[month] as number)) before = month;
    if (middle < (middles[0] as number)) before = 11;
    const after = (before + 1) % 12;
    const from = middles[before] as number;
    const length = ((middles[after] as number) - from + DAYS_OF_NORMAL_YEAR) % DAYS_OF_NORMAL_YEAR;
    return { before, after, fraction: ((middle - from + DAYS_OF_NORMAL_YEAR) % DAYS_OF_NORMAL_YEAR) / length };
  });
}

/** Monthly means of the broken line through knots: a 12 × 12 matrix, inverted once. */
const KNOTS_FROM_MEANS = invert(meansFromKnots());

function meansFromKnots(): number[][] {
  const matrix = Array.from({ length: 12 }, () => new Array<number>(12).fill(0));
  let day = 0;
  for (let month = 0; month < 12; month++) {
    const row = matrix[month] as number[];
    const days = MONTH_DAYS[month] as number;
    for (let i = 0; i < days; i++, day++) {
      const { before, after, fraction } = DAY_WEIGHTS[day] as (typeof DAY_WEIGHTS)[number];
      row[before] = (row[before] as number) + (1 - fraction) / days;
      row[after] = (row[after] as number) + fraction / days;
    }
  }
  return matrix;
}

/** Gauss-Jordan without pivoting: the matrix is diagonally dominant. */
function invert(matrix: number[][]): number[][] {
  const size = matrix.length;
  const rows = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let i = 0; i < size; i++) {
    const pivotRow = rows[i] as number[];
    const pivot = pivotRow[i] as number;
    for (let k = 0; k < 2 * size; k++) pivotRow[k] = (pivotRow[k] as number) / pivot;
    for (let j = 0; j < size; j++) {
      if (j === i) continue;
      const row = rows[j] as number[];
      const factor = row[i] as number;
      for (let k = 0; k < 2 * size; k++) row[k] = (row[k] as number) - factor * (pivotRow[k] as number);
    }
  }
  return rows.map((row) => row.slice(size));
}

/**
 * How monthly means become days. `month means`: straight lines between mid-month knots that are set so that the days of each
 * month average exactly to its mean. `mid-month`: straight lines through the means themselves, which shave half a degree off
 * the summer's peak; reference runs of the published coefficients were made so, and it reproduces them.
 */
export type Interpolation = 'month means' | 'mid-month';

/** Twelve monthly means → 365 daily values. */
export function dailyFromMonthlyMeans(monthlyMeans: readonly number[], interpolation: Interpolation = 'month means'): number[] {
  const knots =
    interpolation === 'mid-month'
      ? monthlyMeans
      : KNOTS_FROM_MEANS.map((row) => row.reduce((sum, weight, month) => sum + weight * (monthlyMeans[month] as number), 0));
  return DAY_WEIGHTS.map(
    ({ before, after, fraction }) => (knots[before] as number) * (1 - fraction) + (knots[after] as number) * fraction,
  );
}

export interface PlaceInput {
  latitude: number;
  longitude: number;
  /** When known, every station is corrected to it; when `null`, stations are taken as they stand. */
  elevationFt: number | null;
  /** Stations that the dealership added; one with the id of a carried station replaces it. */
  extraStations?: readonly Station[];
  /** The table to look in; the carried one unless said. */
  stations?: readonly Station[];
  /** `month means` unless said. */
  interpolation?: Interpolation;
}

/**
 * Climate normals of a place: the six nearest stations weighted by 1/distance², each corrected to the place's elevation when
 * that is known. Throws RangeError when latitude or longitude is no number or off the globe.
 */
export function climateForPlace(input: PlaceInput): ClimateForPlace {
  const { latitude, longitude, elevationFt } = input;
  if (!(Math.abs(latitude) <= 90) || !(Math.abs(longitude) <= 180)) {
    throw new RangeError(`No such place: latitude ${latitude}, longitude ${longitude}`);
  }
  const extra = input.extraStations ?? [];
  const replaced = new Set(extra.map((station) => station.id));
  const near = [...(input.stations ?? STATIONS).filter((station) => !replaced.has(station.id)), ...extra]
    .map((station) => ({ station, miles: distanceMiles(latitude, longitude, station.latitude, station.longitude) }))
    .sort((a, b) => a.miles - b.miles || (a.station.id < b.station.id ? -1 : 1))
    .slice(0, NEAREST_STATIONS);
  if (near.length === 0) throw new RangeError('No climate station to estimate this place from');
  const raw = near.map(({ miles }) => 1 / Math.max(miles, NEAREST_DISTANCE_MILES) ** 2);
  const total = raw.reduce((sum, weight) => sum + weight, 0);
  const weights = raw.map((weight) => weight / total);

  /** How far each station lies below the place, thousands of feet; 0 when the place's elevation is unknown. */
  const rise = near.map(({ station }) => (elevationFt === null ? 0 : (elevationFt - station.elevationFt) / 1000));
  const monthly = (values: (station: Station) => number[]) =>
    Array.from({ length: 12 }, (_, month) =>
      celsiusFromFahrenheit(
        near.reduce((sum, { station }, i) => {
          const fahrenheit = (values(station)[month] as number) - LAPSE_FAHRENHEIT_PER_1000_FT * (rise[i] as number);
          return sum + (weights[i] as number) * fahrenheit;
        }, 0),
      ),
    );
  /** Weighted over the stations that publish the date; by the regression on latitude and elevation when none does. */
  const date = (value: (station: Station) => number | null, daysPer1000Ft: number, fallback: number) => {
    let sum = 0;
    let weight = 0;
    near.forEach(({ station }, i) => {
      const day = value(station);
      if (day === null) return;
      sum += (weights[i] as number) * (day + daysPer1000Ft * (rise[i] as number));
      weight += weights[i] as number;
    });
    return weight > 0 ? sum / weight : fallback;
  };
  const kilofeet =
    (elevationFt ?? near.reduce((sum, { station }, i) => sum + (weights[i] as number) * station.elevationFt, 0)) / 1000;

  return {
    latitude,
    longitude,
    elevationFt,
    dailyMaximumC: dailyFromMonthlyMeans(
      monthly((station) => station.monthlyMaximumF),
      input.interpolation,
    ),
    dailyMinimumC: dailyFromMonthlyMeans(
      monthly((station) => station.monthlyMinimumF),
      input.interpolation,
    ),
    // Regressions: least squares on the 158 stations (residual SD 5.1 and 4.5 days).
    firstKillingFreezeDayOfYear: date(
      (station) => station.firstKillingFreezeDayOfYear,
      FIRST_FREEZE_DAYS_PER_1000_FT,
      426.3 - 2.87 * latitude + FIRST_FREEZE_DAYS_PER_1000_FT * kilofeet,
    ),
    freezeStandardDeviationDays: FREEZE_STANDARD_DEVIATION_DAYS,
    lastSpringFrostDayOfYear: date(
      (station) => station.lastSpringFrostDayOfYear,
      LAST_FROST_DAYS_PER_1000_FT,
      -44.3 + 3.61 * latitude + LAST_FROST_DAYS_PER_1000_FT * kilofeet,
    ),
    stations: near.map(
      ({ station, miles }, i): StationUsed => ({
        id: station.id,
        name: station.name,
        distanceMiles: miles,
        weight: weights[i] as number,
      }),
    ),
    source: 'normals',
  };
}
