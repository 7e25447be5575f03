/** A grid of square cells over a field: which cells lie inside the boundary, holes left out. */
import type { MultiPolygon, Polygon, Position } from 'geojson';
import type { CellGrid } from './idw-grid';
import { eastMeters, type LocalProjection, localProjection, northMeters } from './projection';

const CELL_METERS = 20;
export const MAXIMUM_CELLS = 40_000;
/** A small field gets finer cells, so that its shares are not those of a dozen squares. */
const FEWEST_CELLS = 100;

export interface FieldGrid extends CellGrid {
  projection: LocalProjection;
  /** West, south, east, north of the grid, degrees. */
  bounds: [number, number, number, number];
  /** Cells inside, as row × columns + column, rows from north to south. */
  inside: Int32Array;
}

function ringsOf(geometry: Polygon | MultiPolygon): Position[][] {
  return geometry.type === 'Polygon' ? geometry.coordinates : geometry.coordinates.flat();
}

/**
 * Lays a grid of about 20 m over a polygon (degrees, WGS84): coarser so that it never has more than 40,000 cells, finer on
 * fields under 10 acres. A cell is inside when its centre is, by the even-odd rule over all rings. A boundary too thin to hold a
 * centre keeps the cell at its middle. `null` when the boundary has no extent or is no number.
 */
export function gridOverField(geometry: Polygon | MultiPolygon): FieldGrid | null {
  const rings = ringsOf(geometry);
  let west = Infinity;
  let east = -Infinity;
  let south = Infinity;
  let north = -Infinity;
  for (const ring of rings) {
    for (const [longitude, latitude] of ring) {
      west = Math.min(west, longitude as number);
      east = Math.max(east, longitude as number);
      south = Math.min(south, latitude as number);
      north = Math.max(north, latitude as number);
    }
  }
  if (!Number.isFinite(west + east + south + north) || west >= east || south >= north) return null;
  const projection = localProjection((west + east) / 2, (south + north) / 2);
  const width = (east - west) * projection.metersPerDegreeEast;
  const height = (north - south) * projection.metersPerDegreeNorth;
  const { columns, rows, cellMeters } = shape(width, height);

  const left = -(columns * cellMeters) / 2;
  const top = (rows * cellMeters) / 2;
  const edges = planarEdges(rings, projection);
  const inside: number[] = [];
  for (let row = 0; row < rows; row++) {
    const y = top - (row + 0.5) * cellMeters;
    const crossings = crossingsAt(edges, y);
    for (let i = 0; i + 1 < crossings.length; i += 2) {
      const from = Math.max(0, Math.ceil(((crossings[i] as number) - left) / cellMeters - 0.5));
      const to = Math.min(columns - 1, Math.ceil(((crossings[i + 1] as number) - left) / cellMeters - 0.5) - 1);
      for (let column = from; column <= to; column++) inside.push(row * columns + column);
    }
  }
  if (inside.length === 0) inside.push(Math.floor(rows / 2) * columns + Math.floor(columns / 2));
  const halfEast = (columns * cellMeters) / 2 / projection.metersPerDegreeEast;
  const halfNorth = (rows * cellMeters) / 2 / projection.metersPerDegreeNorth;
  return {
    projection,
    bounds: [
      projection.longitude - halfEast,
      projection.latitude - halfNorth,
      projection.longitude + halfEast,
      projection.latitude + halfNorth,
    ],
    columns,
    rows,
    cellMeters,
    left,
    top,
    inside: Int32Array.from(inside),
  };
}

function shape(width: number, height: number): { columns: number; rows: number; cellMeters: number } {
  let cellMeters = Math.min(CELL_METERS, Math.sqrt((width * height) / FEWEST_CELLS));
  const cells = () => ({
    columns: Math.max(1, Math.ceil(width / cellMeters)),
    rows: Math.max(1, Math.ceil(height / cellMeters)),
  });
  let { columns, rows } = cells();
  while (columns * rows > MAXIMUM_CELLS) {
    cellMeters *= Math.max(1.01, Math.sqrt((columns * rows) / MAXIMUM_CELLS));
    ({ columns, rows } = cells());
  }
  return { columns, rows, cellMeters };
}

interface Edge {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
}

function planarEdges(rings: Position[][], projection: LocalProjection): Edge[] {
  return rings.flatMap((ring) => {
    const x = ring.map(([longitude]) => eastMeters(projection, longitude as number));
    const y = ring.map(([, latitude]) => northMeters(projection, latitude as number));
    return ring.map((_, i) => {
      const j = (i + 1) % ring.length;
      return { x1: x[i] as number, y1: y[i] as number, x2: x[j] as number, y2: y[j] as number };
    });
  });
}

/** Where a horizontal line at y crosses the boundary, west to east; an even number. */
function crossingsAt(edges: readonly Edge[], y: number): number[] {
  const crossings: number[] = [];
  for (const { x1, y1, x2, y2 } of edges) {
    if (y1 <= y !== y2 <= y) crossings.push(x1 + ((y - y1) / (y2 - y1)) * (x2 - x1));
  }
  return crossings.sort((a, b) => a - b);
}
