import type { Polygon, Position } from 'geojson';
import proj4 from 'proj4';
import { zipOf } from '@/features/plans/exports/zip';

/** Zipped shapefiles written by the tests themselves, byte by byte after the published layouts, in any coordinate system. */

/** UTM zone 15 north on NAD 83, as a .prj file has it. */
export const UTM_15_PRJ =
  'PROJCS["NAD_1983_UTM_Zone_15N",GEOGCS["GCS_North_American_1983",DATUM["D_North_American_1983",SPHEROID["GRS_1980",6378137.0,298.257222101]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["False_Easting",500000.0],PARAMETER["False_Northing",0.0],PARAMETER["Central_Meridian",-93.0],PARAMETER["Scale_Factor",0.9996],PARAMETER["Latitude_Of_Origin",0.0],UNIT["Meter",1.0]]';
export const WGS84_PRJ =
  'GEOGCS["GCS_WGS_1984",DATUM["D_WGS_1984",SPHEROID["WGS_1984",6378137.0,298.257223563]],PRIMEM["Greenwich",0.0],UNIT["Degree",0.0174532925199433]]';

export interface ShapeToWrite {
  geometry: Polygon;
  attributes: Record<string, string>;
}

function ringOf(ring: Position[], prj: string | null): Position[] {
  if (!prj || prj === WGS84_PRJ) return ring;
  return ring.map(([longitude, latitude]) => proj4('EPSG:4326', prj, [longitude as number, latitude as number]));
}

/** The .shp file of polygons (ESRI Shapefile Technical Description, July 1998). Outer rings are written clockwise. */
export function shpOf(shapes: ShapeToWrite[], prj: string | null): Buffer {
  const records = shapes.map(({ geometry }, index) => {
    const rings = geometry.coordinates.map((ring) => ringOf([...ring].reverse(), prj));
    const points = rings.flat();
    const content = Buffer.alloc(44 + rings.length * 4 + points.length * 16);
    content.writeInt32LE(5, 0);
    const xs = points.map((point) => point[0] as number);
    const ys = points.map((point) => point[1] as number);
    for (const [at, value] of [Math.min(...xs), Math.min(...ys), Math.max(...xs), Math.max(...ys)].entries())
      content.writeDoubleLE(value, 4 + at * 8);
    content.writeInt32LE(rings.length, 36);
    content.writeInt32LE(points.length, 40);
    let start = 0;
    rings.forEach((ring, at) => {
      content.writeInt32LE(start, 44 + at * 4);
      start += ring.length;
    });
    points.forEach((point, at) => {
      content.writeDoubleLE(point[0] as number, 44 + rings.length * 4 + at * 16);
      content.writeDoubleLE(point[1] as number, 52 + rings.length * 4 + at * 16);
    });
    const head = Buffer.alloc(8);
    head.writeInt32BE(index + 1, 0);
    head.writeInt32BE(content.length / 2, 4);
    return Buffer.concat([head, content]);
  });
  const body = Buffer.concat(records);
  const header = Buffer.alloc(100);
  header.writeInt32BE(9994, 0);
  header.writeInt32BE((100 + body.length) / 2, 24);
  header.writeInt32LE(1000, 28);
  header.writeInt32LE(5, 32);
  return Buffer.concat([header, body]);
}

/** A dBASE III table of text columns, at most 10 letters a name. */
export function dbfOf(rows: Record<string, string>[]): Buffer {
  const names = Object.keys(rows[0] ?? { NAME: '' });
  const width = 40;
  const header = Buffer.alloc(32 + names.length * 32 + 1);
  header[0] = 3;
  header.writeUInt32LE(rows.length, 4);
  header.writeUInt16LE(header.length, 8);
  header.writeUInt16LE(1 + names.length * width, 10);
  names.forEach((name, index) => {
    const at = 32 + index * 32;
    header.write(name.slice(0, 10), at, 'latin1');
    header.write('C', at + 11, 'latin1');
    header[at + 16] = width;
  });
  header[header.length - 1] = 0x0d;
  const body = rows.map((row) =>
    Buffer.from(` ${names.map((name) => (row[name] ?? '').padEnd(width).slice(0, width)).join('')}`, 'latin1'),
  );
  return Buffer.concat([header, ...body, Buffer.from([0x1a])]);
}

/** A zipped shapefile as a farm's own program writes one; without `prj` the coordinate system is not said. */
export function zippedShapefile(shapes: ShapeToWrite[], prj: string | null = UTM_15_PRJ, written: string | null = prj): Buffer {
  const archive = zipOf([
    { name: 'export/Fields.shp', bytes: shpOf(shapes, prj) },
    { name: 'export/Fields.dbf', bytes: dbfOf(shapes.map((shape) => shape.attributes)) },
    ...(written ? [{ name: 'export/Fields.prj', bytes: Buffer.from(written) }] : []),
  ]);
  return Buffer.from(archive);
}
