import { fitSurface, type GeographicPoint, projectPoints, type SurfaceOptions, type SurfacePoint } from '@/features/soil/surface';
import type { Variogram, VariogramModel } from '@/features/soil/surface/variogram';
import {
  type Command,
  needed,
  optional,
  optionalNumber,
  optionalWord,
  type Parsed,
  parseOptions,
  readCsv,
  readText,
  refuse,
} from './command';

const ROW_PROBLEMS_SHOWN = 20;

interface Row {
  x: number;
  y: number;
  value: number;
}

/** Numbers of the three columns; every bad row is named. */
function rowsOf(text: string, file: string, parsed: Parsed, planar: boolean): Row[] {
  const names = { x: needed(parsed, 'x'), y: needed(parsed, 'y'), value: needed(parsed, 'value') };
  const { header, rows } = readCsv(text, file);
  for (const [option, column] of Object.entries(names)) {
    if (!header.includes(column))
      refuse(`--${option} "${column}" is not a column of ${file}. Its columns: ${header.join(', ') || 'none'}.`);
  }
  const log = parsed.values.log === true;
  const problems: string[] = [];
  const read = rows.flatMap(({ row, cells }) => {
    const number = (column: string) => (cells[column]?.trim() ? Number(cells[column]) : Number.NaN);
    const [x, y, raw] = [number(names.x), number(names.y), number(names.value)];
    const fault = rowFault(x, y, raw, planar, log, names);
    if (fault === null) return [{ x, y, value: log ? Math.log(raw) : raw }];
    problems.push(`Row ${row}: ${fault}`);
    return [];
  });
  if (problems.length > 0) {
    const rest = problems.length - ROW_PROBLEMS_SHOWN;
    refuse(...problems.slice(0, ROW_PROBLEMS_SHOWN), ...(rest > 0 ? [`${rest} more rows are wrong.`] : []));
  }
  if (read.length === 0) refuse(`${file} holds no points.`);
  return read;
}

function rowFault(
  x: number,
  y: number,
  value: number,
  planar: boolean,
  log: boolean,
  names: Record<string, string>,
): string | null {
  if (!Number.isFinite(x)) return `${names.x} is not a number.`;
  if (!Number.isFinite(y)) return `${names.y} is not a number.`;
  if (!Number.isFinite(value)) return `${names.value} is not a number.`;
  if (!planar && (Math.abs(x) > 180 || Math.abs(y) > 90))
    return `${x}, ${y} is no longitude and latitude. For metres give --planar.`;
  if (log && value <= 0) return `${names.value} ${value} has no logarithm.`;
  return null;
}

/** The variogram asked for: all of it, a model to fit, or nothing. */
function variogramOf(parsed: Parsed): { variogram?: Variogram; models?: VariogramModel[] } {
  const model = optionalWord(parsed, 'model', ['spherical', 'exponential'] as const);
  const nugget = optionalNumber(parsed, 'nugget', 0, 1e12);
  const partialSill = optionalNumber(parsed, 'psill', 0, 1e12);
  const range = optionalNumber(parsed, 'range', 1e-9, 1e12);
  const given = [nugget, partialSill, range].filter((one) => one !== null).length;
  if (given === 0) return model === null ? {} : { models: [model] };
  if (model === null || nugget === null || partialSill === null || range === null) {
    return refuse('A variogram takes all of --model, --nugget, --psill and --range; without them it is fitted.');
  }
  if (nugget + partialSill === 0) return refuse('--nugget and --psill are both 0: a variogram needs one of them.');
  return { variogram: { model, nugget, partialSill, range } };
}

function placesOf(parsed: Parsed): { x: number; y: number }[] {
  const text = optional(parsed, 'at');
  if (text === null) return [];
  return text
    .split(';')
    .filter((pair) => pair.trim() !== '')
    .map((pair) => {
      const [x, y, ...rest] = pair.split(',').map((one) => (one.trim() === '' ? Number.NaN : Number(one)));
      if (x === undefined || y === undefined || rest.length > 0 || !Number.isFinite(x) || !Number.isFinite(y)) {
        return refuse(`--at "${pair}" is not a place. Write "x,y;x,y".`);
      }
      return { x, y };
    });
}

export const surfaceCommand: Command = {
  summary: 'a surface from points by kriging or inverse distance',
  usage: `hilum surface POINTS.csv --x COL --y COL --value COL [--log] [--planar]
              [--model spherical|exponential --nugget N --psill N --range N] [--method kriging|idw] [--at "x,y;x,y"]

  --x, --y, --value  columns of the CSV: longitude and latitude in degrees, or metres with --planar
  --log              work on the natural logarithm of the value
  --planar           x and y are planar metres
  --model …          use this variogram (range in metres); --model alone fits that model
  --method           force a method; without it kriging is taken from 20 points on, when it beats the mean
  --at               places to estimate, in the units of x and y

Prints {method,variogram,leaveOneOutRmse,at:[{x,y,mean,variance}]}.`,
  async run(argv) {
    const parsed = parseOptions(argv, {
      x: { type: 'string' },
      y: { type: 'string' },
      value: { type: 'string' },
      log: { type: 'boolean' },
      planar: { type: 'boolean' },
      model: { type: 'string' },
      nugget: { type: 'string' },
      psill: { type: 'string' },
      range: { type: 'string' },
      method: { type: 'string' },
      at: { type: 'string' },
    });
    const [file, ...more] = parsed.positionals;
    if (file === undefined || more.length > 0) return refuse('Name one CSV file of points.');
    const planar = parsed.values.planar === true;
    const variogram = variogramOf(parsed);
    const places = placesOf(parsed);
    const rows = rowsOf(await readText(file), file, parsed, planar);
    const asked = optionalWord(parsed, 'method', ['kriging', 'idw'] as const);
    const method: SurfaceOptions['method'] = asked ?? (variogram.variogram ? 'kriging' : undefined);

    const geographic: GeographicPoint[] = rows.map(({ x, y, value }) => ({ longitude: x, latitude: y, value }));
    const projected = planar ? null : projectPoints(geographic);
    const points: SurfacePoint[] = projected ? projected.points : rows;
    const surface = fitSurface(points, { method, ...variogram });
    if (!surface) return refuse(`${file} holds no points.`);
    if (asked === 'kriging' && surface.method !== 'kriging') {
      return refuse('These points cannot be kriged: no variogram could be fitted, or all values are equal. Try --method idw.');
    }
    const used = surface.variogram;
    return {
      value: {
        method: surface.method,
        variogram: used && { model: used.model, nugget: used.nugget, psill: used.partialSill, range: used.range },
        leaveOneOutRmse: surface.leaveOneOutRmse,
        at: places.map(({ x, y }) => {
          const place = projected ? projected.project(x, y) : { x, y };
          return { x, y, ...surface.at(place.x, place.y) };
        }),
      },
    };
  },
};
