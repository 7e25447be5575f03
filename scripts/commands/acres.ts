import { tryBoundaries } from './boundary-files';
import { type Command, optional, parseOptions, refuse } from './command';

export const acresCommand: Command = {
  summary: 'acres of every field in a boundary file',
  usage: `hilum acres FILE [--crs CODE] [--name-column COL]

  FILE           zipped shapefile, .shp with its parts beside it, GeoJSON, KML or KMZ
  --crs          coordinate system of a shapefile that does not say, e.g. EPSG:26915
  --name-column  column that holds the field names; guessed without it

Prints {features:[{name,acres,problems:[…]}],problems:[…]}. Acres are on the WGS84 ellipsoid.`,
  async run(argv) {
    const parsed = parseOptions(argv, { crs: { type: 'string' }, 'name-column': { type: 'string' } });
    const [file, ...more] = parsed.positionals;
    if (file === undefined || more.length > 0) return refuse('Name one boundary file.');
    const { read, problems } = await tryBoundaries(file, {
      crs: optional(parsed, 'crs') ?? undefined,
      nameColumn: optional(parsed, 'name-column') ?? undefined,
    });
    const features = (read?.features ?? []).map((feature) => ({
      name: feature.name,
      acres: feature.areaAcres,
      problems: feature.problems,
    }));
    const notes = [
      ...problems,
      ...features.flatMap((feature, i) => feature.problems.map((problem) => `${feature.name ?? `shape ${i + 1}`}: ${problem}`)),
    ];
    return { value: { features, problems }, notes, bad: read === null };
  },
};
