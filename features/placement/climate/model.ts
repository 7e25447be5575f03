/** What the climate side hands to the engine: the year's weather at one place, and when a freeze comes. Temperatures in °C. */

/** `published`: CROPGRO-Soybean phase lengths as printed. `current`: SD-PM raised for modern varieties (the default). */
export type SeasonParameters = 'published' | 'current';

export interface StationUsed {
  id: string;
  name: string;
  distanceMiles: number;
  weight: number;
}

/** Weather of one place for one year, by day of year: index 0 is January 1, 365 long (366 in a leap year). */
export interface ClimateForPlace {
  latitude: number;
  longitude: number;
  elevationFt: number | null;
  dailyMaximumC: number[];
  dailyMinimumC: number[];
  /** Median day of year of the first autumn day at or below 28 °F, and the year-to-year standard deviation in days. */
  firstKillingFreezeDayOfYear: number;
  freezeStandardDeviationDays: number;
  /** Median day of year of the last spring 32 °F, for early planting. */
  lastSpringFrostDayOfYear: number;
  stations: StationUsed[];
  /** 'normals' or the year of a daily weather file. */
  source: 'normals' | 'daily file';
}

/** Stages of one variety planted on one date; ISO dates, `null` when the season ends before the stage is reached. */
export interface SeasonLine {
  planted: string;
  ve: string | null;
  r1: string | null;
  r3: string | null;
  r5: string | null;
  r6: string | null;
  r7: string | null;
  r8: string | null;
  freeze: {
    medianDate: string;
    chanceBeforeR7: number;
    /** Expected loss over the joint spread of freeze date and stage, 0..1. */
    expectedLossFraction: number;
  };
}
