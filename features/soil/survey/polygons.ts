/** Polygons of a survey's map that meet the fields, cut to them. An area holds tens of thousands; few are parsed. */
import { bbox, bboxClip, intersect, multiPolygon, polygon as polygonOf } from '@turf/turf';
import type { Feature, MultiPolygon, Polygon, Position } from 'geojson';
import { areaAcres } from '@/features/fields/acres';
import type { SurveyTarget } from './model';

type Box = [number, number, number, number];

/** Polygons with more corners than this are cut to the field's box first. */
const MANY_CORNERS = 400;
const MARGIN_DEGREES = 0.0005;
/** Slivers of a square yard come from rounding, not from soil. */
const SLIVER_ACRES = 0.0005;

export function boxOf(geometry: Polygon | MultiPolygon): Box {
  return bbox(geometry) as Box;
}

function meet(one: Box, other: Box): boolean {
  return one[0] <= other[2] && other[0] <= one[2] && one[1] <= other[3] && other[1] <= one[3];
}

/**
 * The records of a .shp file whose own box meets one of `boxes` (same coordinates as the file), as a .shp file again with the
 * places the records had. The file's record lengths must have been checked.
 */
export function recordsMeeting(file: Uint8Array, boxes: readonly Box[]): { bytes: Uint8Array; indexes: number[] } {
  const view = new DataView(file.buffer, file.byteOffset, file.byteLength);
  const parts: Uint8Array[] = [file.slice(0, 100)];
  const indexes: number[] = [];
  let offset = 100;
  for (let index = 0; offset + 12 <= file.byteLength; index += 1) {
    const length = view.getInt32(offset + 4) * 2;
    const end = offset + 8 + length;
    if (length < 4 || end > file.byteLength) break;
    if (length >= 44) {
      const at = (step: number) => view.getFloat64(offset + 12 + step * 8, true);
      const box: Box = [at(0), at(1), at(2), at(3)];
      if (boxes.some((one) => meet(one, box))) {
        parts.push(file.subarray(offset, end));
        indexes.push(index);
      }
    }
    offset = end;
  }
  const bytes = new Uint8Array(parts.reduce((sum, part) => sum + part.byteLength, 0));
  let at = 0;
  for (const part of parts) {
    bytes.set(part, at);
    at += part.byteLength;
  }
  new DataView(bytes.buffer).setInt32(24, bytes.byteLength / 2);
  return { bytes, indexes };
}

function corners(geometry: Polygon | MultiPolygon): number {
  const rings = geometry.type === 'Polygon' ? geometry.coordinates : geometry.coordinates.flat();
  return rings.reduce((sum, ring) => sum + ring.length, 0);
}

function featureOf(geometry: Polygon | MultiPolygon): Feature<Polygon | MultiPolygon> {
  return geometry.type === 'Polygon' ? polygonOf(geometry.coordinates) : multiPolygon(geometry.coordinates);
}

/** The parts of a field covered by each map unit; largest first. Shapes that cannot be cut are counted in `failed`. */
export function unitsOfField(
  field: SurveyTarget,
  shapes: readonly { key: string; geometry: Polygon | MultiPolygon; box: Box }[],
): { units: { key: string; geometry: Polygon | MultiPolygon; areaAcres: number }[]; failed: number } {
  const box = boxOf(field.geometry);
  const wide: Box = [box[0] - MARGIN_DEGREES, box[1] - MARGIN_DEGREES, box[2] + MARGIN_DEGREES, box[3] + MARGIN_DEGREES];
  const byKey = new Map<string, Position[][][]>();
  let failed = 0;
  for (const shape of shapes) {
    if (!meet(shape.box, box)) continue;
    try {
      const near =
        corners(shape.geometry) > MANY_CORNERS
          ? (bboxClip(featureOf(shape.geometry), wide) as Feature<Polygon | MultiPolygon>)
          : featureOf(shape.geometry);
      if (near.geometry.coordinates.length === 0) continue;
      const piece = intersect({ type: 'FeatureCollection', features: [featureOf(field.geometry), near] });
      if (!piece) continue;
      const pieces = piece.geometry.type === 'Polygon' ? [piece.geometry.coordinates] : piece.geometry.coordinates;
      byKey.set(shape.key, [...(byKey.get(shape.key) ?? []), ...pieces]);
    } catch {
      failed += 1;
    }
  }
  const units = [...byKey].flatMap(([key, pieces]) => {
    const geometry: Polygon | MultiPolygon =
      pieces.length === 1
        ? { type: 'Polygon', coordinates: pieces[0] as Position[][] }
        : { type: 'MultiPolygon', coordinates: pieces };
    const acres = areaAcres(geometry);
    return acres > SLIVER_ACRES ? [{ key, geometry, areaAcres: acres }] : [];
  });
  return { units: units.sort((one, other) => other.areaAcres - one.areaAcres), failed };
}
