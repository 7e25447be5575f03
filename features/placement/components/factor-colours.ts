import type { FactorId } from '../engine/model';

/** One colour per factor everywhere: bar, ledger, compare, plan, PDF. Every colour stands beside its factor's name. */
export const FACTOR_COLOURS: Record<FactorId | 'gathered' | 'trial', string> = {
  'maturity-zone': '#6f7fa8',
  freeze: '#9db0d3',
  'soil-ph': '#c08a2b',
  'wet-feet': '#a4452c',
  compaction: '#7d5a3c',
  'row-width': '#b79ad9',
  standability: '#5d8a86',
  height: '#8fb3a8',
  emergence: '#d98c5f',
  'cyst-nematode': '#8c2f4a',
  'sudden-death': '#d1655a',
  'brown-stem-rot': '#6b3d2e',
  'white-mould': '#b8b3a6',
  frogeye: '#9a8f3c',
  'stem-canker': '#a8577e',
  'charcoal-rot': '#3d3a38',
  drought: '#e0bf5c',
  'planting-date': '#4f7fa3',
  'must-be-off-by': '#7f9c4f',
  'weed-programme': '#5b3a86',
  gathered: '#cfc5b1',
  trial: '#3f6f4a',
};

/** Colours of picks on the map, in the order varieties appear; a label on each field says the same. */
export const PICK_COLOURS = [
  '#cbb7e4',
  '#bcd6bb',
  '#f0d59a',
  '#e6b7a5',
  '#b9c6e0',
  '#d9d2a3',
  '#c7dfe0',
  '#e3c3d6',
  '#d8c3a5',
  '#bfcfa6',
] as const;

/** Colours by variety code, the most used first so that neighbours in the list differ. */
export function pickColours(codes: readonly string[]): Map<string, string> {
  const counts = new Map<string, number>();
  for (const code of codes) counts.set(code, (counts.get(code) ?? 0) + 1);
  const order = [...counts].sort((one, other) => other[1] - one[1] || (one[0] < other[0] ? -1 : 1));
  return new Map(order.map(([code], index) => [code, PICK_COLOURS[index % PICK_COLOURS.length] as string]));
}
