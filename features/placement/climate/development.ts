/**
 * Daily development rates: how far a soybean gets in a day at given temperatures and day length, 0…1 of the fastest.
 *
 * Source: CROPGRO-Soybean, Plant/CROPGRO/PHENOL.for (DSSAT Foundation, dssat-csm-os, commit 57a13f8f). Hourly temperatures:
 * Parton & Logan 1981, Agricultural Meteorology 23:205-216, with DSSAT's constants.
 */
import { dayLengthHours } from './day-length';
import type { ClimateForPlace } from './model';
import { type CardinalTemperatures, EARLY_REPRODUCTIVE, LATE_REPRODUCTIVE, VEGETATIVE } from './phenology-table';

/** Trapezoid response, 0…1, to a temperature in °C. */
export function temperatureResponse(temperatureC: number, cardinal: CardinalTemperatures): number {
  const { base, optimumFrom, optimumTo, ceiling } = cardinal;
  if (temperatureC <= base || temperatureC >= ceiling) return 0;
  if (temperatureC < optimumFrom) return (temperatureC - base) / (optimumFrom - base);
  if (temperatureC <= optimumTo) return 1;
  return (ceiling - temperatureC) / (ceiling - optimumTo);
}

/** Photoperiod response, 0…1: full at and below `shortHours`, none at and above `longHours`, linear between (THVAR 0). */
export function photoperiodResponse(dayLength: number, shortHours: number, longHours: number): number {
  if (dayLength <= shortHours) return 1;
  if (dayLength >= longHours) return 0;
  return 1 - (dayLength - shortHours) / (longHours - shortHours);
}

/** Slowing of progress to first flower by cool nights, 0…1; `minimumC` is the night's low in °C. */
export function coolNightResponse(minimumC: number, baseC: number, slopePerC: number): number {
  if (minimumC >= baseC) return 1;
  return Math.max(0, Math.min(1, 1 - slopePerC * (baseC - minimumC)));
}

/** Hours from solar noon + day length / 2 to the warmest hour; night decay; hours from sunrise to the coldest (DSSAT HTEMP). */
const WARMEST_AFTER_MIDDAY_HOURS = 2;
const NIGHT_DECAY = 2.2;
const COLDEST_AFTER_SUNRISE_HOURS = 1;

/** The temperatures of 24 hours, °C, from a day's maximum and minimum and its day length: a sine by day, a decay by night. */
export function hourlyTemperatures(
  maximumC: number,
  minimumC: number,
  dayLength: number,
  into = new Float64Array(24),
): Float64Array {
  const sunrise = 12 - dayLength / 2;
  const sunset = 12 + dayLength / 2;
  const coldest = sunrise + COLDEST_AFTER_SUNRISE_HOURS;
  const warmest = coldest + dayLength / 2 + WARMEST_AFTER_MIDDAY_HOURS;
  const range = maximumC - minimumC;
  const phase = Math.PI / 2 / (warmest - coldest);
  const atSunset = minimumC + range * Math.sin(phase * (sunset - coldest));
  const decayed = Math.exp(-NIGHT_DECAY);
  const floor = (minimumC - atSunset * decayed) / (1 - decayed);
  const nightHours = 24 + COLDEST_AFTER_SUNRISE_HOURS - dayLength;
  for (let index = 0; index < 24; index++) {
    const hour = index + 1;
    if (hour >= coldest && hour <= sunset) into[index] = minimumC + range * Math.sin(phase * (hour - coldest));
    else {
      const sinceSunset = hour < coldest ? 24 + hour - sunset : hour - sunset;
      into[index] = floor + (atSunset - floor) * Math.exp((-NIGHT_DECAY * sinceSunset) / nightHours);
    }
  }
  return into;
}

/** Day length and temperature responses of a place's days. Index 0 is January 1. */
export interface DailyRates {
  dayLength: Float64Array;
  vegetative: Float64Array;
  earlyReproductive: Float64Array;
  lateReproductive: Float64Array;
}

const ratesOfClimate = new WeakMap<ClimateForPlace, DailyRates>();
/** Growing days: nothing planted before March 1 (day 60) is run, and responses in the dead of winter cost time. */
export const FIRST_GROWING_DAY = 60;

/** Daily rates of a climate, worked out once and shared by every variety and planting date. */
export function dailyRates(climate: ClimateForPlace): DailyRates {
  const known = ratesOfClimate.get(climate);
  if (known) return known;
  const days = climate.dailyMaximumC.length;
  const rates: DailyRates = {
    dayLength: new Float64Array(days),
    vegetative: new Float64Array(days),
    earlyReproductive: new Float64Array(days),
    lateReproductive: new Float64Array(days),
  };
  const hours = new Float64Array(24);
  for (let day = FIRST_GROWING_DAY - 1; day < days; day++) {
    const maximum = climate.dailyMaximumC[day] as number;
    const minimum = climate.dailyMinimumC[day] as number;
    const dayLength = dayLengthHours(climate.latitude, day + 1);
    hourlyTemperatures(maximum, minimum, dayLength, hours);
    let early = 0;
    let late = 0;
    for (let hour = 0; hour < 24; hour++) {
      early += temperatureResponse(hours[hour] as number, EARLY_REPRODUCTIVE);
      late += temperatureResponse(hours[hour] as number, LATE_REPRODUCTIVE);
    }
    rates.dayLength[day] = dayLength;
    // Emergence runs on the temperature of the top 10 cm of soil, for which the day's mean air temperature stands in.
    rates.vegetative[day] = temperatureResponse((maximum + minimum) / 2, VEGETATIVE);
    rates.earlyReproductive[day] = early / 24;
    rates.lateReproductive[day] = late / 24;
  }
  ratesOfClimate.set(climate, rates);
  return rates;
}
