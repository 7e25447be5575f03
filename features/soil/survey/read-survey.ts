import type { Geometry } from 'geojson';
import { parseShp } from 'shpjs';
import { areaAcres } from '@/features/fields/acres';
import { shapeRecords } from '@/features/fields/readers/shape-records';
import { attributesOf, coordinateSystem, layersOf } from '@/features/fields/readers/shapefile';
import { type NamedBytes, unpack } from '@/lib/archive';
import { bad, good, type Outcome } from '@/lib/errors';
import { attributesOfUnits } from './attributes';
import type { SurveyInspection, SurveyTarget, SurveyUnit } from './model';
import { boxOf, recordsMeeting, unitsOfField } from './polygons';
import { type SurveyTable, TABLE_FILES } from './tables';

export const SURVEY_LIMITS = { seconds: 240, memoryMegabytes: 1500 } as const;

const MAP_FILE = /(^|\/)soilmu_a_[^/]*\.(shp|dbf|prj|cpg)$/i;
const isTable = (name: string) => Object.values(TABLE_FILES).some((pattern) => pattern.test(name));

interface Shape {
  key: string;
  symbol: string;
  area: string;
  geometry: Extract<Geometry, { type: 'Polygon' | 'MultiPolygon' }>;
}

/**
 * Reads a soil survey area as the NRCS delivers it (a zip with spatial/soilmu_a_*.shp and tabular/*.txt) and says for each
 * field which map units it holds: acres, share, drainage, hydrologic group, slope, available water 0–100 cm, flooding, and pH
 * and carbonate of the top 30 cm. Only polygons near the fields are parsed. Fails with words when it is no survey area.
 */
export async function readSurvey(
  archive: NamedBytes,
  fields: readonly SurveyTarget[],
  progress: (done: number, total: number) => void = () => {},
): Promise<Outcome<SurveyInspection>> {
  if (fields.length === 0) return bad('There are no fields yet. Bring in boundaries first; the survey is cut to them.');
  const inside = await unpack(archive, (name) => MAP_FILE.test(name) || isTable(name));
  if (!inside.ok) return inside;
  const layers = [...layersOf(inside.value.filter((file) => MAP_FILE.test(file.name)))];
  if (layers.length === 0) {
    return bad(
      `"${archive.name}" holds no map of soil units (soilmu_a_….shp). Nothing was kept. Choose the zip of a survey area as it was downloaded, not unpacked.`,
    );
  }
  const problems: string[] = [];
  const notes: string[] = [];
  const shapes: Shape[] = [];
  for (const [name, layer] of layers) {
    const read = shapesOf(name, layer, fields, notes);
    if (!read.ok) return read;
    shapes.push(...read.value);
  }
  const texts = textsOf(inside.value);
  const attributes = attributesOfUnits(texts, new Set(shapes.map((shape) => shape.key)), problems);
  const symbols = new Map(shapes.map((shape) => [shape.key, shape.symbol]));
  const boxed = shapes.map((shape) => ({ ...shape, box: boxOf(shape.geometry) }));
  let failedCount = 0;
  const surveyed = fields.map((field, index) => {
    progress(index, fields.length);
    const fieldAcres = areaAcres(field.geometry);
    const { units, failed } = unitsOfField(field, boxed);
    failedCount += failed;
    const mapUnits = units.map(({ key, geometry, areaAcres: acres }): SurveyUnit => {
      const said = attributes.get(key) as Omit<SurveyUnit, 'geometry' | 'areaAcres' | 'share'>;
      const symbol = said.symbol || symbols.get(key) || key;
      return { ...said, symbol, name: said.name || symbol, geometry, areaAcres: acres, share: acres / fieldAcres };
    });
    const coveredShare = Math.min(
      1,
      mapUnits.reduce((sum, unit) => sum + unit.share, 0),
    );
    if (coveredShare > 0 && coveredShare < 0.99)
      notes.push(`${field.name}: the survey covers ${Math.round(coveredShare * 100)} % of it.`);
    return { id: field.id, name: field.name, areaAcres: fieldAcres, mapUnits, coveredShare };
  });
  if (failedCount > 0) problems.push(`${failedCount} outlines of the survey could not be cut to a field and were left out.`);
  const missed = surveyed.filter((field) => field.mapUnits.length === 0);
  if (missed.length > 0)
    problems.push(
      `The survey does not reach ${missed.length} of ${fields.length} fields: ${missed
        .slice(0, 10)
        .map((field) => field.name)
        .join(', ')}${missed.length > 10 ? ', …' : ''}.`,
    );
  return good({ areas: [...new Set(shapes.map((shape) => shape.area).filter(Boolean))], fields: surveyed, notes, problems });
}

function shapesOf(
  name: string,
  layer: Partial<Record<string, Uint8Array>>,
  fields: readonly SurveyTarget[],
  notes: string[],
): Outcome<Shape[]> {
  const file = `${name.replace(/^.*\//, '')}.shp`;
  const checked = shapeRecords(layer.shp as Uint8Array, file);
  if (!checked.ok) return checked;
  notes.push(...checked.value.notes);
  const system = coordinateSystem(layer.prj, undefined, checked.value.example);
  if (!system.ok) return system;
  const convert = system.value.definition === 'EPSG:4326' ? undefined : system.value.definition;
  const boxes = fields.map((field) => boxOf(field.geometry));
  // A map in meters cannot be held against boxes in degrees: then every record is parsed.
  const { bytes, indexes } = convert
    ? { bytes: checked.value.bytes, indexes: Array.from({ length: checked.value.count }, (_, index) => index) }
    : recordsMeeting(checked.value.bytes, boxes);
  if (indexes.length === 0) return good([]);
  let geometries: (Geometry | null)[];
  try {
    geometries = parseShp(new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength), convert);
  } catch (error) {
    return bad(
      `"${file}" could not be read (${error instanceof Error ? error.message.slice(0, 120) : 'damaged'}). Nothing was kept.`,
    );
  }
  const attributes = attributesOf(layer.dbf, layer.cpg, notes, file);
  if (attributes.length === 0)
    return bad(`"${file}" has no table with map unit keys (.dbf). Nothing was kept. Download the area again.`);
  return good(
    geometries.flatMap((geometry, at): Shape[] => {
      if (geometry?.type !== 'Polygon' && geometry?.type !== 'MultiPolygon') return [];
      const row = attributes[indexes[at] as number] ?? {};
      const key = String(row.MUKEY ?? row.mukey ?? '').trim();
      if (!key) return [];
      return [
        {
          key,
          symbol: String(row.MUSYM ?? row.musym ?? '').trim(),
          area: String(row.AREASYMBOL ?? row.areasymbol ?? '').trim(),
          geometry,
        },
      ];
    }),
  );
}

/** The text of each table; several areas in one archive are read as one. */
function textsOf(files: NamedBytes[]): Partial<Record<SurveyTable | 'columns', string>> {
  const texts: Partial<Record<SurveyTable | 'columns', string>> = {};
  for (const [table, pattern] of Object.entries(TABLE_FILES) as [SurveyTable | 'columns', RegExp][]) {
    const own = files.filter((file) => pattern.test(file.name));
    if (own.length > 0) texts[table] = own.map((file) => new TextDecoder().decode(file.bytes)).join('\n');
  }
  return texts;
}
