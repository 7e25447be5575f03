/** Which field each sample of a file belongs to, and which are there already. Pure. */
import { bbox } from '@turf/turf';
import type { MultiPolygon, Polygon } from 'geojson';
import { distanceToFieldFt, EDGE_TOLERANCE_FT } from './field-of-sample';

export interface PlacedField {
  id: string;
  name: string;
  geometry: Polygon | MultiPolygon;
}

export interface Placeable {
  id: string | null;
  longitude: number | null;
  latitude: number | null;
  fieldName: string | null;
  sampledOn: string | null;
  depthInches: [number, number] | null;
}

/** `inside`, at the `edge` (within 30 ft), by `name` as the field's average; `none`: in no field. */
export type PlacedHow = 'inside' | 'edge' | 'name' | 'none';

export interface Placed {
  fieldId: string | null;
  how: PlacedHow;
  /** Of a point in no field: the nearest field and how far, feet. */
  nearest: { name: string; feet: number } | null;
}

/** About 30 ft in degrees of latitude, and enough of longitude up to 60° N. */
const MARGIN_DEGREES = 0.0002;
/** Looking for the nearest field of a stray point is slow work; beyond this many the distance is left out. */
const MOST_MEASURED = 500;

/** Names are told apart without case, spaces and signs. */
export function nameKey(name: string | null): string {
  return (name ?? '').toLowerCase().replace(/[^\p{L}\p{N}]+/gu, '');
}

/**
 * Gives every sample to the field that holds its point, else to the nearest field within 30 ft; a sample without a point to
 * the field of its name. `chosen` names fields for names that are not met (key: nameKey of the name, '' for none).
 */
export function placeSamples(
  samples: readonly Placeable[],
  fields: readonly PlacedField[],
  chosen: Record<string, string> = {},
): Placed[] {
  const boxes = fields.map((field) => ({ field, box: bbox(field.geometry) }));
  const byName = new Map(fields.map((field) => [nameKey(field.name), field.id]));
  const known = new Set(fields.map((field) => field.id));
  let measured = 0;
  return samples.map(({ longitude, latitude, fieldName }) => {
    if (longitude === null || latitude === null) {
      const key = nameKey(fieldName);
      const fieldId = (key ? byName.get(key) : undefined) ?? chosen[key];
      return fieldId && known.has(fieldId)
        ? { fieldId, how: 'name', nearest: null }
        : { fieldId: null, how: 'none', nearest: null };
    }
    let best: { field: PlacedField; feet: number } | null = null;
    for (const { field, box } of boxes) {
      if (longitude < box[0] - MARGIN_DEGREES || longitude > box[2] + MARGIN_DEGREES) continue;
      if (latitude < box[1] - MARGIN_DEGREES || latitude > box[3] + MARGIN_DEGREES) continue;
      const feet = distanceToFieldFt(field.geometry, longitude, latitude);
      if (feet <= EDGE_TOLERANCE_FT && (!best || feet < best.feet)) best = { field, feet };
      if (feet === 0) break;
    }
    if (best) return { fieldId: best.field.id, how: best.feet === 0 ? 'inside' : 'edge', nearest: null };
    measured += 1;
    return { fieldId: null, how: 'none', nearest: measured <= MOST_MEASURED ? nearestOf(fields, longitude, latitude) : null };
  });
}

function nearestOf(fields: readonly PlacedField[], longitude: number, latitude: number): { name: string; feet: number } | null {
  let nearest: { name: string; feet: number } | null = null;
  for (const field of fields) {
    const feet = distanceToFieldFt(field.geometry, longitude, latitude);
    if (!nearest || feet < nearest.feet) nearest = { name: field.name, feet };
  }
  return nearest;
}

/** One sample of one field at one date and depth; `null` for what has neither number nor place and cannot be told apart. */
export function sampleKey(sample: Omit<Placeable, 'fieldName'>, fieldId: string | null): string | null {
  const who =
    sample.id?.trim().toLowerCase() ??
    (sample.longitude === null ? null : `${sample.longitude.toFixed(6)} ${sample.latitude?.toFixed(6)}`);
  if (who === null) return null;
  const where = fieldId ?? (sample.longitude === null ? '' : `${sample.longitude.toFixed(5)} ${sample.latitude?.toFixed(5)}`);
  return [who, sample.sampledOn ?? '', where, sample.depthInches?.[0] ?? ''].join('|');
}

/** Which samples of a file repeat one that is kept already, or one above them in the file. */
export function repeatsOf(
  samples: readonly Placeable[],
  placed: readonly Placed[],
  kept: ReadonlySet<string>,
): ('kept' | 'file' | null)[] {
  const seen = new Set<string>();
  return samples.map((sample, index) => {
    const key = sampleKey(sample, placed[index]?.fieldId ?? null);
    if (key === null) return null;
    if (kept.has(key)) return 'kept';
    if (seen.has(key)) return 'file';
    seen.add(key);
    return null;
  });
}
