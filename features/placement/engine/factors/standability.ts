import { answer, type Factor } from '../factor';
import type { AskedQuestion, Height } from '../model';
import { clamp, rootSumSquares } from '../numbers';
import { ratedLoss, susceptibility } from '../rated';
import type { Site } from '../site';
import { ask, inches, ratingWords } from '../words';

/** Chance of irrigation when nobody has said: the irrigated states of the west and the Delta, and the rest (planning spread). */
const IRRIGATED_STATES: Readonly<Record<string, number>> = { NE: 0.4, KS: 0.2, AR: 0.8, MS: 0.6, MO: 0.15, LA: 0.3 };
const CHANCE_ELSEWHERE = 0.05;

interface Lodging {
  /** Loss of a variety of standability 1 and medium height. */
  pressure: number;
  irrigationDeviation: number;
}

function lodgingOf(site: Site): Lodging {
  const { c, field, rowWidthInches } = site;
  const yields = clamp(1 + c.lodgingYieldSlope * (site.potential.bushelsPerAcre - 60), 0.2, 3);
  const rows = rowWidthInches === null ? 1 : rowWidthInches <= 15 ? c.lodgingNarrow : rowWidthInches >= 30 ? c.lodgingWide : 1;
  const thick = clamp(site.populationSeedsPerAcre / 140000, 0.4, 2) ** c.lodgingPopulationPower;
  const chance = field.irrigated === null ? (IRRIGATED_STATES[field.state ?? ''] ?? CHANCE_ELSEWHERE) : field.irrigated ? 1 : 0;
  const base = c.lodgingLoss * yields * rows * thick;
  return {
    pressure: base * (1 + chance * (c.lodgingIrrigated - 1)),
    irrigationDeviation: field.irrigated === null ? base * (c.lodgingIrrigated - 1) * Math.sqrt(chance * (1 - chance)) : 0,
  };
}

/** Standability: lodging pressure of yield level, irrigation, rows, population and height × (9 − rating)/8. All match. */
export const standability: Factor = {
  id: 'standability',
  label: 'Standability',
  color: 'factor-standability',
  needs: ['irrigated', 'rowWidthInches', 'populationSeedsPerAcre', 'yieldGoalBushelsPerAcre', 'standability', 'height'],
  kept({ site, variety }) {
    const { c, field } = site;
    const { pressure, irrigationDeviation } = site.once('lodging', lodgingOf);
    const byHeight: Record<Height, number> = { short: c.lodgingShort, medium: 1, tall: c.lodgingTall };
    const height = variety.height ? byHeight[variety.height] : 1;
    const lodging = ratedLoss(c, {
      pressure: Math.min(0.35, pressure * height),
      deviation: rootSumSquares(c.lodgingUncertainty * pressure * height, irrigationDeviation * height),
      rating: variety.standability,
      trait: 'standability',
      traitWords: 'standability',
    });
    const asks: AskedQuestion[] = lodging.asks;
    if (irrigationDeviation > 0) {
      const felt = (irrigationDeviation * height * susceptibility(variety.standability)) / lodging.match;
      asks.push(ask('irrigated', 'Is this field irrigated?', felt));
    }
    const water = field.irrigated === null ? '' : field.irrigated ? ', irrigated' : ', not irrigated';
    const rows = site.rowWidthInches === null ? '' : `, ${inches(site.rowWidthInches)} rows`;
    return answer({
      match: lodging.match,
      sharedSlope: lodging.sharedSlope,
      ownDeviation: lodging.ownDeviation,
      reason: `${Math.round(site.potential.bushelsPerAcre)} bu ground${water}${rows}: ${ratingWords('standability', variety.standability)}`,
      detail: `${variety.height ? `${variety.height} plant` : 'height unknown'}, ${Math.round(site.populationSeedsPerAcre / 1000)},000 seeds/ac`,
      source:
        'Woods & Swearingin 1977 in Mississippi Soybean Promotion Board (lodging costs most at R3–R5); sizes are planning coefficients',
      asks,
    });
  },
};
