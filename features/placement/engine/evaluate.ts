/** One variety on one site: every factor asked once, told as ledger, band and the responses that hold is drawn from. */
import { FACTORS } from './factors/index';
import { ledgerOf } from './ledger';
import type { AskedQuestion, Assessment, Kept, Stopped, VarietyProfile } from './model';
import { clamp, logDeviationOf, NINETIETH } from './numbers';
import type { Site } from './site';
import { weedAdvice } from './weeds/advice';

export interface Evaluation {
  variety: VarietyProfile;
  assessment: Assessment;
  stopped: Stopped | null;
  /** Log response to each factor's shared shock, in the order of FACTORS. */
  slopes: Float64Array;
  /** The deviation in logs that no other variety shares. */
  ownLogDeviation: number;
  asks: AskedQuestion[];
}

/** No shrunken trial advantage is larger than this; one that says so is a slip of units. */
const MOST_FROM_TRIALS = 0.5;

function stopOf(site: Site, variety: VarietyProfile, kept: readonly Kept[]): Stopped | null {
  const { id: varietyId, code } = variety;
  if (!site.rules.releasesPlaced.includes(variety.release)) {
    return { varietyId, code, factor: 'release', reason: `${variety.release} release, not placed` };
  }
  if (variety.unitsOnHand === 0) return { varietyId, code, factor: 'supply', reason: 'sold out' };
  for (let i = 0; i < kept.length; i++) {
    const { stop } = kept[i]!;
    if (stop) return { varietyId, code, factor: FACTORS[i]!.id, reason: stop };
  }
  return null;
}

/** Ask every factor of a variety on a site. */
export function evaluate(site: Site, variety: VarietyProfile): Evaluation {
  const { c, potential } = site;
  const context = { site, variety };
  const kept = FACTORS.map((factor) => factor.kept(context));
  const asks: AskedQuestion[] = potential.asks.slice();
  const slopes = new Float64Array(kept.length);
  let fieldVariance = potential.logDeviation ** 2;
  let varietyVariance = 0;
  let ownVariance = 0;
  for (let i = 0; i < kept.length; i++) {
    const one = kept[i]!;
    fieldVariance += logDeviationOf(one.field) ** 2;
    varietyVariance += logDeviationOf(one.match) ** 2;
    ownVariance += one.ownLogDeviation ** 2;
    slopes[i] = one.sharedLogSlope;
    for (const question of one.asks) asks.push(question);
  }
  const advantage = clamp(variety.trialAdvantage, -MOST_FROM_TRIALS, MOST_FROM_TRIALS);
  const trials = 1 + advantage;
  const beyondTraits =
    variety.trialAdvantageStandardError > 0 ? variety.trialAdvantageStandardError / trials : c.untestedVarietyDeviation;
  varietyVariance += beyondTraits ** 2;
  ownVariance += beyondTraits ** 2;

  const { bushelsPerAcre } = potential;
  const ledger = ledgerOf(bushelsPerAcre, kept, c.gatheredBelowBushels);
  // + 0: minus zero would not survive being stored.
  const trialBushels = ledger.withoutTrials * advantage + 0;
  const expected = ledger.withoutTrials + trialBushels;
  const reach = Math.exp(NINETIETH * Math.sqrt(fieldVariance + varietyVariance));
  const line = site.line(variety.relativeMaturity);
  return {
    variety,
    stopped: stopOf(site, variety, kept),
    slopes,
    ownLogDeviation: Math.sqrt(ownVariance),
    asks,
    assessment: {
      varietyId: variety.id,
      code: variety.code,
      relativeMaturity: variety.relativeMaturity,
      potential: bushelsPerAcre,
      potentialSource: potential.source,
      ledger: ledger.lines,
      gatheredBushels: ledger.gatheredBushels,
      trialBushels,
      expected,
      low: expected / reach,
      high: expected * reach,
      fieldLogDeviation: Math.sqrt(fieldVariance),
      varietyLogDeviation: Math.sqrt(varietyVariance),
      advice: weedAdvice(site),
      season: { r1: line.r1, r5: line.r5, r7: line.r7, r8: line.r8, chanceOfFreezeBeforeR7: line.freeze.chanceBeforeR7 },
    },
  };
}
