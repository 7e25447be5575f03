/**
 * Modus, AgGateway's open standard for laboratory results, as a plain tree → a table. Version 1 is XML
 * (modus_result.xsd: ModusResult/Event/EventSamples/Soil/SoilSample/Depths/Depth/NutrientResults); version 2 is JSON, met with
 * the same names, with lists named in the plural, or flat (`samples[].results[].analyte`). The schemas and examples that were
 * read are those of the Open Ag Data Alliance (github.com/oats-center/modus, MIT).
 */
import type { DelimitedRow } from '@/lib/csv';
import { meaningOf } from './headers';
import type { Meaning } from './meanings';
import type { RawTable } from './table';

type Tree = Record<string, unknown>;

function isTree(value: unknown): value is Tree {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** One thing, a list of things, or things under keys: always a list. */
function listOf(value: unknown): Tree[] {
  if (Array.isArray(value)) return value.filter(isTree);
  if (!isTree(value)) return [];
  const values = Object.values(value);
  return values.length > 0 && Object.keys(value).every((key) => /^\d+$/.test(key)) ? values.filter(isTree) : [value];
}

function get(tree: unknown, ...names: string[]): unknown {
  if (!isTree(tree)) return undefined;
  for (const name of names) if (tree[name] !== undefined) return tree[name];
  return undefined;
}

function textOf(value: unknown): string {
  if (typeof value === 'string') return value.trim();
  if (typeof value === 'number' && Number.isFinite(value)) return String(value);
  if (isTree(value)) return textOf(get(value, '#text', '@_ID', 'ID', 'name', 'value'));
  return '';
}

/** Elements by their Modus names; others are left to the lexicon of headers. */
const ELEMENTS: Record<string, Meaning> = {
  ph: 'ph',
  bph: 'bufferPh',
  om: 'organicMatterPercent',
  som: 'organicMatterPercent',
  cec: 'cec',
  p: 'phosphorusPpm',
  k: 'potassiumPpm',
  ca: 'calciumPpm',
  mg: 'magnesiumPpm',
  ec: 'electricalConductivity',
  ss: 'electricalConductivity',
  caco3: 'carbonatePercent',
  cce: 'carbonatePercent',
};

/** What a result is, by its element and by the test that made it. */
function meaningOfResult(element: string, test: string): Meaning | null {
  const key = element.toLowerCase().replace(/[^a-z0-9]/g, '');
  if (/^S-BPH|BUFFER/i.test(test) || key === 'bufferph') return 'bufferPh';
  if (key === 'ph' && /CACL|CA-?CL2|KCL|SALT|S-PH-?(S|C)/i.test(test)) return 'saltPh';
  return ELEMENTS[key] ?? meaningOf(element)?.meaning ?? null;
}

interface Result {
  element: string;
  test: string;
  unit: string;
  value: string;
}

function resultsOf(node: unknown): Result[] {
  const nutrients = get(node, 'NutrientResults', 'nutrientResults', 'results');
  const single = get(nutrients, 'NutrientResult');
  const rows = single !== undefined ? listOf(single) : Array.isArray(nutrients) ? nutrients.filter(isTree) : null;
  const entries: [string, Tree][] = rows
    ? rows.map((row) => [textOf(get(row, 'Element', 'element', 'analyte', 'Analyte')), row])
    : isTree(nutrients)
      ? Object.entries(nutrients).flatMap(([key, row]): [string, Tree][] =>
          isTree(row) ? [[textOf(get(row, 'Element', 'analyte')) || key, row]] : [],
        )
      : [];
  return entries.map(([element, row]) => ({
    element: element.slice(0, 60),
    test: textOf(get(row, 'ModusTestID', 'modusTestID', 'ModusTestIDv2', 'modusTestIDv2')).slice(0, 60),
    unit: textOf(get(row, 'ValueUnit', 'units', 'unit', 'UCUM')).slice(0, 20),
    value: textOf(get(row, 'Value', 'value')),
  }));
}

function depthTextOf(depth: unknown): string {
  const from = textOf(get(depth, 'StartingDepth', 'top', 'startingDepth'));
  const to = textOf(get(depth, 'EndingDepth', 'bottom', 'endingDepth'));
  const unit = textOf(get(depth, 'DepthUnit', 'units', 'depthUnit')) || 'in';
  return from !== '' && to !== '' ? `${from}-${to} ${unit}` : textOf(get(depth, 'Name', 'name'));
}

function pointOf(sample: unknown): string {
  const place = get(sample, 'geolocation', 'Geolocation');
  const latitude = textOf(get(place, 'lat', 'latitude'));
  const longitude = textOf(get(place, 'lon', 'lng', 'longitude'));
  if (latitude && longitude) return `${latitude}, ${longitude}`;
  const meta = get(sample, 'SampleMetaData') ?? sample;
  const geometry = get(meta, 'Geometry', 'geometry') ?? get(sample, 'geometry');
  const words = textOf(geometry) || textOf(get(geometry, 'wkt', 'WKT'));
  if (words) return words;
  const coordinates = get(geometry, 'coordinates');
  return Array.isArray(coordinates) && coordinates.length >= 2 ? `POINT(${coordinates[0]} ${coordinates[1]})` : '';
}

const FIXED: readonly [string, Meaning][] = [
  ['Sample number', 'id'],
  ['Lab number', 'labNumber'],
  ['Field', 'fieldName'],
  ['Date', 'sampledOn'],
  ['Depth', 'depth'],
  ['Place', 'place'],
];

/** Tables of every event of a Modus tree; empty when it holds no soil results. */
export function modusTable(tree: unknown, name: string): RawTable | null {
  const root = get(tree, 'ModusResult', 'ModusSubmit') ?? tree;
  const events = listOf(get(root, 'Event', 'Events', 'events') ?? (Array.isArray(root) ? root : root));
  const headers = FIXED.map(([header]) => header);
  const meanings: (Meaning | null)[] = FIXED.map(([, meaning]) => meaning);
  const rows: DelimitedRow[] = [];
  let laboratory: string | null = null;

  for (const event of events) {
    laboratory ??= textOf(get(get(event, 'LabMetaData'), 'LabName')) || textOf(get(get(event, 'lab'), 'name')) || null;
    const meta = get(event, 'EventMetaData');
    const date = (textOf(get(meta, 'EventDate')) || textOf(get(event, 'dateCollected', 'EventDate'))).slice(0, 10);
    const profile = get(get(event, 'FMISMetaData', 'FMIS'), 'FMISProfile', 'profile');
    const field = textOf(get(profile, 'Field')) || textOf(get(get(get(event, 'source'), 'field'), 'name'));
    const soil = get(get(event, 'EventSamples'), 'Soil', 'soil');
    const refs = get(soil, 'DepthRefs', 'depthRefs');
    const depthRefs = new Map(
      isTree(refs) && get(refs, 'DepthRef') === undefined && Object.keys(refs).every((key) => /^\d+$/.test(key))
        ? Object.entries(refs)
        : listOf(get(refs, 'DepthRef') ?? refs).map((ref): [string, unknown] => [textOf(get(ref, '@_DepthID', 'DepthID')), ref]),
    );
    for (const sample of listOf(get(soil, 'SoilSample', 'SoilSamples', 'soilSamples') ?? get(event, 'samples'))) {
      const about = get(sample, 'SampleMetaData') ?? sample;
      const fixed = [
        textOf(get(about, 'FMISSampleID')) || textOf(get(about, 'SampleNumber', 'id')),
        textOf(get(about, 'ReportID', 'labid')),
        field,
        date,
      ];
      const depths = get(sample, 'Depths', 'depths');
      const layers = depths === undefined ? [sample] : listOf(get(depths, 'Depth') ?? depths);
      for (const layer of layers) {
        const reference = depthRefs.get(textOf(get(layer, '@_DepthID', 'DepthID'))) ?? get(layer, 'depth') ?? layer;
        const cells = [...fixed, depthTextOf(reference), pointOf(sample)];
        for (const result of resultsOf(layer)) {
          const header = [result.element, result.test && `(${result.test})`, result.unit !== 'none' && result.unit]
            .filter(Boolean)
            .join(' ');
          let at = headers.indexOf(header);
          if (at < 0) {
            at = headers.length;
            if (at >= 400) continue;
            headers.push(header);
            meanings.push(
              /^%/.test(result.unit) && /^(p|k|ca|mg)$/i.test(result.element)
                ? null
                : meaningOfResult(result.element, result.test),
            );
          }
          cells[at] = result.value;
        }
        rows.push({ line: rows.length + 1, cells: Array.from({ length: headers.length }, (_, at) => cells[at] ?? '') });
      }
    }
  }
  if (rows.length === 0) return null;
  return { name, headers, meanings, rows, laboratory, notes: [], problems: [] };
}
