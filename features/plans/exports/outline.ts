/** A field's boundary as a small drawing, for paper and for the sheet. Pure. */
import type { MultiPolygon, Polygon, Position } from 'geojson';
import { METERS_PER_FOOT } from '@/lib/units';

/** Metres in one degree of latitude, mean over the ellipsoid; a sketch needs no more. */
const METERS_PER_DEGREE = 111_132;

export interface Outline {
  /** SVG path data in a box of the given width and height. */
  path: string;
  /** A round length for the scale bar, feet, and how long it is drawn. */
  scaleFeet: number;
  scaleLength: number;
}

/** Boundary rings (holes too) fitted into a box, north up, same scale both ways. */
export function outlineOf(geometry: Polygon | MultiPolygon, width: number, height: number, margin = 4): Outline {
  const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
  const points = polygons.flat(2) as Position[];
  const west = Math.min(...points.map((point) => point[0] as number));
  const east = Math.max(...points.map((point) => point[0] as number));
  const south = Math.min(...points.map((point) => point[1] as number));
  const north = Math.max(...points.map((point) => point[1] as number));
  const eastMeters = METERS_PER_DEGREE * Math.cos((((south + north) / 2) * Math.PI) / 180);
  const groundWidth = Math.max((east - west) * eastMeters, 1);
  const groundHeight = Math.max((north - south) * METERS_PER_DEGREE, 1);
  const scale = Math.min((width - 2 * margin) / groundWidth, (height - 2 * margin) / groundHeight);
  const left = (width - groundWidth * scale) / 2;
  const top = (height - groundHeight * scale) / 2;
  const place = ([longitude, latitude]: Position): string => {
    const x = left + ((longitude as number) - west) * eastMeters * scale;
    const y = top + (north - (latitude as number)) * METERS_PER_DEGREE * scale;
    return `${x.toFixed(1)} ${y.toFixed(1)}`;
  };
  const path = polygons
    .flat()
    .map((ring) => `M${ring.slice(0, -1).map(place).join('L')}Z`)
    .join('');
  const feetAcross = (width - 2 * margin) / scale / METERS_PER_FOOT;
  const scaleFeet = [5000, 2000, 1000, 500, 200, 100, 50].find((feet) => feet <= feetAcross / 3) ?? 20;
  return { path, scaleFeet, scaleLength: scaleFeet * METERS_PER_FOOT * scale };
}
