/**
 * The plan as a zipped shapefile: polygons in WGS84 degrees with attributes of at most ten characters.
 * Layout after the ESRI Shapefile Technical Description (July 1998): big-endian file header and record heads,
 * little-endian contents; outer rings clockwise, holes counter-clockwise.
 */
import type { MultiPolygon, Polygon, Position } from 'geojson';
import { CAUTIONS } from '@/lib/ui/cautions';
import type { PlanView } from '../model';
import { type PlanAttributes, planFeatures } from './geojson';
import { zipOf } from './zip';

const POLYGON = 5;
const HEADER_BYTES = 100;
const WGS84 =
  'GEOGCS["GCS_WGS_1984",DATUM["D_WGS_1984",SPHEROID["WGS_1984",6378137.0,298.257223563]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]]';

type Attribute = { name: keyof PlanAttributes } & ({ kind: 'C'; length: number } | { kind: 'N'; length: number; digits: number });

const ATTRIBUTES: readonly Attribute[] = [
  { name: 'FIELD', kind: 'C', length: 60 },
  { name: 'PART', kind: 'C', length: 40 },
  { name: 'FARM', kind: 'C', length: 60 },
  { name: 'VARIETY', kind: 'C', length: 30 },
  { name: 'RM', kind: 'N', length: 6, digits: 1 },
  { name: 'LOT', kind: 'C', length: 40 },
  { name: 'ACRES', kind: 'N', length: 12, digits: 2 },
  { name: 'ROW_IN', kind: 'N', length: 8, digits: 2 },
  { name: 'SEEDS_AC', kind: 'N', length: 9, digits: 0 },
  { name: 'SEEDS_FT', kind: 'N', length: 8, digits: 2 },
  { name: 'LB_AC', kind: 'N', length: 8, digits: 1 },
  { name: 'UNITS', kind: 'N', length: 12, digits: 2 },
];

/** Zip of plan.shp, .shx, .dbf, .prj, .cpg and a text of cautions. `madeOn` is an ISO date. */
export function planShapefile(view: PlanView, madeOn: string): Uint8Array {
  const features = planFeatures(view);
  const { shp, shx } = shapes(features.map((feature) => feature.geometry));
  const dbf = table(
    features.map((feature) => feature.properties),
    madeOn,
  );
  const text = (words: string) => new TextEncoder().encode(words);
  const base = `plan-${view.season}`;
  return zipOf([
    { name: `${base}.shp`, bytes: shp },
    { name: `${base}.shx`, bytes: shx },
    { name: `${base}.dbf`, bytes: dbf },
    { name: `${base}.prj`, bytes: text(WGS84) },
    { name: `${base}.cpg`, bytes: text('UTF-8') },
    { name: 'cautions.txt', bytes: text(`${CAUTIONS.yield}\r\n${CAUTIONS.treatedSeed}\r\n${CAUTIONS.herbicide}\r\n`) },
  ]);
}

function signedArea(ring: Position[]): number {
  let twice = 0;
  for (let i = 1; i < ring.length; i++) {
    const [x1, y1] = ring[i - 1] as [number, number];
    const [x2, y2] = ring[i] as [number, number];
    twice += x1 * y2 - x2 * y1;
  }
  return twice / 2;
}

/** Rings closed and turned the shapefile's way. */
function ringsOf(geometry: Polygon | MultiPolygon): Position[][] {
  const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
  return polygons.flatMap((rings) =>
    rings.map((ring, index) => {
      const clockwise = signedArea(ring) < 0;
      return clockwise === (index === 0) ? ring : [...ring].reverse();
    }),
  );
}

function shapes(geometries: (Polygon | MultiPolygon)[]): { shp: Uint8Array; shx: Uint8Array } {
  const records = geometries.map((geometry) => {
    const rings = ringsOf(geometry);
    const points = rings.flat();
    const bytes = Buffer.alloc(44 + 4 * rings.length + 16 * points.length);
    bytes.writeInt32LE(POLYGON, 0);
    boxOf(points).forEach((value, i) => {
      bytes.writeDoubleLE(value, 4 + 8 * i);
    });
    bytes.writeInt32LE(rings.length, 36);
    bytes.writeInt32LE(points.length, 40);
    let start = 0;
    rings.forEach((ring, i) => {
      bytes.writeInt32LE(start, 44 + 4 * i);
      start += ring.length;
    });
    points.forEach(([x, y], i) => {
      bytes.writeDoubleLE(x as number, 44 + 4 * rings.length + 16 * i);
      bytes.writeDoubleLE(y as number, 44 + 4 * rings.length + 16 * i + 8);
    });
    return bytes;
  });
  const box = boxOf(geometries.flatMap((geometry) => ringsOf(geometry).flat()));
  const shx = Buffer.alloc(8 * records.length);
  const parts: Buffer[] = [];
  let offset = HEADER_BYTES;
  records.forEach((record, i) => {
    const head = Buffer.alloc(8);
    head.writeInt32BE(i + 1, 0);
    head.writeInt32BE(record.length / 2, 4);
    shx.writeInt32BE(offset / 2, 8 * i);
    shx.writeInt32BE(record.length / 2, 8 * i + 4);
    parts.push(head, record);
    offset += 8 + record.length;
  });
  return {
    shp: Buffer.concat([fileHeader(offset, box), ...parts]),
    shx: Buffer.concat([fileHeader(HEADER_BYTES + shx.length, box), shx]),
  };
}

function boxOf(points: Position[]): [number, number, number, number] {
  const xs = points.map((point) => point[0] as number);
  const ys = points.map((point) => point[1] as number);
  const lowest = (values: number[]) => values.reduce((low, value) => Math.min(low, value), Number.POSITIVE_INFINITY);
  const highest = (values: number[]) => values.reduce((high, value) => Math.max(high, value), Number.NEGATIVE_INFINITY);
  return [lowest(xs), lowest(ys), highest(xs), highest(ys)];
}

function fileHeader(bytes: number, box: [number, number, number, number]): Buffer {
  const header = Buffer.alloc(HEADER_BYTES);
  header.writeInt32BE(9994, 0);
  header.writeInt32BE(bytes / 2, 24);
  header.writeInt32LE(1000, 28);
  header.writeInt32LE(POLYGON, 32);
  box.forEach((value, i) => {
    header.writeDoubleLE(value, 36 + 8 * i);
  });
  return header;
}

/** dBASE III table: fixed-length records, numbers as text flush right, unknown as blanks. */
function table(rows: PlanAttributes[], madeOn: string): Uint8Array {
  const recordLength = 1 + ATTRIBUTES.reduce((total, attribute) => total + attribute.length, 0);
  const headLength = 32 + 32 * ATTRIBUTES.length + 1;
  const head = Buffer.alloc(headLength);
  head.writeUInt8(3, 0);
  head.writeUInt8(Number(madeOn.slice(0, 4)) - 1900, 1);
  head.writeUInt8(Number(madeOn.slice(5, 7)), 2);
  head.writeUInt8(Number(madeOn.slice(8, 10)), 3);
  head.writeUInt32LE(rows.length, 4);
  head.writeUInt16LE(headLength, 8);
  head.writeUInt16LE(recordLength, 10);
  ATTRIBUTES.forEach((attribute, i) => {
    const at = 32 + 32 * i;
    head.write(attribute.name, at, 'latin1');
    head.write(attribute.kind, at + 11, 'latin1');
    head.writeUInt8(attribute.length, at + 16);
    head.writeUInt8(attribute.kind === 'N' ? attribute.digits : 0, at + 17);
  });
  head.writeUInt8(0x0d, headLength - 1);
  const records = rows.map((row) =>
    Buffer.concat([Buffer.from(' '), ...ATTRIBUTES.map((attribute) => cell(attribute, row[attribute.name]))]),
  );
  return Buffer.concat([head, ...records, Buffer.from([0x1a])]);
}

function cell(attribute: Attribute, value: string | number | null): Buffer {
  const bytes = Buffer.alloc(attribute.length, ' ');
  if (attribute.kind === 'N') {
    if (value !== null)
      bytes.write(Number(value).toFixed(attribute.digits).padStart(attribute.length).slice(0, attribute.length), 'latin1');
    return bytes;
  }
  // Cut at a whole character, never inside one.
  let text = String(value ?? '');
  while (Buffer.byteLength(text, 'utf8') > attribute.length) text = text.slice(0, -1);
  bytes.write(text, 'utf8');
  return bytes;
}
