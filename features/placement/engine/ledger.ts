/** Fractions kept, told in bushels. */
import { FACTORS } from './factors/index';
import type { Kept, LedgerLine } from './model';

export interface Ledger {
  lines: LedgerLine[];
  /** Lines too small to show, together. */
  gatheredBushels: number;
  /** Y0 · Π k, bu/ac: expected before trial evidence. */
  withoutTrials: number;
}

/**
 * Share the whole loss by logarithm: line i = (Y0 − Y) · ln kᵢ / Σ ln k. So the lines sum exactly to the loss and none depends
 * on the order of the others. `kept` stands in the order of FACTORS. Lines under `gatherBelow` bu/ac are gathered.
 */
export function ledgerOf(potential: number, kept: readonly Kept[], gatherBelow: number): Ledger {
  let sum = 0;
  for (const one of kept) sum += Math.log(one.kept.mid);
  // Bushels per unit of log: Y0·(e^Σ − 1)/Σ, which stays sound when gains and losses cancel.
  const perLog = Math.abs(sum) < 1e-12 ? potential : (potential * Math.expm1(sum)) / sum;
  const lines: LedgerLine[] = [];
  let gatheredBushels = 0;
  for (let i = 0; i < kept.length; i++) {
    const one = kept[i]!;
    const fieldBushels = perLog * Math.log(one.field.mid);
    const matchBushels = perLog * Math.log(one.match.mid);
    const bushels = fieldBushels + matchBushels;
    if (Math.abs(bushels) < gatherBelow) {
      gatheredBushels += bushels;
      continue;
    }
    const factor = FACTORS[i]!;
    const { reason, detail, source } = one;
    lines.push({ factor: factor.id, label: factor.label, bushels, fieldBushels, matchBushels, reason, detail, source });
  }
  return { lines, gatheredBushels, withoutTrials: potential * Math.exp(sum) };
}
