/** Exact conversions between the units the trade uses. Names say both ends; every factor is exact by definition unless noted. */

export const SQUARE_METERS_PER_ACRE = 4046.8564224;
export const SQUARE_FEET_PER_ACRE = 43560;
export const METERS_PER_FOOT = 0.3048;
export const METERS_PER_MILE = 1609.344;
export const CENTIMETERS_PER_INCH = 2.54;
/** Mass of one standard bushel of soybeans, lb at 13 % moisture (USDA grain standards). */
export const POUNDS_PER_BUSHEL = 60;

/** °F → °C. */
export function celsiusFromFahrenheit(fahrenheit: number): number {
  return ((fahrenheit - 32) * 5) / 9;
}

/** °C → °F. */
export function fahrenheitFromCelsius(celsius: number): number {
  return (celsius * 9) / 5 + 32;
}

/** m² → acres. */
export function acresFromSquareMeters(squareMeters: number): number {
  return squareMeters / SQUARE_METERS_PER_ACRE;
}
