import { formatDay } from '@/lib/dates';
import { answer, type Factor } from '../factor';
import type { AskedQuestion, Kept } from '../model';
import { along, type Curve, rootSumSquares } from '../numbers';
import type { Site } from '../site';
import { ask } from '../words';

/**
 * Relative yield by planting day of the year: May 10 100, May 20 98, May 30 95, Jun 10 88, Jun 20 76 (Penn State Agronomy
 * Guide). After that: early July a third to a half of the optimum (Iowa State ICM 2008, after Whigham 1995–97).
 */
export const RELATIVE_YIELD_BY_PLANTING_DAY: Curve = [
  [130, 1],
  [140, 0.98],
  [150, 0.95],
  [161, 0.88],
  [171, 0.76],
  [186, 0.48],
  [205, 0.2],
];

/** The same for every variety, so worked out once a field. */
function lossOf(site: Site): Kept {
  const { c, plantingDay } = site;
  const now = along(RELATIVE_YIELD_BY_PLANTING_DAY, plantingDay);
  const late = along(RELATIVE_YIELD_BY_PLANTING_DAY, plantingDay + c.plantingDateUnknownDays);
  const unknown = site.plantingKnown ? 0 : Math.abs(now - late) * 0.6;
  const field = site.plantingKnown ? now : 0.75 * now + 0.25 * late;
  const asks: AskedQuestion[] = site.plantingKnown
    ? []
    : [ask('plantingDate', 'On what day will this field be planted?', unknown / field)];
  return answer({
    field,
    fieldDeviation: rootSumSquares(c.plantingDateUncertainty * (1 - field), unknown) / field,
    reason: site.plantingKnown
      ? `planted ${formatDay(site.plantingDate)}`
      : `planting day not given, ${formatDay(site.plantingDate)} assumed`,
    detail: 'the same for every variety',
    source: 'Penn State Agronomy Guide; after 20 June Iowa State ICM 2008',
    asks,
  });
}

/** Planting date: the same for every variety, wholly field. Cold seedbeds of early dates stand under emergence. */
export const plantingDate: Factor = {
  id: 'planting-date',
  label: 'Planting date',
  color: 'factor-planting-date',
  needs: ['plantingDate'],
  kept: ({ site }) => site.once('kept: planting date', lossOf),
};
