import type { Geometry } from 'geojson';
import { bad, good } from '@/lib/errors';
import { type BoundaryReader, extensionOf, type RawFeature, stemOf } from './reader';

const GEOMETRIES = new Set([
  'Point',
  'MultiPoint',
  'LineString',
  'MultiLineString',
  'Polygon',
  'MultiPolygon',
  'GeometryCollection',
]);

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** GeoJSON (RFC 7946): a collection, one feature, or a bare geometry. A CRS member other than WGS 84 is refused. */
export const geojson: BoundaryReader = {
  format: 'GeoJSON',
  canRead: (files) =>
    files.length === 1 && (['geojson', 'json'].includes(extensionOf(files[0]?.name ?? '')) || firstSign(files[0]?.bytes) === '{'),
  async read(files) {
    const file = files[0];
    if (!file) return bad('There is no file.');
    let parsed: unknown;
    try {
      parsed = JSON.parse(new TextDecoder().decode(file.bytes).replace(/^\uFEFF/, ''));
    } catch (error) {
      return bad(
        `"${file.name}" is not GeoJSON (${error instanceof Error ? error.message.slice(0, 120) : 'damaged'}). Nothing was kept. Export it again.`,
      );
    }
    if (!isObject(parsed)) return bad(`"${file.name}" is not GeoJSON. Nothing was kept.`);
    const foreign = foreignCrs(parsed.crs);
    if (foreign)
      return bad(
        `"${file.name}" says its coordinates are in ${foreign}. GeoJSON is in longitude and latitude (WGS 84). Nothing was kept. Export it in WGS 84.`,
      );
    const items = parsed.type === 'FeatureCollection' ? parsed.features : [parsed];
    if (!Array.isArray(items)) return bad(`"${file.name}" is a collection without features. Nothing was kept.`);
    const features: RawFeature[] = [];
    for (const item of items) features.push(featureOf(item));
    if (features.length === 0) return bad(`"${file.name}" holds no shapes. Nothing was kept.`);
    return good([{ name: stemOf(file.name), features, notes: [], unknownCrs: null }]);
  },
};

function firstSign(bytes: Uint8Array | undefined): string {
  return bytes
    ? (new TextDecoder()
        .decode(bytes.slice(0, 64))
        .replace(/^\uFEFF/, '')
        .trimStart()[0] ?? '')
    : '';
}

function foreignCrs(crs: unknown): string | null {
  if (!isObject(crs)) return null;
  const name = isObject(crs.properties)
    ? String(crs.properties.name ?? crs.properties.href ?? 'an unnamed system')
    : 'an unnamed system';
  return /CRS84|EPSG:+4326|EPSG:+4269|WGS ?84/i.test(name.replace('::', ':')) ? null : name.slice(0, 80);
}

function featureOf(item: unknown): RawFeature {
  if (!isObject(item)) return { geometry: null, properties: {}, problems: ['This is not a shape.'] };
  const geometry = item.type === 'Feature' ? item.geometry : item;
  const properties = isObject(item.properties) ? item.properties : {};
  if (geometry === null || geometry === undefined) return { geometry: null, properties, problems: [] };
  if (!isObject(geometry) || !GEOMETRIES.has(String(geometry.type)))
    return { geometry: null, properties, problems: ['This is not a shape.'] };
  return { geometry: geometry as unknown as Geometry, properties, problems: [] };
}
