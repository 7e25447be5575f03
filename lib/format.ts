/** How numbers look everywhere: minus is −, ranges use –, always with the unit. `null` is an em dash. */

const DASH = '—';

function grouped(value: number, digits: number): string {
  return value.toLocaleString('en-US', { minimumFractionDigits: digits, maximumFractionDigits: digits }).replace('-', '−');
}

/** A number with a fixed count of decimals, thousands grouped, true minus. */
export function formatNumber(value: number | null | undefined, digits = 0): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return DASH;
  const rounded = Number(value.toFixed(digits));
  return grouped(Object.is(rounded, -0) ? 0 : rounded, digits);
}

/** Acres: 0.1 in lists, 0.01 on the field itself. */
export function formatAcres(acres: number | null | undefined, digits: 1 | 2 = 1): string {
  return formatNumber(acres, digits);
}

/** Bushels per acre to 0.1. */
export function formatBushels(bushels: number | null | undefined): string {
  return formatNumber(bushels, 1);
}

/** A range of bushels in whole numbers, `56–62`. */
export function formatBand(low: number, high: number): string {
  return `${formatNumber(low)}–${formatNumber(high)}`;
}

/** Relative maturity or pH to 0.1. */
export function formatTenth(value: number | null | undefined): string {
  return formatNumber(value, 1);
}

/** A fraction as whole percent, `38 %`. */
export function formatPercent(fraction: number | null | undefined, digits = 0): string {
  return fraction === null || fraction === undefined ? DASH : `${formatNumber(fraction * 100, digits)} %`;
}

/** Cents as dollars. */
export function formatDollars(cents: number | null | undefined, digits: 0 | 2 = 0): string {
  return cents === null || cents === undefined ? DASH : `$${formatNumber(cents / 100, digits)}`;
}
