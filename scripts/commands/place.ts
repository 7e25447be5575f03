import { pointOnFeature } from '@turf/turf';
import { UNKNOWN_FACTS } from '@/features/fields/model';
import { stateOf } from '@/features/fields/state';
import { parseLineUpCsv } from '@/features/line-up/read-line-up';
import { climateForPlace } from '@/features/placement/climate/place';
import type { Assessment, FixFirst, PlacementRules, Ranking, VarietyProfile } from '@/features/placement/engine/model';
import { rank } from '@/features/placement/engine/rank';
import { ENGINE_VERSION } from '@/features/placement/engine/version';
import { fieldProfile } from '@/features/placement/profile';
import { type BoundaryField, boundaryFields } from './boundary-files';
import { type Command, needed, optional, optionalNumber, parseOptions, readText, refuse } from './command';
import { readFacts } from './facts-file';
import { type FieldSamples, NO_SAMPLES, samplesByField } from './soil-files';

const RULES: PlacementRules = { overrides: {}, zone: null, releasesPlaced: ['full', 'limited'] };
/** Farther from every station than this, a climate is a guess. */
const FARTHEST_STATION_MILES = 300;
/** From September on, the next crop is planned. */
const NEXT_CROP_FROM_MONTH = 8;

/** To a ten-thousandth of a bushel: lines still sum, and two runs compare byte by byte. */
function tidy(value: number): number {
  return Math.round(value * 10_000) / 10_000;
}

interface OutputLine {
  factor: string;
  bushels: number;
  reason: string;
  source: string;
}

/** Every line, the small ones gathered in one, and what trials add: potential and lines sum to what is expected. */
function ledgerOf(pick: Assessment): OutputLine[] {
  const lines: OutputLine[] = pick.ledger.map(({ factor, bushels, reason, source }) => ({
    factor,
    bushels: tidy(bushels),
    reason,
    source,
  }));
  if (pick.gatheredBushels !== 0) {
    lines.push({
      factor: 'gathered',
      bushels: tidy(pick.gatheredBushels),
      reason: 'everything else, each too small to show',
      source: 'sum of the lines not shown',
    });
  }
  if (pick.trialBushels !== 0) {
    lines.push({
      factor: 'trials',
      bushels: tidy(pick.trialBushels),
      reason: 'advantage in trials, shrunken',
      source: 'trial results',
    });
  }
  return lines;
}

function fixOf({ factor, title, remedy, worthBushelsPerAcre, acres, costDollarsPerAcre, caution, source }: FixFirst) {
  return {
    factor,
    title,
    remedy,
    worthBushelsPerAcre: tidy(worthBushelsPerAcre),
    acres: tidy(acres),
    costDollarsPerAcre,
    caution,
    source,
  };
}

function outputOf(field: BoundaryField, ranking: Ranking, top: number, unplaceable: readonly string[]) {
  return {
    name: field.name,
    acres: field.areaAcres,
    potential: tidy(ranking.potential),
    picks: ranking.picks.slice(0, top).map((pick) => ({
      code: pick.code,
      expected: tidy(pick.expected),
      low: tidy(pick.low),
      high: tidy(pick.high),
      hold: pick.hold,
      ledger: ledgerOf(pick),
    })),
    stopped: [
      ...ranking.stopped.map(({ code, reason }) => ({ code, reason })),
      ...unplaceable.map((code) => ({ code, reason: 'Relative maturity is not given, so it cannot be placed.' })),
    ],
    fixFirst: ranking.fixFirst.map(fixOf),
  };
}

async function lineUpOf(path: string): Promise<{ varieties: VarietyProfile[]; withoutMaturity: string[]; notes: string[] }> {
  const outcome = parseLineUpCsv(await readText(path));
  if (!outcome.ok) return refuse(...outcome.problems.map((problem) => problem.message));
  if (outcome.value.varieties.length + outcome.value.withoutMaturity.length === 0) refuse(`${path} holds no variety.`);
  return outcome.value;
}

/** The season asked for; else that of the first planting date; else the next one to be planted. */
function seasonOf(asked: number | null, facts: ReturnType<typeof readFacts>): number {
  const dates = [...facts.values()].flatMap(({ name, facts: one }) =>
    one.plantingDate === null ? [] : [{ name, date: one.plantingDate }],
  );
  const today = new Date();
  const next = today.getUTCFullYear() + (today.getUTCMonth() >= NEXT_CROP_FROM_MONTH ? 1 : 0);
  const season = asked ?? (dates[0] ? Number(dates[0].date.slice(0, 4)) : next);
  const strangers = dates.filter(({ date }) => Number(date.slice(0, 4)) !== season);
  if (strangers.length > 0)
    refuse(...strangers.map(({ name, date }) => `${name}: plantingDate ${date} is not in season ${season}.`));
  return season;
}

export const placeCommand: Command = {
  summary: 'rank a line-up on every field, with ledgers and reasons',
  usage: `hilum place --boundaries FILE [--soil FILE] [--facts CSV] --line-up CSV [--season YEAR] [--top N]
            [--crs CODE] [--name-column COL]

  --boundaries   zipped shapefile, GeoJSON, KML or KMZ
  --soil         soil tests with latitude and longitude, under any laboratory's headers
  --facts        CSV, first column field; other columns optional, empty is unknown
  --line-up      CSV, first column code
  --season       crop year; taken from the planting dates, or the next one, without it
  --top          how many picks a field; all without it

Prints {engineVersion,fields:[{name,acres,potential,picks:[{code,expected,low,high,hold,ledger:[{factor,bushels,reason,source}]}],
stopped:[{code,reason}],fixFirst:[…]}]}. Potential and ledger lines sum to expected, bu/ac.`,
  async run(argv) {
    const parsed = parseOptions(argv, {
      boundaries: { type: 'string' },
      soil: { type: 'string' },
      facts: { type: 'string' },
      'line-up': { type: 'string' },
      season: { type: 'string' },
      top: { type: 'string' },
      crs: { type: 'string' },
      'name-column': { type: 'string' },
    });
    if (parsed.positionals.length > 0)
      refuse(`"${parsed.positionals[0]}" is not an option. Name files with --boundaries, --soil, --facts and --line-up.`);
    const boundaries = needed(parsed, 'boundaries');
    const lineUpFile = needed(parsed, 'line-up');
    const top = optionalNumber(parsed, 'top', 1, 10_000) ?? Infinity;
    const askedSeason = optionalNumber(parsed, 'season', 1990, 2100);
    for (const [name, value] of [
      ['top', top],
      ['season', askedSeason ?? 1],
    ] as const) {
      if (Number.isFinite(value) && !Number.isInteger(value)) refuse(`--${name} must be a whole number.`);
    }

    const factsFile = optional(parsed, 'facts');
    const soilFile = optional(parsed, 'soil');
    const { fields, notes } = await boundaryFields(boundaries, {
      crs: optional(parsed, 'crs') ?? undefined,
      nameColumn: optional(parsed, 'name-column') ?? undefined,
    });
    const facts =
      factsFile === null ? (new Map() as ReturnType<typeof readFacts>) : readFacts(await readText(factsFile), factsFile);
    const lineUp = await lineUpOf(lineUpFile);
    const season = seasonOf(askedSeason, facts);
    const soil: FieldSamples = soilFile === null ? NO_SAMPLES : await samplesByField(soilFile, fields);
    notes.push(...lineUp.notes, ...soil.notes);
    const known = new Set(fields.map((field) => field.name.toLowerCase()));
    for (const [key, { name }] of facts) {
      if (!known.has(key))
        notes.push(
          `${factsFile}: no field is called ${name}; its facts are not used. Fields: ${fields.map((one) => one.name).join(', ')}.`,
        );
    }

    const ranked = fields.map((field) => {
      const [longitude, latitude] = pointOnFeature(field.geometry).geometry.coordinates as [number, number];
      const profile = fieldProfile({
        field: {
          id: field.name,
          name: field.name,
          areaAcres: field.areaAcres,
          latitude,
          longitude,
          elevationFt: null,
          state: stateOf(latitude, longitude),
          geometry: field.geometry,
        },
        facts: facts.get(field.name.toLowerCase())?.facts ?? UNKNOWN_FACTS,
        soilSamples: soil.byField.get(field.name) ?? [],
        mapUnits: [],
      });
      const climate = climateForPlace({ latitude, longitude, elevationFt: null });
      const miles = climate.stations[0]?.distanceMiles ?? Infinity;
      if (miles > FARTHEST_STATION_MILES) {
        notes.push(`${field.name}: the nearest climate station is ${Math.round(miles)} miles away; its season is a guess.`);
      }
      const ranking = rank(profile, lineUp.varieties, { year: season, climate, parameters: 'current' }, RULES);
      return outputOf(field, ranking, top, lineUp.withoutMaturity);
    });
    return { value: { engineVersion: ENGINE_VERSION, fields: ranked }, notes };
  },
};
