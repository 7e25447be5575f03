import { answer, type Factor } from '../factor';
import { relativeMaturityWords } from '../words';

/**
 * Maturity zone: how far the variety's RM lies from the optimum of the place and planting day.
 * k = 1 − 0.10·Δ² when Δ RM early, 1 − 0.06·Δ² when late (floor 0.3). All of it is the variety's own.
 */
export const maturityZone: Factor = {
  id: 'maturity-zone',
  label: 'Maturity zone',
  color: 'factor-maturity-zone',
  needs: ['latitude', 'longitude', 'elevationFt', 'state', 'plantingDate', 'relativeMaturity'],
  kept({ site, variety }) {
    const { c, optimum, optimumDeviation } = site;
    const distance = variety.relativeMaturity - optimum;
    const bend = distance < 0 ? c.maturityEarlyLoss : c.maturityLateLoss;
    const match = Math.max(0.3, 1 - bend * distance * distance);
    const tenths = Math.abs(distance).toFixed(1);
    const side = Number(tenths) === 0 ? 'right at' : `${tenths} ${distance < 0 ? 'earlier' : 'later'} than`;
    return answer({
      match,
      // An optimum later than thought hurts early varieties and helps late ones.
      sharedSlope: (2 * bend * distance * optimumDeviation) / match,
      ownDeviation: (bend * optimumDeviation * optimumDeviation * Math.SQRT2) / match,
      reason: `RM ${relativeMaturityWords(variety.relativeMaturity)}, ${side} the ${relativeMaturityWords(optimum)} this place wants`,
      detail: site.rules.zone ? `by ${site.optimumWords}` : `by ${site.optimumWords}, ± 0.4`,
      source:
        'Mourtzinis & Conley 2017, Agronomy Journal 109:1397 (delineation, table from memory); Furseth et al. 2011 (loss when early)',
    });
  },
};
