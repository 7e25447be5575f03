import type { ProfiledSample } from '@/features/placement/profile';
import { fieldOfPoint } from '@/features/soil/field-of-sample';
import type { BoundaryField } from './boundary-files';
import { readCsv, readText, refuse } from './command';

/** Soil samples by field name, and what there is to say about the rest. */
export interface FieldSamples {
  byField: Map<string, ProfiledSample[]>;
  notes: string[];
}

export const NO_SAMPLES: FieldSamples = { byField: new Map(), notes: [] };

interface Column {
  key: keyof ProfiledSample | 'fieldName' | 'sampleId';
  header: RegExp;
  low?: number;
  high?: number;
}

/** Laboratory headers, squeezed to lower-case letters and digits; the first that fits wins. */
const COLUMNS: Column[] = [
  { key: 'sampleId', header: /^(sample(id|no|number|name)?|id|labno|labnumber)$/ },
  { key: 'fieldName', header: /^field(name|id)?$/ },
  { key: 'latitude', header: /^(lat|latitude|y|ycoord|gpslat|northing)$/, low: -90, high: 90 },
  { key: 'longitude', header: /^(lon|long|lng|longitude|x|xcoord|gpslon|gpslong|easting)$/, low: -180, high: 180 },
  {
    key: 'bufferPh',
    header:
      /^(b(uffer)?ph|phb(uffer)?|buffer(index)?|(sikora|smp|mehlich|adamsevans|ae|woodruff|wdrf)(buffer)?(ph)?|ph(sikora|smp|mehlich))$/,
    low: 3,
    high: 8.5,
  },
  { key: 'ph', header: /^(ph|soilph|waterph|phwater|ph11|ph1to1|phh2o|wph)$/, low: 3, high: 10.5 },
  { key: 'organicMatterPercent', header: /^(om|organicmatter)(pct|percent|loi)?$/, low: 0, high: 100 },
  { key: 'cationExchangeCapacity', header: /^(cec|cationexchange(capacity)?)(meq.*)?$/, low: 0, high: 200 },
  {
    key: 'carbonatePercent',
    header: /^(caco3|carbonates?|cce|lime|calciumcarbonate|freelime)(pct|percent)?$/,
    low: 0,
    high: 100,
  },
  { key: 'electricalConductivity', header: /^(ec|solublesalts?|salts|conductivity)(11|dsm|mmhoscm|mmhos)?$/, low: 0, high: 60 },
  { key: 'cystEggsPer100cc', header: /^(scn|eggs|cyst).*(100cc|100cm3|eggs|count)?$/, low: 0, high: 1_000_000 },
  { key: 'sampledOn', header: /^(date|sampled(on)?|sampledate|datesampled|datecollected)$/ },
  { key: 'depthFromInches', header: /^(depthfrom(inches|in)?|topdepth|begindepth)$/, low: 0, high: 120 },
];

const UNMEASURED = /^(|-|n\/?a|nd|none|null|\.)$/i;
const PROBLEMS_SHOWN = 20;

function squeezed(text: string): string {
  return text.toLowerCase().replace(/[^a-z0-9]/g, '');
}

function bufferMethodOf(header: string): string | null {
  const text = squeezed(header);
  if (text.includes('sikora')) return 'Sikora';
  if (text.includes('smp')) return 'SMP';
  if (text.includes('mehlich')) return 'Mehlich';
  if (text.includes('adams') || /^ae/.test(text)) return 'Adams-Evans';
  if (text.includes('woodruff') || text.includes('wdrf')) return 'Woodruff';
  return null;
}

/** `2026-10-01`, `10/1/2026` or a year → ISO date; `null` for anything else. */
function dateOf(text: string): string | null {
  if (/^\d{4}-\d{2}-\d{2}/.test(text)) return text.slice(0, 10);
  const american = /^(\d{1,2})\/(\d{1,2})\/(\d{4})/.exec(text);
  if (american) return `${american[3]}-${(american[1] as string).padStart(2, '0')}-${(american[2] as string).padStart(2, '0')}`;
  return /^\d{4}$/.test(text) ? `${text}-01-01` : null;
}

function matched(header: readonly string[]): Map<Column['key'], { name: string; column: Column }> {
  const found = new Map<Column['key'], { name: string; column: Column }>();
  for (const column of COLUMNS) {
    const name = header.find(
      (one) => column.header.test(squeezed(one)) && ![...found.values()].some((other) => other.name === one),
    );
    if (name !== undefined) found.set(column.key, { name, column });
  }
  return found;
}

const TITLE_LINES = 20;

/** Blanks the title lines that laboratories put above the header, so that row numbers stay those of the file. */
function withoutTitle(text: string): string {
  const lines = text.split(/\r?\n/);
  const header = lines
    .slice(0, TITLE_LINES)
    .findIndex((line) => matched(line.split(',').map((cell) => cell.replaceAll('"', ''))).has('ph'));
  return lines.map((line, i) => (i < header ? '' : line)).join('\n');
}

/**
 * Reads soil tests and gives each to the field that holds it (30 ft of tolerance), or, without coordinates, to the field it
 * names. Refuses files without pH or a way to place rows, and values that cannot be; notes points in no field.
 */
export async function samplesByField(path: string, fields: readonly BoundaryField[]): Promise<FieldSamples> {
  const { header, rows } = readCsv(withoutTitle(await readText(path)), path);
  const columns = matched(header);
  const placed = columns.has('latitude') && columns.has('longitude');
  if (!columns.has('ph')) refuse(`${path} has no pH column. Its columns: ${header.join(', ') || 'none'}.`);
  if (!placed && !columns.has('fieldName'))
    refuse(`${path} has neither latitude and longitude nor a field column, so no row can be placed.`);
  const bufferMethod = bufferMethodOf(columns.get('bufferPh')?.name ?? '');

  const byField = new Map<string, ProfiledSample[]>();
  const problems: string[] = [];
  const strangers: number[] = [];
  for (const { row, cells } of rows) {
    const text = (key: Column['key']) => (cells[columns.get(key)?.name ?? ''] ?? '').trim();
    const number = (key: Column['key']): number | null => {
      const raw = text(key);
      if (UNMEASURED.test(raw)) return null;
      const value = Number(raw.replace(/^[<>]\s*/, ''));
      const { low = -Infinity, high = Infinity } = columns.get(key)?.column ?? {};
      if (Number.isFinite(value) && value >= low && value <= high) return value;
      problems.push(`${path} row ${row}: ${columns.get(key)?.name} "${raw}" is not a number from ${low} to ${high}.`);
      return null;
    };
    const bufferPh = number('bufferPh');
    const sample: ProfiledSample = {
      sampledOn: dateOf(text('sampledOn')),
      latitude: number('latitude'),
      longitude: number('longitude'),
      depthFromInches: number('depthFromInches'),
      ph: number('ph'),
      bufferPh,
      bufferMethod: bufferPh === null ? null : bufferMethod,
      organicMatterPercent: number('organicMatterPercent'),
      cationExchangeCapacity: number('cationExchangeCapacity'),
      carbonatePercent: number('carbonatePercent'),
      electricalConductivity: number('electricalConductivity'),
      cystEggsPer100cc: number('cystEggsPer100cc'),
    };
    const field =
      sample.latitude !== null && sample.longitude !== null
        ? fieldOfPoint(fields, sample.longitude, sample.latitude)
        : fields.find((one) => one.name.toLowerCase() === text('fieldName').toLowerCase());
    if (!field) strangers.push(row);
    else byField.set(field.name, [...(byField.get(field.name) ?? []), sample]);
  }
  if (problems.length > 0) {
    const rest = problems.length - PROBLEMS_SHOWN;
    refuse(...problems.slice(0, PROBLEMS_SHOWN), ...(rest > 0 ? [`${rest} more values are wrong.`] : []));
  }
  if (rows.length === 0) refuse(`${path} holds no samples.`);
  const notes =
    strangers.length === 0
      ? []
      : [
          `${path}: ${strangers.length} of ${rows.length} samples lie in no field (row ${strangers.slice(0, 10).join(', ')}${strangers.length > 10 ? ', …' : ''}).`,
        ];
  return { byField, notes };
}
