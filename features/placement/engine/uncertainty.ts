/** Hold: how often a pick stays first when what is unknown turns out one way or another. */
import type { Evaluation } from './evaluate';
import { FACTORS } from './factors/index';
import { DRAWS, LARGEST_SHOCK, shocksOf } from './random';

/**
 * Share of `DRAWS` seeded draws in which each evaluation comes first, in the order given (best expected first). A draw is one
 * way the season could go: each factor's shared shock moves all varieties, each by its own slope, and each variety has a shock
 * of its own. What moves all alike (the field's own deviation) cannot change a rank and is left out. Shocks belong to names, so
 * the result depends neither on the order nor on what else is ranked. Shares sum to 1 when there is anything to rank.
 */
export function holdOf(evaluations: readonly Evaluation[]): number[] {
  const leader = evaluations[0];
  if (!leader) return [];
  const best = new Float64Array(DRAWS);
  const winner = new Int32Array(DRAWS);
  const leaderMean = Math.log(leader.assessment.expected);
  const leaderShocks = shocksOf(`variety ${leader.variety.id}`);
  for (let draw = 0; draw < DRAWS; draw++) best[draw] = leaderMean + leader.ownLogDeviation * leaderShocks[draw]!;
  // No draw has the leader below this; who cannot reach it is never first.
  const floor = leaderMean - leader.ownLogDeviation * LARGEST_SHOCK;

  for (let i = 1; i < evaluations.length; i++) {
    const one = evaluations[i]!;
    const mean = Math.log(one.assessment.expected);
    const own = one.ownLogDeviation;
    // Scores stand relative to the leader's response to the shared shocks, so only differences of slopes matter.
    const differences: number[] = [];
    const shared: Float64Array[] = [];
    let reach = 0;
    for (let f = 0; f < FACTORS.length; f++) {
      const difference = one.slopes[f]! - leader.slopes[f]!;
      if (difference === 0) continue;
      differences.push(difference);
      shared.push(shocksOf(`factor ${FACTORS[f]!.id}`));
      reach += Math.abs(difference) * LARGEST_SHOCK;
    }
    if (mean + own * LARGEST_SHOCK + reach <= floor) continue;
    const shocks = shocksOf(`variety ${one.variety.id}`);
    for (let draw = 0; draw < DRAWS; draw++) {
      let score = mean + own * shocks[draw]!;
      if (score + reach <= best[draw]!) continue;
      for (let f = 0; f < differences.length; f++) score += differences[f]! * shared[f]![draw]!;
      if (score > best[draw]!) {
        best[draw] = score;
        winner[draw] = i;
      }
    }
  }
  const wins = new Array<number>(evaluations.length).fill(0);
  for (let draw = 0; draw < DRAWS; draw++) wins[winner[draw]!]!++;
  return wins.map((count) => count / DRAWS);
}

/** Hold in words: 0.9 → `holds first in 9 of 10`. */
export function holdWords(hold: number): string {
  if (hold >= 0.995) return 'holds first nearly always';
  if (hold < 0.05) return 'hardly ever first';
  return `holds first in ${Math.max(1, Math.min(9, Math.round(hold * 10)))} of 10`;
}
