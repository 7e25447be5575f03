import type { Coefficient } from './coefficient';

/** What remedies cost and aim at. */
export const FIX_COEFFICIENTS = {
  limeBelowPh: {
    value: 6,
    low: 5.3,
    high: 6.5,
    unit: 'pH',
    does: 'Ground below this is named under fix first.',
    reason: 'Liming paid in most Iowa fields below 5.9–6.0 (Mallarino, Iowa State).',
    changeable: true,
  },
  limeTargetPh: {
    value: 6.5,
    low: 6,
    high: 6.8,
    unit: 'pH',
    does: 'What lime is figured to bring sour ground to.',
    reason: 'Best 6.3–6.5: Michigan State University Extension (Staton 2012).',
    changeable: true,
  },
  limeDollarsPerTon: {
    value: 35,
    low: 5,
    high: 150,
    unit: '$/ton spread',
    does: 'Price of lime spread, for the cost under fix first.',
    reason: "Planning coefficient: set your own quarry's price.",
    changeable: true,
  },
  deepTillageDollarsPerAcre: {
    value: 28,
    low: 5,
    high: 120,
    unit: '$/ac',
    does: 'Price of opening a tight layer.',
    reason: 'Planning coefficient: set your own custom rate.',
    changeable: true,
  },
} as const satisfies Record<string, Coefficient>;
