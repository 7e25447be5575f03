import type { MultiPolygon, Polygon, Position } from 'geojson';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import states from 'us-atlas/states-10m.json';

/** FIPS code of a state → postal code (ANSI INCITS 38). */
const POSTAL_CODES: Record<string, string> = Object.fromEntries(
  (
    '01AL 02AK 04AZ 05AR 06CA 08CO 09CT 10DE 11DC 12FL 13GA 15HI 16ID 17IL 18IN 19IA 20KS 21KY 22LA 23ME 24MD 25MA 26MI 27MN ' +
    '28MS 29MO 30MT 31NE 32NV 33NH 34NJ 35NM 36NY 37NC 38ND 39OH 40OK 41OR 42PA 44RI 45SC 46SD 47TN 48TX 49UT 50VT 51VA 53WA ' +
    '54WV 55WI 56WY 72PR'
  )
    .split(' ')
    .map((pair) => [pair.slice(0, 2), pair.slice(2)]),
);

interface StateShape {
  code: string;
  /** West, south, east, north. */
  bounds: [number, number, number, number];
  polygons: Position[][][];
}

let shapes: StateShape[] | null = null;

function stateShapes(): StateShape[] {
  if (shapes) return shapes;
  // The package's JSON is typed by its literal arcs, which are not tuples.
  const topology = states as unknown as Topology<{ states: GeometryCollection }>;
  shapes = feature(topology, topology.objects.states).features.flatMap((one) => {
    const code = POSTAL_CODES[String(one.id)];
    const geometry = one.geometry as Polygon | MultiPolygon;
    if (!code) return [];
    const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
    const bounds: StateShape['bounds'] = [Infinity, Infinity, -Infinity, -Infinity];
    for (const [x, y] of polygons.flat(2) as [number, number][]) {
      bounds[0] = Math.min(bounds[0], x);
      bounds[1] = Math.min(bounds[1], y);
      bounds[2] = Math.max(bounds[2], x);
      bounds[3] = Math.max(bounds[3], y);
    }
    return [{ code, bounds, polygons }];
  });
  return shapes;
}

/** Even-odd over all rings. */
function isInside(polygons: Position[][][], longitude: number, latitude: number): boolean {
  let inside = false;
  for (const ring of polygons.flat()) {
    for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
      const [xi, yi] = ring[i] as [number, number];
      const [xj, yj] = ring[j] as [number, number];
      if (yi > latitude !== yj > latitude && longitude < ((xj - xi) * (latitude - yi)) / (yj - yi) + xi) inside = !inside;
    }
  }
  return inside;
}

/**
 * Postal code of the state that a point lies in, `null` outside the United States. Borders are the Census Bureau's cartographic
 * boundaries at 1:10 million (us-atlas), right to about a mile.
 */
export function stateOf(latitude: number, longitude: number): string | null {
  const found = stateShapes().find(
    ({ bounds, polygons }) =>
      longitude >= bounds[0] &&
      longitude <= bounds[2] &&
      latitude >= bounds[1] &&
      latitude <= bounds[3] &&
      isInside(polygons, longitude, latitude),
  );
  return found?.code ?? null;
}
