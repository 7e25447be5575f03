import type { Geometry } from 'geojson';
import type { NamedBytes } from '@/lib/archive';
import type { Outcome } from '@/lib/errors';

/** One shape as a file has it, before cleaning. `geometry` is WGS84, or `null` where the file has an empty shape. */
export interface RawFeature {
  geometry: Geometry | null;
  properties: Record<string, unknown>;
  /** Faults of this shape met while reading. */
  problems: string[];
}

export interface RawLayer {
  name: string;
  features: RawFeature[];
  notes: string[];
  /** Set when the file does not say its coordinate system: a guess, and an example coordinate as it stands. */
  unknownCrs: { guess: string | null; example: [number, number] } | null;
}

export interface ReadOptions {
  /** 'EPSG:26915', 'EPSG:4326', … or WKT: for files that do not say their coordinate system. */
  crs?: string;
  nameColumn?: string;
}

/** One file format behind one face. To add a format: one file with one of these, and a line in index.ts. */
export interface BoundaryReader {
  /** Name of the format as people know it. */
  format: string;
  canRead(files: NamedBytes[]): boolean;
  read(files: NamedBytes[], options: ReadOptions): Promise<Outcome<RawLayer[]>>;
}

export const BOUNDARY_LIMITS = {
  uploadBytes: 200_000_000,
  features: 50_000,
  vertices: 5_000_000,
  seconds: 120,
  memoryMegabytes: 1500,
} as const;

/** `folder/Fields.SHP` → `shp`. */
export function extensionOf(name: string): string {
  return /\.([a-z0-9]+)$/i.exec(name)?.[1]?.toLowerCase() ?? '';
}

/** `folder/Fields.SHP` → `Fields`. */
export function stemOf(name: string): string {
  return name.replace(/^.*[/\\]/, '').replace(/\.[^.]*$/, '');
}

/** The sentence for too many shapes or corners, or `null` within the limits. */
export function overLimits(featureCount: number, vertexCount: number): string | null {
  if (featureCount > BOUNDARY_LIMITS.features) {
    return `The file has more than ${BOUNDARY_LIMITS.features.toLocaleString('en-US')} shapes. Nothing was kept. Split it.`;
  }
  if (vertexCount > BOUNDARY_LIMITS.vertices) {
    return `The file has more than ${BOUNDARY_LIMITS.vertices.toLocaleString('en-US')} corners. Nothing was kept. Split it.`;
  }
  return null;
}
