import type { Polygon, Position } from 'geojson';

/** Invented fields on the square-mile grid of north-central Iowa. x and y are metres east and north of a section corner. */
const ORIGIN = { latitude: 42.728, longitude: -93.612 };
const METERS_PER_DEGREE = 111_120;
export const MILE_METERS = 1609.344;
/** Half a road's width and the ditch. */
const SETBACK_METERS = 14;

export interface Plane {
  x: number;
  y: number;
}

/** Plane metres to longitude and latitude, seven decimals (about a centimetre). */
export function lonLat({ x, y }: Plane): Position {
  const latitude = ORIGIN.latitude + y / METERS_PER_DEGREE;
  const longitude = ORIGIN.longitude + x / (METERS_PER_DEGREE * Math.cos((ORIGIN.latitude * Math.PI) / 180));
  return [Number(longitude.toFixed(7)), Number(latitude.toFixed(7))];
}

/** How the plain rectangle is cut: a creek along an edge, a farmstead out of a corner, a railroad across one. */
export type Cut = 'creek south' | 'creek north' | 'farmstead ne' | 'farmstead sw' | 'railroad se' | 'pond' | 'none';

export interface DemoField {
  name: string;
  farm: string;
  /** Section east and north of the origin, and the rectangle inside it in fractions of a mile. */
  section: readonly [number, number];
  part: readonly [number, number, number, number];
  cut: Cut;
}

/** The creek of the demo, a line across the country. */
function creekNorthing(x: number): number {
  return 1180 + 170 * Math.sin(x / 620) + 70 * Math.sin(x / 240 + 1.3);
}

/** Boundary of a demo field in plane metres, counter-clockwise and closed; a pond is a hole. */
export function ringsOf(field: DemoField): Plane[][] {
  const [i, j] = field.section;
  const [x0, y0, x1, y1] = field.part;
  const inset = (fraction: number) => (fraction === 0 ? SETBACK_METERS : fraction === 1 ? -SETBACK_METERS : 0);
  const west = (i + x0) * MILE_METERS + inset(x0);
  const east = (i + x1) * MILE_METERS + inset(x1);
  const south = (j + y0) * MILE_METERS + inset(y0);
  const north = (j + y1) * MILE_METERS + inset(y1);
  return [
    outline(field.cut, { west, east, south, north }),
    ...(field.cut === 'pond' ? [pond(west, east, south, north)] : []),
  ].map(closed);
}

type Box = Record<'west' | 'east' | 'south' | 'north', number>;

function outline(cut: Cut, { west, east, south, north }: Box): Plane[] {
  const sw = { x: west, y: south };
  const se = { x: east, y: south };
  const ne = { x: east, y: north };
  const nw = { x: west, y: north };
  switch (cut) {
    case 'creek south':
      return [...bank(west, east, 26), ne, nw];
    case 'creek north':
      return [sw, se, ...bank(west, east, -26).reverse()];
    case 'farmstead ne':
      return [sw, se, { x: east, y: north - 150 }, { x: east - 190, y: north - 150 }, { x: east - 190, y: north }, nw];
    case 'farmstead sw':
      return [{ x: west + 170, y: south }, se, ne, nw, { x: west, y: south + 140 }, { x: west + 170, y: south + 140 }];
    case 'railroad se':
      return [sw, { x: east - 330, y: south }, { x: east, y: south + 300 }, ne, nw];
    default:
      return [sw, se, ne, nw];
  }
}

function bank(west: number, east: number, offset: number): Plane[] {
  const steps = Math.ceil((east - west) / 45);
  return Array.from({ length: steps + 1 }, (_, step) => {
    const x = west + ((east - west) * step) / steps;
    return { x, y: creekNorthing(x) + offset };
  });
}

function pond(west: number, east: number, south: number, north: number): Plane[] {
  const center = { x: west + (east - west) * 0.62, y: south + (north - south) * 0.38 };
  return Array.from({ length: 18 }, (_, step) => {
    const angle = (-step / 18) * 2 * Math.PI;
    return { x: center.x + Math.cos(angle) * (62 + 9 * Math.sin(angle * 3)), y: center.y + Math.sin(angle) * 48 };
  });
}

function closed(ring: Plane[]): Plane[] {
  return [...ring, ring[0] as Plane];
}

/** Boundary of a demo field as GeoJSON. */
export function boundaryOf(field: DemoField): Polygon {
  return { type: 'Polygon', coordinates: ringsOf(field).map((ring) => ring.map(lonLat)) };
}
