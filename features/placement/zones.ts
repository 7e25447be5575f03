import { area, booleanPointInPolygon, simplify } from '@turf/turf';
import type { MultiPolygon, Polygon } from 'geojson';

/** A maturity zone of the dealership: ground where varieties of a range of RM belong. */
export interface MaturityZone {
  id: string;
  name: string;
  geometry: Polygon | MultiPolygon;
  relativeMaturityFrom: number;
  relativeMaturityTo: number;
}

/** `RM 2.1–2.5`. */
export function rangeWords(zone: { relativeMaturityFrom: number; relativeMaturityTo: number }): string {
  return `RM ${zone.relativeMaturityFrom.toFixed(1)}–${zone.relativeMaturityTo.toFixed(1)}`;
}

/** The zone that counts at a place: where zones lie over each other, the smaller one. `null` outside all of them. */
export function zoneAt<Zone extends Pick<MaturityZone, 'geometry'>>(zones: readonly Zone[], longitude: number, latitude: number) {
  const covering = zones.filter((zone) => booleanPointInPolygon([longitude, latitude], zone.geometry));
  return covering.length < 2
    ? (covering[0] ?? null)
    : (covering.sort((one, other) => area(one.geometry) - area(other.geometry))[0] as Zone);
}

/** Corners beyond this are more than a line on a map of maturity can mean. */
const MOST_CORNERS = 2000;
/** About 150 m, far below what any maturity line is known to. */
const TOLERANCE_DEGREES = 0.0015;

function cornersOf(geometry: Polygon | MultiPolygon): number {
  const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
  return polygons.flat().reduce((sum, ring) => sum + ring.length, 0);
}

/** An outline light enough to be read with every score; small ones stay as they are. */
export function simplerOutline(geometry: Polygon | MultiPolygon): Polygon | MultiPolygon {
  return cornersOf(geometry) <= MOST_CORNERS
    ? geometry
    : simplify(geometry, { tolerance: TOLERANCE_DEGREES, highQuality: true, mutate: false });
}

/** A range of RM read out of a zone's name or attributes ("2.1-2.5", "RM 2.1 to 2.5", "zone 2.3"); `null` when it says none. */
export function rangeIn(text: string): { from: number; to: number } | null {
  const numbers = [...text.replace(/[–—]/g, '-').matchAll(/(?<![\d.])\d\.\d(?!\d)/g)].map((match) => Number(match[0]));
  if (numbers.length === 0) return null;
  const [from, to] = [Math.min(...numbers.slice(0, 2)), Math.max(...numbers.slice(0, 2))];
  return numbers.length === 1 ? { from: Number((from - 0.2).toFixed(1)), to: Number((from + 0.2).toFixed(1)) } : { from, to };
}

/** A box of degrees as an outline. */
export function boxOutline(box: { west: number; south: number; east: number; north: number }): Polygon {
  const { west, south, east, north } = box;
  return {
    type: 'Polygon',
    coordinates: [
      [
        [west, south],
        [east, south],
        [east, north],
        [west, north],
        [west, south],
      ],
    ],
  };
}
