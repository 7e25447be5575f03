import { describe, expect, test } from 'vitest';
import {
  CIVIL_TWILIGHT_DEGREES,
  dayLengthCbm,
  dayLengthHours,
  SUN_CENTER_DEGREES,
  SUNRISE_DEGREES,
} from '@/features/placement/climate/day-length';

/**
 * CBM: Forsythe et al. 1995, Ecological Modelling 80:87-95. NOAA: the NOAA solar calculator's algorithm (Meeus, Astronomical
 * Algorithms), 2021 dates, as an independent judge. Latitude, day of year, CBM at p = 0, 0.8333 and 6, DSSAT DAYL, NOAA
 * sunrise to sunset, NOAA civil twilight; hours.
 */
const TABLE = [
  [30, 172, 13.933, 14.078, 14.994, 13.934, 14.077, 14.993],
  [30, 258, 12.258, 12.387, 13.187, 12.179, 12.339, 13.138],
  [35, 196, 14.153, 14.306, 15.273, 14.141, 14.275, 15.239],
  [40, 79, 11.947, 12.092, 12.992, 11.898, 12.16, 13.061],
  [40, 172, 14.846, 15.016, 16.112, 14.846, 15.014, 16.11],
  [40, 227, 13.649, 13.803, 14.773, 13.594, 13.74, 14.705],
  [42, 135, 14.363, 14.529, 15.59, 14.37, 14.581, 15.648],
  [42, 172, 15.065, 15.243, 16.393, 15.065, 15.241, 16.391],
  [42, 196, 14.794, 14.967, 16.08, 14.778, 14.927, 16.035],
  [45, 172, 15.427, 15.618, 16.867, 15.427, 15.616, 16.865],
  [45, 227, 13.972, 14.14, 15.209, 13.905, 14.065, 15.127],
  [48, 172, 15.839, 16.047, 17.425, 15.84, 16.045, 17.423],
  [48, 258, 12.497, 12.664, 13.707, 12.343, 12.572, 13.612],
] as const;

describe('day length', () => {
  test('no row of the table was dropped', () => expect(TABLE.length).toBe(13));

  test.each(TABLE)(
    'at %s° N on day %s agrees with the published formulas to 0.01 h',
    (latitude, day, center, sunrise, civil, dssat) => {
      expect(Math.abs(dayLengthCbm(latitude, day, SUN_CENTER_DEGREES) - center)).toBeLessThan(0.001);
      expect(Math.abs(dayLengthCbm(latitude, day, SUNRISE_DEGREES) - sunrise)).toBeLessThan(0.001);
      expect(Math.abs(dayLengthCbm(latitude, day, CIVIL_TWILIGHT_DEGREES) - civil)).toBeLessThan(0.001);
      expect(Math.abs(dayLengthHours(latitude, day) - dssat)).toBeLessThan(0.001);
    },
  );

  test.each(TABLE)('at %s° N on day %s stays within 0.1 h of the NOAA solar calculator', (latitude, day, ...rest) => {
    expect(Math.abs(dayLengthCbm(latitude, day, SUNRISE_DEGREES) - rest[4])).toBeLessThan(0.1);
    expect(Math.abs(dayLengthCbm(latitude, day, CIVIL_TWILIGHT_DEGREES) - rest[5])).toBeLessThan(0.1);
  });

  test('almanacs give 15 h 1 min at 40° N and 15 h 37 min at 45° N on June 21 (from memory)', () => {
    expect(dayLengthCbm(40, 172, SUNRISE_DEGREES)).toBeCloseTo(15 + 1 / 60, 1);
    expect(dayLengthCbm(45, 172, SUNRISE_DEGREES)).toBeCloseTo(15 + 37 / 60, 1);
  });

  test('beyond the polar circle the day is 24 h in June and 0 h in December', () => {
    expect(dayLengthHours(80, 172)).toBe(24);
    expect(dayLengthHours(80, 355)).toBe(0);
    expect(dayLengthCbm(80, 172, SUNRISE_DEGREES)).toBe(24);
  });
});
