/** Which field a soil point belongs to, by geometry. */
import type { MultiPolygon, Polygon, Position } from 'geojson';
import { METERS_PER_FOOT } from '@/lib/units';
import { eastMeters, localProjection, northMeters } from './surface/projection';

/** A point this near a field's edge still belongs to it: a sampler's receiver is no surveyor's. */
export const EDGE_TOLERANCE_FT = 30;

/** Distance from a place (degrees) to a boundary, feet; 0 inside. */
export function distanceToFieldFt(geometry: Polygon | MultiPolygon, longitude: number, latitude: number): number {
  const projection = localProjection(longitude, latitude);
  const rings: Position[][] = geometry.type === 'Polygon' ? geometry.coordinates : geometry.coordinates.flat();
  let inside = false;
  let nearest = Infinity;
  for (const ring of rings) {
    for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
      // The place is the plane's origin.
      const x1 = eastMeters(projection, ring[j]?.[0] as number);
      const y1 = northMeters(projection, ring[j]?.[1] as number);
      const x2 = eastMeters(projection, ring[i]?.[0] as number);
      const y2 = northMeters(projection, ring[i]?.[1] as number);
      if (y1 > 0 !== y2 > 0 && x1 - (y1 / (y2 - y1)) * (x2 - x1) > 0) inside = !inside;
      const lengthSquared = (x2 - x1) ** 2 + (y2 - y1) ** 2;
      const t = lengthSquared === 0 ? 0 : Math.max(0, Math.min(1, -(x1 * (x2 - x1) + y1 * (y2 - y1)) / lengthSquared));
      nearest = Math.min(nearest, Math.hypot(x1 + t * (x2 - x1), y1 + t * (y2 - y1)));
    }
  }
  return inside ? 0 : nearest / METERS_PER_FOOT;
}

/** The field that holds a point, else the nearest one within 30 ft; `null` when there is none. */
export function fieldOfPoint<Field extends { geometry: Polygon | MultiPolygon }>(
  fields: readonly Field[],
  longitude: number,
  latitude: number,
): Field | null {
  let best: Field | null = null;
  let bestFt = EDGE_TOLERANCE_FT;
  for (const field of fields) {
    const feet = distanceToFieldFt(field.geometry, longitude, latitude);
    if (feet <= bestFt && (best === null || feet < bestFt)) {
      best = field;
      bestFt = feet;
    }
    if (bestFt === 0) break;
  }
  return best;
}
