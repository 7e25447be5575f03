/** Cells of laboratory sheets as values: numbers, depths, dates and places as people write them. Pure. */
import { isIsoDate } from '@/lib/dates';
import { CENTIMETERS_PER_INCH } from '@/lib/units';

const EMPTY =
  /^(|-+|–|—|\.+|n\.?\/?a\.?|#n\/a|#value!|#div\/0!|nan|nd|n\.d\.|ns|null|none|nil|not (tested|analyzed|analysed|run|requested|measured|available)|missing|\?|\*+|b\.?d\.?l\.?)$/i;
/** Numbers that stand for "not measured" in exports of maps. */
const SENTINELS = new Set([-9999, -999, -99, -32768, -1e30]);
const RATING =
  /^(vl|l|m|h|vh|e|very low|low|medium|med|moderate|optimum|opt|adequate|high|very high|slight|strong|present|absent|yes|no|none|trace|excessive)$/i;

export type NumberCell =
  | { kind: 'number'; value: number; limit: 'below' | 'above' | null }
  | { kind: 'empty' }
  | { kind: 'rating'; text: string }
  | { kind: 'wrong'; text: string };

/** A number as a sheet has it: "<0.1", "6.5*", "23 VL", "1,234", "6,5". A limit is read as the limit. */
export function numberCell(raw: string): NumberCell {
  const text = raw.replace(/\u00a0/g, ' ').trim();
  if (EMPTY.test(text)) return { kind: 'empty' };
  if (RATING.test(text)) return { kind: 'rating', text };
  const match =
    /^([<>≤≥]=?|less than|greater than)?\s*([-+−]?(?:\d[\d,]*\.?\d*|\.\d+)(?:e[-+]?\d+)?)\s*(%|ppm|lbs?(?:\/a(?:c(?:re)?)?)?|meq\/100 ?g|mg\/kg|ds\/m|mmhos?\/cm)?\s*(vl|l|m|h|vh|e)?\*{0,3}$/i.exec(
      text,
    );
  if (!match) return { kind: 'wrong', text: text.slice(0, 60) };
  const digits = (match[2] as string).replace('−', '-');
  const value = Number(separated(digits));
  if (!Number.isFinite(value)) return { kind: 'wrong', text: text.slice(0, 60) };
  if (SENTINELS.has(value)) return { kind: 'empty' };
  const sign = match[1]?.toLowerCase();
  return { kind: 'number', value, limit: !sign ? null : /^[<≤l]/.test(sign) ? 'below' : 'above' };
}

/** Commas are thousands when they stand in threes ("1,234"), a decimal sign when there is one only ("6,5"). */
function separated(digits: string): string {
  if (!digits.includes(',')) return digits;
  if (/^[-+]?\d{1,3}(,\d{3})+(\.\d*)?$/.test(digits)) return digits.replaceAll(',', '');
  return /^[-+]?\d+,\d+$/.test(digits) ? digits.replace(',', '.') : 'NaN';
}

/** "0 - 8 in", "0–20 cm", "6\"", "0 to 6" → inches from and to; `null` when it is no depth. */
export function depthCell(raw: string, headerUnit: string | null): [number, number] | null {
  const text = raw.replace(/[–—−]/g, '-').trim().toLowerCase();
  const found = [...text.matchAll(/\d+(?:\.\d+)?/g)].map((match) => Number(match[0]));
  if (found.length === 0 || found.length > 2 || /[a-z]{8,}/.test(text.replace(/inches|centimet/g, ''))) return null;
  const inCentimeters = /\d\s*cm|centimet|\d\s*cms/.test(text) || (headerUnit === 'cm' && !/in|"/.test(text));
  const toInches = (value: number) => (inCentimeters ? Math.round((value / CENTIMETERS_PER_INCH) * 100) / 100 : value);
  const [first, second] = found as [number, number | undefined];
  const from = second === undefined ? 0 : toInches(first);
  const to = toInches(second ?? first);
  return to > from && to <= 240 ? [from, to] : null;
}

const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

function iso(year: number, month: number, day: number): string | null {
  const full = year < 100 ? (year > 69 ? 1900 + year : 2000 + year) : year;
  const text = `${String(full).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(day).padStart(2, '0')}`;
  return full >= 1950 && full <= 2100 && isIsoDate(text) ? text : null;
}

/** A date as sheets have it: 2026-10-01, 10/1/2026 (month first, as the trade writes it), 1-Oct-26, a year alone. */
export function dateCell(raw: string): { date: string; yearOnly: boolean } | null {
  const text = raw.trim();
  const whole = (date: string | null) => (date ? { date, yearOnly: false } : null);
  if (/^(19|20)\d{2}$/.test(text)) return { date: `${text}-01-01`, yearOnly: true };
  let match = /^(\d{4})[-/.](\d{1,2})[-/.](\d{1,2})(?:[T ].*)?$/.exec(text);
  if (match) return whole(iso(Number(match[1]), Number(match[2]), Number(match[3])));
  match = /^((?:19|20)\d{2})(\d{2})(\d{2})$/.exec(text);
  if (match) return whole(iso(Number(match[1]), Number(match[2]), Number(match[3])));
  match = /^(\d{1,2})[-/.](\d{1,2})[-/.](\d{2}|\d{4})(?:[T ].*)?$/.exec(text);
  if (match) {
    const [first, second, year] = [Number(match[1]), Number(match[2]), Number(match[3])];
    // A first number above twelve can only be the day.
    return whole(first > 12 ? iso(year, second, first) : iso(year, first, second));
  }
  match = /^(\d{1,2})[-\s/]?([a-z]{3})[a-z]*\.?[-\s/,]*(\d{2}|\d{4})$/i.exec(text);
  if (match) return whole(iso(Number(match[3]), MONTHS.indexOf((match[2] as string).toLowerCase()) + 1, Number(match[1])));
  match = /^([a-z]{3})[a-z]*\.?\s+(\d{1,2})(?:st|nd|rd|th)?,?\s+(\d{2}|\d{4})$/i.exec(text);
  if (match) return whole(iso(Number(match[3]), MONTHS.indexOf((match[1] as string).toLowerCase()) + 1, Number(match[2])));
  // Days since the end of 1899, as a spreadsheet stores a date whose format was lost.
  if (/^\d{5}(\.\d+)?$/.test(text)) {
    const serial = Math.floor(Number(text));
    if (serial > 25_569 && serial < 73_000) return whole(new Date((serial - 25_569) * 86_400_000).toISOString().slice(0, 10));
  }
  return null;
}

/** An angle: decimal degrees, or degrees, minutes and seconds with any signs and a letter at either end. */
export function angleCell(raw: string): number | null {
  const text = raw
    .trim()
    .replace('−', '-')
    .replace(/,(?=\d)/, '.');
  if (/^[-+]?\d+(\.\d+)?(e[-+]?\d+)?$/i.test(text)) return Number(text);
  const letters = /^([nsew])?\s*(.*?)\s*([nsew])?$/i.exec(text);
  const letter = (letters?.[1] ?? letters?.[3] ?? '').toUpperCase();
  const parts = (letters?.[2] ?? '').split(/[°ºd:'’′"”″ms\s]+/i).filter((part) => part !== '');
  if (
    parts.length < 1 ||
    parts.length > 3 ||
    parts.some((part, index) => !(index === 0 ? /^[-+]?\d+(\.\d+)?$/ : /^\d+(\.\d+)?$/).test(part))
  )
    return null;
  const [degrees, minutes = 0, seconds = 0] = parts.map(Number) as [number, number?, number?];
  if (minutes >= 60 || seconds >= 60) return null;
  const size = Math.abs(degrees) + minutes / 60 + seconds / 3600;
  const negative = degrees < 0 || (parts[0] as string).startsWith('-') || letter === 'S' || letter === 'W';
  return negative ? -size : size;
}

/** Latitude and longitude in one cell: "42.03, -93.62", "POINT (-93.62 42.03)", "42°1'48\"N 93°37'12\"W". */
export function placeCell(raw: string): { latitude: number; longitude: number } | null {
  const point = /point\s*z?m?\s*\(\s*(-?[\d.]+)[\s,]+(-?[\d.]+)/i.exec(raw);
  if (point) return { longitude: Number(point[1]), latitude: Number(point[2]) };
  const text = raw.trim().replace(/^[([]|[)\]]$/g, '');
  const lettered = /^(.+?[ns])[\s,;]+(.+?[ew])$/i.exec(text) ?? /^([ns]\s*.+?)[\s,;]+([ew]\s*.+)$/i.exec(text);
  const parts = lettered ? [lettered[1], lettered[2]] : text.split(/\s*[,;]\s*|\s+/);
  if (parts.length !== 2) return null;
  const latitude = angleCell(parts[0] as string);
  const longitude = angleCell(parts[1] as string);
  return latitude === null || longitude === null ? null : { latitude, longitude };
}
