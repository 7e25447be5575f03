/**
 * Extra climate stations from NOAA's normals files, as NCEI publishes them: a CSV with STATION, NAME, LATITUDE, LONGITUDE,
 * ELEVATION (metres) and normals columns; twelve rows a station in the monthly product, one in the annual and seasonal one.
 * Files may be given together, and are joined by station. Flag columns (meas_flag_…, comp_flag_…, years_…) are passed over.
 */
import { parse } from 'csv-parse/sync';
import type { Outcome, Problem } from '@/lib/errors';
import { METERS_PER_FOOT } from '@/lib/units';
import type { Station } from './normals';

/** NCEI writes −9999 for missing, −7777 for a value that rounds to nothing, −8888 and −6666 for not computed. */
const MISSING_BELOW = -1000;
const MONTH_STARTS = [0, 31, 59, 90, 120, 151, 181, 212, 243, 273, 304, 334];
const WANTED = ['STATION', 'NAME', 'LATITUDE', 'LONGITUDE', 'ELEVATION'];

type Row = Record<string, string>;

interface Draft {
  id: string;
  head: Row;
  maximum: (number | null)[];
  minimum: (number | null)[];
  dates: Record<string, number | null>;
}

const DATE_COLUMNS = {
  lastSpringFrostDayOfYear: 'ANN-TMIN-PRBLST-T32FP50',
  firstAutumnFrostDayOfYear: 'ANN-TMIN-PRBFST-T32FP50',
  lastSpringFreezeDayOfYear: 'ANN-TMIN-PRBLST-T28FP50',
  firstKillingFreezeDayOfYear: 'ANN-TMIN-PRBFST-T28FP50',
} as const;

/** A normals value; `null` for blank, text, or one of NCEI's codes for missing. */
function numberOf(text: string | undefined): number | null {
  if (text === undefined || text.trim() === '') return null;
  const value = Number(text);
  return Number.isFinite(value) && value > MISSING_BELOW ? value : null;
}

/** `10/22` → 295, a day of a 365-day year; `null` for anything else. */
function dayOfMonthAndDay(text: string | undefined): number | null {
  const match = /^\s*(\d{1,2})\/(\d{1,2})\s*$/.exec(text ?? '');
  const start = match ? MONTH_STARTS[Number(match[1]) - 1] : undefined;
  const day = match ? Number(match[2]) : 0;
  return start === undefined || day < 1 || day > 31 ? null : start + day;
}

/** Month 0…11 of a monthly row: its `month` column, or DATE as `01`, `1` or `2010-01`. */
function monthOf(row: Row): number | null {
  const text = row.MONTH ?? row.DATE ?? '';
  const month = Number(/(\d{1,2})\s*$/.exec(text)?.[1] ?? Number.NaN);
  return month >= 1 && month <= 12 ? month - 1 : null;
}

/**
 * Reads one or more NOAA normals CSV files. Succeeds with the whole stations and a note for each station left out (fewer than
 * twelve months of either temperature, no position) or without freeze dates; fails when no station is whole.
 */
export function stationsFromNormalsFiles(texts: readonly string[]): Outcome<Station[]> {
  const drafts = new Map<string, Draft>();
  const problems: Problem[] = [];
  texts.forEach((text, index) => {
    const name = texts.length > 1 ? `File ${index + 1}` : 'The file';
    let rows: Row[];
    try {
      rows = parse(text, {
        columns: (header: string[]) => header.map((column) => column.trim().toUpperCase()),
        bom: true,
        trim: true,
        skip_empty_lines: true,
        relax_column_count: true,
      });
    } catch (error) {
      problems.push({ message: `${name} is not a readable CSV: ${error instanceof Error ? error.message : 'unknown fault'}.` });
      return;
    }
    const columns = Object.keys(rows[0] ?? {});
    if (!columns.includes('STATION') || !columns.some((column) => /^(MLY|ANN)-TM(AX|IN)-/.test(column))) {
      problems.push({
        message: `${name} is not a NOAA normals CSV: it needs STATION and MLY-TMAX-NORMAL, MLY-TMIN-NORMAL or ANN-TMIN-PRBFST-T28FP50.`,
      });
      return;
    }
    for (const row of rows) take(row, drafts);
  });
  const notes: string[] = [];
  const stations = [...drafts.values()].flatMap((draft) => finish(draft, notes));
  if (stations.length === 0) return { ok: false, problems: [...problems, ...notes.map((message) => ({ message }))] };
  return { ok: true, value: stations, notes: [...problems.map((problem) => problem.message), ...notes] };
}

function take(row: Row, drafts: Map<string, Draft>): void {
  const id = row.STATION?.trim();
  if (!id) return;
  const draft: Draft = drafts.get(id) ?? {
    id,
    head: {},
    maximum: new Array(12).fill(null),
    minimum: new Array(12).fill(null),
    dates: {},
  };
  drafts.set(id, draft);
  for (const column of WANTED) if (row[column]) draft.head[column] = row[column];
  const month = monthOf(row);
  if (month !== null) {
    draft.maximum[month] = numberOf(row['MLY-TMAX-NORMAL']) ?? draft.maximum[month] ?? null;
    draft.minimum[month] = numberOf(row['MLY-TMIN-NORMAL']) ?? draft.minimum[month] ?? null;
  }
  for (const [key, column] of Object.entries(DATE_COLUMNS))
    draft.dates[key] = dayOfMonthAndDay(row[column]) ?? draft.dates[key] ?? null;
}

function finish(draft: Draft, notes: string[]): Station[] {
  const latitude = numberOf(draft.head.LATITUDE);
  const longitude = numberOf(draft.head.LONGITUDE);
  const elevationMeters = numberOf(draft.head.ELEVATION);
  const name = draft.head.NAME || draft.id;
  if (
    latitude === null ||
    longitude === null ||
    elevationMeters === null ||
    Math.abs(latitude) > 90 ||
    Math.abs(longitude) > 180
  ) {
    notes.push(`${name} was left out: it has no latitude, longitude or elevation.`);
    return [];
  }
  const months = draft.maximum.filter((value, month) => value !== null && draft.minimum[month] !== null).length;
  if (months < 12) {
    notes.push(`${name} was left out: ${months} of 12 months have both temperatures. Give the monthly file too.`);
    return [];
  }
  const date = (key: keyof typeof DATE_COLUMNS) => draft.dates[key] ?? null;
  if (date('firstKillingFreezeDayOfYear') === null) {
    notes.push(`${name} has no 28 °F date: freeze dates nearby come from the other stations. Give the annual file too.`);
  }
  return [
    {
      id: draft.id,
      name,
      latitude,
      longitude,
      elevationFt: elevationMeters / METERS_PER_FOOT,
      lastSpringFrostDayOfYear: date('lastSpringFrostDayOfYear'),
      firstAutumnFrostDayOfYear: date('firstAutumnFrostDayOfYear'),
      lastSpringFreezeDayOfYear: date('lastSpringFreezeDayOfYear'),
      firstKillingFreezeDayOfYear: date('firstKillingFreezeDayOfYear'),
      monthlyMaximumF: draft.maximum as number[],
      monthlyMinimumF: draft.minimum as number[],
    },
  ];
}
