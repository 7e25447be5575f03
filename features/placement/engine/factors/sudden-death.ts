import { byHistory, diseaseFactor } from '../disease';
import { layerOf } from '../ground/layer';
import { wetnessOf } from '../ground/wetness';
import { clamp } from '../numbers';
import { percent } from '../words';

/** Day of the year (May 10) before which planting counts as early. */
const MAY_10 = 130;

/** Sudden death: cool wet soils, tight layers, early planting and nematodes raise it; worst with high yields. */
export const suddenDeath = diseaseFactor({
  id: 'sudden-death',
  label: 'Sudden death',
  color: 'factor-sudden-death',
  trait: 'suddenDeath',
  traitWords: 'sudden death',
  needs: ['drainageShares', 'tiled', 'probeDepthInches', 'plantingDate', 'cystEggsPer100cc', 'suddenDeathHistory'],
  source:
    'Leandro et al. 2013, Plant Health Progress (wet, cool epidemic years in Iowa); loss commonly 10–15 %: soybean research programme; sizes are planning coefficients',
  pressure(site) {
    const { c, field } = site;
    const wet = wetnessOf(site);
    const early = clamp((MAY_10 - site.plantingDay) / 15, 0, 1);
    const eggs = clamp((field.cystEggsPer100cc ?? 500) / 6000, 0, 1);
    const risk = 1 + 1.5 * wet.wetShare + layerOf(site).severity + 0.5 * early + 0.7 * eggs;
    const base = c.suddenDeathBase * risk;
    // Its range is the Corn Belt and south to Arkansas; it is rare north of 46° N (planning).
    const range = clamp((46.5 - field.latitude) / 2, 0.1, 1);
    const history = byHistory(
      field.suddenDeathHistory,
      0.12,
      { without: base * range * 0.5, with: (base + c.suddenDeathHistory * (0.7 + 0.15 * risk)) * range },
      { fact: 'suddenDeathHistory', words: 'Has this field had sudden death syndrome?' },
    );
    const ground = wet.wetShare > 0.02 ? `, ${percent(wet.wetShare)} of the field wet` : '';
    return {
      loss: history.loss,
      unknownDeviation: history.deviation,
      words: `${history.words}${ground}${early > 0.3 ? ', planted early' : ''}`,
      asks: history.asks,
    };
  },
});
