/**
 * Ordinary kriging with all points (dual form), its variance, and leave-one-out errors without leaving one out.
 *
 * C is the covariance of the points, c₀ that of the points with a place. u = C⁻¹1, v = C⁻¹z, β = 1ᵀv / 1ᵀu; with b = v − βu
 * the estimate is β + c₀ᵀb, so a grid costs one dot product a cell. Leaving point i out errs by bᵢ/Qᵢᵢ with
 * Q = C⁻¹ − uuᵀ/1ᵀu (Dubrule 1983, Mathematical Geology 15:687-699).
 */
import { SAME_SPOT_SQUARE_METERS } from './idw';
import { choleskyInPlace, inverseDiagonal, solveLowerInPlace, solveUpperInPlace } from './linear-algebra';
import { type PlanarPoints, type Variogram, variogramShape } from './variogram';

export interface Kriging {
  points: PlanarPoints;
  variogram: Variogram;
  /** Generalised least squares mean β and dual weights b. */
  mean: number;
  weights: Float64Array;
  /** C⁻¹1 and its sum, and the Cholesky factor of C, for the variance. */
  ones: Float64Array;
  onesSum: number;
  factor: Float64Array;
}

/** Added to the diagonal, as a share of the sill, when nearly coincident points without a nugget make C singular. */
const JITTERS = [0, 1e-10, 1e-8, 1e-6];

function covariance(variogram: Variogram, distance: number): number {
  const { model, nugget, partialSill, range } = variogram;
  return distance === 0 ? nugget + partialSill : partialSill * (1 - variogramShape(model, distance, range));
}

/** Prepares kriging of points, no two of which coincide. `null` when the system cannot be solved. */
export function prepareKriging(points: PlanarPoints, variogram: Variogram): Kriging | null {
  const size = points.x.length;
  const sill = variogram.nugget + variogram.partialSill;
  if (size === 0 || !(sill > 0)) return null;
  for (const jitter of JITTERS) {
    const factor = new Float64Array(size * size);
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < i; j++) {
        const dx = (points.x[i] as number) - (points.x[j] as number);
        const dy = (points.y[i] as number) - (points.y[j] as number);
        factor[i * size + j] = covariance(variogram, Math.sqrt(dx * dx + dy * dy));
      }
      factor[i * size + i] = sill * (1 + jitter);
    }
    if (!choleskyInPlace(factor, size)) continue;
    const solve = (right: Float64Array) => solveUpperInPlace(factor, size, solveLowerInPlace(factor, size, right));
    const ones = solve(new Float64Array(size).fill(1));
    const values = solve(Float64Array.from(points.value));
    const onesSum = ones.reduce((sum, one) => sum + one, 0);
    const mean = values.reduce((sum, one) => sum + one, 0) / onesSum;
    const weights = values.map((value, i) => value - mean * (ones[i] as number));
    if (!Number.isFinite(mean) || !weights.every(Number.isFinite)) continue;
    return { points, variogram, mean, weights, ones, onesSum, factor };
  }
  return null;
}

/** Estimate and kriging variance at one place. A data point gives its own value and 0. */
export function krigeAt(kriging: Kriging, x: number, y: number): { mean: number; variance: number } {
  const { points, variogram, factor } = kriging;
  const size = points.x.length;
  const near = new Float64Array(size);
  let mean = kriging.mean;
  let onesDot = 0;
  for (let i = 0; i < size; i++) {
    const dx = x - (points.x[i] as number);
    const dy = y - (points.y[i] as number);
    const distance = Math.sqrt(dx * dx + dy * dy);
    if (distance * distance < SAME_SPOT_SQUARE_METERS) return { mean: points.value[i] as number, variance: 0 };
    const value = covariance(variogram, distance);
    near[i] = value;
    mean += value * (kriging.weights[i] as number);
    onesDot += value * (kriging.ones[i] as number);
  }
  solveLowerInPlace(factor, size, near);
  let quadratic = 0;
  for (let i = 0; i < size; i++) quadratic += (near[i] as number) ** 2;
  const sill = variogram.nugget + variogram.partialSill;
  return { mean, variance: Math.max(0, sill - quadratic + (1 - onesDot) ** 2 / kriging.onesSum) };
}

/** Leave-one-out errors, estimate less value, one a point. */
export function krigingLeaveOneOutErrors(kriging: Kriging): Float64Array {
  const diagonal = inverseDiagonal(kriging.factor, kriging.points.x.length);
  return kriging.weights.map(
    (weight, i) => -weight / ((diagonal[i] as number) - (kriging.ones[i] as number) ** 2 / kriging.onesSum),
  );
}

/** Estimate at one place, without its variance. */
function estimateAt({ points, variogram, weights, mean }: Kriging, x: number, y: number): number {
  let sum = mean;
  for (let i = 0; i < points.x.length; i++) {
    const dx = x - (points.x[i] as number);
    const dy = y - (points.y[i] as number);
    const squared = dx * dx + dy * dy;
    if (squared < SAME_SPOT_SQUARE_METERS) return points.value[i] as number;
    sum += (weights[i] as number) * covariance(variogram, Math.sqrt(squared));
  }
  return sum;
}

/** With fewer covariances than this to work out, each is worked out by itself: the table would cost more than it saves. */
const WORTH_A_TABLE = 100_000;
/** Steps of the covariance table; straight lines between them err by less than a millionth of the sill. */
const TABLE_STEPS = 8192;
/** An exponential covariance past this many ranges is nothing: e⁻¹⁸. */
const EXPONENTIAL_REACH = 18;

/**
 * Estimates at many places (no variance): `into[k]` for x[k], y[k]. On large grids covariances come from a table by distance,
 * which costs the same for every model.
 */
export function krigeMany(kriging: Kriging, x: Float64Array, y: Float64Array, into: Float64Array): void {
  if (x.length * kriging.points.x.length < WORTH_A_TABLE) {
    for (let k = 0; k < x.length; k++) into[k] = estimateAt(kriging, x[k] as number, y[k] as number);
    return;
  }
  const { points, variogram, weights, mean } = kriging;
  const size = points.x.length;
  const px = points.x;
  const py = points.y;
  const reach = variogram.model === 'spherical' ? variogram.range : variogram.range * EXPONENTIAL_REACH;
  const reachSquared = reach * reach;
  const table = new Float64Array(TABLE_STEPS + 2);
  for (let i = 0; i <= TABLE_STEPS; i++) {
    const distance = (i / TABLE_STEPS) * reach;
    table[i] = variogram.partialSill * (1 - variogramShape(variogram.model, distance, variogram.range));
  }
  const stepsPerMeter = TABLE_STEPS / reach;
  for (let k = 0; k < x.length; k++) {
    const xk = x[k] as number;
    const yk = y[k] as number;
    let sum = mean;
    let exact = -1;
    for (let i = 0; i < size; i++) {
      const dx = xk - (px[i] as number);
      const dy = yk - (py[i] as number);
      const squared = dx * dx + dy * dy;
      if (squared >= reachSquared) continue;
      if (squared < SAME_SPOT_SQUARE_METERS) exact = i;
      const step = Math.sqrt(squared) * stepsPerMeter;
      const below = step | 0;
      const from = table[below] as number;
      sum += (weights[i] as number) * (from + (step - below) * ((table[below + 1] as number) - from));
    }
    into[k] = exact >= 0 ? (points.value[exact] as number) : sum;
  }
}
