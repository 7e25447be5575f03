/** Dates of the season: ISO calendar dates without time or zone, counted in UTC so that no clock can shift them. */

const DAY_MILLISECONDS = 86_400_000;
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;

/** Day of year (January 1 = 1) of an ISO date. Throws RangeError when the text is not a date. */
export function dayOfYear(isoDate: string): number {
  const time = Date.parse(`${isoDate}T00:00:00Z`);
  if (Number.isNaN(time)) throw new RangeError(`Not an ISO date: ${isoDate}`);
  return Math.round((time - Date.UTC(Number(isoDate.slice(0, 4)), 0, 1)) / DAY_MILLISECONDS) + 1;
}

/** ISO date of a day of year (January 1 = 1; fractions are cut; days past the year's end run into the next). */
export function isoDateOfDay(year: number, day: number): string {
  return new Date(Date.UTC(year, 0, 1) + (Math.floor(day) - 1) * DAY_MILLISECONDS).toISOString().slice(0, 10);
}

/** Is this text a real calendar date written YYYY-MM-DD? */
export function isIsoDate(text: string): boolean {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(text)) return false;
  const time = Date.parse(`${text}T00:00:00Z`);
  return !Number.isNaN(time) && new Date(time).toISOString().slice(0, 10) === text;
}

/** `8 May`. */
export function formatDay(isoDate: string | null | undefined): string {
  if (!isoDate) return '—';
  return `${Number(isoDate.slice(8, 10))} ${MONTHS[Number(isoDate.slice(5, 7)) - 1]}`;
}

/** `8 May 2027`. */
export function formatDate(isoDate: string | null | undefined): string {
  return isoDate ? `${formatDay(isoDate)} ${isoDate.slice(0, 4)}` : '—';
}

/** A moment (milliseconds) as `8 May 2027, 14:05` in UTC. */
export function formatMoment(milliseconds: number | null | undefined): string {
  if (milliseconds === null || milliseconds === undefined) return '—';
  const iso = new Date(milliseconds).toISOString();
  return `${formatDate(iso.slice(0, 10))}, ${iso.slice(11, 16)} UTC`;
}
