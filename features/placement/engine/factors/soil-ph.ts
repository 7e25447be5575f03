import { answer, type Factor } from '../factor';
import { type Acidity, acidityOf } from '../ground/acidity';
import type { AskedQuestion } from '../model';
import { rootSumSquares } from '../numbers';
import { ratedLoss, susceptibility } from '../rated';
import { ask, percent, ratingWords } from '../words';

/** Average steepness of the relative-yield curve off its plateau, per pH unit: turns the surface's error into yield. */
const AVERAGE_STEEPNESS = 0.15;

function reasonOf(acidity: Acidity): string {
  if (!acidity.tested) return 'pH not tested';
  const parts = [];
  const below6 = acidity.shareBelow(6);
  const below63 = acidity.shareBelow(6.3);
  const above73 = acidity.shareAbove(7.3);
  if (below6 >= 0.005) parts.push(`${percent(below6)} of the field below pH 6.0`);
  else if (below63 >= 0.005) parts.push(`${percent(below63)} of the field below pH 6.3`);
  if (above73 >= 0.005) parts.push(`${percent(above73)}${parts.length === 0 ? ' of the field' : ''} above pH 7.3`);
  if (parts.length > 0) return parts.join(', ');
  const mean = acidity.shares.reduce((sum, one) => sum + one.value * one.share, 0);
  return `pH ${mean.toFixed(1)} on average`;
}

/**
 * Soil pH: area-weighted relative yield over the pH surface (field), and iron chlorosis from the alkaline part by the
 * variety's rating (match): 20 % per unit of score, score by pH above 7.3, carbonate and salts.
 */
export const soilPh: Factor = {
  id: 'soil-ph',
  label: 'Soil pH',
  color: 'factor-soil-ph',
  needs: ['phShares', 'carbonatePercent', 'electricalConductivity', 'ironChlorosisHistory', 'ironChlorosis'],
  kept({ site, variety }) {
    const { c, field } = site;
    const acidity = acidityOf(site);
    const loss = 1 - acidity.relativeYield;
    const surfaceError = acidity.tested
      ? (AVERAGE_STEEPNESS * (field.phErrorStandardDeviation ?? 0.2)) / Math.sqrt(Math.max(1, field.phPointCount))
      : acidity.scenarioDeviation;
    const chlorosis = ratedLoss(c, {
      pressure: acidity.chlorosis,
      deviation: rootSumSquares(acidity.chlorosisUnknownDeviation, c.diseaseUncertainty * acidity.chlorosis * 0.5),
      rating: variety.ironChlorosis,
      trait: 'ironChlorosis',
      traitWords: 'iron chlorosis',
    });
    const asks: AskedQuestion[] = chlorosis.asks;
    if (!acidity.tested) {
      asks.push(
        ask(
          'phShares',
          'What is the soil pH over this field? A grid or zone test answers it.',
          acidity.scenarioDeviation / acidity.relativeYield,
        ),
      );
    } else if (acidity.chlorosis > 0 && (field.carbonatePercent === null || field.electricalConductivity === null)) {
      const felt = (acidity.chlorosisUnknownDeviation * susceptibility(variety.ironChlorosis)) / chlorosis.match;
      const fact = field.carbonatePercent === null ? 'carbonatePercent' : 'electricalConductivity';
      const words =
        fact === 'carbonatePercent'
          ? 'How much free carbonate is in the alkaline part, in per cent?'
          : 'What is the soluble salt (EC 1:1) of the alkaline part, in dS/m?';
      asks.push(ask(fact, words, felt));
    }
    const sour = acidity.sourLoss > 0.002;
    const alkaline = acidity.alkalineLoss > 0.002 || acidity.chlorosis > 0.002;
    return answer({
      field: acidity.relativeYield,
      fieldDeviation: rootSumSquares(c.phUncertainty * loss, surfaceError) / acidity.relativeYield,
      match: chlorosis.match,
      sharedSlope: chlorosis.sharedSlope,
      ownDeviation: chlorosis.ownDeviation,
      reason: reasonOf(acidity),
      detail: [
        acidity.tested ? '' : 'a usual spread from 5.6 to 7.5 is assumed',
        acidity.tested && sour ? 'sour ground limits P, Ca, Mg and Mo; the same for every variety, see fix first' : '',
        acidity.tested && alkaline
          ? `high pH ties up P, B, Fe, Mn and Zn; ${ratingWords('chlorosis rating', variety.ironChlorosis)}`
          : '',
      ]
        .filter(Boolean)
        .join('; '),
      source:
        'Ohio Special Circular 53 (1938, from memory); Michigan State Extension 2012; Tri-State Recommendations 2020; Froehlich & Fehr 1981 (chlorosis, from memory)',
      asks,
    });
  },
};
