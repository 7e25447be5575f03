/**
 * The season line: when a variety of a given relative maturity, planted on a given day, emerges, flowers, sets pods, fills and
 * ripens at a place, and what a killing freeze would cost it.
 *
 * Source: CROPGRO-Soybean as in development.ts and phenology-table.ts. No water or nitrogen stress. Stages fall on whole days.
 */
import { dayOfYear, isoDateOfDay } from '@/lib/dates';
import { coolNightResponse, dailyRates, FIRST_GROWING_DAY, photoperiodResponse } from './development';
import { type FreezeStages, freezeRisk } from './freeze';
import type { ClimateForPlace, SeasonLine, SeasonParameters } from './model';
import {
  CURRENT_SEED_TO_MATURITY,
  MATURITY_GROUPS,
  type MaturityGroupRow,
  PLANTING_TO_EMERGENCE,
  R7_TO_R8_DAYS,
} from './phenology-table';

/** R6 lies this share of the way from R5 to R7: with Fehr & Caviness' average days, 15 of 33. */
const R6_SHARE_OF_SEED_FILL = 0.45;

/** Planted earlier than this (March 1) or later (end of August) nothing is run: no such crop is grown here. */
const LAST_PLANTING_DAY = 243;

/**
 * Coefficients of a relative maturity. Group g is RM g.5 (RM 2.5 is the middle of group II); linear between rows, and held at
 * the ends (RM −1.5 and 10.5).
 */
export function coefficientsOf(relativeMaturity: number, parameters: SeasonParameters): MaturityGroupRow {
  const published = publishedRow(relativeMaturity - 0.5);
  if (parameters === 'published') return published;
  const { fromRelativeMaturity, toRelativeMaturity, photothermalDays } = CURRENT_SEED_TO_MATURITY;
  const nearest = Math.max(fromRelativeMaturity, Math.min(toRelativeMaturity, relativeMaturity));
  const raise = photothermalDays - publishedRow(nearest - 0.5).seedToMaturity;
  return { ...published, seedToMaturity: published.seedToMaturity + raise };
}

function publishedRow(group: number): MaturityGroupRow {
  const first = MATURITY_GROUPS[0] as MaturityGroupRow;
  const last = MATURITY_GROUPS[MATURITY_GROUPS.length - 1] as MaturityGroupRow;
  const held = Math.max(first.group, Math.min(last.group, group));
  const index = Math.min(MATURITY_GROUPS.length - 2, Math.floor(held - first.group));
  const a = MATURITY_GROUPS[index] as MaturityGroupRow;
  const b = MATURITY_GROUPS[index + 1] as MaturityGroupRow;
  const t = held - a.group;
  const between = (from: number, to: number) => from + (to - from) * t;
  return {
    group: held,
    criticalDayLengthHours: between(a.criticalDayLengthHours, b.criticalDayLengthHours),
    photoperiodSensitivityPerHour: between(a.photoperiodSensitivityPerHour, b.photoperiodSensitivityPerHour),
    emergenceToFlower: between(a.emergenceToFlower, b.emergenceToFlower),
    flowerToPod: between(a.flowerToPod, b.flowerToPod),
    flowerToSeed: between(a.flowerToSeed, b.flowerToSeed),
    seedToMaturity: between(a.seedToMaturity, b.seedToMaturity),
    criticalDayLengthFallHours: between(a.criticalDayLengthFallHours, b.criticalDayLengthFallHours),
    coolNightBaseC: between(a.coolNightBaseC, b.coolNightBaseC),
    coolNightSlopePerC: between(a.coolNightSlopePerC, b.coolNightSlopePerC),
  };
}

/** Days of the year on which stages are reached; `null` when the year ends first. */
export interface StageDays extends FreezeStages {
  ve: number | null;
  r1: number | null;
}

/**
 * Runs the daily rates from planting. `plantingDay` is a day of the year. Returns days of the year.
 * Before R1 the photoperiod response starts at CSDL, from R1 on at CSDL − R1PPO; cool nights act from emergence to R1 only.
 */
export function stageDays(climate: ClimateForPlace, row: MaturityGroupRow, plantingDay: number): StageDays {
  const rates = dailyRates(climate);
  const days = climate.dailyMinimumC.length;
  const shortBefore = row.criticalDayLengthHours;
  const longBefore = shortBefore + 1 / Math.max(row.photoperiodSensitivityPerHour, 1e-6);
  const shortAfter = shortBefore - row.criticalDayLengthFallHours;
  const longAfter = longBefore - row.criticalDayLengthFallHours;
  const stages: StageDays = { ve: null, r1: null, r3: null, r5: null, r6: null, r7: null, r8: null };

  // Planted in the course of a day, the seed's first whole day is the next.
  let day = plantingDay + 1;
  let sum = 0;
  for (; day <= days && stages.ve === null; day++) {
    sum += rates.vegetative[day - 1] as number;
    if (sum >= PLANTING_TO_EMERGENCE) stages.ve = day;
  }
  sum = 0;
  for (; day <= days && stages.r1 === null; day++) {
    const photo = photoperiodResponse(rates.dayLength[day - 1] as number, shortBefore, longBefore);
    const cool = coolNightResponse(climate.dailyMinimumC[day - 1] as number, row.coolNightBaseC, row.coolNightSlopePerC);
    sum += (rates.earlyReproductive[day - 1] as number) * photo * cool;
    if (sum >= row.emergenceToFlower) stages.r1 = day;
  }
  sum = 0;
  for (; day <= days && stages.r5 === null; day++) {
    const photo = photoperiodResponse(rates.dayLength[day - 1] as number, shortAfter, longAfter);
    sum += (rates.earlyReproductive[day - 1] as number) * photo;
    if (stages.r3 === null && sum >= row.flowerToPod) stages.r3 = day;
    if (sum >= row.flowerToSeed) stages.r5 = day;
  }
  sum = 0;
  for (; day <= days && stages.r7 === null; day++) {
    const photo = photoperiodResponse(rates.dayLength[day - 1] as number, shortAfter, longAfter);
    sum += (rates.lateReproductive[day - 1] as number) * photo;
    if (sum >= row.seedToMaturity) stages.r7 = day;
  }
  if (stages.r5 !== null && stages.r7 !== null) {
    stages.r6 = Math.round(stages.r5 + R6_SHARE_OF_SEED_FILL * (stages.r7 - stages.r5));
    stages.r8 = stages.r7 + R7_TO_R8_DAYS;
  }
  return stages;
}

const datesByYear = new Map<number, string[]>();

/** `isoDateOfDay`, remembered: a field asks for the same few hundred dates thousands of times. */
function rememberedDate(year: number, day: number): string {
  let dates = datesByYear.get(year);
  if (!dates) {
    dates = [];
    datesByYear.set(year, dates);
  }
  dates[day] ??= isoDateOfDay(year, day);
  return dates[day] as string;
}

export interface SeasonLineInput {
  climate: ClimateForPlace;
  relativeMaturity: number;
  /** ISO date, March to August. */
  plantingDate: string;
  parameters: SeasonParameters;
}

/**
 * The season line of one variety. Throws RangeError when the planting date is no date or outside March to August, or the
 * relative maturity is no number.
 */
export function seasonLine({ climate, relativeMaturity, plantingDate, parameters }: SeasonLineInput): SeasonLine {
  const plantingDay = dayOfYear(plantingDate);
  if (plantingDay < FIRST_GROWING_DAY || plantingDay > LAST_PLANTING_DAY) {
    throw new RangeError(`Planting date ${plantingDate} is outside March to August`);
  }
  if (!Number.isFinite(relativeMaturity)) throw new RangeError(`Relative maturity is not a number: ${relativeMaturity}`);
  const year = Number(plantingDate.slice(0, 4));
  const stages = stageDays(climate, coefficientsOf(relativeMaturity, parameters), plantingDay);
  const date = (day: number | null) => (day === null ? null : rememberedDate(year, day));
  return {
    planted: plantingDate,
    ve: date(stages.ve),
    r1: date(stages.r1),
    r3: date(stages.r3),
    r5: date(stages.r5),
    r6: date(stages.r6),
    r7: date(stages.r7),
    r8: date(stages.r8),
    freeze: {
      medianDate: rememberedDate(year, Math.round(climate.firstKillingFreezeDayOfYear)),
      ...freezeRisk(climate, stages),
    },
  };
}
