import { answer, type Factor } from '../factor';
import { drynessOf } from '../ground/dryness';
import type { AskedQuestion } from '../model';
import { clamp, rootSumSquares } from '../numbers';
import { susceptibility, susceptibilityDeviation } from '../rated';
import { ask, ratingWords } from '../words';

/**
 * Drought: loss by the water the soil can store; the drought rating moves it 40 % either way of a 5, and a variety earlier
 * than the optimum has less time to recover. What a rating of 9 at the optimum loses is the field's part.
 */
export const drought: Factor = {
  id: 'drought',
  label: 'Drought',
  color: 'factor-drought',
  needs: ['availableWaterInches', 'irrigated', 'drought', 'relativeMaturity'],
  kept({ site, variety }) {
    const { c, field } = site;
    const dry = drynessOf(site);
    const earlier = clamp(site.optimum - variety.relativeMaturity, 0, 2);
    const share = susceptibility(variety.drought);
    // share 0.5 is a rating of 5: the loss as the curve has it.
    const times = (1 + 2 * c.droughtRatingSpan * (share - 0.5)) * (1 + c.droughtEarlyRaise * earlier);
    const kept = 1 - Math.min(0.6, dry.loss * times);
    const fieldTimes = Math.min(times, 1 - c.droughtRatingSpan);
    const fieldPart = 1 - Math.min(0.6, dry.loss * fieldTimes);
    const match = kept / fieldPart;
    const ratingStep = dry.loss * 2 * c.droughtRatingSpan;
    const ownDeviation = (ratingStep * susceptibilityDeviation(variety.drought, c)) / kept;
    const asks: AskedQuestion[] = [];
    if (!dry.storageKnown && !field.irrigated) {
      const words = 'How much water can the soil store? The soil survey of this field answers it.';
      asks.push(ask('availableWaterInches', words, (dry.unknownDeviation * times) / kept));
    }
    if (variety.drought === null && dry.loss > 0.01) {
      asks.push(ask('drought', "What is this variety's root health or drought rating?", ownDeviation * 0.9));
    }
    const storage =
      field.availableWaterInches === null
        ? 'water storage unknown'
        : `${field.availableWaterInches.toFixed(1)} in of stored water`;
    return answer({
      field: fieldPart,
      fieldDeviation: (dry.deviation * fieldTimes) / fieldPart,
      match,
      sharedSlope: (-dry.deviation * Math.max(0, times - fieldTimes)) / match,
      ownDeviation: rootSumSquares(ownDeviation, 0.1 * dry.loss * Math.min(1, earlier)),
      reason: field.irrigated ? `irrigated, ${storage}` : storage,
      detail: ratingWords('drought rating', variety.drought),
      source: 'NRCS soil survey (available water storage 0–100 cm); loss by storage is a planning curve',
      asks,
    });
  },
};
