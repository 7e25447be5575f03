import { STATION_LINES } from './normals-data';

/** A station's normals. Dates are days of a 365-day year; `null` where the station publishes none. Temperatures in °F. */
export interface Station {
  id: string;
  name: string;
  latitude: number;
  longitude: number;
  elevationFt: number;
  /** Median last spring and first autumn day at or below 32 °F. */
  lastSpringFrostDayOfYear: number | null;
  firstAutumnFrostDayOfYear: number | null;
  /** Median last spring and first autumn day at or below 28 °F. */
  lastSpringFreezeDayOfYear: number | null;
  firstKillingFreezeDayOfYear: number | null;
  /** January … December. */
  monthlyMaximumF: number[];
  monthlyMinimumF: number[];
}

/** Reads one line of normals-data.ts. Throws RangeError when it is not whole: the table is ours, so that is a bug. */
function stationOfLine(line: string): Station {
  const [id, name, ...rest] = line.split('|');
  const [latitude, longitude, elevationFt, last32, first32, last28, first28] = rest.slice(0, 7).map(Number) as number[];
  const monthlyMaximumF = (rest[7] ?? '').split(' ').map(Number);
  const monthlyMinimumF = (rest[8] ?? '').split(' ').map(Number);
  const numbers = [latitude, longitude, elevationFt, last32, first32, last28, first28, ...monthlyMaximumF, ...monthlyMinimumF];
  if (!id || !name || numbers.length !== 31 || !numbers.every(Number.isFinite))
    throw new RangeError(`Broken station line: ${line}`);
  return {
    id,
    name,
    latitude: latitude as number,
    longitude: longitude as number,
    elevationFt: elevationFt as number,
    lastSpringFrostDayOfYear: last32 as number,
    firstAutumnFrostDayOfYear: first32 as number,
    lastSpringFreezeDayOfYear: last28 as number,
    firstKillingFreezeDayOfYear: first28 as number,
    monthlyMaximumF,
    monthlyMinimumF,
  };
}

/** The stations that Hilum carries (NOAA NCEI normals 1991-2020, see normals-data.ts). */
export const STATIONS: readonly Station[] = STATION_LINES.trim().split('\n').map(stationOfLine);
