/** Hold: how often a pick stays first when what is unknown turns out one way or another. */
import type { Evaluation } from './evaluate';
import { FACTORS } from './factors/index';
import { DRAWS, shocksOf } from './random';

interface SharedShocks {
  /** Draw-major: the factors' shocks of one draw stand together. */
  byDraw: Float64Array;
  /** Length of each draw's vector of shocks. */
  norms: Float64Array;
}

let sharedShocks: SharedShocks | null = null;

function makeSharedShocks(): SharedShocks {
  const byDraw = new Float64Array(DRAWS * FACTORS.length);
  const norms = new Float64Array(DRAWS);
  FACTORS.forEach((factor, f) => {
    const shocks = shocksOf(`factor ${factor.id}`);
    for (let draw = 0; draw < DRAWS; draw++) {
      byDraw[draw * FACTORS.length + f] = shocks[draw]!;
      norms[draw] = norms[draw]! + shocks[draw]! ** 2;
    }
  });
  for (let draw = 0; draw < DRAWS; draw++) norms[draw] = Math.sqrt(norms[draw]!);
  return { byDraw, norms };
}

/** Differences worked out before the rest is bounded: the largest few decide nearly every draw. */
const WORKED_FIRST = 4;

function lengthOf(values: Float64Array, indexes: readonly number[]): number {
  return Math.sqrt(indexes.reduce((sum, index) => sum + values[index]! ** 2, 0));
}

/** Guards the bound below against rounding, in logs. */
const ROUNDING = 1e-9;

/**
 * Share of `DRAWS` seeded draws in which each evaluation comes first, in the order given (best expected first). A draw is one
 * way the season could go: each factor's shared shock moves all varieties, each by its own slope, and each variety has a shock
 * of its own. What moves all alike (the field's own deviation) cannot change a rank and is left out. Shocks belong to names, so
 * the result depends neither on the order nor on what else is ranked. Shares sum to 1 when there is anything to rank.
 *
 * Most scores are never worked out in full: by Cauchy's inequality a variety's shared part cannot lift it by more than the length
 * of its slopes times the length of the draw, and where even that leaves it behind, it is behind.
 */
export function holdOf(evaluations: readonly Evaluation[]): number[] {
  const leader = evaluations[0];
  if (!leader) return [];
  sharedShocks ??= makeSharedShocks();
  const { byDraw, norms } = sharedShocks;
  const size = FACTORS.length;
  const best = new Float64Array(DRAWS);
  const winner = new Int32Array(DRAWS);
  const leaderMean = Math.log(leader.assessment.expected);
  const leaderShocks = shocksOf(`variety ${leader.variety.id}`);
  for (let draw = 0; draw < DRAWS; draw++) best[draw] = leaderMean + leader.ownLogDeviation * leaderShocks[draw]!;

  // Scores stand relative to the leader's response to the shared shocks, so only differences of slopes matter.
  const differences = new Float64Array(size);
  for (let i = 1; i < evaluations.length; i++) {
    const one = evaluations[i]!;
    for (let f = 0; f < size; f++) differences[f] = one.slopes[f]! - leader.slopes[f]!;
    const largest = FACTORS.map((_, f) => f).sort((a, b) => Math.abs(differences[b]!) - Math.abs(differences[a]!));
    const head = largest.slice(0, WORKED_FIRST);
    const tail = largest.slice(WORKED_FIRST).filter((f) => differences[f] !== 0);
    const headReach = lengthOf(differences, head);
    const tailReach = lengthOf(differences, tail);
    const mean = Math.log(one.assessment.expected);
    const own = one.ownLogDeviation;
    const shocks = shocksOf(`variety ${one.variety.id}`);
    const [f0, f1, f2, f3] = head as [number, number, number, number];
    const d0 = differences[f0]!;
    const d1 = differences[f1]!;
    const d2 = differences[f2]!;
    const d3 = differences[f3]!;
    for (let draw = 0; draw < DRAWS; draw++) {
      let score = mean + own * shocks[draw]!;
      const norm = norms[draw]!;
      const needed = best[draw]! - ROUNDING - tailReach * norm;
      if (score + headReach * norm < needed) continue;
      const start = draw * size;
      score += d0 * byDraw[start + f0]! + d1 * byDraw[start + f1]! + d2 * byDraw[start + f2]! + d3 * byDraw[start + f3]!;
      if (score < needed) continue;
      for (let t = 0; t < tail.length; t++) score += differences[tail[t]!]! * byDraw[start + tail[t]!]!;
      if (score > best[draw]!) {
        best[draw] = score;
        winner[draw] = i;
      }
    }
  }
  const wins = new Array<number>(evaluations.length).fill(0);
  for (let draw = 0; draw < DRAWS; draw++) {
    const index = winner[draw]!;
    wins[index] = wins[index]! + 1;
  }
  return wins.map((count) => count / DRAWS);
}

/** Hold in words: 0.9 → `holds first in 9 of 10`. */
export function holdWords(hold: number): string {
  if (hold >= 0.995) return 'holds first nearly always';
  if (hold < 0.05) return 'hardly ever first';
  return `holds first in ${Math.max(1, Math.min(9, Math.round(hold * 10)))} of 10`;
}
