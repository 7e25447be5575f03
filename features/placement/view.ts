import type { Field, FieldFacts } from '@/features/fields/model';
import type { Ranking } from './engine/model';

/** What the lists show of a field and its picks: pure, so that table, map and exports say the same. */

/** Facts that matter most, by name, in the order a grower is asked for them. */
const ASKED_FACTS: readonly [keyof FieldFacts, string][] = [
  ['plantingDate', 'planting date'],
  ['rowWidthInches', 'row width'],
  ['drainage', 'drainage'],
  ['tiled', 'tile'],
  ['yieldGoalBushelsPerAcre', 'yield goal'],
  ['weedProgramme', 'weed programme'],
  ['lastCrop', 'last crop'],
];

/** What is still missing of a field, in a few words; empty when nothing that matters is. */
export function missingOf(facts: FieldFacts, soilSampleCount: number, hasSurvey: boolean): string[] {
  const missing = ASKED_FACTS.filter(([name]) => facts[name] === null && !(name === 'drainage' && hasSurvey)).map(
    ([, words]) => words,
  );
  return soilSampleCount === 0 ? ['soil tests', ...missing] : missing;
}

/** A list of what is missing, short enough for a cell. */
export function missingWords(missing: readonly string[]): string {
  if (missing.length === 0) return 'nothing';
  return missing.slice(0, 3).join(', ') + (missing.length > 3 ? ` and ${missing.length - 3} more` : '');
}

/** How firmly a pick stays first: words and a number. */
export function holdWords(hold: number): string {
  const inTen = Math.round(hold * 10);
  const number = inTen >= 10 ? 'nearly 10 of 10' : inTen <= 0 ? 'fewer than 1 of 10' : `${inTen} of 10`;
  const word = hold >= 0.8 ? 'firm' : hold >= 0.5 ? 'likely' : hold >= 0.3 ? 'open' : 'a toss-up';
  return `${word}, first in ${number}`;
}

export interface FieldLine {
  id: string;
  name: string;
  farmName: string | null;
  areaAcres: number;
  geometry: Field['boundary'];
  pickCode: string | null;
  pickRelativeMaturity: number | null;
  expected: number | null;
  low: number | null;
  high: number | null;
  hold: number | null;
  runnerUp: string | null;
  fixFirstBushels: number;
  fixFirstTitle: string | null;
  missing: string[];
  stale: boolean;
  scored: boolean;
}

/** One row of the fields table. */
export function fieldLine(input: {
  field: Field;
  facts: FieldFacts;
  soilSampleCount: number;
  hasSurvey: boolean;
  score: { ranking: Ranking; stale: boolean } | null;
}): FieldLine {
  const { field, facts, score } = input;
  const first = score?.ranking.picks[0];
  const second = score?.ranking.picks[1];
  const fixes = score?.ranking.fixFirst ?? [];
  return {
    id: field.id,
    name: field.name,
    farmName: field.farmName,
    areaAcres: field.areaAcres,
    geometry: field.boundary,
    pickCode: first?.code ?? null,
    pickRelativeMaturity: first?.relativeMaturity ?? null,
    expected: first?.expected ?? null,
    low: first?.low ?? null,
    high: first?.high ?? null,
    hold: first?.hold ?? null,
    runnerUp: first && second ? `${second.code} −${(first.expected - second.expected).toFixed(1)}` : null,
    fixFirstBushels: fixes.reduce((sum, fix) => sum + (fix.worthBushelsPerAcre * fix.acres) / field.areaAcres, 0),
    fixFirstTitle: fixes[0]?.title ?? null,
    missing: missingOf(facts, input.soilSampleCount, input.hasSurvey),
    stale: score?.stale ?? false,
    scored: score !== null,
  };
}

/** Layers of the field's map, in the order of its buttons; the key is in the address. */
export const FIELD_LAYERS = [
  { key: 'picks', label: 'Picks' },
  { key: 'ph', label: 'Soil pH' },
  { key: 'drainage', label: 'Drainage' },
  { key: 'survey', label: 'Soil survey' },
] as const;
export type FieldLayer = (typeof FIELD_LAYERS)[number]['key'];

/** The layer an address asks for; picks when it asks for none that exists. */
export function layerOf(asked: string | undefined): FieldLayer {
  return FIELD_LAYERS.find((layer) => layer.key === asked)?.key ?? 'picks';
}

/** Varieties an address asks to compare: two to four that exist, else the first three picks. */
export function comparedIds(asked: string | undefined, ranking: Ranking): string[] {
  const known = new Set([...ranking.picks.map((pick) => pick.varietyId), ...ranking.stopped.map((one) => one.varietyId)]);
  const wanted = [...new Set((asked ?? '').split(',').filter((id) => known.has(id)))].slice(0, 4);
  return wanted.length >= 2 ? wanted : ranking.picks.slice(0, 3).map((pick) => pick.varietyId);
}
