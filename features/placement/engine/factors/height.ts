import { answer, type Factor } from '../factor';
import { drynessOf } from '../ground/dryness';
import type { AskedQuestion, Height } from '../model';
import { expectation, rootSumSquares } from '../numbers';
import { ask } from '../words';

/**
 * Height × ground: a short plant on droughty, low-yield ground makes too little canopy and sets pods too low. On rich or
 * irrigated ground it loses nothing here; a tall plant pays there through standability.
 */
export const height: Factor = {
  id: 'height',
  label: 'Height',
  color: 'factor-height',
  needs: ['availableWaterInches', 'irrigated', 'yieldGoalBushelsPerAcre', 'height'],
  kept({ site, variety }) {
    const { c, field } = site;
    const dry = drynessOf(site);
    const share: Record<Height, number> = { tall: 0, medium: c.mediumOnDroughtyShare, short: 1 };
    const unknown = expectation([
      { weight: 1, value: share.short },
      { weight: 2, value: share.medium },
      { weight: 1, value: share.tall },
    ]);
    const own = variety.height ? share[variety.height] : unknown.mean;
    const most = c.shortOnDroughtyLoss * dry.lowYield;
    const loss = most * dry.index * own;
    const match = 1 - loss;
    const ownDeviation = variety.height ? 0 : (most * dry.index * unknown.deviation) / match;
    const asks: AskedQuestion[] = [];
    if (!variety.height && ownDeviation > 0.0005) {
      asks.push(ask('height', 'Is this variety short, medium or tall?', ownDeviation));
    }
    const bushels = Math.round(site.potential.bushelsPerAcre);
    const storage = field.availableWaterInches === null ? '' : ` storing ${field.availableWaterInches.toFixed(1)} in of water`;
    const ground = field.irrigated ? 'irrigated' : dry.index > 0.5 ? 'droughty' : dry.index > 0.15 ? 'thin' : 'good';
    return answer({
      match,
      sharedSlope: -rootSumSquares(most * own * dry.indexDeviation, 0.4 * loss) / match,
      ownDeviation,
      reason: `${bushels} bu, ${ground} ground${storage}: ${variety.height ? `${variety.height} plant` : 'height unknown'}`,
      detail: loss < 0.001 ? 'short plants belong here; tall ones pay through standability' : '',
      source: 'Short plants belong on high-yield ground: common practice; height under 24 in on droughty ground: from memory',
      asks,
    });
  },
};
