/** Numbers as the ledger says them. */
import type { AskedQuestion, Rating } from './model';

/** 0.38 → `38 %`; under one per cent → `under 1 %`. */
export function percent(share: number): string {
  if (share > 0 && share < 0.01) return 'under 1 %';
  return `${Math.round(share * 100)} %`;
}

/** 15 → `15 in`, 7.5 → `7.5 in`. */
export function inches(value: number): string {
  return `${Math.round(value * 10) / 10} in`;
}

/** 2.4 → `2.4`; −0.3 → `00.7`, −1.2 → `000.8`: the trade's writing of the earliest groups. */
export function relativeMaturityWords(value: number): string {
  if (value >= -0.05) return Math.max(0, value).toFixed(1);
  return value >= -1.05 ? `00.${Math.round((value + 1) * 10)}` : `000.${Math.round((value + 2) * 10)}`;
}

/** 0.034 → `1 year in 29`; next to nothing and nearly always get words. */
export function yearsIn(chance: number): string {
  if (chance < 0.01) return 'hardly ever';
  if (chance > 0.95) return 'nearly every year';
  if (chance > 0.5) return `${Math.round(chance * 10)} years in 10`;
  return `1 year in ${Math.round(1 / chance)}`;
}

/** `standability 7 of 9`, or `standability not rated, taken as 5`. */
export function ratingWords(name: string, rating: Rating): string {
  return rating === null ? `${name} not rated, taken as 5 of 9` : `${name} ${Math.round(rating * 10) / 10} of 9`;
}

/** `a`, `a and b`, `a, b and c`. */
export function listed(parts: readonly string[]): string {
  if (parts.length < 2) return parts[0] ?? '';
  return `${parts.slice(0, -1).join(', ')} and ${parts[parts.length - 1]}`;
}

/** `Poorly drained` from `poorly drained`. */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** A question, with how much of the deviation in logs hangs on it. */
export function ask(fact: AskedQuestion['fact'], words: string, logDeviation: number): AskedQuestion {
  return { fact, words, logDeviation };
}
