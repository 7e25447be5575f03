import { XMLParser, XMLValidator } from 'fast-xml-parser';
import type { Polygon, Position } from 'geojson';
import { isZip, unpack } from '@/lib/archive';
import { bad, good } from '@/lib/errors';
import { type BoundaryReader, extensionOf, type RawFeature, stemOf } from './reader';

type Node = Record<string, unknown>;

/** KML 2.3 (OGC 12-007r2) and KMZ: every placemark with a polygon; names and plain data values come along. */
export const kml: BoundaryReader = {
  format: 'KML',
  canRead: (files) => files.length === 1 && ['kml', 'kmz'].includes(extensionOf(files[0]?.name ?? '')),
  async read(files) {
    let [file] = files;
    if (!file) return bad('There is no file.');
    if (isZip(file.bytes)) {
      const inside = await unpack(file, (name) => extensionOf(name) === 'kml');
      if (!inside.ok) return inside;
      if (!inside.value[0]) return bad(`"${file.name}" holds no .kml file. Nothing was kept.`);
      file = inside.value[0];
    }
    const text = new TextDecoder().decode(file.bytes);
    if (/<!DOCTYPE|<!ENTITY/i.test(text))
      return bad(`"${file.name}" defines entities of its own, which a map file never needs. Nothing was kept.`);
    const valid = XMLValidator.validate(text);
    if (valid !== true)
      return bad(`"${file.name}" is not whole at line ${valid.err.line}: ${valid.err.msg} Nothing was kept. Export it again.`);
    let tree: Node;
    try {
      tree = new XMLParser({ ignoreAttributes: false, removeNSPrefix: true, parseTagValue: false, processEntities: true }).parse(
        text,
      ) as Node;
    } catch (error) {
      return bad(
        `"${file.name}" could not be read (${error instanceof Error ? error.message.slice(0, 120) : 'damaged'}). Nothing was kept.`,
      );
    }
    const features: RawFeature[] = [];
    collect(tree, features, 0);
    if (features.length === 0)
      return bad(`"${file.name}" holds no outlines (polygons). Nothing was kept. Draw or export the field outlines as polygons.`);
    return good([{ name: stemOf(file.name), features, notes: [], unknownCrs: null }]);
  },
};

function each(value: unknown): Node[] {
  return (Array.isArray(value) ? value : [value]).filter((one): one is Node => typeof one === 'object' && one !== null);
}

function collect(node: Node, features: RawFeature[], depth: number): void {
  if (depth > 40) return;
  for (const [tag, value] of Object.entries(node)) {
    if (tag === 'Placemark') {
      for (const placemark of each(value)) {
        const polygons = polygonsOf(placemark, 0);
        if (polygons.length === 0) continue;
        features.push({
          geometry:
            polygons.length === 1
              ? (polygons[0] as Polygon)
              : { type: 'MultiPolygon', coordinates: polygons.map((one) => one.coordinates) },
          properties: propertiesOf(placemark),
          problems: [],
        });
      }
    } else if (typeof value === 'object' && value !== null) {
      for (const child of each(value)) collect(child, features, depth + 1);
    }
  }
}

function polygonsOf(node: Node, depth: number): Polygon[] {
  if (depth > 10) return [];
  return [
    ...each(node.Polygon).map((polygon): Polygon => ({ type: 'Polygon', coordinates: ringsOf(polygon) })),
    ...each(node.MultiGeometry).flatMap((child) => polygonsOf(child, depth + 1)),
  ];
}

function ringsOf(polygon: Node): Position[][] {
  return [...each(polygon.outerBoundaryIs), ...each(polygon.innerBoundaryIs)]
    .flatMap((boundary) => each(boundary.LinearRing))
    .map((ring) =>
      String(ring.coordinates ?? '')
        .trim()
        .split(/\s+/)
        .filter(Boolean)
        .map((tuple) => tuple.split(',').slice(0, 2).map(Number)),
    );
}

function propertiesOf(placemark: Node): Record<string, unknown> {
  const properties: Record<string, unknown> = {};
  if (typeof placemark.name === 'string') properties.name = placemark.name;
  const extended = each(placemark.ExtendedData)[0];
  for (const datum of [...each(extended?.Data), ...each(each(extended?.SchemaData)[0]?.SimpleData)]) {
    const key = datum['@_name'];
    if (typeof key === 'string') properties[key] = datum.value ?? datum['#text'] ?? null;
  }
  return properties;
}
