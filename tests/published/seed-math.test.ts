import { describe, expect, test } from 'vitest';
import {
  exactUnits,
  hoopFactor,
  isLargeSeed,
  lossFromBeansPerSquareFoot,
  poundsPerAcre,
  poundsPerBushelAt,
  rowFeetPerAcre,
  seedsPerAcreForStand,
  seedsPerFoot,
  standardBushels,
  standardYieldFactor,
  suggestedStand,
} from '@/features/plans/seed-math';

/** Arithmetic of 43,560 ft² an acre; agrees with Ohio State's 70 / 35 / 17.5 ft for a thousandth of an acre. */
const ROWS: [rowInches: number, feetPerAcre: number, thousandth: number, at100: number, at140: number][] = [
  [7, 74_674, 74.67, 1.34, 1.87],
  [7.5, 69_696, 69.7, 1.43, 2.01],
  [10, 52_272, 52.27, 1.91, 2.68],
  [15, 34_848, 34.85, 2.87, 4.02],
  [20, 26_136, 26.14, 3.83, 5.36],
  [30, 17_424, 17.42, 5.74, 8.03],
  [36, 14_520, 14.52, 6.89, 9.64],
  [38, 13_756, 13.76, 7.27, 10.18],
];

describe('rows and seeds per foot', () => {
  test.each(ROWS)('%s in rows: feet of row per acre and seeds per foot', (row, feet, thousandth, at100, at140) => {
    expect(Math.abs(rowFeetPerAcre(row) - feet)).toBeLessThan(1);
    expect(Math.abs(rowFeetPerAcre(row) / 1000 - thousandth)).toBeLessThan(0.006);
    expect(Math.abs(seedsPerFoot(100_000, row) - at100)).toBeLessThan(0.006);
    expect(Math.abs(seedsPerFoot(140_000, row) - at140)).toBeLessThan(0.006);
  });

  test('130,000 seeds are 7.46 a foot in 30 in rows and 3.73 in 15 in rows (Ohio State C.O.R.N.)', () => {
    expect(seedsPerFoot(130_000, 30)).toBeCloseTo(7.46, 2);
    expect(seedsPerFoot(130_000, 15)).toBeCloseTo(3.73, 2);
  });

  // Purdue (Christmas), farm press: 6 a foot in 30 in, 3.7 in 15 in; narrow rows carry more seed an acre.
  test.each([
    [36, 7, 101_640],
    [30, 6, 104_544],
    [20, 5, 130_680],
    [15, 3.7, 128_938],
  ])('%s in rows at %s seeds a foot are %s seeds an acre', (row, perFoot, perAcre) => {
    expect(Math.abs(rowFeetPerAcre(row) * perFoot - perAcre)).toBeLessThan(1);
  });
});

describe('hoops', () => {
  // π r² arithmetic; Purdue's guide rounds the 30 in factor to about 8,900 and gives 107,000 plants for 12 in the hoop.
  test.each([
    [28.25, 10_007],
    [30, 8_874],
    [36, 6_162],
  ])('a %s in hoop: one plant counted is %s an acre', (diameter, factor) => {
    expect(Math.abs(hoopFactor(diameter) - factor)).toBeLessThan(1);
  });

  test('12 plants in a 30 in hoop are about 107,000 an acre (Purdue)', () => {
    expect(Math.abs(hoopFactor(30) * 12 - 107_000)).toBeLessThan(600);
  });
});

describe('stand, rate, pounds, units', () => {
  const rate = seedsPerAcreForStand(120_000, 0.9, 0.85);

  test('a stand of 120,000 at 90 % germination and 85 % emergence asks for 156,863 seeds', () => {
    expect(Math.round(rate)).toBe(156_863);
  });
  test('which are 56.0 lb at 2,800 seeds/lb, 1.12 units of 140,000 and 4.50 seeds a foot in 15 in rows', () => {
    expect(poundsPerAcre(rate, 2800)).toBeCloseTo(56.0, 1);
    expect(exactUnits(1, rate)).toBeCloseTo(1.12, 2);
    expect(seedsPerFoot(rate, 15)).toBeCloseTo(4.5, 2);
  });

  // Ohio State C.O.R.N. 2019: May 100,000-120,000 final plants; June 130,000-150,000 at harvest.
  test.each([
    ['2027-05-08', 100_000, 120_000],
    ['2027-06-08', 130_000, 150_000],
  ])('planted %s the stand aimed at lies in Ohio State’s range whatever the row', (date, low, high) => {
    for (const row of [7, 10, 15, 20, 30, 36, 38]) {
      expect(suggestedStand(row, date)).toBeGreaterThanOrEqual(low);
      expect(suggestedStand(row, date)).toBeLessThanOrEqual(high);
    }
  });

  test('150,000 seeds in 15 in rows that leave 109,000–136,000 plants (Ohio State) keep 73–91 %', () => {
    expect(seedsPerAcreForStand(109_000, 1, 109 / 150)).toBeCloseTo(150_000, 6);
    expect(seedsPerAcreForStand(136_000, 1, 136 / 150)).toBeCloseTo(150_000, 6);
  });

  test('large seed, 2,100–2,200 a pound, is over 63 lb an acre at 140,000 (common practice, no source)', () => {
    expect(poundsPerAcre(140_000, 2200)).toBeGreaterThan(63);
    expect(isLargeSeed(2200)).toBe(true);
    expect(isLargeSeed(2100)).toBe(true);
    expect(isLargeSeed(2300)).toBe(false);
    expect(isLargeSeed(null)).toBe(false);
  });
});

describe('moisture and harvest loss', () => {
  test('a standard bushel holds 52.2 lb of dry matter and 7.8 lb of water (University of Nebraska CropWatch 2009)', () => {
    expect(60 * 0.87).toBeCloseTo(52.2, 10);
    expect(60 - poundsPerBushelAt(0)).toBeCloseTo(7.8, 10);
  });

  // Follows from 60 lb at 13 %.
  test.each([
    [10, 58.0],
    [11, 58.65],
    [13, 60],
    [14, 60.7],
  ])('at %s %% moisture a bushel weighs %s lb', (moisture, pounds) => {
    expect(poundsPerBushelAt(moisture)).toBeCloseTo(pounds, 2);
  });

  test.each([
    [10, 1.0345],
    [11, 1.023],
    [16, 0.9655],
  ])('the factor to 13 %% from %s %% is %s', (moisture, factor) => {
    expect(standardYieldFactor(moisture)).toBeCloseTo(factor, 4);
  });

  test.each([
    [11, 1704.98],
    [15, 1628.35],
  ])('100,000 lb at %s %% are %s standard bushels', (moisture, bushels) => {
    expect(standardBushels(100_000, moisture)).toBeCloseTo(bushels, 2);
  });

  test('four beans on a square foot are one bushel an acre (Missouri G1280, Michigan State, Nebraska)', () => {
    expect(lossFromBeansPerSquareFoot(4)).toBe(1);
    // The header example of the guide, 8.5 beans, prints 2.2; the arithmetic gives 2.1.
    expect(lossFromBeansPerSquareFoot(8.5)).toBeCloseTo(2.1, 1);
  });
});
