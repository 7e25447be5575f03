import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { climateFromDailyFile } from '@/features/placement/climate/daily-file';
import { hourlyTemperatures } from '@/features/placement/climate/development';
import { freezeCurve, freezeLossOnDay, freezeRisk, normalCdf } from '@/features/placement/climate/freeze';
import { STATIONS } from '@/features/placement/climate/normals';
import { climateForPlace, dailyFromMonthlyMeans } from '@/features/placement/climate/place';
import { coefficientsOf, seasonLine, stageDays } from '@/features/placement/climate/season-line';
import { stationsFromNormalsFiles } from '@/features/placement/climate/stations-file';
import { isoDateOfDay } from '@/lib/dates';

const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
const ames = { latitude: 41.992, longitude: -93.6, elevationFt: 930 };

describe('climate of a place', () => {
  test('the days of each month average exactly to its mean', () => {
    const means = [20, 25, 40, 55, 68, 78, 84, 81, 74, 60, 42, 27];
    const days = dailyFromMonthlyMeans(means);
    expect(days.length).toBe(365);
    let start = 0;
    MONTH_DAYS.forEach((length, month) => {
      const month_ = days.slice(start, start + length);
      expect(month_.reduce((sum, day) => sum + day, 0) / length).toBeCloseTo(means[month]!, 9);
      start += length;
    });
    expect(Math.max(...days)).toBeLessThan(86);
  });

  test('six stations are used, nearest first, and their weights sum to 1', () => {
    const climate = climateForPlace(ames);
    expect(climate.stations.length).toBe(6);
    expect(climate.stations[0]!.name).toContain('Ames');
    expect(climate.stations.reduce((sum, one) => sum + one.weight, 0)).toBeCloseTo(1, 9);
    const distances = climate.stations.map((one) => one.distanceMiles);
    expect([...distances].sort((a, b) => a - b)).toEqual(distances);
  });

  test('1,000 ft higher is 3.5 °F cooler and freezes 7.8 days earlier', () => {
    const low = climateForPlace(ames);
    const high = climateForPlace({ ...ames, elevationFt: 1930 });
    expect((low.dailyMaximumC[190]! - high.dailyMaximumC[190]!) * 1.8).toBeCloseTo(3.5, 6);
    expect(low.firstKillingFreezeDayOfYear - high.firstKillingFreezeDayOfYear).toBeCloseTo(7.84, 6);
  });

  test('a station that a manager added counts, and replaces a carried one of the same id', () => {
    const near = { ...STATIONS[0]!, id: 'OWN', name: 'Home farm', latitude: ames.latitude, longitude: ames.longitude };
    expect(climateForPlace({ ...ames, extraStations: [near] }).stations[0]!.name).toBe('Home farm');
    const corrected = { ...STATIONS.find((one) => one.name.startsWith('Ames'))!, name: 'Ames, corrected' };
    const names = climateForPlace({ ...ames, extraStations: [corrected] }).stations.map((one) => one.name);
    expect(names[0]).toBe('Ames, corrected');
    expect(names.filter((name) => name.startsWith('Ames')).length).toBe(1);
  });

  test('a place off the globe is refused, never estimated', () => {
    expect(() => climateForPlace({ latitude: Number.NaN, longitude: 0, elevationFt: null })).toThrow(RangeError);
    expect(() => climateForPlace({ latitude: 95, longitude: 0, elevationFt: null })).toThrow(RangeError);
  });

  test('hourly temperatures stay between the night low and the day high and peak in the afternoon', () => {
    const hours = [...hourlyTemperatures(30, 15, 14.5)];
    expect(Math.max(...hours)).toBeLessThanOrEqual(30 + 1e-9);
    expect(Math.min(...hours)).toBeGreaterThan(14.5);
    const warmest = hours.indexOf(Math.max(...hours)) + 1;
    expect(warmest).toBeGreaterThanOrEqual(14);
    expect(warmest).toBeLessThanOrEqual(16);
  });
});

describe('the season line', () => {
  const climate = climateForPlace(ames);

  test('stages come in order, a later variety ripens later, and later planting never ripens earlier', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 4.5, noNaN: true }), fc.integer({ min: 100, max: 180 }), (maturity, day) => {
        const stages = stageDays(climate, coefficientsOf(maturity, 'current'), day);
        const list = [day, stages.ve!, stages.r1!, stages.r3!, stages.r5!, stages.r6!, stages.r7!, stages.r8!];
        expect([...list].sort((a, b) => a - b)).toEqual(list);
        expect(stageDays(climate, coefficientsOf(maturity + 0.5, 'current'), day).r7!).toBeGreaterThanOrEqual(stages.r7!);
        expect(stageDays(climate, coefficientsOf(maturity, 'current'), day + 5).r7!).toBeGreaterThanOrEqual(stages.r7!);
      }),
      { numRuns: 100 },
    );
  });

  test('one tenth of RM is about a day (common practice, no source)', () => {
    const early = stageDays(climate, coefficientsOf(2, 'current'), 125).r7!;
    const late = stageDays(climate, coefficientsOf(3, 'current'), 125).r7!;
    expect((late - early) / 10).toBeGreaterThan(0.7);
    expect((late - early) / 10).toBeLessThan(2);
  });

  test('R6 lies 45 % of the way from R5 to R7 and R8 twelve days after R7', () => {
    const stages = stageDays(climate, coefficientsOf(2.5, 'current'), 125);
    expect(stages.r6).toBe(Math.round(stages.r5! + 0.45 * (stages.r7! - stages.r5!)));
    expect(stages.r8! - stages.r7!).toBe(12);
  });

  test('a variety far too late has no R7, and its freeze chance is 1', () => {
    const north = climateForPlace({ latitude: 48.8, longitude: -97.5, elevationFt: null });
    const line = seasonLine({ climate: north, relativeMaturity: 9, plantingDate: '2027-06-20', parameters: 'current' });
    expect(line.r7).toBeNull();
    expect(line.r8).toBeNull();
    expect(line.freeze.chanceBeforeR7).toBe(1);
    expect(line.freeze.expectedLossFraction).toBeGreaterThan(0.6);
  });

  test('planting in winter and dates that are no dates are refused', () => {
    const run = (plantingDate: string) => () =>
      seasonLine({ climate, relativeMaturity: 2.5, plantingDate, parameters: 'current' });
    expect(run('2027-01-15')).toThrow(RangeError);
    expect(run('2027-10-15')).toThrow(RangeError);
    expect(run('next week')).toThrow(RangeError);
  });
});

describe('freeze risk', () => {
  test('the normal distribution agrees with tables (from memory): 0.8413 at 1, 0.0228 at −2', () => {
    expect(normalCdf(1)).toBeCloseTo(0.8413447, 6);
    expect(normalCdf(-2)).toBeCloseTo(0.0227501, 6);
    expect(normalCdf(0)).toBeCloseTo(0.5, 7);
  });

  test('the expected loss is the loss averaged over 20,000 drawn years', () => {
    const climate = { ...climateForPlace(ames), firstKillingFreezeDayOfYear: 270 };
    const stages = { r3: 200, r5: 220, r6: 242, r7: 264, r8: 276 };
    let seed = 7;
    const random = () => {
      seed = (seed * 48271) % 2147483647;
      return seed / 2147483647;
    };
    const gauss = () => Math.sqrt(-2 * Math.log(random())) * Math.cos(2 * Math.PI * random());
    let sum = 0;
    const draws = 20_000;
    for (let i = 0; i < draws; i++) sum += freezeLossOnDay(stages, 270 + 10 * gauss() - 5 * gauss());
    expect(freezeRisk(climate, stages).expectedLossFraction).toBeCloseTo(sum / draws, 2);
  });

  test('the freeze curve is a density: its days sum to 1', () => {
    const curve = freezeCurve(climateForPlace(ames), 230, 365);
    expect(curve.reduce((sum, one) => sum + one.density, 0)).toBeCloseTo(1, 3);
    expect(curve.at(-1)!.chanceBy).toBeCloseTo(1, 4);
  });
});

describe('a daily weather file', () => {
  const normals = climateForPlace(ames);
  const lines = (year: number, from: number, to: number, low = 10) =>
    ['date,tmaxC,tminC', ...Array.from({ length: to - from + 1 }, (_, i) => `${isoDateOfDay(year, from + i)},25,${low}`)].join(
      '\n',
    );

  test('a whole leap year is taken as it stands', () => {
    const outcome = climateFromDailyFile(lines(2024, 1, 366), normals);
    expect(outcome.ok && outcome.value.climate.dailyMaximumC.length).toBe(366);
    expect(outcome.ok && outcome.value.climate.source).toBe('daily file');
  });

  test('days that the file lacks come from the normals, and the count is said', () => {
    const outcome = climateFromDailyFile(lines(2025, 100, 300), normals);
    expect(outcome.ok && outcome.notes?.[0]).toContain('164 days of 2025');
    expect(outcome.ok && outcome.value.climate.dailyMaximumC[20]).toBe(normals.dailyMaximumC[20]);
    expect(outcome.ok && outcome.value.climate.dailyMaximumC[150]).toBe(25);
  });

  test('a mild autumn moves the freeze past the last day measured', () => {
    const outcome = climateFromDailyFile(lines(2025, 100, 320), normals);
    expect(outcome.ok && outcome.value.climate.firstKillingFreezeDayOfYear).toBe(321);
    expect(outcome.ok && outcome.value.year).toBe(2025);
  });

  test('the freeze of that year is the freeze, without a spread', () => {
    const text = `${lines(2025, 100, 270)}\n2025-10-02,8,-4`;
    const outcome = climateFromDailyFile(text, normals);
    expect(outcome.ok && outcome.value.climate.firstKillingFreezeDayOfYear).toBe(275);
    expect(outcome.ok && outcome.value.climate.freezeStandardDeviationDays).toBe(0);
  });

  test.each([
    ['no column tminC', 'date,tmaxC\n2025-05-01,20', 'tminC'],
    ['a date that is no date', `${lines(2025, 100, 200)}\n2025-02-30,20,10`, 'Row 103'],
    ['two years', `${lines(2025, 100, 200)}\n2026-05-01,20,10`, 'one file holds one year'],
    ['the same day twice', `${lines(2025, 100, 200)}\n${isoDateOfDay(2025, 150)},20,10`, 'twice'],
    ['°F in place of °C', `${lines(2025, 100, 200)}\n2025-08-01,88,60`, '°F'],
    ['a minimum above the maximum', `${lines(2025, 100, 200)}\n2025-08-01,10,20`, 'above'],
    ['a blank temperature', `${lines(2025, 100, 200)}\n2025-08-01,,20`, 'not a number'],
    ['a handful of days', lines(2025, 100, 110), 'at least 30'],
    ['nothing', '', 'no days'],
    ['a stray quote', 'date,tmaxC,tminC\n2025-05-01,"20,10', 'CSV'],
  ])('%s is refused with the row and the reason', (_, text, words) => {
    const outcome = climateFromDailyFile(text, normals);
    expect(outcome.ok).toBe(false);
    expect(!outcome.ok && outcome.problems.map((one) => one.message).join(' ')).toContain(words);
  });
});

describe('a NOAA normals CSV', () => {
  const monthly = [
    '"STATION","DATE","LATITUDE","LONGITUDE","ELEVATION","NAME","month","MLY-TMAX-NORMAL","meas_flag_MLY-TMAX-NORMAL","MLY-TMIN-NORMAL"',
    ...Array.from(
      { length: 12 },
      (_, m) =>
        `"USC00999999","${String(m + 1).padStart(2, '0')}"," 42.1"," -93.5","  304.8","TESTVILLE, IA US","${m + 1}","  ${30 + 4 * m}.5"," ","  ${10 + 4 * m}.5"`,
    ),
  ].join('\n');
  const annual =
    '"STATION","LATITUDE","LONGITUDE","ELEVATION","NAME","ANN-TMIN-PRBFST-T28FP50","ANN-TMIN-PRBLST-T32FP50","ANN-TMAX-NORMAL"\n"USC00999999","42.1","-93.5","304.8","TESTVILLE, IA US","   10/22","05/01","59.4"';

  test('the monthly and the annual file together make a whole station', () => {
    const outcome = stationsFromNormalsFiles([monthly, annual]);
    expect(outcome.ok && outcome.value[0]).toMatchObject({
      id: 'USC00999999',
      latitude: 42.1,
      firstKillingFreezeDayOfYear: 295,
      lastSpringFrostDayOfYear: 121,
    });
    expect(outcome.ok && outcome.value[0]!.elevationFt).toBeCloseTo(1000, 6);
    expect(outcome.ok && outcome.value[0]!.monthlyMaximumF[11]).toBe(74.5);
  });

  test('the monthly file alone is kept and says that freeze dates are missing', () => {
    const outcome = stationsFromNormalsFiles([monthly]);
    expect(outcome.ok && outcome.value[0]!.firstKillingFreezeDayOfYear).toBeNull();
    expect(outcome.ok && outcome.notes?.join(' ')).toContain('28 °F');
  });

  test('a month coded missing (−9999) leaves the station out, with words', () => {
    const outcome = stationsFromNormalsFiles([monthly.replace('54.5', '-9999')]);
    expect(outcome.ok).toBe(false);
    expect(!outcome.ok && outcome.problems.map((one) => one.message).join(' ')).toContain('11 of 12 months');
  });

  test('another CSV is refused', () => {
    expect(stationsFromNormalsFiles(['field,ph\nNorth,6.1']).ok).toBe(false);
  });
});
