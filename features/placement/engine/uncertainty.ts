/** Hold: how often a pick stays first when what is unknown turns out one way or another. */
import type { Evaluation } from './evaluate';
import { FACTORS } from './factors/index';
import { DRAWS, shocksOf } from './random';

/** Factors whose shocks are worked out before the rest is bounded: the few that tell varieties apart decide nearly every draw. */
const WORKED_FIRST = 4;
/** Guards the bounds below against rounding, in logs. */
const ROUNDING = 1e-9;

/** The shared shocks that matter here, laid out draw by draw, and the length of each draw's vector of them. */
interface SharedShocks {
  factors: number[];
  byDraw: Float64Array;
  norms: Float64Array;
}

/** Layouts kept ready: fields of one operation are told apart by much the same factors. */
const layouts = new Map<string, SharedShocks>();
const MOST_LAYOUTS = 24;

function layOut(factors: number[]): SharedShocks {
  const key = factors.join();
  const known = layouts.get(key);
  if (known) return known;
  const byDraw = new Float64Array(DRAWS * factors.length);
  const norms = new Float64Array(DRAWS);
  for (let i = 0; i < factors.length; i++) {
    const shocks = shocksOf(`factor ${FACTORS[factors[i]!]!.id}`);
    for (let draw = 0, at = i; draw < DRAWS; draw++, at += factors.length) {
      const shock = shocks[draw]!;
      byDraw[at] = shock;
      norms[draw] = norms[draw]! + shock * shock;
    }
  }
  for (let draw = 0; draw < DRAWS; draw++) norms[draw] = Math.sqrt(norms[draw]!);
  if (layouts.size >= MOST_LAYOUTS) layouts.clear();
  const laidOut = { factors, byDraw, norms };
  layouts.set(key, laidOut);
  return laidOut;
}

/** Factors by how much they tell the evaluations apart, the most telling first; beyond the first four, those that never do are left out. */
function tellingFactors(evaluations: readonly Evaluation[], leader: Evaluation): number[] {
  const spread = new Float64Array(FACTORS.length);
  for (const one of evaluations) {
    for (let f = 0; f < spread.length; f++) spread[f] = spread[f]! + (one.slopes[f]! - leader.slopes[f]!) ** 2;
  }
  return FACTORS.map((_, f) => f)
    .sort((a, b) => spread[b]! - spread[a]! || a - b)
    .filter((f, i) => i < WORKED_FIRST || spread[f]! > 0);
}

/**
 * Share of `DRAWS` seeded draws in which each evaluation comes first, in the order given (best expected first). A draw is one
 * way the season could go: each factor's shared shock moves all varieties, each by its own slope, and each variety has a shock
 * of its own. What moves all alike (the field's own deviation) cannot change a rank and is left out. Shocks belong to names, so
 * the result does not depend on the order of the line-up. Shares sum to 1 when there is anything to rank.
 *
 * Most scores are never worked out in full: by Cauchy's inequality a variety's shared part cannot lift it by more than the length
 * of its slopes times the length of the draw, and where even that leaves it behind, it is behind.
 */
export function holdOf(evaluations: readonly Evaluation[]): number[] {
  const leader = evaluations[0];
  if (!leader) return [];
  const telling = tellingFactors(evaluations, leader);
  const head = layOut(telling.slice(0, WORKED_FIRST).sort((a, b) => a - b));
  const tail = layOut(telling.slice(WORKED_FIRST).sort((a, b) => a - b));
  const best = new Float64Array(DRAWS);
  const winner = new Int32Array(DRAWS);
  const leaderMean = Math.log(leader.assessment.expected);
  const leaderShocks = shocksOf(`variety ${leader.variety.id}`);
  for (let draw = 0; draw < DRAWS; draw++) best[draw] = leaderMean + leader.ownLogDeviation * leaderShocks[draw]!;
  for (let i = 1; i < evaluations.length; i++) drawOne(evaluations[i]!, i, leader, head, tail, best, winner);
  const wins = new Array<number>(evaluations.length).fill(0);
  for (let draw = 0; draw < DRAWS; draw++) {
    const index = winner[draw]!;
    wins[index] = wins[index]! + 1;
  }
  return wins.map((count) => count / DRAWS);
}

/** Scores stand relative to the leader's response to the shared shocks, so only differences of slopes matter. */
function differencesOf(one: Evaluation, leader: Evaluation, shared: SharedShocks): { slopes: Float64Array; length: number } {
  const slopes = new Float64Array(shared.factors.length);
  let squares = 0;
  for (let i = 0; i < slopes.length; i++) {
    const difference = one.slopes[shared.factors[i]!]! - leader.slopes[shared.factors[i]!]!;
    slopes[i] = difference;
    squares += difference * difference;
  }
  return { slopes, length: Math.sqrt(squares) };
}

/** Run one evaluation through all draws against the best so far; where it is better, it is the winner. */
function drawOne(
  one: Evaluation,
  index: number,
  leader: Evaluation,
  head: SharedShocks,
  tail: SharedShocks,
  best: Float64Array,
  winner: Int32Array,
): void {
  const { slopes: headSlopes, length: headLength } = differencesOf(one, leader, head);
  const { slopes: tailSlopes, length: tailLength } = differencesOf(one, leader, tail);
  const headNorms = head.norms;
  const tailNorms = tail.norms;
  const headShocks = head.byDraw;
  const tailShocks = tail.byDraw;
  const [h0, h1, h2, h3] = headSlopes as unknown as [number, number, number, number];
  const tailSize = tailSlopes.length;
  const mean = Math.log(one.assessment.expected);
  const own = one.ownLogDeviation;
  const shocks = shocksOf(`variety ${one.variety.id}`);
  for (let draw = 0; draw < DRAWS; draw++) {
    let score = mean + own * shocks[draw]!;
    const needed = best[draw]! - ROUNDING - tailLength * tailNorms[draw]!;
    if (score + headLength * headNorms[draw]! < needed) continue;
    const at4 = draw * WORKED_FIRST;
    score += h0 * headShocks[at4]! + h1 * headShocks[at4 + 1]! + h2 * headShocks[at4 + 2]! + h3 * headShocks[at4 + 3]!;
    if (score < needed) continue;
    for (let i = 0, at = draw * tailSize; i < tailSize; i++) score += tailSlopes[i]! * tailShocks[at + i]!;
    if (score > best[draw]!) {
      best[draw] = score;
      winner[draw] = index;
    }
  }
}

/** Hold in words: 0.9 → `holds first in 9 of 10`. */
export function holdWords(hold: number): string {
  if (hold >= 0.995) return 'holds first nearly always';
  if (hold < 0.05) return 'hardly ever first';
  return `holds first in ${Math.max(1, Math.min(9, Math.round(hold * 10)))} of 10`;
}
