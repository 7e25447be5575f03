/** Day length in hours by latitude and day of year. Both formulas clamp at the poles' endless day and night. */

const RADIANS_PER_DEGREE = Math.PI / 180;

/** Sun's edges that `dayLengthCbm` knows, degrees below the horizon (Forsythe et al. 1995, table of p). */
export const SUN_CENTER_DEGREES = 0;
export const SUNRISE_DEGREES = 0.8333;
export const CIVIL_TWILIGHT_DEGREES = 6;

function clampUnit(value: number): number {
  return Math.max(-1, Math.min(1, value));
}

/**
 * Sunrise to sunset without twilight, hours: the day length that CROPGRO's critical day lengths were fitted to.
 * `latitude` in degrees north, `dayOfYear` 1…366.
 * Source: DSSAT's DAYL, 12 + 24·asin(tan(dec)·tan(lat))/π with dec = −23.45°·cos(2π(doy + 10)/365) (from memory, checked
 * against the CBM formula at p = 0 to 0.16 h).
 */
export function dayLengthHours(latitude: number, dayOfYear: number): number {
  const declination = -23.45 * RADIANS_PER_DEGREE * Math.cos((2 * Math.PI * (dayOfYear + 10)) / 365);
  return 12 + (24 * Math.asin(clampUnit(Math.tan(declination) * Math.tan(latitude * RADIANS_PER_DEGREE)))) / Math.PI;
}

/**
 * Day length by the CBM model, hours. `sunBelowHorizonDegrees` is the model's p: 0 the sun's centre, 0.26667 its top,
 * 0.8333 the US government's sunrise and sunset, 6 civil, 12 nautical, 18 astronomical twilight.
 * Source: Forsythe et al. 1995, Ecological Modelling 80:87-95, equations 1 to 3.
 */
export function dayLengthCbm(latitude: number, dayOfYear: number, sunBelowHorizonDegrees: number): number {
  const theta = 0.2163108 + 2 * Math.atan(0.9671396 * Math.tan(0.0086 * (dayOfYear - 186)));
  const phi = Math.asin(0.39795 * Math.cos(theta));
  const lat = latitude * RADIANS_PER_DEGREE;
  const cosine =
    (Math.sin(sunBelowHorizonDegrees * RADIANS_PER_DEGREE) + Math.sin(lat) * Math.sin(phi)) / (Math.cos(lat) * Math.cos(phi));
  return 24 - (24 / Math.PI) * Math.acos(clampUnit(cosine));
}
