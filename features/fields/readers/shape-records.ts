import { bad, good, type Outcome } from '@/lib/errors';

/** Shape types of the ESRI Shapefile Technical Description (July 1998), table 1, that have an area. */
const POLYGONS = new Set([5, 15, 25]);
const NULL_SHAPE = 0;
const NAMES: Record<number, string> = {
  1: 'points',
  3: 'lines',
  8: 'points',
  11: 'points',
  13: 'lines',
  18: 'points',
  21: 'points',
  23: 'lines',
  28: 'points',
  31: 'a multipatch',
};

export interface ShapeRecords {
  /** The file again with whole records only, safe to hand to a parser. */
  bytes: Uint8Array;
  count: number;
  vertexCount: number;
  /** The first corner as it stands in the file. */
  example: [number, number];
  notes: string[];
}

/**
 * Walks the records of a .shp file by its published layout before a parser sees it: header, record lengths, part and point
 * counts must fit the bytes that are there. A damaged tail is left out and said; points and lines are refused by name.
 * `accept` is the set of shape types wanted (polygons by default).
 */
export function shapeRecords(file: Uint8Array, name: string, accept: ReadonlySet<number> = POLYGONS): Outcome<ShapeRecords> {
  const view = new DataView(file.buffer, file.byteOffset, file.byteLength);
  if (file.byteLength < 100 || view.getInt32(0) !== 9994)
    return bad(`"${name}" is not a shapefile. Nothing was kept. Export it again.`);
  const type = view.getInt32(32, true);
  if (!accept.has(type)) {
    const found = NAMES[type] ?? (POLYGONS.has(type) ? 'polygons' : 'an unknown kind of shape');
    return bad(
      `"${name}" holds ${found}, not ${accept === POLYGONS ? 'boundaries (polygons)' : 'points'}. Nothing was kept. Choose the layer with the ${accept === POLYGONS ? 'field outlines' : 'sample points'}.`,
    );
  }
  const notes: string[] = [];
  let offset = 100;
  let count = 0;
  let vertexCount = 0;
  let example: [number, number] = [0, 0];
  let hasExample = false;
  while (offset + 12 <= file.byteLength) {
    const length = view.getInt32(offset + 4) * 2;
    const kind = view.getInt32(offset + 8, true);
    if (length < 4 || offset + 8 + length > file.byteLength || (kind !== NULL_SHAPE && kind !== type)) break;
    if (kind !== NULL_SHAPE) {
      const points = pointsOf(view, offset + 8, length, kind);
      if (!points) break;
      vertexCount += points.count;
      if (!hasExample && points.first) {
        example = points.first;
        hasExample = true;
      }
    }
    count += 1;
    offset += 8 + length;
  }
  if (count === 0) return bad(`"${name}" holds no shapes that can be read. Nothing was kept. Export it again.`);
  if (!example.every(Number.isFinite))
    return bad(`"${name}" has coordinates that are not numbers. Nothing was kept. Export it again.`);
  if (offset < file.byteLength && offset < view.getInt32(24) * 2) {
    notes.push(
      `"${name}" is damaged after shape ${count}: the ${count === 1 ? 'one before it was' : `${count} before it were`} read, what follows was left out. Export it again to have all.`,
    );
  }
  // The header's length is what parsers trust, so it must be the length that was walked.
  const bytes = new Uint8Array(file.subarray(0, offset));
  new DataView(bytes.buffer).setInt32(24, offset / 2);
  return good({ bytes, count, vertexCount, example, notes });
}

function pointsOf(
  view: DataView,
  start: number,
  length: number,
  kind: number,
): { count: number; first: [number, number] | null } | null {
  if ([1, 11, 21].includes(kind)) return length >= 20 ? { count: 1, first: corner(view, start + 4) } : null;
  if ([8, 18, 28].includes(kind)) {
    const count = view.getInt32(start + 36, true);
    return count >= 0 && 40 + count * 16 <= length ? { count, first: count > 0 ? corner(view, start + 40) : null } : null;
  }
  if (length < 44) return null;
  const parts = view.getInt32(start + 36, true);
  const count = view.getInt32(start + 40, true);
  if (parts < 0 || count < 0 || 44 + parts * 4 + count * 16 > length) return null;
  let before = -1;
  for (let part = 0; part < parts; part += 1) {
    const begin = view.getInt32(start + 44 + part * 4, true);
    if (begin <= before || begin >= count) return null;
    before = begin;
  }
  return { count, first: count > 0 ? corner(view, start + 44 + parts * 4) : null };
}

function corner(view: DataView, at: number): [number, number] {
  return [view.getFloat64(at, true), view.getFloat64(at + 8, true)];
}
