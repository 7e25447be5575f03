import type { NamedBytes } from '@/lib/archive';
import { bad, good, type Outcome } from '@/lib/errors';
import { cleanBoundary } from '../clean';
import { compareAll } from '../compare';
import type { Boundary } from '../model';
import { BOUNDARY_READERS } from './index';
import { overLimits, type RawFeature, type ReadOptions } from './reader';

export interface ReadFeature {
  name: string | null;
  farm: string | null;
  geometry: Boundary | null;
  areaAcres: number;
  problems: string[];
  /** True when cleaning changed the outline. */
  changed: boolean;
  properties: Record<string, unknown>;
}

export interface ReadBoundaries {
  format: string;
  features: ReadFeature[];
  /** Attribute columns with a few values, for choosing the one that holds the names. */
  columns: { name: string; samples: string[] }[];
  nameColumn: string | null;
  farmColumn: string | null;
  notes: string[];
  /** Set when a shapefile does not say its coordinate system and none was chosen. */
  unknownCrs: { guess: string | null; example: [number, number] } | null;
}

const NAME_COLUMNS = [
  /^field_?name$/i,
  /^fld_?name$/i,
  /^name$/i,
  /^field$/i,
  /^fieldid$|^field_?id$/i,
  /name/i,
  /^label$|^title$/i,
  /field/i,
  /^id$/i,
];
const FARM_COLUMNS = [/^farm_?name$/i, /^farm$/i, /farm/i];

/**
 * Reads boundaries from files of any known format, cleans every shape and says what was wrong with it. Geometry comes out
 * in WGS84. Fails with words when no format fits or the file cannot be read at all.
 */
export async function readBoundaries(
  files: NamedBytes[],
  options: ReadOptions = {},
  progress: (done: number, total: number) => void = () => {},
): Promise<Outcome<ReadBoundaries>> {
  if (files.length === 0) return bad('No file was chosen.');
  const empty = files.find((file) => file.bytes.byteLength === 0);
  if (empty) return bad(`"${empty.name}" is empty. Nothing was kept. Choose the file again.`);
  const reader = BOUNDARY_READERS.find((one) => one.canRead(files));
  if (!reader) {
    return bad(
      `"${files[0]?.name}" is not a boundary file that is known here. Nothing was kept. Send a zipped shapefile, GeoJSON, KML or KMZ.`,
    );
  }
  const layers = await reader.read(files, options);
  if (!layers.ok) return layers;
  const raw = layers.value.flatMap((layer) => layer.features);
  const refusal = overLimits(
    raw.length,
    raw.reduce((sum, one) => sum + roughVertexCount(one), 0),
  );
  if (refusal) return bad(refusal);

  const columns = columnsOf(raw);
  const nameColumn = options.nameColumn ?? guessColumn(columns, NAME_COLUMNS);
  const farmColumn = guessColumn(
    columns.filter((column) => column.name !== nameColumn),
    FARM_COLUMNS,
  );
  const features = raw.map((one, index): ReadFeature => {
    if (index % 200 === 0) progress(index, raw.length);
    const cleaned = cleanBoundary(one.geometry);
    return {
      ...cleaned,
      name: nameColumn ? textOf(one.properties[nameColumn]) : null,
      farm: farmColumn ? textOf(one.properties[farmColumn]) : null,
      problems: [...one.problems, ...cleaned.problems],
      properties: one.properties,
    };
  });
  compareAll(features);
  progress(raw.length, raw.length);
  return good({
    format: reader.format,
    features,
    columns,
    nameColumn,
    farmColumn,
    notes: layers.value.flatMap((layer) => layer.notes),
    unknownCrs: layers.value.find((layer) => layer.unknownCrs)?.unknownCrs ?? null,
  });
}

function roughVertexCount(feature: RawFeature): number {
  const geometry = feature.geometry;
  if (geometry?.type === 'Polygon' && Array.isArray(geometry.coordinates))
    return geometry.coordinates.reduce((sum, ring) => sum + (ring?.length ?? 0), 0);
  if (geometry?.type === 'MultiPolygon' && Array.isArray(geometry.coordinates)) {
    return geometry.coordinates.reduce(
      (sum, rings) => sum + (Array.isArray(rings) ? rings.reduce((inner, ring) => inner + (ring?.length ?? 0), 0) : 0),
      0,
    );
  }
  return 0;
}

function textOf(value: unknown): string | null {
  if (typeof value !== 'string' && typeof value !== 'number') return null;
  const text = String(value).replaceAll('\0', '').trim();
  return text ? text.slice(0, 120) : null;
}

function columnsOf(features: RawFeature[]): { name: string; samples: string[] }[] {
  const samples = new Map<string, Set<string>>();
  for (const { properties } of features.slice(0, 500)) {
    for (const [name, value] of Object.entries(properties)) {
      const seen = samples.get(name) ?? new Set<string>();
      const text = textOf(value);
      if (text && seen.size < 3) seen.add(text);
      samples.set(name, seen);
    }
  }
  return [...samples].slice(0, 200).map(([name, seen]) => ({ name, samples: [...seen] }));
}

function guessColumn(columns: { name: string; samples: string[] }[], patterns: RegExp[]): string | null {
  for (const pattern of patterns) {
    const found = columns.find((column) => pattern.test(column.name) && column.samples.length > 0);
    if (found) return found.name;
  }
  return null;
}
