/** The small arithmetic that every factor shares. Nothing here knows agronomy. */
import type { Spread } from './model';

/** Standard normal 90th percentile, and the width from the 10th to the 90th in deviations (2.563). */
export const NINETIETH = 1.2815515655446004;
export const WIDTH_OF_80_PERCENT = 2 * NINETIETH;

/** Points of a curve, ascending in x. */
export type Curve = readonly (readonly [x: number, y: number])[];

/** Value of a curve at x: linear between its points, flat beyond its ends. */
export function along(curve: Curve, x: number): number {
  const first = curve[0]!;
  if (x <= first[0]) return first[1];
  for (let i = 1; i < curve.length; i++) {
    const [x1, y1] = curve[i]!;
    if (x <= x1) {
      const [x0, y0] = curve[i - 1]!;
      return y0 + ((y1 - y0) * (x - x0)) / (x1 - x0);
    }
  }
  return curve[curve.length - 1]![1];
}

/** `value` kept within `low`…`high`. */
export function clamp(value: number, low: number, high: number): number {
  return Math.min(Math.max(value, low), high);
}

/** One way an unknown could turn out, with its weight and what it would cost or be. */
export interface Scenario {
  weight: number;
  value: number;
}

/** Weighted mean and standard deviation over the ways an unknown could turn out. */
export function expectation(scenarios: readonly Scenario[]): { mean: number; deviation: number } {
  let weight = 0;
  let sum = 0;
  for (const one of scenarios) {
    weight += one.weight;
    sum += one.weight * one.value;
  }
  const mean = sum / weight;
  let squares = 0;
  for (const one of scenarios) squares += one.weight * (one.value - mean) ** 2;
  return { mean, deviation: Math.sqrt(squares / weight) };
}

/**
 * A kept fraction with its 10th and 90th percentile, `logDeviation` wide in logs. The top is held at 1 (a factor cannot give
 * more than the field carries); the bottom then moves down so that the width stays what the deviation says.
 */
export function keptSpread(mid: number, logDeviation: number): Spread {
  if (logDeviation <= 0) return { low: mid, mid, high: mid };
  const high = Math.min(mid * Math.exp(NINETIETH * logDeviation), Math.max(1, mid));
  const low = Math.min(mid, high * Math.exp(-WIDTH_OF_80_PERCENT * logDeviation));
  return { low, mid, high };
}

/** Standard deviation in logs that a spread stands for: (ln high − ln low) / 2.563. */
export function logDeviationOf(spread: Spread): number {
  return spread.high === spread.low ? 0 : (Math.log(spread.high) - Math.log(spread.low)) / WIDTH_OF_80_PERCENT;
}

/** `Math.sqrt(a² + b² + …)`. */
export function rootSumSquares(...values: number[]): number {
  let sum = 0;
  for (const value of values) sum += value * value;
  return Math.sqrt(sum);
}
