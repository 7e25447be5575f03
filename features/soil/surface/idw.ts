/** Inverse distance squared with all points: a place on a point has that point's value. */
import type { PlanarPoints } from './variogram';

/** A place within a millimetre of a point is on it; the inverse of less would run out of numbers. */
export const SAME_SPOT_SQUARE_METERS = 1e-6;

/** Weighted mean at one place, leaving out point `skip` (−1: none). Squared distances are taken as given, so no root is drawn. */
export function idwAt(points: PlanarPoints, x: number, y: number, skip = -1): number {
  let weight = 0;
  let sum = 0;
  for (let i = 0; i < points.x.length; i++) {
    if (i === skip) continue;
    const dx = x - (points.x[i] as number);
    const dy = y - (points.y[i] as number);
    const squared = dx * dx + dy * dy;
    if (squared < SAME_SPOT_SQUARE_METERS) return points.value[i] as number;
    const inverse = 1 / squared;
    weight += inverse;
    sum += inverse * (points.value[i] as number);
  }
  return sum / weight;
}

/** Leave-one-out errors, estimate less value, one a point; for two points or more. */
export function idwLeaveOneOutErrors(points: PlanarPoints): Float64Array {
  return points.value.map((value, i) => idwAt(points, points.x[i] as number, points.y[i] as number, i) - value);
}
