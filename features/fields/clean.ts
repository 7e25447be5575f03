import { kinks, rewind } from '@turf/turf';
import type { Geometry, MultiPolygon, Polygon, Position } from 'geojson';
import { union } from 'polyclip-ts';
import { areaAcres, ringSquareMeters } from './acres';
import type { Boundary } from './model';

/** A shape after cleaning: what is left of it, what was wrong, and what was done. */
export interface Cleaned {
  /** `null` when nothing usable is left. */
  geometry: Boundary | null;
  areaAcres: number;
  /** What was wrong or should be looked at, in words. */
  problems: string[];
  /** True when the geometry is not as it stands in the file. */
  changed: boolean;
}

/** Smallest area that is taken for a field, acres. */
const SMALLEST_FIELD_ACRES = 0.5;
/** Parts smaller than this beside larger ones are slivers, m². */
const SLIVER_SQUARE_METERS = 40;
/** Where soybeans are grown in North America: south Texas to the Peace River, the Rockies to the Atlantic. */
const SOYBEAN_AREA = { west: -120, east: -64, south: 24, north: 57 };

const nothing = (problem: string): Cleaned => ({ geometry: null, areaAcres: 0, problems: [problem], changed: false });

/** Cleans one shape: whole rings, no crossings, no slivers, right-hand winding (RFC 7946), two dimensions. */
export function cleanBoundary(geometry: Geometry | null): Cleaned {
  if (!geometry) return nothing('The shape is empty. It is left out.');
  const polygons = polygonsOf(geometry);
  if (polygons.length === 0) return nothing(`This is ${articled(geometry.type)}, not an outline. It is left out.`);
  const fault = coordinateFault(polygons);
  if (fault) return nothing(fault);

  const problems: string[] = [];
  let changed = false;
  let parts = polygons
    .map((rings) => rings.map(tidyRing))
    .map((rings) => {
      const outer = rings[0];
      return outer && outer.length >= 4 ? [outer, ...rings.slice(1).filter((ring) => ring.length >= 4)] : null;
    })
    .filter((rings): rings is Position[][] => rings !== null);
  if (parts.length === 0) return nothing('The shape has no area: fewer than three different corners. It is left out.');

  if (parts.some(crossesItself)) {
    const repaired = repair(parts);
    if (!repaired) return nothing('The outline crosses itself and could not be mended. Draw it again.');
    parts = repaired;
    problems.push(
      `The outline crossed itself. It was mended${parts.length > 1 ? ` into ${parts.length} parts` : ''}; look at it on the map.`,
    );
    changed = true;
  }
  const large = parts.filter((rings) => ringSquareMeters(rings[0] as Position[]) >= SLIVER_SQUARE_METERS);
  if (large.length > 0 && large.length < parts.length) {
    problems.push(
      `${parts.length - large.length} ${parts.length - large.length === 1 ? 'sliver was' : 'slivers were'} left out.`,
    );
    parts = large;
    changed = true;
  }
  const geometryKept = rewind(
    parts.length === 1
      ? { type: 'Polygon', coordinates: parts[0] as Position[][] }
      : { type: 'MultiPolygon', coordinates: parts },
  ) as Boundary;
  const acres = areaAcres(geometryKept);
  if (!Number.isFinite(acres) || acres <= 0) return nothing('The shape has no area. It is left out.');
  if (acres < SMALLEST_FIELD_ACRES)
    problems.push(`Only ${acres.toFixed(2)} ac: under ${SMALLEST_FIELD_ACRES} ac is seldom a field.`);
  if (outsideSoybeanArea(geometryKept))
    problems.push('It lies outside the part of North America where soybeans grow. Check the coordinate system.');
  return { geometry: geometryKept, areaAcres: acres, problems, changed };
}

function articled(type: string): string {
  return { Point: 'a point', MultiPoint: 'points', LineString: 'a line', MultiLineString: 'lines' }[type] ?? 'not an area';
}

function polygonsOf(geometry: Geometry): Position[][][] {
  if (geometry.type === 'Polygon') return Array.isArray(geometry.coordinates) ? [geometry.coordinates] : [];
  if (geometry.type === 'MultiPolygon') return Array.isArray(geometry.coordinates) ? geometry.coordinates : [];
  if (geometry.type === 'GeometryCollection' && Array.isArray(geometry.geometries)) {
    return geometry.geometries.flatMap((one) =>
      one && (one.type === 'Polygon' || one.type === 'MultiPolygon') ? polygonsOf(one) : [],
    );
  }
  return [];
}

function coordinateFault(polygons: unknown[]): string | null {
  for (const rings of polygons) {
    if (!Array.isArray(rings)) return 'The shape is damaged. It is left out.';
    for (const ring of rings) {
      if (!Array.isArray(ring)) return 'The shape is damaged. It is left out.';
      for (const position of ring) {
        if (!Array.isArray(position) || !Number.isFinite(position[0]) || !Number.isFinite(position[1]))
          return 'A coordinate is not a number. The shape is left out.';
        if (Math.abs(position[0]) > 180 || Math.abs(position[1]) > 90) {
          return `A coordinate (${Number(position[0]).toPrecision(6)}, ${Number(position[1]).toPrecision(6)}) is not on the earth. The file is probably in another coordinate system. The shape is left out.`;
        }
      }
    }
  }
  return null;
}

/** Two dimensions, no corner twice in a row, closed. */
function tidyRing(ring: Position[]): Position[] {
  const tidy: Position[] = [];
  for (const [longitude, latitude] of ring) {
    const last = tidy.at(-1);
    if (!last || last[0] !== longitude || last[1] !== latitude) tidy.push([longitude as number, latitude as number]);
  }
  const first = tidy[0];
  const last = tidy.at(-1);
  if (first && last && (first[0] !== last[0] || first[1] !== last[1])) tidy.push([...first]);
  return tidy;
}

function crossesItself(rings: Position[][]): boolean {
  try {
    return kinks({ type: 'Polygon', coordinates: rings }).features.length > 0;
  } catch {
    return true;
  }
}

/** A union of the outline with itself settles its crossings (Martinez, Rueda and Feito's sweep, as polyclip does it). */
function repair(parts: Position[][][]): Position[][][] | null {
  try {
    const settled = union(parts as never) as Position[][][];
    return settled.length > 0 ? settled : null;
  } catch {
    return null;
  }
}

function outsideSoybeanArea(geometry: Polygon | MultiPolygon): boolean {
  const [longitude, latitude] = (geometry.type === 'Polygon'
    ? geometry.coordinates[0]?.[0]
    : geometry.coordinates[0]?.[0]?.[0]) ?? [0, 0];
  return (
    (longitude as number) < SOYBEAN_AREA.west ||
    (longitude as number) > SOYBEAN_AREA.east ||
    (latitude as number) < SOYBEAN_AREA.south ||
    (latitude as number) > SOYBEAN_AREA.north
  );
}
