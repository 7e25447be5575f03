import { diseaseFactor, southness } from '../disease';

/** Stem canker: south of about 41° N, soybeans after soybeans; most current varieties resist it. */
export const stemCanker = diseaseFactor({
  id: 'stem-canker',
  label: 'Stem canker',
  color: 'factor-stem-canker',
  trait: 'stemCanker',
  traitWords: 'stem canker',
  needs: ['latitude', 'lastCrop', 'tillage'],
  source:
    'Mississippi State 2014 (most current varieties resistant); loss 50–100 % in susceptible ones: from memory; size is a planning coefficient',
  pressure(site) {
    const { c, field } = site;
    const again = (field.lastCrop === 'soybean' ? 1.5 : 1) * (field.tillage === 'no-till' ? 1.2 : 1);
    const loss = c.stemCankerBase * southness(field.latitude, 38, 42, 0.1) * again;
    return { loss, unknownDeviation: 0.5 * loss, words: `${field.latitude.toFixed(1)}° N`, asks: [] };
  },
});
