import { type Evaluation, evaluate } from './evaluate';
import { fixFirstOf } from './fix-first';
import type { FieldProfile, PlacementRules, Ranking, SeasonContext, Stopped, VarietyProfile } from './model';
import { questionsOf } from './questions';
import { type Site, siteOf } from './site';
import { holdOf } from './uncertainty';
import { ENGINE_VERSION } from './version';

function textOrder(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}

/** A variety nobody has rated, of the RM the place wants: stands in where there is no pick to speak for the field. */
export function plainVariety(relativeMaturity: number): VarietyProfile {
  return {
    id: 'plain',
    code: 'any variety',
    relativeMaturity,
    height: 'medium',
    bushType: 'medium',
    standability: 5,
    emergence: 5,
    phytophthoraGenes: [],
    phytophthora: 5,
    suddenDeath: 5,
    brownStemRot: 5,
    whiteMould: 5,
    frogeye: 5,
    stemCanker: 5,
    charcoalRot: 5,
    ironChlorosis: 5,
    drought: 5,
    cystNematodeSource: 'PI 88788',
    tolerances: [],
    seedsPerLb: null,
    germinationPercent: null,
    unitsOnHand: null,
    release: 'full',
    trialAdvantage: 0,
    trialAdvantageStandardError: 0,
  };
}

/** Every variety asked; those that may be placed best first, ties by code and id, and the stopped ones by code. */
export function ordered(site: Site, varieties: readonly VarietyProfile[]): { picks: Evaluation[]; stopped: Stopped[] } {
  const picks: Evaluation[] = [];
  const stopped: Stopped[] = [];
  for (const variety of varieties) {
    const evaluation = evaluate(site, variety);
    if (evaluation.stopped) stopped.push(evaluation.stopped);
    else picks.push(evaluation);
  }
  picks.sort(
    (a, b) =>
      b.assessment.expected - a.assessment.expected ||
      textOrder(a.variety.code, b.variety.code) ||
      textOrder(a.variety.id, b.variety.id),
  );
  stopped.sort((a, b) => textOrder(a.code, b.code) || textOrder(a.varietyId, b.varietyId));
  return { picks, stopped };
}

/**
 * Rank a line-up on a field: picks best first with ledger, band and hold; stopped varieties with their reason; what to fix
 * first; which question would narrow the first pick's band most. Pure: same inputs, same answer, whatever the order of varieties.
 * Throws RangeError like `assess`.
 */
export function rank(
  field: FieldProfile,
  varieties: readonly VarietyProfile[],
  season: SeasonContext,
  rules: PlacementRules,
): Ranking {
  const site = siteOf(field, season, rules);
  const { picks, stopped } = ordered(site, varieties);
  const hold = holdOf(picks);
  const first = picks[0];
  return {
    engineVersion: ENGINE_VERSION,
    fieldId: field.id,
    potential: site.potential.bushelsPerAcre,
    potentialSource: site.potential.source,
    picks: picks.map(({ assessment }, i) => ({ ...assessment, hold: hold[i]! })),
    stopped,
    fixFirst: fixFirstOf(site, first?.variety ?? plainVariety(site.optimum)),
    questions: questionsOf(first ?? evaluate(site, plainVariety(site.optimum))),
  };
}
