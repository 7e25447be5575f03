import { describe, expect, test } from 'vitest';
import { coolNightResponse, photoperiodResponse, temperatureResponse } from '@/features/placement/climate/development';
import { chanceOfFreezeBefore, freezeLossOnDay } from '@/features/placement/climate/freeze';
import { STATIONS } from '@/features/placement/climate/normals';
import { EARLY_REPRODUCTIVE, LATE_REPRODUCTIVE, MATURITY_GROUPS, VEGETATIVE } from '@/features/placement/climate/phenology-table';
import { climateForPlace } from '@/features/placement/climate/place';
import { coefficientsOf, seasonLine, stageDays } from '@/features/placement/climate/season-line';
import { dayOfYear, isoDateOfDay } from '@/lib/dates';

/**
 * Reference runs of CROPGRO-Soybean's published coefficients (DSSAT Foundation, dssat-csm-os, SBGRO048.CUL, .ECO and .SPE) on
 * NOAA NCEI 1991-2020 normals: monthly means at mid-month with straight lines between, cosine day, emergence on the daily mean.
 * Station (as in the normals), maturity-group row, planting date, days after planting of VE, R1, R3, R5, R7, R8; to ±2 days.
 */
const RUNS: [string, number, string, number, number, number, number, number, number][] = [
  ['Grand Forks Intl Ap, ND', -1, '2027-05-20', 11, 51, 60, 72, 110, 122],
  ['Fargo Hector Intl Ap, ND', 0, '2027-05-15', 10, 52, 63, 75, 114, 126],
  ['Minneapolis/St Paul Ap, MN', 1, '2027-05-10', 10, 50, 62, 74, 114, 126],
  ['Madison Dane Rgnl Ap, WI', 2, '2027-05-08', 11, 60, 73, 87, 129, 141],
  ['Lansing Capital City Ap, MI', 2, '2027-05-10', 10, 58, 71, 85, 126, 138],
  ['Ames Muni Ap, IA', 2, '2027-05-05', 10, 54, 67, 81, 123, 135],
  ['Ames Muni Ap, IA', 2.5, '2027-05-05', 10, 58, 72, 87, 130, 142],
  ['Ames Muni Ap, IA', 3, '2027-05-05', 10, 64, 79, 94, 137, 149],
  ['Ames Muni Ap, IA', 2, '2027-06-05', 6, 42, 53, 65, 105, 117],
  ['Champaign Willard Ap, IL', 2, '2027-05-05', 8, 45, 57, 71, 114, 126],
  ['Champaign Willard Ap, IL', 3, '2027-05-05', 8, 53, 67, 83, 126, 138],
  ['Champaign Willard Ap, IL', 4, '2027-05-05', 8, 67, 85, 100, 143, 155],
  ['Champaign Willard Ap, IL', 3, '2027-06-05', 6, 45, 57, 69, 109, 121],
  ['Columbus Port Columbus Intl Ap, OH', 3, '2027-05-10', 8, 53, 67, 82, 124, 136],
  ['Lincoln Muni Ap, NE', 3, '2027-05-10', 8, 54, 68, 83, 125, 137],
  ['Carbondale Southern Il Ap, IL', 4, '2027-05-10', 7, 54, 70, 86, 129, 141],
  ['Manhattan Muni Ap, KS', 4, '2027-05-20', 6, 55, 71, 85, 127, 139],
  ['Jackson Mckellar Ap, TN', 4, '2027-05-10', 6, 46, 62, 77, 121, 133],
  ['Greenville Asos, MS', 4, '2027-04-20', 7, 42, 56, 72, 122, 134],
  ['Greenville Asos, MS', 5, '2027-05-10', 6, 45, 64, 80, 125, 137],
];

function station(name: string) {
  const found = STATIONS.find((one) => one.name === name);
  if (!found) throw new Error(`No station ${name}`);
  return found;
}

function reference(name: string) {
  const { latitude, longitude } = station(name);
  return climateForPlace({ latitude, longitude, elevationFt: null, interpolation: 'mid-month' });
}

describe('the season line against reference runs of the published coefficients', () => {
  test('no run was dropped', () => expect(RUNS.length).toBe(20));

  test.each(RUNS)('%s, group row %s, planted %s', (name, row, planted, ...expected) => {
    const line = seasonLine({
      climate: reference(name),
      relativeMaturity: row + 0.5,
      plantingDate: planted,
      parameters: 'published',
    });
    const days = [line.ve, line.r1, line.r3, line.r5, line.r7, line.r8].map(
      (date) => dayOfYear(date as string) - dayOfYear(planted),
    );
    days.forEach((day, stage) => {
      expect(Math.abs(day - (expected[stage] as number)), `stage ${stage}: ${day} for ${expected[stage]}`).toBeLessThanOrEqual(2);
    });
  });

  const AMES_R7: [string, number][] = [
    ['2027-05-11', 3],
    ['2027-05-21', 6],
    ['2027-05-31', 11],
    ['2027-06-10', 16],
    ['2027-06-20', 23],
    ['2027-06-30', 30],
  ];
  test.each(AMES_R7)('at Ames, group row 2.5, planting on %s puts R7 %s days after that of May 1', (planted, later) => {
    const climate = reference('Ames Muni Ap, IA');
    const row = coefficientsOf(3, 'published');
    const first = stageDays(climate, row, dayOfYear('2027-05-01')).r7 as number;
    expect(Math.abs(first - dayOfYear('2027-09-11'))).toBeLessThanOrEqual(2);
    expect(Math.abs((stageDays(climate, row, dayOfYear(planted)).r7 as number) - first - later)).toBeLessThanOrEqual(2);
  });

  const CHAMPAIGN_R7: [number, string][] = [
    [1, '2027-08-16'],
    [1.5, '2027-08-21'],
    [2, '2027-08-27'],
    [2.5, '2027-09-02'],
    [3, '2027-09-08'],
    [3.5, '2027-09-16'],
    [4, '2027-09-25'],
  ];
  test.each(CHAMPAIGN_R7)('at Champaign planted May 5, group row %s ripens about %s', (group, date) => {
    const r7 = stageDays(reference('Champaign Willard Ap, IL'), coefficientsOf(group + 0.5, 'published'), 125).r7 as number;
    expect(Math.abs(r7 - dayOfYear(date))).toBeLessThanOrEqual(2);
  });

  test('a group IV at Greenville takes 132 to 140 days from late April, as at Stoneville (Delta Farm Press: 135-140 days)', () => {
    const line = seasonLine({
      climate: reference('Greenville Asos, MS'),
      relativeMaturity: 4.5,
      plantingDate: '2027-04-20',
      parameters: 'published',
    });
    const days = dayOfYear(line.r8 as string) - dayOfYear('2027-04-20');
    expect(days).toBeGreaterThanOrEqual(132);
    expect(days).toBeLessThanOrEqual(140);
  });
});

describe('the season line against what extension services saw', () => {
  /** Conley & Shaner, Purdue University, West Lafayette: RM 3.6 planted April 29 and June 2. */
  const climate = climateForPlace({ latitude: 40.42, longitude: -86.9, elevationFt: 620 });
  const stages = (planted: string) => stageDays(climate, coefficientsOf(3.6, 'current'), dayOfYear(planted));

  test('at West Lafayette planting June 2 in place of April 29 puts R6 13 days later (August 13 and 26), to 3 days', () => {
    expect(Math.abs(stages('2027-06-02').r6! - stages('2027-04-29').r6! - 13)).toBeLessThanOrEqual(3);
  });

  test('and R6 itself falls within ten days of what was seen there', () => {
    expect(Math.abs(stages('2027-04-29').r6! - dayOfYear('2027-08-13'))).toBeLessThanOrEqual(10);
    expect(Math.abs(stages('2027-06-02').r6! - dayOfYear('2027-08-26'))).toBeLessThanOrEqual(10);
  });

  test('a month between plantings is about two weeks at R7', () => {
    const weeks = (stages('2027-06-02').r7! - stages('2027-05-02').r7!) / 7;
    expect(weeks).toBeGreaterThan(1.3);
    expect(weeks).toBeLessThan(2.7);
  });

  test.each([2.2, 2.8, 3.4])(
    'at Champaign one group later than RM %s is about 10 days at R7 (University of Illinois), to 5 days',
    (maturity) => {
      const champaign = reference('Champaign Willard Ap, IL');
      const r7 = (one: number) => stageDays(champaign, coefficientsOf(one, 'current'), 130).r7 as number;
      expect(Math.abs(r7(maturity + 0.5) - r7(maturity - 0.5) - 10)).toBeLessThanOrEqual(5);
    },
  );
});

describe('daily rates against the published rows (SBGRO048.CUL, .ECO, .SPE; PHENOL.for)', () => {
  test.each([
    [0, 19.948],
    [2, 17.606],
    [3, 16.909],
    [5, 16.13],
  ])('group %s stops developing at a day of %s h', (group, hours) => {
    const row = MATURITY_GROUPS.find((one) => one.group === group)!;
    expect(row.criticalDayLengthHours + 1 / row.photoperiodSensitivityPerHour).toBeCloseTo(hours, 3);
  });

  test('group 2 at 15.065 h runs at 0.6327 before R1 and 0.5632 after', () => {
    expect(photoperiodResponse(15.065, 13.59, 13.59 + 1 / 0.249)).toBeCloseTo(0.6327, 4);
    expect(photoperiodResponse(15.065, 13.59 - 0.279, 13.59 + 1 / 0.249 - 0.279)).toBeCloseTo(0.5632, 3);
  });

  test.each([
    ['vegetative at 17.5 °C', 17.5, VEGETATIVE, 0.5],
    ['early reproductive at 16 °C', 16, EARLY_REPRODUCTIVE, 0.5],
    ['late reproductive at 10 °C', 10, LATE_REPRODUCTIVE, 25 / 41],
    ['early reproductive at 37.5 °C', 37.5, EARLY_REPRODUCTIVE, 0.5],
  ] as const)('%s', (_, temperature, cardinal, rate) => {
    expect(temperatureResponse(temperature, cardinal)).toBeCloseTo(rate, 6);
  });

  test('a night of 12 °C slows group 2 to 0.832 and group 4 to 0.720', () => {
    expect(coolNightResponse(12, 18, 0.028)).toBeCloseTo(0.832, 6);
    expect(coolNightResponse(12, 20, 0.035)).toBeCloseTo(0.72, 6);
  });

  test('RM 2.5 is the row of group II, and RM 3 lies half way to group III', () => {
    expect(coefficientsOf(2.5, 'published').criticalDayLengthHours).toBe(13.59);
    expect(coefficientsOf(3, 'published').criticalDayLengthHours).toBeCloseTo(13.495, 9);
    expect(coefficientsOf(2.7, 'current').seedToMaturity).toBeCloseTo(37.7, 9);
    expect(coefficientsOf(3.6, 'current').seedToMaturity).toBeCloseTo(37.7, 9);
  });
});

/**
 * Days between stages, average and range: Fehr & Caviness 1977, Iowa State University Special Report 80 (from memory, high
 * confidence): planting-VE 5-15; R1-R3 5-22; R3-R5 9-41; R5-R7 20-50; R7-R8 7-18.
 */
describe('the season line inside the ranges of Fehr & Caviness 1977', () => {
  const places = RUNS.map(([name, row, planted]) => [name, row, planted] as const);
  test.each(places)('%s, group row %s, planted %s', (name, row, planted) => {
    const { latitude, longitude, elevationFt } = station(name);
    const climate = climateForPlace({ latitude, longitude, elevationFt });
    const stages = stageDays(climate, coefficientsOf(row + 0.5, 'published'), dayOfYear(planted));
    const gaps = [
      [stages.ve! - dayOfYear(planted), 5, 15],
      [stages.r3! - stages.r1!, 5, 22],
      [stages.r5! - stages.r3!, 9, 41],
      [stages.r6! - stages.r5!, 11, 25],
      [stages.r7! - stages.r5!, 20, 50],
      [stages.r8! - stages.r7!, 7, 18],
    ] as const;
    for (const [days, least, most] of gaps) {
      expect(days).toBeGreaterThanOrEqual(least);
      expect(days).toBeLessThanOrEqual(most);
    }
    // Modern varieties fill seed longer than the ranges of 1977, by about a week.
    const current = stageDays(climate, coefficientsOf(row + 0.5, 'current'), dayOfYear(planted));
    expect(current.r5).toBe(stages.r5);
    expect(current.r7! - stages.r7!).toBeGreaterThanOrEqual(3);
    expect(current.r7! - stages.r7!).toBeLessThanOrEqual(12);
  });
});

/** Saliba et al. 1982, Crop Science 22:73-78, in Kansas State University MF-2234 (1996): R5 65 %, R6 37 %, R7 11 %, R8 0. */
describe('freeze loss by stage', () => {
  const stages = { r3: 190, r5: 210, r6: 230, r7: 250, r8: 262 };
  test.each([
    ['at R5', 210, 0.65],
    ['half way from R5 to R6', 220, 0.51],
    ['at R6', 230, 0.37],
    ['half way from R6 to R7', 240, 0.24],
    ['at R7', 250, 0.11],
    ['at R8', 262, 0],
    ['after R8', 300, 0],
  ])('%s', (_, day, loss) => expect(freezeLossOnDay(stages, day)).toBeCloseTo(loss, 9));

  test('a freeze at R7 takes 6.6 bu of a 60 bu crop, at R6 22.2 bu', () => {
    expect(60 * freezeLossOnDay(stages, 250)).toBeCloseTo(6.6, 6);
    expect(60 * freezeLossOnDay(stages, 230)).toBeCloseTo(22.2, 6);
  });

  test('the median freeze comes before a stage on its own date in half the years', () => {
    const climate = reference('Ames Muni Ap, IA');
    expect(chanceOfFreezeBefore(climate, climate.firstKillingFreezeDayOfYear)).toBeCloseTo(0.5, 6);
    expect(isoDateOfDay(2027, climate.firstKillingFreezeDayOfYear).slice(0, 7)).toBe('2027-10');
  });
});
