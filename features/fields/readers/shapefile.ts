import type { Geometry } from 'geojson';
import proj4 from 'proj4';
import { parseShp } from 'shpjs';
import { isZip, type NamedBytes, unpack } from '@/lib/archive';
import { bad, good, type Outcome } from '@/lib/errors';
import { definitionOf, guessCrs } from './crs';
import { dbfRows } from './dbf-table';
import { type BoundaryReader, extensionOf, overLimits, type RawLayer, type ReadOptions, stemOf } from './reader';
import { shapeRecords } from './shape-records';

const PARTS = new Set(['shp', 'dbf', 'prj', 'cpg']);

/** The files of one layer, whatever folder and case they come in. */
type LayerFiles = Partial<Record<string, Uint8Array>>;

/** Files of a shapefile by layer: parts of one name in one folder belong together. */
export function layersOf(files: NamedBytes[]): Map<string, LayerFiles> {
  const layers = new Map<string, LayerFiles>();
  for (const { name, bytes } of files) {
    const extension = extensionOf(name);
    if (!PARTS.has(extension)) continue;
    const key = name.replace(/\.[^.]*$/, '').toLowerCase();
    const layer = layers.get(key) ?? {};
    layer[extension] = bytes;
    layers.set(key, layer);
  }
  for (const [key, layer] of layers) if (!layer.shp) layers.delete(key);
  return layers;
}

/** Shapefiles: zipped (several layers, folders inside) or as loose .shp, .dbf, .prj files chosen together. */
export const shapefile: BoundaryReader = {
  format: 'shapefile',
  canRead: (files) =>
    files.some((file) => extensionOf(file.name) === 'shp') ||
    files.some((file) => extensionOf(file.name) === 'zip' || (isZip(file.bytes) && extensionOf(file.name) !== 'kmz')),
  async read(files, options) {
    const loose = files.filter((file) => PARTS.has(extensionOf(file.name)));
    const all = [...loose];
    for (const archive of files.filter((file) => !loose.includes(file))) {
      const inside = await unpack(archive, (name) => PARTS.has(extensionOf(name)));
      if (!inside.ok) return inside;
      all.push(...inside.value);
    }
    const layers = layersOf(all);
    if (layers.size === 0) {
      return bad(
        'There is no .shp file in it, so it holds no boundaries. Nothing was kept. A zipped shapefile has at least a .shp, a .shx, a .dbf and a .prj.',
      );
    }
    const read: RawLayer[] = [];
    for (const [name, layer] of layers) {
      const outcome = readLayer(stemOf(`${name}.shp`), layer, options);
      if (!outcome.ok) return outcome;
      read.push(outcome.value);
    }
    return good(read);
  },
};

function readLayer(name: string, files: LayerFiles, options: ReadOptions): Outcome<RawLayer> {
  const shapes = shapeRecords(files.shp as Uint8Array, `${name}.shp`);
  if (!shapes.ok) return shapes;
  const { bytes, count, vertexCount, example, notes } = shapes.value;
  const refusal = overLimits(count, vertexCount);
  if (refusal) return bad(refusal);

  const system = coordinateSystem(files.prj, options.crs, example);
  if (!system.ok) return system;
  const unknownCrs = system.value.known ? null : { guess: guessCrs(example), example };
  const convert = system.value.definition;

  let geometries: (Geometry | null)[];
  try {
    geometries = parseShp(
      new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength),
      convert === 'EPSG:4326' ? undefined : convert,
    );
  } catch (error) {
    return bad(
      `"${name}.shp" could not be read (${error instanceof Error ? error.message.slice(0, 120) : 'damaged'}). Nothing was kept. Export it again.`,
    );
  }
  const attributes = attributesOf(files.dbf, files.cpg, notes, name);
  return good({
    name,
    notes,
    unknownCrs,
    features: geometries.map((geometry, index) => ({
      geometry: geometry ?? null,
      properties: attributes[index] ?? {},
      problems: [],
    })),
  });
}

/** The coordinate system of a layer: as chosen, as its .prj says, else a guess marked unknown. */
export function coordinateSystem(
  prj: Uint8Array | undefined,
  chosen: string | undefined,
  example: [number, number],
): Outcome<{ definition: string; known: boolean }> {
  if (chosen) {
    const outcome = definitionOf(chosen);
    return outcome.ok ? good({ definition: outcome.value, known: true }) : outcome;
  }
  const text = prj ? new TextDecoder().decode(prj).replace(/\0/g, '').trim() : '';
  if (text) {
    // Geographic systems of North America differ from WGS 84 by less than the width of a planter row.
    if (/^GEOGC(S|RS)\[/i.test(text) && /WGS|NAD|North_American_19(83|27)|NAD83|GRS/i.test(text) && !/1927|NAD27/i.test(text))
      return good({ definition: 'EPSG:4326', known: true });
    try {
      const converter = proj4(text);
      const [longitude, latitude] = converter.inverse(example);
      if (Number.isFinite(longitude) && Number.isFinite(latitude)) return good({ definition: text, known: true });
    } catch {
      return bad(
        'The .prj file names a coordinate system that is not known here. Nothing was kept. Export the shapefile in longitude and latitude (WGS 84) or UTM.',
      );
    }
    return bad(
      'The coordinates do not fit the coordinate system in the .prj file. Nothing was kept. Export the shapefile again.',
    );
  }
  const guess = guessCrs(example);
  const definition = definitionOf(guess ?? 'EPSG:4326');
  return good({ definition: definition.ok ? definition.value : 'EPSG:4326', known: false });
}

/** Attributes by record; what is missing is said in the notes. */
export function attributesOf(
  dbf: Uint8Array | undefined,
  cpg: Uint8Array | undefined,
  notes: string[],
  name: string,
): Record<string, unknown>[] {
  if (!dbf) {
    notes.push(`"${name}" has no .dbf file, so its shapes have no names.`);
    return [];
  }
  const rows = dbfRows(dbf, cpg ? new TextDecoder().decode(cpg).trim() : undefined);
  if (rows) return rows;
  notes.push(`The .dbf file of "${name}" could not be read, so its shapes have no names.`);
  return [];
}
