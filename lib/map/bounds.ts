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
