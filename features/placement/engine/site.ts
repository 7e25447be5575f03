/** One field in its season, worked out once and shared by every variety that is asked about. */
import type { ClimateForPlace, SeasonLine, SeasonParameters } from '@/features/placement/climate/model';
import { seasonLine } from '@/features/placement/climate/season-line';
import { dayOfYear, isoDateOfDay } from '@/lib/dates';
import { type Coefficients, coefficients } from './coefficients';
import { fullSeasonMaturity, latePlantingShift, lateRuleOf } from './maturity';
import type { FieldProfile, IsoDate, PlacementRules, SeasonContext } from './model';
import { clamp } from './numbers';
import { type Potential, potentialOf } from './potential';

export interface Site {
  field: FieldProfile;
  season: SeasonContext;
  rules: PlacementRules;
  c: Coefficients;
  potential: Potential;
  /** The field's planting date, or the one assumed when none is given. */
  plantingDate: IsoDate;
  plantingDay: number;
  plantingKnown: boolean;
  /** Row width, or `null` when unknown. */
  rowWidthInches: number | null;
  populationSeedsPerAcre: number;
  /** Optimum RM here and how unsure it is, RM. */
  optimum: number;
  optimumDeviation: number;
  /** Where the optimum comes from, in words. */
  optimumWords: string;
  /** Season line of an RM planted on the field's day, or on another. Kept ready between calls. */
  line(relativeMaturity: number, plantingDate?: IsoDate): SeasonLine;
  /** Value worked out at the first call under this key, and handed back at the next ones. */
  once<T>(key: string, make: (site: Site) => T): T;
}

/** First and last day on which the season line can start: March 1 and August 31. */
const FIRST_PLANTING_DAY = 60;
const LAST_PLANTING_DAY = 243;

const linesByClimate = new WeakMap<ClimateForPlace, Map<string, SeasonLine>>();

/**
 * The season line of an RM planted on a day, remembered for as long as the climate object lives. RM counts to 0.01.
 * Dates outside March to August are taken as the nearest day inside.
 */
export function rememberedLine(
  climate: ClimateForPlace,
  parameters: SeasonParameters,
  relativeMaturity: number,
  plantingDate: IsoDate,
): SeasonLine {
  let lines = linesByClimate.get(climate);
  if (!lines) {
    lines = new Map();
    linesByClimate.set(climate, lines);
  }
  const key = `${Math.round(relativeMaturity * 100)} ${plantingDate} ${parameters}`;
  let line = lines.get(key);
  if (!line) {
    line = seasonLine({ climate, relativeMaturity: Math.round(relativeMaturity * 100) / 100, plantingDate, parameters });
    lines.set(key, line);
  }
  return line;
}

/** Day of the year assumed for planting: after the median last frost, between April 20 and May 25. */
export function assumedPlantingDay(climate: ClimateForPlace, c: Coefficients): number {
  return Math.round(clamp(climate.lastSpringFrostDayOfYear + c.assumedPlantingAfterFrostDays, 110, 145));
}

/** Work out a site. Throws RangeError when the rules hold a coefficient out of range or the planting date is no date. */
export function siteOf(field: FieldProfile, season: SeasonContext, rules: PlacementRules): Site {
  const c = coefficients(rules.overrides);
  const wanted = field.plantingDate ? dayOfYear(field.plantingDate) : assumedPlantingDay(season.climate, c);
  const plantingDay = clamp(wanted, FIRST_PLANTING_DAY, LAST_PLANTING_DAY);
  const plantingDate =
    field.plantingDate && wanted === plantingDay
      ? field.plantingDate
      : isoDateOfDay(field.plantingDate ? Number(field.plantingDate.slice(0, 4)) : season.year, plantingDay);
  const { zone } = rules;
  const fullSeason = zone
    ? (zone.relativeMaturityFrom + zone.relativeMaturityTo) / 2
    : fullSeasonMaturity(field.latitude, field.longitude, field.elevationFt);
  const shift = latePlantingShift(lateRuleOf(field.state, field.latitude, field.longitude), plantingDay);
  const kept = new Map<string, unknown>();
  const lines = new Map<number, SeasonLine>();
  const lineOnTheDay = (relativeMaturity: number) => {
    let line = lines.get(relativeMaturity);
    if (!line) {
      line = rememberedLine(season.climate, season.parameters, relativeMaturity, plantingDate);
      lines.set(relativeMaturity, line);
    }
    return line;
  };
  const site: Site = {
    field,
    season,
    rules,
    c,
    potential: potentialOf(field, c),
    plantingDate,
    plantingDay,
    plantingKnown: field.plantingDate !== null,
    rowWidthInches: field.rowWidthInches,
    populationSeedsPerAcre: field.populationSeedsPerAcre ?? c.assumedPopulation,
    optimum: fullSeason + shift,
    optimumDeviation: zone ? c.maturityZoneDeviation : c.maturityTableDeviation,
    optimumWords: zone ? `zone ${zone.name}` : `latitude ${field.latitude.toFixed(1)}° N`,
    line: (relativeMaturity, date = plantingDate) =>
      date === plantingDate
        ? lineOnTheDay(relativeMaturity)
        : rememberedLine(season.climate, season.parameters, relativeMaturity, date),
    once: (key, make) => {
      if (!kept.has(key)) kept.set(key, make(site));
      return kept.get(key) as ReturnType<typeof make>;
    },
  };
  return site;
}
