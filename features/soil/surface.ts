/**
 * From soil points to a surface: ordinary kriging where the points carry a pattern, inverse distance squared where they do not,
 * their mean where they are too few. pH is averaged as pH, never as hydrogen ions. A surface never holds a NaN.
 */
import type { MultiPolygon, Polygon } from 'geojson';
import { gridOverField } from './surface/field-grid';
import { idwAt, idwLeaveOneOutErrors } from './surface/idw';
import { type CellGrid, idwOverGrid } from './surface/idw-grid';
import { type Kriging, krigeAt, krigeMany, krigingLeaveOneOutErrors, prepareKriging } from './surface/kriging';
import { eastMeters, localProjection, northMeters } from './surface/projection';
import { fitVariogram, type PlanarPoints, sampleVariogram, type Variogram, type VariogramModel } from './surface/variogram';

export interface SurfacePoint {
  /** Planar metres. */
  x: number;
  y: number;
  value: number;
}

export interface GeographicPoint {
  longitude: number;
  latitude: number;
  value: number;
}

export type SurfaceMethod = 'kriging' | 'idw' | 'mean';

export interface SurfaceOptions {
  /** Force a method; without it the rule of `fitSurface` chooses. */
  method?: 'kriging' | 'idw';
  /** Use this variogram in place of a fitted one. */
  variogram?: Variogram;
  /** Models to fit; both unless said. */
  models?: readonly VariogramModel[];
}

export interface FittedSurface {
  method: SurfaceMethod;
  /** The variogram that kriging used; `null` for the other methods. */
  variogram: Variogram | null;
  /** Root mean square of leave-one-out errors of the method used, in units of the value; `null` under two points. */
  leaveOneOutRmse: number | null;
  /** The same for "every place is the mean of the others", to compare. */
  leaveOneOutRmseOfMean: number | null;
  /** Points after those at one spot were averaged. */
  pointCount: number;
  /** Estimate and, for kriging, its variance at a place in planar metres. */
  at(x: number, y: number): { mean: number; variance: number | null };
  /** Estimates at many places. */
  many(x: Float64Array, y: Float64Array): Float64Array;
  /** Estimates at the listed cells of a grid (row × columns + column); quicker than `many` where a grid allows it. */
  over(grid: CellGrid, cells: Int32Array): Float64Array;
}

const FEWEST_FOR_IDW = 4;
const FEWEST_FOR_KRIGING = 20;
/** More points than this are averaged over a lattice first: the system of kriging grows with their cube. */
const MOST_POINTS = 800;
/** Points within a centimetre are at one spot. */
const SAME_SPOT_METERS = 0.01;

/**
 * Fits a surface to points in planar metres; points whose numbers are not finite are passed over. Kriging (spherical or
 * exponential, whichever fits better) when there are 20 points or more and it beats the mean in leave-one-out; otherwise
 * inverse distance squared; under 4 points, or when all values are equal, the mean. `null` when no point is left.
 */
export function fitSurface(points: readonly SurfacePoint[], options: SurfaceOptions = {}): FittedSurface | null {
  const planar = thinned(mergedAt(points.filter(isFinitePoint), SAME_SPOT_METERS));
  const size = planar.value.length;
  if (size === 0) return null;
  const mean = planar.value.reduce((sum, value) => sum + value, 0) / size;
  const errorOfMean = size < 2 ? null : rootMeanSquare(planar.value.map((value) => ((mean - value) * size) / (size - 1)));
  const base = { leaveOneOutRmseOfMean: errorOfMean, pointCount: size };

  const varies = planar.value.some((value) => value !== planar.value[0]);
  if (varies && options.method !== 'idw' && (size >= FEWEST_FOR_KRIGING || (options.method === 'kriging' && size >= 3))) {
    const variogram = options.variogram ?? fitVariogram(sampleVariogram(planar), options.models);
    const kriging = variogram ? prepareKriging(planar, variogram) : null;
    const error = kriging ? rootMeanSquare(krigingLeaveOneOutErrors(kriging)) : Number.NaN;
    if (kriging && Number.isFinite(error) && (options.method === 'kriging' || error < (errorOfMean as number))) {
      return { ...base, ...krigedSurface(kriging, error) };
    }
  }
  if (varies && (size >= FEWEST_FOR_IDW || (options.method === 'idw' && size >= 2))) {
    return { ...base, ...idwSurface(planar) };
  }
  const value = varies ? mean : (planar.value[0] as number);
  return {
    ...base,
    method: 'mean',
    variogram: null,
    leaveOneOutRmse: errorOfMean === null ? null : varies ? errorOfMean : 0,
    at: () => ({ mean: value, variance: null }),
    many: (x) => new Float64Array(x.length).fill(value),
    over: (_, cells) => new Float64Array(cells.length).fill(value),
  };
}

type MethodPart = Omit<FittedSurface, 'leaveOneOutRmseOfMean' | 'pointCount'>;

function krigedSurface(kriging: Kriging, leaveOneOutRmse: number): MethodPart {
  const many = (x: Float64Array, y: Float64Array) => {
    const into = new Float64Array(x.length);
    krigeMany(kriging, x, y, into);
    return into;
  };
  return {
    method: 'kriging',
    variogram: kriging.variogram,
    leaveOneOutRmse,
    at: (x, y) => krigeAt(kriging, x, y),
    many,
    over: ({ columns, cellMeters, left, top }, cells) => {
      const x = new Float64Array(cells.length);
      const y = new Float64Array(cells.length);
      for (let k = 0; k < cells.length; k++) {
        const row = Math.floor((cells[k] as number) / columns);
        x[k] = left + ((cells[k] as number) - row * columns + 0.5) * cellMeters;
        y[k] = top - (row + 0.5) * cellMeters;
      }
      return many(x, y);
    },
  };
}

function idwSurface(points: PlanarPoints): MethodPart {
  return {
    method: 'idw',
    variogram: null,
    leaveOneOutRmse: rootMeanSquare(idwLeaveOneOutErrors(points)),
    at: (x, y) => ({ mean: idwAt(points, x, y), variance: null }),
    many: (x, y) => x.map((xk, k) => idwAt(points, xk, y[k] as number)),
    over: (grid, cells) => {
      const all = idwOverGrid(points, grid);
      const values = new Float64Array(cells.length);
      for (let k = 0; k < cells.length; k++) values[k] = all[cells[k] as number] as number;
      return values;
    },
  };
}

function isFinitePoint({ x, y, value }: SurfacePoint): boolean {
  return Number.isFinite(x) && Number.isFinite(y) && Number.isFinite(value);
}

function rootMeanSquare(errors: Float64Array): number {
  return Math.sqrt(errors.reduce((sum, error) => sum + error * error, 0) / errors.length);
}

/** Averages the points of each cell of a lattice of the given width: place and value. Order of points does not matter. */
function mergedAt(points: readonly SurfacePoint[], widthMeters: number): PlanarPoints {
  const cells = new Map<string, { x: number; y: number; value: number; count: number }>();
  for (const { x, y, value } of points) {
    const key = `${Math.round(x / widthMeters)},${Math.round(y / widthMeters)}`;
    const cell = cells.get(key);
    if (!cell) cells.set(key, { x, y, value, count: 1 });
    else {
      cell.count++;
      cell.x += (x - cell.x) / cell.count;
      cell.y += (y - cell.y) / cell.count;
      cell.value += (value - cell.value) / cell.count;
    }
  }
  const merged = [...cells.values()].sort((a, b) => a.x - b.x || a.y - b.y);
  return {
    x: Float64Array.from(merged, (cell) => cell.x),
    y: Float64Array.from(merged, (cell) => cell.y),
    value: Float64Array.from(merged, (cell) => cell.value),
  };
}

function thinned(points: PlanarPoints): PlanarPoints {
  if (points.x.length <= MOST_POINTS) return points;
  const list = Array.from(points.x, (x, i) => ({ x, y: points.y[i] as number, value: points.value[i] as number }));
  const extent = (values: Float64Array) => values.reduce((a, b) => Math.max(a, b)) - values.reduce((a, b) => Math.min(a, b));
  let width = Math.sqrt((Math.max(extent(points.x), 1) * Math.max(extent(points.y), 1)) / MOST_POINTS);
  let merged = mergedAt(list, width);
  while (merged.x.length > MOST_POINTS) {
    width *= 1.2;
    merged = mergedAt(list, width);
  }
  return merged;
}

/** Points in degrees → planar metres about their middle, and the way there for further places. */
export function projectPoints(points: readonly GeographicPoint[]): {
  points: SurfacePoint[];
  project(longitude: number, latitude: number): { x: number; y: number };
} {
  const middle = (values: number[]) => (Math.min(...values) + Math.max(...values)) / 2;
  const projection = localProjection(
    points.length === 0 ? 0 : middle(points.map((point) => point.longitude)),
    points.length === 0 ? 0 : middle(points.map((point) => point.latitude)),
  );
  const project = (longitude: number, latitude: number) => ({
    x: eastMeters(projection, longitude),
    y: northMeters(projection, latitude),
  });
  return { project, points: points.map(({ longitude, latitude, value }) => ({ ...project(longitude, latitude), value })) };
}

/** A surface over a field, ready to draw and to measure. Plain data: it can be stored and sent. */
export interface FieldSurface {
  method: SurfaceMethod;
  variogram: Variogram | null;
  leaveOneOutRmse: number | null;
  pointCount: number;
  /** West, south, east, north of the grid, degrees. */
  bounds: [number, number, number, number];
  columns: number;
  rows: number;
  cellMeters: number;
  /** Row by row from the north-west corner; `null` outside the field. */
  values: (number | null)[];
  minimum: number;
  mean: number;
  maximum: number;
}

/**
 * The surface of points (degrees) over a field's boundary (WGS84): `fitSurface` on a grid of about 20 m, at most 40,000 cells,
 * inside the boundary only. `null` without a point or with a boundary that has no extent.
 */
export function surfaceOfField(
  points: readonly GeographicPoint[],
  geometry: Polygon | MultiPolygon,
  options: SurfaceOptions = {},
): FieldSurface | null {
  const grid = gridOverField(geometry);
  if (!grid) return null;
  const fitted = fitSurface(
    points.map(({ longitude, latitude, value }) => ({
      x: eastMeters(grid.projection, longitude),
      y: northMeters(grid.projection, latitude),
      value,
    })),
    options,
  );
  if (!fitted) return null;
  const estimates = fitted.over(grid, grid.inside);
  const values = new Array<number | null>(grid.columns * grid.rows).fill(null);
  let minimum = Infinity;
  let maximum = -Infinity;
  let sum = 0;
  grid.inside.forEach((cell, k) => {
    const value = estimates[k] as number;
    values[cell] = value;
    sum += value;
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
  });
  return {
    method: fitted.method,
    variogram: fitted.variogram,
    leaveOneOutRmse: fitted.leaveOneOutRmse,
    pointCount: fitted.pointCount,
    bounds: grid.bounds,
    columns: grid.columns,
    rows: grid.rows,
    cellMeters: grid.cellMeters,
    values,
    minimum,
    mean: sum / grid.inside.length,
    maximum,
  };
}

/** Shares of a surface's area by value rounded to `step` (0.1 for pH), ascending; they sum to 1. */
export function valueShares(surface: FieldSurface, step = 0.1): { value: number; share: number }[] {
  const perUnit = Math.round(1 / step);
  const counts = new Map<number, number>();
  let total = 0;
  for (const value of surface.values) {
    if (value === null) continue;
    const bin = Math.round(value * perUnit);
    counts.set(bin, (counts.get(bin) ?? 0) + 1);
    total++;
  }
  return [...counts.entries()].sort(([a], [b]) => a - b).map(([bin, count]) => ({ value: bin / perUnit, share: count / total }));
}
