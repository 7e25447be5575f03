/** A table of text under headers → samples, row by row; what is wrong with a row is said and costs that row only. Pure. */
import { groupBy } from '@/lib/group';
import { angleCell, dateCell, depthCell, numberCell, placeCell } from './cells';
import { type MatchedColumn, matchColumns, type SampleOptions } from './columns';
import { conversionOf, measured, NUTRIENTS, Tally } from './conversions';
import { bufferMethodOf, phosphorusMethodOf } from './headers';
import { type Meaning, type Measure, RANGES } from './meanings';
import type { RawTable } from './table';

/** One sample as a laboratory reported it; `null` is not measured. */
export interface ReadSample {
  id: string | null;
  depthInches: [number, number] | null;
  ph: number | null;
  saltPh: number | null;
  bufferPh: number | null;
  bufferMethod: string | null;
  organicMatterPercent: number | null;
  cec: number | null;
  phosphorusPpm: number | null;
  phosphorusMethod: string | null;
  potassiumPpm: number | null;
  calciumPpm: number | null;
  magnesiumPpm: number | null;
  carbonatePercent: number | null;
  electricalConductivity: number | null;
  cystEggsPer100cc: number | null;
  longitude: number | null;
  latitude: number | null;
  fieldName: string | null;
  sampledOn: string | null;
  sampledYearOnly: boolean;
  /** Row of the file. */
  row: number;
}

export interface ReadProblem {
  row?: number;
  message: string;
}

export const MEASURES = Object.keys(RANGES).filter((one) => one !== 'latitude' && one !== 'longitude') as Measure[];
export interface TableSamples {
  samples: ReadSample[];
  columns: MatchedColumn[];
  notes: string[];
  problems: ReadProblem[];
  /** Header says nothing of it and values are there: asked once. */
  asks: { bufferMethod: boolean; phosphorusMethod: boolean; nutrientUnit: boolean };
}

const SUMMARY = /^(field |overall )?(avg|average|mean|median|min|minimum|max|maximum|std\.? ?dev|total)s?:?$/i;

/** Every row of a table as a sample. Rows with a value that cannot be are left out and named. */
export function samplesOfTable(table: RawTable, options: SampleOptions = {}): TableSamples {
  const columns = matchColumns(table, options);
  const of = groupBy(
    columns.filter((column) => column.meaning !== null),
    (column) => column.meaning as Meaning,
  );
  const tally = new Tally();
  const convert = new Map(columns.map((column) => [column.index, conversionOf(table, column, options, tally)]));
  const west = needsWest(table, of.get('longitude')?.[0]);
  if (west) tally.note('Longitudes have no minus sign and were read as west.');
  const problems: ReadProblem[] = [];
  const samples: ReadSample[] = [];
  const text = (cells: string[], meaning: Meaning) => (cells[of.get(meaning)?.[0]?.index ?? -1] ?? '').trim();

  for (const { line, cells } of table.rows) {
    const wrong: string[] = [];
    const values: Partial<Record<Measure, number | null>> = {};
    const taken: Partial<Record<Measure, MatchedColumn>> = {};
    for (const measure of MEASURES) {
      values[measure] = null;
      for (const column of of.get(measure) ?? []) {
        const value = measured(
          numberCell(cells[column.index] ?? ''),
          column,
          measure,
          convert.get(column.index) ?? 1,
          wrong,
          tally,
        );
        if (value === null) continue;
        values[measure] = value;
        taken[measure] = column;
        break;
      }
    }
    const place = placeOf(cells, of, west, wrong);
    const id = text(cells, 'id') || text(cells, 'labNumber') || null;
    if (cells.some((cell) => SUMMARY.test(cell.trim()))) {
      tally.count('rows left out as averages or other summaries');
      continue;
    }
    const date = text(cells, 'sampledOn') ? dateCell(text(cells, 'sampledOn')) : null;
    if (text(cells, 'sampledOn') && !date)
      tally.count(`dates that could not be read (“${text(cells, 'sampledOn').slice(0, 30)}”)`);
    if (wrong.length > 0) {
      problems.push({
        row: line,
        message: `Row ${line}${id ? ` (sample ${id.slice(0, 40)})` : ''}: ${wrong.join(' ')} The row was left out.`,
      });
      continue;
    }
    const hasAny = MEASURES.some((measure) => values[measure] !== null) || place !== null;
    if (!hasAny) {
      if (id) tally.count('rows left out because they have a sample number and nothing else');
      continue;
    }
    samples.push({
      id: id?.slice(0, 80) ?? null,
      depthInches: depthOf(cells, of, tally),
      ...(values as Record<Measure, number | null>),
      bufferMethod: taken.bufferPh ? (bufferMethodOf(taken.bufferPh.header) ?? options.bufferMethod ?? null) : null,
      phosphorusMethod: taken.phosphorusPpm
        ? (phosphorusMethodOf(taken.phosphorusPpm.header) ?? options.phosphorusMethod ?? null)
        : null,
      longitude: place?.longitude ?? null,
      latitude: place?.latitude ?? null,
      fieldName: text(cells, 'fieldName').slice(0, 120) || null,
      sampledOn: date?.date ?? null,
      sampledYearOnly: date?.yearOnly ?? false,
      row: line,
    });
  }
  const unsaid = (meaning: Meaning, known: (header: string) => string | null) =>
    (of.get(meaning) ?? []).some((column) => !known(column.header) && column.samples.length > 0);
  return {
    samples,
    columns,
    notes: tally.notes(table.name),
    problems,
    asks: {
      bufferMethod: unsaid('bufferPh', bufferMethodOf),
      phosphorusMethod: unsaid('phosphorusPpm', phosphorusMethodOf),
      nutrientUnit: columns.some(
        (column) => column.meaning && NUTRIENTS.has(column.meaning) && !column.unit && column.samples.length > 0,
      ),
    },
  };
}

type Columns = Map<Meaning, MatchedColumn[]>;

/** North American longitudes written without their sign. */
function needsWest(table: RawTable, column: MatchedColumn | undefined): boolean {
  if (!column) return false;
  const values = table.rows.flatMap((row) => angleCell(row.cells[column.index] ?? '') ?? []);
  return values.length > 0 && values.every((one) => one === 0 || (one > 60 && one < 130));
}

function placeOf(cells: string[], of: Columns, west: boolean, wrong: string[]): { latitude: number; longitude: number } | null {
  const text = (meaning: Meaning) => (cells[of.get(meaning)?.[0]?.index ?? -1] ?? '').trim();
  let place: { latitude: number; longitude: number } | null = null;
  if (of.has('latitude') && of.has('longitude')) {
    const [lat, lon] = [text('latitude'), text('longitude')];
    if (numberCell(lat).kind === 'empty' || numberCell(lon).kind === 'empty') return null;
    const latitude = angleCell(lat);
    const longitude = angleCell(lon);
    if (latitude === null || longitude === null) {
      wrong.push(`“${lat.slice(0, 30)}, ${lon.slice(0, 30)}” is not a latitude and longitude in degrees.`);
      return null;
    }
    place = { latitude, longitude: west ? -Math.abs(longitude) : longitude };
  } else if (of.has('place') && text('place')) place = placeCell(text('place'));
  if (!place || (place.latitude === 0 && place.longitude === 0)) return null;
  const { latitude, longitude } = place;
  if (Math.abs(latitude) > 90 || Math.abs(longitude) > 180) {
    const exchanged = Math.abs(longitude) <= 90 && Math.abs(latitude) <= 180;
    wrong.push(
      `latitude ${latitude}, longitude ${longitude} is no place in degrees; −90 to 90 and −180 to 180 is allowed.${exchanged ? ' Perhaps the two are exchanged.' : ' Send degrees, not meters or feet.'}`,
    );
    return null;
  }
  return place;
}

function depthOf(cells: string[], of: Columns, tally: Tally): [number, number] | null {
  const from = of.get('depthFrom')?.[0];
  const to = of.get('depthTo')?.[0];
  if (from && to) {
    const [top, bottom] = [numberCell(cells[from.index] ?? ''), numberCell(cells[to.index] ?? '')];
    const inches = `${from.unit === 'cm' ? 'cm' : ''}`;
    if (top.kind === 'number' && bottom.kind === 'number') return depthCell(`${top.value}-${bottom.value}${inches}`, from.unit);
  }
  const column = of.get('depth')?.[0];
  const text = (cells[column?.index ?? -1] ?? '').trim();
  if (!column || !text || numberCell(text).kind === 'empty') return null;
  const depth = depthCell(text, column.unit);
  if (!depth) tally.count(`depths that could not be read (“${text.slice(0, 30)}”)`);
  return depth;
}
