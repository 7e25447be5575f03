import { booleanPointInPolygon } from '@turf/turf';
import type { Polygon } from 'geojson';
import { areaAcres } from '@/features/fields/acres';
import type { DrainageClass } from '@/features/placement/engine/model';
import { boundaryOf, type DemoField, lonLat, type Plane, ringsOf } from './land';
import { seededRandom, smoothNoise } from './random';

/** Invented soil: smooth acid uplands, potholes with dark centres and calcareous rims. */
const broad = smoothNoise(11);
const fine = smoothNoise(23);
const wet = smoothNoise(37);
/** One sample on about 2.5 acres. */
const GRID_METERS = 100.6;
const POTHOLE_SPACING_METERS = 560;

function potholeNearness({ x, y }: Plane): { rim: number; center: number } {
  let rim = 0;
  let center = 0;
  const i = Math.round(x / POTHOLE_SPACING_METERS);
  const j = Math.round(y / POTHOLE_SPACING_METERS);
  for (let di = -1; di <= 1; di += 1) {
    for (let dj = -1; dj <= 1; dj += 1) {
      const random = seededRandom(9000 + (i + di) * 131 + (j + dj) * 7919);
      const px = (i + di + (random() - 0.5) * 0.7) * POTHOLE_SPACING_METERS;
      const py = (j + dj + (random() - 0.5) * 0.7) * POTHOLE_SPACING_METERS;
      const calcareous = random() < 0.45;
      const distance = Math.hypot(x - px, y - py);
      center = Math.max(center, Math.exp(-((distance / 80) ** 2)));
      if (calcareous) rim = Math.max(rim, Math.exp(-(((distance - 105) / 45) ** 2)));
    }
  }
  return { rim, center };
}

/** pH of the ground at a place, 5.2 to 8.0. */
function phAt(place: Plane): number {
  const { rim } = potholeNearness(place);
  const upland = 6.22 + 0.95 * broad(place.x / 610, place.y / 610) + 0.32 * fine(place.x / 170, place.y / 170);
  return Math.min(8, Math.max(5.2, upland + 1.35 * rim));
}

export interface DemoSample {
  sampleNumber: string;
  longitude: number;
  latitude: number;
  ph: number;
  bufferPh: number | null;
  organicMatterPercent: number;
  cationExchangeCapacity: number;
  phosphorusPpm: number;
  potassiumPpm: number;
  carbonatePercent: number | null;
  electricalConductivity: number | null;
}

/** Grid samples of a field, as a laboratory would report them. */
export function samplesOf(field: DemoField): DemoSample[] {
  const boundary = boundaryOf(field);
  const ring = ringsOf(field)[0] as Plane[];
  const random = seededRandom(field.name.length * 977 + Math.round((ring[0] as Plane).x));
  const samples: DemoSample[] = [];
  const west = Math.min(...ring.map((one) => one.x));
  const south = Math.min(...ring.map((one) => one.y));
  const east = Math.max(...ring.map((one) => one.x));
  const north = Math.max(...ring.map((one) => one.y));
  for (let y = south + GRID_METERS / 2; y < north; y += GRID_METERS) {
    for (let x = west + GRID_METERS / 2; x < east; x += GRID_METERS) {
      const place = { x: x + (random() - 0.5) * 24, y: y + (random() - 0.5) * 24 };
      const [longitude, latitude] = lonLat(place) as [number, number];
      if (!booleanPointInPolygon([longitude, latitude], boundary)) continue;
      const { center, rim } = potholeNearness(place);
      const ph = Number((phAt(place) + (random() - 0.5) * 0.16).toFixed(1));
      samples.push({
        sampleNumber: String(samples.length + 1),
        longitude,
        latitude,
        ph,
        bufferPh: ph < 6.5 ? Number((6.95 - (6.8 - ph) * 0.42 + (random() - 0.5) * 0.08).toFixed(1)) : null,
        organicMatterPercent: Number((3.6 + 2.4 * center + 0.5 * random()).toFixed(1)),
        cationExchangeCapacity: Number((17 + 9 * center + 4 * rim + 2 * random()).toFixed(1)),
        phosphorusPpm: Math.round(14 + 22 * random() * random()),
        potassiumPpm: Math.round(140 + 90 * random()),
        carbonatePercent: ph >= 7.3 ? Number(((ph - 7.2) * 9 * (0.7 + 0.6 * random())).toFixed(1)) : null,
        electricalConductivity: ph >= 7.3 ? Number((0.25 + (ph - 7.2) * 0.7 * random()).toFixed(2)) : null,
      });
    }
  }
  return samples;
}

export interface DemoMapUnit {
  symbol: string;
  name: string;
  drainage: DrainageClass;
  hydrologicGroup: string;
  slopePercent: number;
  availableWaterInches: number;
  surfacePh: number;
  surfaceCarbonatePercent: number;
  geometry: Polygon;
  areaAcres: number;
}

const UNITS: Record<'upland' | 'flat' | 'wet', Omit<DemoMapUnit, 'geometry' | 'areaAcres'>> = {
  upland: {
    symbol: 'D138B',
    name: 'Demo loam, 2 to 6 percent slopes',
    drainage: 'moderately well',
    hydrologicGroup: 'C',
    slopePercent: 4,
    availableWaterInches: 7.1,
    surfacePh: 6.3,
    surfaceCarbonatePercent: 0,
  },
  flat: {
    symbol: 'D55',
    name: 'Demo clay loam, 1 to 3 percent slopes',
    drainage: 'somewhat poorly',
    hydrologicGroup: 'C/D',
    slopePercent: 2,
    availableWaterInches: 7.6,
    surfacePh: 6.6,
    surfaceCarbonatePercent: 0.5,
  },
  wet: {
    symbol: 'D507',
    name: 'Demo silty clay loam, 0 to 2 percent slopes',
    drainage: 'poorly',
    hydrologicGroup: 'C/D',
    slopePercent: 1,
    availableWaterInches: 8.2,
    surfacePh: 7.4,
    surfaceCarbonatePercent: 4,
  },
};

/** Invented survey map units of a rectangular field: three strips whose widths follow the wetness of the place. */
export function mapUnitsOf(field: DemoField): DemoMapUnit[] {
  if (field.cut !== 'none') return [];
  const ring = ringsOf(field)[0] as Plane[];
  const [sw, , ne] = ring as [Plane, Plane, Plane];
  const share = 0.34 + 0.16 * wet(sw.x / 900, sw.y / 900);
  const cuts = [sw.x, sw.x + (ne.x - sw.x) * share, sw.x + (ne.x - sw.x) * (share + 0.36), ne.x];
  return (['upland', 'flat', 'wet'] as const).map((kind, index) => {
    const west = cuts[index] as number;
    const east = cuts[index + 1] as number;
    const corners = [
      { x: west, y: sw.y },
      { x: east, y: sw.y },
      { x: east, y: ne.y },
      { x: west, y: ne.y },
      { x: west, y: sw.y },
    ];
    const geometry: Polygon = { type: 'Polygon', coordinates: [corners.map(lonLat)] };
    return { ...UNITS[kind], geometry, areaAcres: areaAcres(geometry) };
  });
}
