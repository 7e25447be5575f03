import { describe, expect, test } from 'vitest';
import { STATIONS } from '@/features/placement/climate/normals';
import { dayOfYear } from '@/lib/dates';

/**
 * NOAA NCEI U.S. Climate Normals 1991-2020: last 32 °F, first 32 °F and first 28 °F at 50 %, July Tmax and Tmin in °F.
 * Days are those of a 365-day year.
 */
const ROWS: [string, string, number, number, string, string, string, number, number][] = [
  ['USW00094989', 'Ames', 41.992, 930, '04-26', '10-08', '10-19', 84, 63],
  ['USW00014842', 'Peoria', 40.667, 650, '04-16', '10-23', '11-02', 86, 66],
  ['USW00014914', 'Fargo', 46.925, 900, '05-10', '09-30', '10-10', 82, 59],
  ['USW00093819', 'Indianapolis', 39.708, 790, '04-15', '10-26', '11-05', 85, 66],
  ['USW00014939', 'Lincoln', 40.851, 1190, '04-24', '10-13', '10-22', 89, 67],
  ['USW00013893', 'Memphis', 35.056, 254, '03-16', '11-16', '11-28', 92, 74],
  ['USW00014837', 'Madison', 43.141, 866, '05-01', '10-10', '10-22', 82, 62],
  ['USW00014944', 'Sioux Falls', 43.588, 1430, '05-01', '10-06', '10-17', 85, 63],
];

describe('the carried station normals', () => {
  test('hold 158 stations, each once', () => {
    expect(STATIONS.length).toBe(158);
    expect(new Set(STATIONS.map((station) => station.id)).size).toBe(158);
    expect(ROWS.length).toBe(8);
  });

  test.each(ROWS)(
    '%s %s is as NOAA published it',
    (id, name, latitude, elevation, last32, first32, first28, maximum, minimum) => {
      const station = STATIONS.find((one) => one.id === id)!;
      expect(station.name).toContain(name);
      expect(station.latitude).toBe(latitude);
      expect(station.elevationFt).toBe(elevation);
      expect(station.lastSpringFrostDayOfYear).toBe(dayOfYear(`2027-${last32}`));
      expect(station.firstAutumnFrostDayOfYear).toBe(dayOfYear(`2027-${first32}`));
      expect(station.firstKillingFreezeDayOfYear).toBe(dayOfYear(`2027-${first28}`));
      expect(station.monthlyMaximumF[6]).toBe(maximum);
      expect(station.monthlyMinimumF[6]).toBe(minimum);
    },
  );

  test('frost dates stand in order and the 28 °F median comes 6 to 17 days after the 32 °F one in autumn', () => {
    for (const station of STATIONS) {
      expect(station.lastSpringFreezeDayOfYear!).toBeLessThanOrEqual(station.lastSpringFrostDayOfYear!);
      expect(station.lastSpringFrostDayOfYear!).toBeLessThan(station.firstAutumnFrostDayOfYear!);
      const gap = station.firstKillingFreezeDayOfYear! - station.firstAutumnFrostDayOfYear!;
      expect(gap).toBeGreaterThanOrEqual(6);
      expect(gap).toBeLessThanOrEqual(17);
    }
  });
});
