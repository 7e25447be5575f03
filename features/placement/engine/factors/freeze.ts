import { formatDay } from '@/lib/dates';
import { answer, type Factor } from '../factor';
import type { AskedQuestion } from '../model';
import { rootSumSquares } from '../numbers';
import type { Site } from '../site';
import { shiftedDate } from '../what-if';
import { ask, yearsIn } from '../words';

interface FreezeLoss {
  loss: number;
  unknownDeviation: number;
}

/** Expected loss of an RM here; when the planting day is only assumed, over that day and a later one. */
function freezeLoss(site: Site, relativeMaturity: number): FreezeLoss {
  const now = site.line(relativeMaturity).freeze.expectedLossFraction;
  if (site.plantingKnown) return { loss: now, unknownDeviation: 0 };
  const days = site.c.plantingDateUnknownDays;
  const late = site.line(relativeMaturity, shiftedDate(site.plantingDate, days)).freeze.expectedLossFraction;
  return { loss: 0.75 * now + 0.25 * late, unknownDeviation: Math.abs(late - now) * 0.6 };
}

/**
 * Freeze: loss expected over the joint spread of the first 28 °F and of the stage it meets (R5 65 %, R6 37 %, R7 11 %, R8 0).
 * The field's part is what a variety of the optimum RM would lose, if that is less.
 */
export const freeze: Factor = {
  id: 'freeze',
  label: 'Freeze',
  color: 'factor-freeze',
  needs: ['latitude', 'longitude', 'elevationFt', 'plantingDate', 'relativeMaturity'],
  kept({ site, variety }) {
    const { c } = site;
    const own = freezeLoss(site, variety.relativeMaturity);
    const fitting = site.once('freeze of the optimum', () => freezeLoss(site, site.optimum));
    const fieldLoss = Math.min(own.loss, fitting.loss);
    const field = 1 - fieldLoss;
    const match = (1 - own.loss) / field;
    const line = site.line(variety.relativeMaturity);
    const asks: AskedQuestion[] =
      own.unknownDeviation > 0
        ? [ask('plantingDate', 'On what day will this field be planted?', own.unknownDeviation / (1 - own.loss))]
        : [];
    const chance = line.freeze.chanceBeforeR7;
    return answer({
      field,
      fieldDeviation: (c.freezeUncertainty * fieldLoss) / field,
      match,
      sharedSlope: -rootSumSquares(c.freezeUncertainty * (own.loss - fieldLoss), own.unknownDeviation) / (1 - own.loss),
      reason: line.r7
        ? `R7 on ${formatDay(line.r7)}, freeze before then ${yearsIn(chance)}`
        : 'R7 not reached before the year ends',
      detail: site.plantingKnown
        ? `planted ${formatDay(site.plantingDate)}`
        : `planting day not given, ${formatDay(site.plantingDate)} assumed`,
      source:
        'Saliba et al. 1982, Crop Science 22:73, in Kansas State MF-2234; NOAA NCEI Climate Normals 1991–2020; season by CROPGRO-Soybean',
      asks,
    });
  },
};
