import type { MultiPolygon, Polygon } from 'geojson';

/** West, south, east, north of shapes; infinite when there are none. */
export function boundsOf(shapes: (Polygon | MultiPolygon)[]): [number, number, number, number] {
  const bounds: [number, number, number, number] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const shape of shapes) {
    for (const rings of shape.type === 'Polygon' ? [shape.coordinates] : shape.coordinates) {
      for (const [longitude, latitude] of rings[0] ?? []) {
        bounds[0] = Math.min(bounds[0], longitude as number);
        bounds[1] = Math.min(bounds[1], latitude as number);
        bounds[2] = Math.max(bounds[2], longitude as number);
        bounds[3] = Math.max(bounds[3], latitude as number);
      }
    }
  }
  return bounds;
}

/** Twice the signed area and the centre of a closed ring, in degrees: exact enough to place a label. */
function ringCentre(ring: number[][]): { twiceArea: number; longitude: number; latitude: number } {
  const [x0, y0] = ring[0] as [number, number];
  let twiceArea = 0;
  let x = 0;
  let y = 0;
  for (let at = 1; at < ring.length; at += 1) {
    const [xa, ya] = ring[at - 1] as [number, number];
    const [xb, yb] = ring[at] as [number, number];
    const cross = (xa - x0) * (yb - y0) - (xb - x0) * (ya - y0);
    twiceArea += cross;
    x += (xa + xb - 2 * x0) * cross;
    y += (ya + yb - 2 * y0) * cross;
  }
  if (twiceArea === 0) return { twiceArea, longitude: x0, latitude: y0 };
  return { twiceArea, longitude: x0 + x / (3 * twiceArea), latitude: y0 + y / (3 * twiceArea) };
}

/** Longitude and latitude of the middle of a shape's largest part, where its label stands. */
export function labelPointOf(shape: Polygon | MultiPolygon): [number, number] {
  const rings = (shape.type === 'Polygon' ? [shape.coordinates] : shape.coordinates).flatMap((one) => (one[0] ? [one[0]] : []));
  const centres = rings.filter((ring) => ring.length > 2).map(ringCentre);
  const largest = centres.sort((one, other) => Math.abs(other.twiceArea) - Math.abs(one.twiceArea))[0];
  return largest ? [largest.longitude, largest.latitude] : [0, 0];
}
