import type { Coefficients } from '../coefficients';
import { answer, type Factor } from '../factor';
import { acidityOf } from '../ground/acidity';
import type { AskedQuestion, CystSource } from '../model';
import { along, type Curve, expectation, rootSumSquares } from '../numbers';
import type { Site } from '../site';
import { ask } from '../words';

/**
 * Loss of a variety without resistance by eggs per 100 cc. Classes: low to 2,000, medium to 12,000, high above (Iowa State,
 * from memory, medium). Losses are planning figures: 10–20 bu/ac at the worst (Grau, University of Wisconsin 2001).
 */
export const LOSS_BY_EGGS: Curve = [
  [0, 0],
  [500, 0.01],
  [2000, 0.05],
  [5000, 0.12],
  [12000, 0.22],
  [25000, 0.35],
];
/** Eggs in a field nobody has sampled, with weights (planning spread). */
const UNKNOWN_EGGS = [
  { weight: 0.4, eggs: 0 },
  { weight: 0.3, eggs: 800 },
  { weight: 0.2, eggs: 4000 },
  { weight: 0.1, eggs: 14000 },
] as const;
/**
 * Damage relative to that at pH 6.5 and below: low risk 6.0–6.5, rising fast from 7.0 (Grau 2001). Held level below 6.5, so
 * that lime is never charged with nematodes before it has reached the sweet spot.
 */
export const DAMAGE_BY_PH: Curve = [
  [6.5, 1],
  [7, 1.25],
  [7.5, 1.6],
];
/** Damage falls again with much free carbonate (Rogovska, Blackmer & Tylka 2005). */
const MUCH_CARBONATE_PERCENT = 5;
const CARBONATE_FACTOR = 0.8;
/** Sources of a variety that does not say: over 95 % of resistant ones are PI 88788 (University of Missouri). */
const UNKNOWN_SOURCE = [
  { weight: 0.75, source: 'PI 88788' },
  { weight: 0.2, source: 'none' },
  { weight: 0.05, source: 'Peking' },
] as const satisfies readonly { weight: number; source: CystSource }[];

/** Iowa State's words for a count (eggs per 100 cc). */
export function eggClass(eggs: number): 'none found' | 'low' | 'medium' | 'high' {
  if (eggs <= 0) return 'none found';
  return eggs <= 2000 ? 'low' : eggs <= 12000 ? 'medium' : 'high';
}

interface Nematodes {
  loss: number;
  deviation: number;
  unknownDeviation: number;
  words: string;
}

function nematodesOf(site: Site): Nematodes {
  const { c, field } = site;
  const acidity = acidityOf(site);
  let damage = 0;
  let total = 0;
  for (const { value, share } of acidity.shares) {
    damage += share * along(DAMAGE_BY_PH, value);
    total += share;
  }
  damage /= total;
  if ((field.carbonatePercent ?? 0) > MUCH_CARBONATE_PERCENT) damage *= CARBONATE_FACTOR;
  const counts = field.cystEggsPer100cc === null ? UNKNOWN_EGGS : [{ weight: 1, eggs: field.cystEggsPer100cc }];
  const over = expectation(
    counts.map((one) => ({ weight: one.weight, value: Math.min(0.5, along(LOSS_BY_EGGS, one.eggs) * damage) })),
  );
  const eggs = field.cystEggsPer100cc;
  return {
    words:
      eggs === null
        ? 'nematode eggs not counted'
        : `${Math.round(eggs).toLocaleString('en-US')} eggs per 100 cc (${eggClass(eggs)})`,
    loss: over.mean,
    unknownDeviation: over.deviation,
    deviation: rootSumSquares(over.deviation, c.cystUncertainty * over.mean),
  };
}

/** Share of the loss that a source leaves, raised when the same source was grown last time. */
export function sourceRemains(source: CystSource, lastGrown: CystSource | null, c: Coefficients): number {
  const base = source === 'none' ? 1 : source === 'PI 88788' ? c.cystPi88788Remains : c.cystPekingRemains;
  return source !== 'none' && source === lastGrown ? Math.min(1, base * (1 + c.cystSameSourceRaise)) : base;
}

/** Cyst nematode: egg count × source of resistance × what was grown last × pH. The field's part is what the best source loses. */
export const cystNematode: Factor = {
  id: 'cyst-nematode',
  label: 'Cyst nematode',
  color: 'factor-cyst-nematode',
  needs: ['cystEggsPer100cc', 'cystSourceLastGrown', 'phShares', 'carbonatePercent', 'cystNematodeSource'],
  kept({ site, variety }) {
    const { c, field } = site;
    const nematodes = site.once('nematodes', nematodesOf);
    const source = variety.cystNematodeSource;
    const last = field.cystSourceLastGrown;
    const remains = source
      ? { mean: sourceRemains(source, last, c), deviation: 0 }
      : expectation(UNKNOWN_SOURCE.map((one) => ({ weight: one.weight, value: sourceRemains(one.source, last, c) })));
    const best = Math.min(sourceRemains('PI 88788', last, c), sourceRemains('Peking', last, c));
    const keptBest = 1 - nematodes.loss * Math.min(best, remains.mean);
    const kept = 1 - nematodes.loss * remains.mean;
    const match = kept / keptBest;
    const ownDeviation = rootSumSquares(nematodes.loss * remains.deviation, 0.15 * nematodes.loss * remains.mean) / kept;
    const asks: AskedQuestion[] = [];
    if (field.cystEggsPer100cc === null) {
      const words = 'How many cyst nematode eggs per 100 cc does a soil sample of this field hold?';
      asks.push(ask('cystEggsPer100cc', words, (nematodes.unknownDeviation * remains.mean) / kept));
    }
    if (!source && nematodes.loss > 0.002) {
      const words = "What is this variety's source of cyst nematode resistance: none, PI 88788 or Peking?";
      asks.push(ask('cystNematodeSource', words, (nematodes.loss * remains.deviation) / kept));
    }
    const sourceWords = source === null ? 'source not said' : source === 'none' ? 'no resistance' : source;
    return answer({
      field: keptBest,
      fieldDeviation: (nematodes.deviation * best) / keptBest,
      match,
      sharedSlope: (-nematodes.deviation * Math.max(0, remains.mean - best)) / match,
      ownDeviation,
      reason: `${nematodes.words}, ${sourceWords}`,
      detail: source && source === last ? 'the same source as last time' : '',
      source:
        'Tylka, Iowa State (Peking against PI 88788); University of Missouri 2023 (reproduction on PI 88788); Grau, Wisconsin 2001 (pH)',
      asks,
    });
  },
};
