import { pointOnFeature } from '@turf/turf';
import type { Geometry } from 'geojson';
import { parseShp } from 'shpjs';
import { shapeRecords } from '@/features/fields/readers/shape-records';
import { attributesOf, coordinateSystem, layersOf } from '@/features/fields/readers/shapefile';
import { MOST_ROWS } from '@/lib/csv';
import { bad, good, type Outcome } from '@/lib/errors';
import { extensionOf, type RawTable, type ReadTableOptions, type SoilReader } from './table';

/** Shape types of the ESRI Shapefile Technical Description (July 1998), table 1: points, and polygons for zones. */
const POINTS = new Set([1, 11, 21, 8, 18, 28]);
const POINTS_AND_ZONES = new Set([...POINTS, 5, 15, 25]);
const PARTS = new Set(['shp', 'dbf', 'prj', 'cpg']);

/** Point shapefiles; zones (polygons) stand for their middle when a file holds no points. */
export const points: SoilReader = {
  format: 'shapefile',
  takes: (files) =>
    files.some((file) => extensionOf(file.name) === 'shp') ? files.filter((file) => PARTS.has(extensionOf(file.name))) : [],
  async read(files, options): Promise<Outcome<RawTable[]>> {
    const tables: (RawTable & { zones: boolean })[] = [];
    for (const [key, layer] of layersOf(files)) {
      const name = `${key.replace(/^.*[/\\]/, '')}.shp`;
      const read = readLayer(name, layer, options);
      if (!read.ok) return read;
      tables.push(read.value);
    }
    const withPoints = tables.filter((table) => !table.zones);
    if (withPoints.length === 0) return good(tables);
    for (const skipped of tables.filter((table) => table.zones))
      withPoints[0]?.notes.push(`${skipped.name}: holds polygons beside the points, and was left out.`);
    return good(withPoints);
  },
};

function readLayer(
  name: string,
  files: Partial<Record<string, Uint8Array>>,
  options: ReadTableOptions,
): Outcome<RawTable & { zones: boolean }> {
  const shapes = shapeRecords(files.shp as Uint8Array, name, POINTS_AND_ZONES);
  if (!shapes.ok) return shapes;
  const { bytes, count, example, notes } = shapes.value;
  if (count > MOST_ROWS)
    return bad(`"${name}" has more than ${MOST_ROWS.toLocaleString('en-US')} points. Nothing was kept. Split it.`);
  const type = new DataView(bytes.buffer, bytes.byteOffset).getInt32(32, true);
  const zones = !POINTS.has(type);
  const system = coordinateSystem(files.prj, options.crs, example);
  if (!system.ok) return system;
  if (!system.value.known)
    notes.push(`${name}: the file does not say its coordinate system (there is no .prj); it was guessed from the numbers.`);
  const convert = system.value.definition;
  let geometries: (Geometry | null)[];
  try {
    geometries = parseShp(
      new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength),
      convert === 'EPSG:4326' ? undefined : convert,
    );
  } catch (error) {
    return bad(
      `"${name}" could not be read (${error instanceof Error ? error.message.slice(0, 120) : 'damaged'}). Nothing was kept. Export it again.`,
    );
  }
  const attributes = attributesOf(files.dbf, files.cpg, notes, name.replace(/\.shp$/, ''));
  const columns = [...new Set(attributes.slice(0, 200).flatMap((one) => Object.keys(one ?? {})))].slice(0, 400);
  if (zones) notes.push(`${name}: holds zones, not points; each stands for its middle.`);
  return good({
    name,
    zones,
    headers: [...columns, 'Latitude of the point', 'Longitude of the point'],
    meanings: [...columns.map(() => null), 'latitude', 'longitude'],
    rows: geometries.map((geometry, index) => {
      const [longitude, latitude] = middleOf(geometry);
      return {
        line: index + 1,
        cells: [...columns.map((column) => cellOf(attributes[index]?.[column])), degrees(latitude), degrees(longitude)],
      };
    }),
    laboratory: null,
    notes,
    problems: [],
  });
}

function degrees(value: number | undefined): string {
  return value !== undefined && Number.isFinite(value) ? String(Number(value.toFixed(9))) : '';
}

function middleOf(geometry: Geometry | null): number[] {
  try {
    if (geometry?.type === 'Point') return geometry.coordinates;
    if (geometry?.type === 'MultiPoint') return geometry.coordinates[0] ?? [];
    if (geometry && geometry.type !== 'GeometryCollection') return pointOnFeature(geometry).geometry.coordinates;
  } catch {
    // A broken outline has no middle; its row is left without a place.
  }
  return [];
}

function cellOf(value: unknown): string {
  if (value instanceof Date) return Number.isNaN(value.getTime()) ? '' : value.toISOString().slice(0, 10);
  if (typeof value === 'number') return Number.isFinite(value) ? String(Number(value.toPrecision(15))) : '';
  return typeof value === 'string' ? value.replaceAll('\0', '').trim() : '';
}
