/** How alike two points are at a distance: the sample variogram, its models, and the fit by weighted least squares. */

export type VariogramModel = 'spherical' | 'exponential';

/** `nugget` and `partialSill` in squared units of the value, `range` in metres (exponential: the distance parameter a). */
export interface Variogram {
  model: VariogramModel;
  nugget: number;
  partialSill: number;
  range: number;
}

/** Points in planar metres: x[i], y[i] and value[i] belong together. */
export interface PlanarPoints {
  x: Float64Array;
  y: Float64Array;
  value: Float64Array;
}

/** One distance class of the sample variogram. */
export interface Lag {
  pairs: number;
  distance: number;
  gamma: number;
}

const LAGS = 15;
/** More points than this are thinned evenly for the fit alone: two million pairs say all there is to say. */
const POINTS_FOR_FIT = 2000;

/** Share of the partial sill that is gone at distance h: 0 at 0, 1 at the range (spherical) or far away (exponential). */
export function variogramShape(model: VariogramModel, distance: number, range: number): number {
  if (model === 'exponential') return 1 - Math.exp(-distance / range);
  if (distance >= range) return 1;
  const ratio = distance / range;
  return ratio * (1.5 - 0.5 * ratio * ratio);
}

/** Semivariance at distance h > 0; 0 at 0. */
export function semivariance(variogram: Variogram, distance: number): number {
  if (distance === 0) return 0;
  return variogram.nugget + variogram.partialSill * variogramShape(variogram.model, distance, variogram.range);
}

/**
 * Sample variogram by Matheron's estimator in 15 classes up to a third of the bounding box's diagonal, classes closed above;
 * empty classes are left out. These are the defaults of gstat (Pebesma 2004, Computers & Geosciences 30:683-691).
 */
export function sampleVariogram(points: PlanarPoints): Lag[] {
  const step = Math.max(1, Math.ceil(points.x.length / POINTS_FOR_FIT));
  const indices: number[] = [];
  for (let i = 0; i < points.x.length; i += step) indices.push(i);
  let west = Infinity;
  let east = -Infinity;
  let south = Infinity;
  let north = -Infinity;
  for (const i of indices) {
    west = Math.min(west, points.x[i] as number);
    east = Math.max(east, points.x[i] as number);
    south = Math.min(south, points.y[i] as number);
    north = Math.max(north, points.y[i] as number);
  }
  const cutoff = Math.hypot(east - west, north - south) / 3;
  if (!(cutoff > 0)) return [];
  const width = cutoff / LAGS;
  const lags = Array.from({ length: LAGS }, () => ({ pairs: 0, distance: 0, gamma: 0 }));
  for (let a = 0; a < indices.length; a++) {
    const i = indices[a] as number;
    const xi = points.x[i] as number;
    const yi = points.y[i] as number;
    const vi = points.value[i] as number;
    for (let b = 0; b < a; b++) {
      const j = indices[b] as number;
      const dx = xi - (points.x[j] as number);
      const dy = yi - (points.y[j] as number);
      const distance = Math.sqrt(dx * dx + dy * dy);
      if (distance > cutoff) continue;
      const lag = lags[Math.max(0, Math.ceil(distance / width) - 1)];
      if (!lag) continue;
      lag.pairs++;
      lag.distance += distance;
      lag.gamma += (vi - (points.value[j] as number)) ** 2 / 2;
    }
  }
  return lags
    .filter((lag) => lag.pairs > 0 && lag.distance > 0)
    .map((lag) => ({ pairs: lag.pairs, distance: lag.distance / lag.pairs, gamma: lag.gamma / lag.pairs }));
}

/** Best nugget and partial sill (neither negative) for a given range, and the weighted sum of squares left. */
function fitSills(
  lags: readonly Lag[],
  model: VariogramModel,
  range: number,
): { nugget: number; partialSill: number; error: number } {
  let w = 0;
  let ws = 0;
  let wss = 0;
  let wg = 0;
  let wsg = 0;
  let wgg = 0;
  for (const { pairs, distance, gamma } of lags) {
    const weight = pairs / (distance * distance);
    const shape = variogramShape(model, distance, range);
    w += weight;
    ws += weight * shape;
    wss += weight * shape * shape;
    wg += weight * gamma;
    wsg += weight * shape * gamma;
    wgg += weight * gamma * gamma;
  }
  const determinant = w * wss - ws * ws;
  let nugget = determinant > 0 ? (wss * wg - ws * wsg) / determinant : wg / w;
  let partialSill = determinant > 0 ? (w * wsg - ws * wg) / determinant : 0;
  if (nugget < 0) {
    nugget = 0;
    partialSill = wsg / wss;
  }
  if (partialSill < 0) {
    partialSill = 0;
    nugget = wg / w;
  }
  const error =
    wgg -
    2 * (nugget * wg + partialSill * wsg) +
    nugget * nugget * w +
    2 * nugget * partialSill * ws +
    partialSill * partialSill * wss;
  return { nugget, partialSill, error };
}

const RANGES_TRIED = 60;
const REFINEMENTS = 32;

/**
 * Fits a variogram by least squares with weights pairs/distance² (gstat's default). For any range the sills are a linear
 * problem, so only the range is searched: a coarse pass over two decades, then golden section about the best. Of the two
 * models the one that leaves less is taken. `null` when there are fewer than three classes or the values do not vary.
 */
export function fitVariogram(
  lags: readonly Lag[],
  models: readonly VariogramModel[] = ['spherical', 'exponential'],
): Variogram | null {
  if (lags.length < 3 || lags.every((lag) => lag.gamma === 0)) return null;
  const longest = Math.max(...lags.map((lag) => lag.distance));
  const shortest = Math.min(...lags.map((lag) => lag.distance));
  let best: (Variogram & { error: number }) | null = null;
  for (const model of models) {
    const from = Math.log(shortest / 2);
    const step = (Math.log(longest * 3) - from) / RANGES_TRIED;
    const errorAt = (logRange: number) => fitSills(lags, model, Math.exp(logRange)).error;
    let bestLog = from;
    let bestError = Infinity;
    for (let i = 0; i <= RANGES_TRIED; i++) {
      const error = errorAt(from + i * step);
      if (error < bestError) {
        bestError = error;
        bestLog = from + i * step;
      }
    }
    const golden = (Math.sqrt(5) - 1) / 2;
    let low = bestLog - step;
    let high = bestLog + step;
    for (let i = 0; i < REFINEMENTS; i++) {
      const a = high - golden * (high - low);
      const b = low + golden * (high - low);
      if (errorAt(a) < errorAt(b)) high = b;
      else low = a;
    }
    const range = Math.exp((low + high) / 2);
    const { nugget, partialSill, error } = fitSills(lags, model, range);
    if (best === null || error < best.error) best = { model, nugget, partialSill, range, error };
  }
  if (best === null || !(best.nugget + best.partialSill > 0)) return null;
  return { model: best.model, nugget: best.nugget, partialSill: best.partialSill, range: best.range };
}
