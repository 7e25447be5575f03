import { readSurvey } from '@/features/soil/survey/read-survey';
import { tryBoundaries } from './boundary-files';
import { type Command, needed, optional, parseOptions, readInput, refuse } from './command';

export const surveyCommand: Command = {
  summary: 'map units of a soil survey area in every field',
  usage: `hilum survey ZIP --boundaries FILE [--crs CODE] [--name-column COL]

  ZIP            a survey area as the NRCS delivers it (spatial/soilmu_a_*.shp and tabular/*.txt)
  --boundaries   zipped shapefile, .shp with its parts beside it, GeoJSON, KML or KMZ
  --crs          coordinate system of a shapefile that does not say, e.g. EPSG:26915
  --name-column  column that holds the field names; guessed without it

Prints {fields:[{name,acres,mapUnits:[{symbol,name,acres,drainage,hydrologicGroup,slopePercent,availableWaterInches,flooding}]}],
problems:[…]}; water is what the top 100 cm can store; null where the survey does not say.`,
  async run(argv) {
    const parsed = parseOptions(argv, {
      boundaries: { type: 'string' },
      crs: { type: 'string' },
      'name-column': { type: 'string' },
    });
    const [zip, ...more] = parsed.positionals;
    if (zip === undefined || more.length > 0) return refuse('Name one survey area (zip).');
    const { read, problems } = await tryBoundaries(needed(parsed, 'boundaries'), {
      crs: optional(parsed, 'crs') ?? undefined,
      nameColumn: optional(parsed, 'name-column') ?? undefined,
    });
    const targets = (read?.features ?? []).flatMap((feature, index) =>
      feature.geometry ? [{ id: String(index), name: feature.name ?? `shape ${index + 1}`, geometry: feature.geometry }] : [],
    );
    if (targets.length === 0) return { value: { fields: [], problems }, notes: problems, bad: true };
    const survey = await readSurvey(await readInput(zip), targets);
    if (!survey.ok) {
      const lines = [...problems, ...survey.problems.map((problem) => problem.message)];
      return { value: { fields: [], problems: lines }, notes: lines, bad: true };
    }
    const lines = [...problems, ...survey.value.problems];
    return {
      value: {
        fields: survey.value.fields.map((field) => ({
          name: field.name,
          acres: field.areaAcres,
          mapUnits: field.mapUnits.map((unit) => ({
            symbol: unit.symbol,
            name: unit.name,
            acres: unit.areaAcres,
            drainage: unit.drainage,
            hydrologicGroup: unit.hydrologicGroup,
            slopePercent: unit.slopePercent,
            availableWaterInches: unit.availableWaterInches,
            flooding: unit.flooding,
            surfacePh: unit.surfacePh,
            surfaceCarbonatePercent: unit.surfaceCarbonatePercent,
          })),
        })),
        notes: survey.value.notes,
        problems: lines,
      },
      notes: lines,
    };
  },
};
