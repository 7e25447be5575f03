/** A year's daily weather from a CSV file with the columns date, tmaxC, tminC. */
import { parse } from 'csv-parse/sync';
import { dayOfYear, isIsoDate, isoDateOfDay } from '@/lib/dates';
import type { Outcome, Problem } from '@/lib/errors';
import type { ClimateForPlace } from './model';

const COLUMNS = ['date', 'tmaxC', 'tminC'] as const;
/** 28 °F in °C: the killing freeze. */
const KILLING_FREEZE_C = -20 / 9;
/** Colder or hotter than the records of North America's farm country: a slip of the file, most likely °F. */
const LOWEST_C = -60;
const HIGHEST_C = 58;
const PROBLEMS_SHOWN = 20;
/** A season line needs the growing season; with less than this measured, the file is not a year's weather. */
const FEWEST_DAYS = 30;

interface Day {
  index: number;
  maximumC: number;
  minimumC: number;
}

export interface YearOfWeather {
  year: number;
  climate: ClimateForPlace;
}

/**
 * Reads a daily weather file of one year into a climate. Days that the file does not hold are taken from `normals` and noted.
 * When the file shows an autumn freeze (28 °F, July or later) that day is the freeze, with no year-to-year spread; otherwise
 * the normals' median and spread stand, the median moved past the file's last day when that is later. Fails, with a problem for each wrong row (the first 20), on missing columns, dates
 * that are no dates, more than one year, the same day twice, temperatures that are no numbers, beyond −60…58 °C or with the
 * minimum above the maximum, and under 30 days.
 */
export function climateFromDailyFile(text: string, normals: ClimateForPlace): Outcome<YearOfWeather> {
  let rows: Record<string, string>[];
  try {
    rows = parse(text, { columns: true, bom: true, trim: true, skip_empty_lines: true, relax_column_count: true });
  } catch (error) {
    return failed([
      { message: `The weather file is not a readable CSV: ${error instanceof Error ? error.message : 'unknown fault'}.` },
    ]);
  }
  const first = rows[0];
  if (!first)
    return failed([{ message: 'The weather file holds no days. It needs a header date,tmaxC,tminC and a line for each day.' }]);
  const missing = COLUMNS.filter((column) => !(column in first));
  if (missing.length > 0) {
    return failed([
      { message: `The weather file lacks the column ${missing.join(' and ')}. Its header must be date,tmaxC,tminC, in °C.` },
    ]);
  }
  const { days, year, problems } = readDays(rows);
  if (problems.length > 0 || year === null) return failed(problems);
  if (days.size < FEWEST_DAYS) {
    return failed([{ message: `The weather file holds ${days.size} days; at least ${FEWEST_DAYS} of one year are needed.` }]);
  }
  return fromDays(days, year, normals);
}

function failed(problems: Problem[]): Outcome<YearOfWeather> {
  const rest = problems.length - PROBLEMS_SHOWN;
  return {
    ok: false,
    problems: rest > 0 ? [...problems.slice(0, PROBLEMS_SHOWN), { message: `${rest} more rows are wrong.` }] : problems,
  };
}

function readDays(rows: Record<string, string>[]): { days: Map<number, Day>; year: number | null; problems: Problem[] } {
  const problems: Problem[] = [];
  const days = new Map<number, Day>();
  let year: number | null = null;
  for (const [position, row] of rows.entries()) {
    const read = readDay(row, year, days);
    // The header is row 1.
    if (typeof read === 'string') problems.push({ message: `Row ${position + 2}: ${read}`, path: `row ${position + 2}` });
    else {
      year ??= Number((row.date ?? '').slice(0, 4));
      days.set(read.index, read);
    }
  }
  return { days, year, problems };
}

/** One day, or what is wrong with the row. */
function readDay(row: Record<string, string>, year: number | null, days: Map<number, Day>): Day | string {
  const date = row.date ?? '';
  if (!isIsoDate(date)) return `"${date}" is not a date written YYYY-MM-DD.`;
  if (year !== null && Number(date.slice(0, 4)) !== year) return `${date} is not in ${year}; one file holds one year.`;
  const maximumC = row.tmaxC === '' ? Number.NaN : Number(row.tmaxC);
  const minimumC = row.tminC === '' ? Number.NaN : Number(row.tminC);
  if (!Number.isFinite(maximumC)) return `tmaxC "${row.tmaxC ?? ''}" is not a number.`;
  if (!Number.isFinite(minimumC)) return `tminC "${row.tminC ?? ''}" is not a number.`;
  if (minimumC > maximumC) return `tminC ${minimumC} is above tmaxC ${maximumC}.`;
  if (minimumC < LOWEST_C || maximumC > HIGHEST_C) return `${minimumC} to ${maximumC} °C cannot be; are these °F?`;
  const index = dayOfYear(date) - 1;
  if (days.has(index)) return `${date} stands twice.`;
  return { index, maximumC, minimumC };
}

function fromDays(days: Map<number, Day>, year: number, normals: ClimateForPlace): Outcome<YearOfWeather> {
  const length = new Date(Date.UTC(year, 1, 29)).getUTCMonth() === 1 ? 366 : 365;
  const dailyMaximumC: number[] = [];
  const dailyMinimumC: number[] = [];
  let filled = 0;
  let freezeDay: number | null = null;
  let lastFrostDay: number | null = null;
  for (let index = 0; index < length; index++) {
    const day = days.get(index);
    const normalIndex = Math.min(index, normals.dailyMaximumC.length - 1);
    if (!day) filled++;
    dailyMaximumC.push(day ? day.maximumC : (normals.dailyMaximumC[normalIndex] as number));
    dailyMinimumC.push(day ? day.minimumC : (normals.dailyMinimumC[normalIndex] as number));
    if (!day) continue;
    if (index >= 181 && freezeDay === null && day.minimumC <= KILLING_FREEZE_C) freezeDay = index + 1;
    if (index < 181 && day.minimumC <= 0) lastFrostDay = index + 1;
  }
  const notes: string[] = [];
  if (filled > 0) notes.push(`${filled} days of ${year} are not in the file and were taken from the place's normals.`);
  notes.push(
    freezeDay === null
      ? `The file shows no day at or below 28 °F from July on; the normals' freeze date and spread stand.`
      : `First day at or below 28 °F in the file: ${isoDateOfDay(year, freezeDay)}.`,
  );
  return {
    ok: true,
    value: {
      year,
      climate: {
        ...normals,
        dailyMaximumC,
        dailyMinimumC,
        firstKillingFreezeDayOfYear: freezeDay ?? Math.max(normals.firstKillingFreezeDayOfYear, Math.max(...days.keys()) + 2),
        freezeStandardDeviationDays: freezeDay === null ? normals.freezeStandardDeviationDays : 0,
        lastSpringFrostDayOfYear: lastFrostDay ?? normals.lastSpringFrostDayOfYear,
        source: 'daily file',
      },
    },
    notes,
  };
}
