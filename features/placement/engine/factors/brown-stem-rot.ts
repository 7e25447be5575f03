import { byHistory, diseaseFactor } from '../disease';
import { acidityOf } from '../ground/acidity';
import { clamp } from '../numbers';
import { percent } from '../words';

/** Brown stem rot: sour soil, cool Augusts, soybeans too often, no-till. The lower the pH, the greater the damage. */
export const brownStemRot = diseaseFactor({
  id: 'brown-stem-rot',
  label: 'Brown stem rot',
  color: 'factor-brown-stem-rot',
  trait: 'brownStemRot',
  traitWords: 'brown stem rot',
  needs: ['phShares', 'soybeanYearsOfLastFour', 'lastCrop', 'tillage', 'latitude', 'brownStemRotHistory'],
  source:
    'Grau, University of Wisconsin 2001 (damage rises as pH falls); loss to 25–30 %: from memory; sizes are planning coefficients',
  pressure(site) {
    const { c, field } = site;
    const acidity = acidityOf(site);
    let sour = 0;
    let total = 0;
    for (const { value, share } of acidity.shares) {
      sour += share * clamp((6.5 - value) / 1.5, 0, 1);
      total += share;
    }
    const often =
      field.soybeanYearsOfLastFour === null
        ? field.lastCrop === 'soybean'
          ? 1
          : 0.3
        : clamp((field.soybeanYearsOfLastFour - 1) / 2, 0, 1);
    const risk = 1 + 2 * (sour / total) + 1.5 * often + (field.tillage === 'no-till' ? 0.4 : 0);
    // A disease of cool Augusts: full strength north of 42.5° N, hardly any south of 38° N (planning).
    const north = clamp((field.latitude - 38) / 4.5, 0.05, 1);
    const base = c.brownStemRotBase * risk * north;
    const history = byHistory(
      field.brownStemRotHistory,
      0.08,
      { without: base * 0.7, with: base + c.brownStemRotHistory * (0.6 + 0.15 * risk) * Math.max(0.4, north) },
      { fact: 'brownStemRotHistory', words: 'Has this field had brown stem rot?' },
    );
    const below = acidity.shareBelow(6.3);
    const sourWords = acidity.tested && below >= 0.005 ? `, ${percent(below)} below pH 6.3` : '';
    return { loss: history.loss, unknownDeviation: history.deviation, words: `${history.words}${sourWords}`, asks: history.asks };
  },
});
