import { diseaseFactor, southness } from '../disease';
import { drynessOf } from '../ground/dryness';

/** Charcoal rot: hot, dry pod fill on droughty ground, mostly in the south. */
export const charcoalRot = diseaseFactor({
  id: 'charcoal-rot',
  label: 'Charcoal rot',
  color: 'factor-charcoal-rot',
  trait: 'charcoalRot',
  traitWords: 'charcoal rot',
  needs: ['latitude', 'availableWaterInches', 'irrigated'],
  source: 'General pathology (droughty ground, wet then hot and dry): from memory; size is a planning coefficient',
  pressure(site) {
    const { c, field } = site;
    const dry = drynessOf(site);
    const south = southness(field.latitude, 37, 43, 0.15);
    const ground = field.irrigated
      ? 'irrigated'
      : dry.index > 0.5
        ? 'droughty ground'
        : dry.index > 0.15
          ? 'thin ground'
          : 'ground that holds water';
    return {
      loss: c.charcoalRotBase * south * (0.1 + 0.9 * dry.index),
      unknownDeviation: c.charcoalRotBase * south * 0.9 * dry.indexDeviation,
      words: `${ground}, ${field.latitude.toFixed(1)}° N`,
      asks: [],
    };
  },
});
