import { parseRelativeMaturity } from '@/features/line-up/cells';
import { climateFromDailyFile } from '@/features/placement/climate/daily-file';
import { climateForPlace } from '@/features/placement/climate/place';
import { seasonLine } from '@/features/placement/climate/season-line';
import { dayOfYear, isIsoDate } from '@/lib/dates';
import {
  type Command,
  needed,
  neededNumber,
  optional,
  optionalNumber,
  optionalWord,
  parseOptions,
  readText,
  refuse,
} from './command';

/** Farther from every station than this, an estimate is a guess. */
const FARTHEST_STATION_MILES = 300;
const FIRST_PLANTING_DAY = 60;
const LAST_PLANTING_DAY = 243;

function maturityOf(text: string): number {
  const value = /^-/.test(text) ? Number(text) : parseRelativeMaturity(text);
  if (value === null || !Number.isFinite(value) || value < -2 || value > 10) {
    return refuse(`--rm "${text}" is not a relative maturity. Write one like 2.4, or 00.7 for the earliest groups.`);
  }
  return value;
}

export const seasonLineCommand: Command = {
  summary: 'stages of a variety at a place, and what a freeze would cost',
  usage: `hilum season-line --lat N --lon N --rm RM --planted DATE [--elevation-ft N] [--weather CSV] [--parameters published|current]

  --lat, --lon       the place, degrees; west is negative
  --rm               relative maturity, e.g. 2.4 (earliest groups like 00.7)
  --planted          planting date, YYYY-MM-DD, March to August
  --elevation-ft     elevation of the field; stations are corrected to it
  --weather          daily weather of the planting year: CSV with date,tmaxC,tminC
  --parameters       current (default): modern varieties; published: the coefficients as printed

Prints {ve,r1,r3,r5,r6,r7,r8,freeze:{medianDate,chanceBeforeR7,expectedLossFraction},stations:[…]}.`,
  async run(argv) {
    const parsed = parseOptions(argv, {
      lat: { type: 'string' },
      lon: { type: 'string' },
      rm: { type: 'string' },
      planted: { type: 'string' },
      'elevation-ft': { type: 'string' },
      weather: { type: 'string' },
      parameters: { type: 'string' },
    });
    const latitude = neededNumber(parsed, 'lat', -90, 90);
    const longitude = neededNumber(parsed, 'lon', -180, 180);
    const relativeMaturity = maturityOf(needed(parsed, 'rm'));
    const plantingDate = needed(parsed, 'planted');
    if (!isIsoDate(plantingDate)) refuse(`--planted "${plantingDate}" is not a date written YYYY-MM-DD.`);
    const plantingDay = dayOfYear(plantingDate);
    if (plantingDay < FIRST_PLANTING_DAY || plantingDay > LAST_PLANTING_DAY) {
      refuse(`--planted ${plantingDate} is outside March to August; no soybean is planted then.`);
    }
    const elevationFt = optionalNumber(parsed, 'elevation-ft', -300, 10_000);
    const parameters = optionalWord(parsed, 'parameters', ['published', 'current'] as const) ?? 'current';

    const normals = climateForPlace({
      latitude,
      longitude,
      elevationFt,
      // The printed coefficients were run on straight lines between mid-month normals; so that they come out as printed.
      interpolation: parameters === 'published' ? 'mid-month' : 'month means',
    });
    const nearest = normals.stations[0]?.distanceMiles ?? Infinity;
    if (nearest > FARTHEST_STATION_MILES) {
      refuse(
        `The nearest climate station to ${latitude}, ${longitude} is ${Math.round(nearest)} miles away. Longitudes west are negative.`,
      );
    }
    let climate = normals;
    let notes: string[] | undefined;
    const weather = optional(parsed, 'weather');
    if (weather !== null) {
      const outcome = climateFromDailyFile(await readText(weather), normals);
      if (!outcome.ok) return refuse(...outcome.problems.map((problem) => problem.message));
      const year = Number(plantingDate.slice(0, 4));
      if (outcome.value.year !== year)
        refuse(`${weather} holds the weather of ${outcome.value.year}, but --planted is in ${year}.`);
      climate = outcome.value.climate;
      notes = outcome.notes;
    }
    const { planted: _, ...line } = seasonLine({ climate, relativeMaturity, plantingDate, parameters });
    return { value: { ...line, stations: climate.stations }, notes };
  },
};
