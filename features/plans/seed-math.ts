/**
 * Seed arithmetic: stand, rate, seeds per foot of row, pounds and units. Pure.
 *
 * | symbol | meaning | unit |
 * |---|---|---|
 * | stand | plants wanted at harvest | plants/ac |
 * | rate | seeds dropped | seeds/ac |
 * | germination, emergence | share of seeds that sprout; share of sprouts that come up | 0..1 |
 * | row width | centre to centre | inches |
 */
import { POUNDS_PER_BUSHEL, SQUARE_FEET_PER_ACRE } from '@/lib/units';

/** A unit of seed, unless the lot says otherwise. */
export const SEEDS_PER_UNIT = 140_000;
/** Seeds per pound of a usual lot, where the tag is not known (from memory: 2,300 to 3,600, typically 2,800). */
export const USUAL_SEEDS_PER_POUND = 2800;
/** Share of live seeds that come up in a fair seedbed; a planning figure, the worked example of the stand tables. */
export const USUAL_FIELD_EMERGENCE = 0.85;
/** Common practice, no source: a lot at or under this many seeds per pound is large seed. */
export const LARGE_SEED_SEEDS_PER_POUND = 2200;
/** Percent moisture of a standard bushel (USDA standard; University of Nebraska CropWatch 2009). */
export const STANDARD_MOISTURE_PERCENT = 13;

/** Square inches per acre ÷ inches per foot: feet of row per acre = 522,720 ÷ row width in inches. */
const INCH_FEET_PER_ACRE = SQUARE_FEET_PER_ACRE * 12;

function requirePositive(value: number, what: string): void {
  if (!(value > 0) || !Number.isFinite(value)) throw new RangeError(`${what} must be above zero, not ${value}.`);
}

/** Feet of row in one acre. Arithmetic: 43,560 ft² ÷ (row width ÷ 12). Throws RangeError unless the width is above zero. */
export function rowFeetPerAcre(rowWidthInches: number): number {
  requirePositive(rowWidthInches, 'Row width in inches');
  return INCH_FEET_PER_ACRE / rowWidthInches;
}

/** Seeds dropped per foot of row. Arithmetic: seeds/ac × row in ÷ 522,720. */
export function seedsPerFoot(seedsPerAcre: number, rowWidthInches: number): number {
  return seedsPerAcre / rowFeetPerAcre(rowWidthInches);
}

/**
 * Seeds to drop per acre for a stand: stand ÷ (germination × field emergence), both as fractions 0..1.
 * Throws RangeError when either is outside (0, 1].
 */
export function seedsPerAcreForStand(standPlantsPerAcre: number, germination: number, emergence: number): number {
  for (const [value, what] of [
    [germination, 'Germination'],
    [emergence, 'Field emergence'],
  ] as const) {
    requirePositive(value, what);
    if (value > 1) throw new RangeError(`${what} is a fraction up to 1, not ${value}.`);
  }
  return standPlantsPerAcre / (germination * emergence);
}

/** Pounds of seed per acre. */
export function poundsPerAcre(seedsPerAcre: number, seedsPerPound: number): number {
  requirePositive(seedsPerPound, 'Seeds per pound');
  return seedsPerAcre / seedsPerPound;
}

/** Units for an area, exact (not rounded): acres × seeds/ac ÷ seeds per unit. */
export function exactUnits(areaAcres: number, seedsPerAcre: number, seedsPerUnit: number = SEEDS_PER_UNIT): number {
  requirePositive(seedsPerUnit, 'Seeds per unit');
  return (areaAcres * seedsPerAcre) / seedsPerUnit;
}

/** Whole units that cover a sum of exact ones. A thousandth of a unit (140 seeds) is arithmetic dust, not another bag. */
export function wholeUnits(exact: number): number {
  return Math.ceil(Math.round(exact * 1000) / 1000 - 1e-9);
}

/** Large seed: about 2,100 to 2,200 seeds/lb, over 63 lb/ac at 140,000; mind the plates. Common practice, no source. */
export function isLargeSeed(seedsPerPound: number | null): boolean {
  return seedsPerPound !== null && seedsPerPound <= LARGE_SEED_SEEDS_PER_POUND;
}

/**
 * Stand to aim at, plants/ac at harvest, by row width (inches) and planting date (ISO, may be unknown).
 * Range by date: 100,000–120,000 planted to the end of May; 130,000–150,000 from June on (Ohio State C.O.R.N. 2019).
 * Where in the range, by row: wide rows (25 in and over) its low end, narrow (10 in and under) its high end, between
 * them its middle – the order of Purdue's seeds per foot by row width (Christmas); the steps are a planning choice.
 */
export function suggestedStand(rowWidthInches: number | null, plantingDate: string | null): number {
  const june = plantingDate !== null && Number(plantingDate.slice(5, 7)) >= 6;
  const [low, high] = june ? [130_000, 150_000] : [100_000, 120_000];
  if (rowWidthInches !== null && rowWidthInches >= 25) return low;
  if (rowWidthInches !== null && rowWidthInches <= 10) return high;
  return (low + high) / 2;
}

/**
 * Seeds/ac to drop for the suggested stand, to the nearest 1,000. Germination in percent as a tag says it;
 * unknown germination counts as 90 %, the least that certified soybean seed usually carries (from memory).
 */
export function suggestedSeedsPerAcre(input: {
  rowWidthInches: number | null;
  plantingDate: string | null;
  germinationPercent: number | null;
}): number {
  const stand = suggestedStand(input.rowWidthInches, input.plantingDate);
  const germination = Math.min(Math.max((input.germinationPercent ?? 90) / 100, 0.5), 1);
  return Math.round(seedsPerAcreForStand(stand, germination, USUAL_FIELD_EMERGENCE) / 1000) * 1000;
}

/** Plants/ac from plants counted inside a hoop of this diameter: 43,560 ÷ (π (d/24)²) plants/ac for each plant counted. */
export function hoopFactor(diameterInches: number): number {
  requirePositive(diameterInches, 'Hoop diameter in inches');
  return SQUARE_FEET_PER_ACRE / (Math.PI * (diameterInches / 24) ** 2);
}

/** Pounds that hold one standard bushel's dry matter at another moisture: 60 × 87 ÷ (100 − M). */
export function poundsPerBushelAt(moisturePercent: number): number {
  return POUNDS_PER_BUSHEL / standardYieldFactor(moisturePercent);
}

/** Factor from weight at a moisture to weight at 13 %: (100 − M) ÷ 87. */
export function standardYieldFactor(moisturePercent: number): number {
  if (!(moisturePercent >= 0 && moisturePercent < 100)) {
    throw new RangeError(`Moisture is a percentage from 0 to under 100, not ${moisturePercent}.`);
  }
  return (100 - moisturePercent) / (100 - STANDARD_MOISTURE_PERCENT);
}

/** Standard bushels (60 lb at 13 %) in a weight of beans at a moisture. */
export function standardBushels(pounds: number, moisturePercent: number): number {
  return (pounds / POUNDS_PER_BUSHEL) * standardYieldFactor(moisturePercent);
}

/** Bushels per acre left on the ground: 4 beans on a square foot are one bushel an acre (Missouri G1280). */
export function lossFromBeansPerSquareFoot(beansPerSquareFoot: number): number {
  return beansPerSquareFoot / 4;
}
