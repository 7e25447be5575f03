/** Why not the other one, and what would have to change for it to be first. */

import { formatDay } from '@/lib/dates';
import { evaluate } from './evaluate';
import type { Assessment, FactorId, FieldProfile, PlacementRules, SeasonContext, VarietyProfile } from './model';
import { ordered } from './rank';
import { type Site, siteOf } from './site';
import { shiftedDate, withLime, withTile } from './what-if';
import { inches, listed } from './words';

export interface DifferenceLine {
  factor: FactorId | 'gathered' | 'trial';
  label: string;
  /** Positive: the first one's advantage, bu/ac. */
  bushels: number;
}

/** Lines smaller than this stay out of the sentence, bu/ac. */
const SAID_FROM = 0.05;

/**
 * Two ledgers of one field subtracted, largest difference first; the lines sum to the difference of the expected yields.
 * A line that one ledger has gathered counts as nothing there and stays in the gathered sum.
 */
export function whyNot(first: Assessment, other: Assessment): { sentence: string; lines: DifferenceLine[] } {
  const byFactor = new Map<DifferenceLine['factor'], DifferenceLine>();
  const add = (factor: DifferenceLine['factor'], label: string, bushels: number) => {
    const line = byFactor.get(factor);
    if (line) line.bushels += bushels;
    else byFactor.set(factor, { factor, label, bushels });
  };
  for (const line of first.ledger) add(line.factor, line.label, line.bushels);
  for (const line of other.ledger) add(line.factor, line.label, -line.bushels);
  add('gathered', 'Small lines together', first.gatheredBushels - other.gatheredBushels);
  add('trial', 'Trials', first.trialBushels - other.trialBushels);
  const lines = [...byFactor.values()]
    .filter((line) => line.bushels !== 0)
    .sort((a, b) => Math.abs(b.bushels) - Math.abs(a.bushels) || (a.label < b.label ? -1 : 1));
  const lead = first.expected - other.expected;
  const [ahead, behind] = lead >= 0 ? [first.code, other.code] : [other.code, first.code];
  const sign = lead >= 0 ? 1 : -1;
  const said = (side: 1 | -1) =>
    lines
      .filter((line) => line.bushels * sign * side >= SAID_FROM)
      .slice(0, 3)
      .map((line) => `${Math.abs(line.bushels).toFixed(1)} on ${line.label.toLowerCase()}`);
  const gains = said(1);
  const losses = said(-1);
  let sentence = `${Math.abs(lead).toFixed(1)} bu/ac: ${ahead} is expected ahead of ${behind}`;
  if (gains.length > 0) sentence += `, by ${listed(gains)}`;
  sentence += losses.length > 0 ? `; ${behind} takes back ${listed(losses)}.` : '.';
  return { sentence, lines };
}

/** One thing that could be farmed otherwise. */
interface Change {
  kind: 'rows' | 'date' | 'lime' | 'tile';
  words: string;
  apply(field: FieldProfile): FieldProfile;
}

const ROW_WIDTHS = [7.5, 15, 20, 30, 36];
const DATE_SHIFTS = [-15, -10, -5, 5, 10, 15, 20, 30];

function changesFor(site: Site): Change[] {
  const { field, c } = site;
  const changes: Change[] = [];
  for (const width of ROW_WIDTHS) {
    if (width === field.rowWidthInches) continue;
    const words = `${inches(width)} rows`;
    changes.push({ kind: 'rows', words, apply: (one) => ({ ...one, rowWidthInches: width }) });
  }
  for (const days of DATE_SHIFTS) {
    const date = shiftedDate(site.plantingDate, days);
    changes.push({ kind: 'date', words: `planting on ${formatDay(date)}`, apply: (one) => ({ ...one, plantingDate: date }) });
  }
  if (field.phShares?.some((one) => one.value < c.limeBelowPh)) {
    const words = `lime to pH ${c.limeTargetPh.toFixed(1)}`;
    changes.push({ kind: 'lime', words, apply: (one) => withLime(one, c.limeTargetPh, c.limeBelowPh) });
  }
  if (field.tiled === false) changes.push({ kind: 'tile', words: 'tile', apply: withTile });
  return changes;
}

export interface WhatWouldMakeItFirst {
  /** `first`: it is already. `found`: these would do. `none`: nothing tried would. `stopped`: it may not be placed. */
  outcome: 'first' | 'found' | 'none' | 'stopped';
  sentence: string;
  /** Changes that put it first, the best yield first; single changes, or pairs when no single one does. */
  ways: { words: string; expected: number; leadBushels: number }[];
}

/** Expected of `other` and of its best rival under a change, or `null` as soon as a rival beats it. */
function leadUnder(
  site: Site,
  other: VarietyProfile,
  rivals: readonly VarietyProfile[],
): { expected: number; lead: number } | null {
  const { expected } = evaluate(site, other).assessment;
  let lead = Number.POSITIVE_INFINITY;
  for (const rival of rivals) {
    const margin = expected - evaluate(site, rival).assessment.expected;
    if (margin <= 0) return null;
    lead = Math.min(lead, margin);
  }
  return { expected, lead };
}

/**
 * What would have to change for a variety to be first on a field: row width, planting date, lime, tile, one at a time and then
 * in pairs, each tried by ranking again. Says plainly when nothing tried would.
 */
export function whatWouldMakeItFirst(
  field: FieldProfile,
  varieties: readonly VarietyProfile[],
  season: SeasonContext,
  rules: PlacementRules,
  varietyId: string,
): WhatWouldMakeItFirst {
  const site = siteOf(field, season, rules);
  const { picks, stopped } = ordered(site, varieties);
  const stop = stopped.find((one) => one.varietyId === varietyId);
  if (stop) return { outcome: 'stopped', sentence: `${stop.code} is stopped here: ${stop.reason}.`, ways: [] };
  const other = picks.find((one) => one.variety.id === varietyId)?.variety;
  if (!other) throw new RangeError(`No variety ${varietyId} among those given`);
  if (picks[0]?.variety.id === varietyId) return { outcome: 'first', sentence: `${other.code} is first already.`, ways: [] };
  // Today's leaders are the likeliest to beat it again, so they are asked first.
  const rivals = picks.filter((one) => one.variety.id !== varietyId).map((one) => one.variety);
  const changes = changesFor(site);
  const tried = (list: readonly Change[]) => {
    const changed = list.reduce((one, change) => change.apply(one), field);
    const result = leadUnder(siteOf(changed, season, rules), other, rivals);
    return result
      ? [{ words: listed(list.map((change) => change.words)), expected: result.expected, leadBushels: result.lead }]
      : [];
  };
  const bySize = (a: { expected: number; words: string }, b: { expected: number; words: string }) =>
    b.expected - a.expected || (a.words < b.words ? -1 : 1);
  let ways = changes.flatMap((change) => tried([change])).sort(bySize);
  if (ways.length === 0) {
    const pairs = changes.flatMap((a, i) => changes.slice(i + 1).flatMap((b) => (a.kind === b.kind ? [] : [[a, b]])));
    ways = pairs.flatMap(tried).sort(bySize);
  }
  if (ways.length === 0) {
    const kinds = ['row widths from 7.5 to 36 in', 'planting days from 15 earlier to 30 later'];
    if (changes.some((change) => change.kind === 'lime')) kinds.push('lime');
    if (changes.some((change) => change.kind === 'tile')) kinds.push('tile');
    return { outcome: 'none', sentence: `Nothing tried puts ${other.code} first: ${listed(kinds)}, alone and in pairs.`, ways };
  }
  const best = ways[0]!;
  const more = ways.length > 1 ? ` ${ways.length - 1} other ${ways.length === 2 ? 'way' : 'ways'} would too.` : '';
  const sentence = `With ${best.words} ${other.code} would be first, at ${best.expected.toFixed(1)} bu/ac, ${best.leadBushels.toFixed(1)} ahead.${more}`;
  return { outcome: 'found', sentence, ways };
}
