import { formatDay } from '@/lib/dates';
import { answer, type Factor, LOWEST_KEPT } from '../factor';
import type { AskedQuestion } from '../model';
import { along, type Curve, clamp } from '../numbers';
import { susceptibility, susceptibilityDeviation } from '../rated';
import type { Site } from '../site';
import { ask, percent, ratingWords } from '../words';

/** Plants that yield all a May stand can. */
const FULL_STAND = 100000;
/**
 * Relative yield by plants that stand, planted in May: 46,000 83 %, 70,000 90–95 % (middle taken), 100,000 about all
 * (Penn State Agronomy Guide). Below 46,000 drawn on to nothing (planning).
 */
export const RELATIVE_YIELD_BY_STAND: Curve = [
  [0, 0],
  [20000, 0.5],
  [46000, 0.83],
  [70000, 0.925],
  [FULL_STAND, 1],
];
/** A stand planted late needs more plants: 130,000–150,000 in June for 100,000–120,000 in May (Ohio State University 2019). */
const JUNE_STAND_RATIO = 110 / 140;
/** Mean air temperature of the fortnight after planting at which a seedbed is kind, and how much colder is a stress of 1, °C. */
const KIND_SEEDBED_C = 16;
const COLD_SPAN_C = 7;
const FORTNIGHT = 14;

interface Seedbed {
  stress: number;
  temperatureC: number;
  /** Plants that stand count this much toward the curve. */
  standRatio: number;
  words: string;
  asks: AskedQuestion[];
}

function seedbedOf(site: Site): Seedbed {
  const { c, field, season, plantingDay } = site;
  let sum = 0;
  let days = 0;
  for (let day = plantingDay; day < plantingDay + FORTNIGHT; day++) {
    const high = season.climate.dailyMaximumC[day - 1];
    const low = season.climate.dailyMinimumC[day - 1];
    if (high === undefined || low === undefined) continue;
    sum += (high + low) / 2;
    days++;
  }
  const temperatureC = days > 0 ? sum / days : KIND_SEEDBED_C;
  const cold = clamp((KIND_SEEDBED_C - temperatureC) / COLD_SPAN_C, 0, 1.2);
  const residue = field.tillage === 'no-till' && (field.lastCrop === 'corn' || field.lastCrop === null) ? c.residueRaise : 0;
  const crust = field.crustingSoil === null ? 0.2 * c.crustingRaise : field.crustingSoil ? c.crustingRaise : 0;
  const eased = field.seedTreated === false ? 1 : 1 - c.treatedSeedEases;
  const stress = clamp((0.1 + cold + residue + crust) * eased, 0, 2);
  const parts = [`${temperatureC.toFixed(0)} °C in the fortnight after ${formatDay(site.plantingDate)}`];
  if (residue > 0) parts.push('no-till residue');
  if (field.crustingSoil) parts.push('crusting soil');
  const asks: AskedQuestion[] = [];
  if (field.crustingSoil === null) {
    asks.push(ask('crustingSoil', 'Does this soil crust after a hard rain?', 0.4 * c.crustingRaise * c.emergenceLoss));
  }
  return {
    stress,
    temperatureC,
    standRatio: 1 - clamp((plantingDay - 145) / 15, 0, 1) * (1 - JUNE_STAND_RATIO),
    words: parts.join(', '),
    asks,
  };
}

/**
 * Emergence: early, cold, crusting or trashy seedbeds × emergence rating, as late and uneven plants and as plants missing from
 * the stand. Stand = seeds × germination × field emergence. What even a rating of 9 loses is the field's part.
 */
export const emergence: Factor = {
  id: 'emergence',
  label: 'Emergence',
  color: 'factor-emergence',
  needs: [
    'plantingDate',
    'populationSeedsPerAcre',
    'tillage',
    'lastCrop',
    'crustingSoil',
    'seedTreated',
    'emergence',
    'germinationPercent',
  ],
  kept({ site, variety }) {
    const { c } = site;
    const bed = site.once('seedbed', seedbedOf);
    const germination = variety.germinationPercent === null ? c.assumedGermination : variety.germinationPercent / 100;
    const standWith = (share: number) =>
      site.populationSeedsPerAcre * germination * (c.fieldEmergenceBest - c.fieldEmergenceSpan * share * Math.min(1, bed.stress));
    const keptWith = (share: number) =>
      Math.max(
        LOWEST_KEPT,
        along(RELATIVE_YIELD_BY_STAND, standWith(share) * bed.standRatio) * (1 - c.emergenceLoss * bed.stress * share),
      );
    const share = susceptibility(variety.emergence);
    const field = keptWith(0);
    const match = keptWith(share) / field;
    const step = susceptibilityDeviation(variety.emergence, c);
    const ownDeviation =
      Math.abs(keptWith(Math.min(1, share + step)) - keptWith(Math.max(0, share - step))) / (2 * field * match);
    const asks = bed.asks.map((one) => ({ ...one, logDeviation: (one.logDeviation * share) / match }));
    if (variety.emergence === null) asks.push(ask('emergence', "What is this variety's emergence rating?", ownDeviation * 0.9));
    const stand = standWith(share);
    const wanted = FULL_STAND / bed.standRatio;
    const reason =
      stand < wanted
        ? `${Math.round(stand / 1000)},000 plants/ac, ${Math.round(wanted / 1000)},000 wanted${bed.standRatio < 1 ? ' when planted late' : ''}`
        : bed.words;
    return answer({
      field,
      fieldDeviation: (c.emergenceUncertainty * (1 - field)) / field,
      match,
      sharedSlope: (-c.emergenceUncertainty * (1 - match)) / match,
      ownDeviation,
      reason: `${reason}: ${ratingWords('emergence', variety.emergence)}`,
      detail: `${Math.round(stand / 1000)},000 plants/ac from ${Math.round(site.populationSeedsPerAcre / 1000)},000 seeds, ${percent(germination)} germination`,
      source:
        'Penn State Agronomy Guide (stand); Ohio State University 2019 (June stands); seedbed stress is a planning coefficient',
      asks,
    });
  },
};
