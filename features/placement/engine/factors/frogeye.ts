import { byHistory, diseaseFactor, southness } from '../disease';

/** Frogeye leaf spot: warm, wet, south of about 41° N, soybeans after soybeans. */
export const frogeye = diseaseFactor({
  id: 'frogeye',
  label: 'Frogeye leaf spot',
  color: 'factor-frogeye',
  trait: 'frogeye',
  traitWords: 'frogeye leaf spot',
  needs: ['latitude', 'lastCrop', 'frogeyeHistory'],
  source:
    'Mississippi State 2013 (scale); UNL CropWatch 2022 (QoI resistance throughout Nebraska); sizes are planning coefficients',
  pressure(site) {
    const { c, field } = site;
    const south = southness(field.latitude, 38, 42, 0.1);
    const again = field.lastCrop === 'soybean' ? 1.5 : 1;
    const history = byHistory(
      field.frogeyeHistory,
      0.05 + 0.2 * south,
      { without: c.frogeyeBase * south * again * 0.7, with: (c.frogeyeBase + c.frogeyeHistory) * Math.max(0.4, south) * again },
      { fact: 'frogeyeHistory', words: 'Has this field had frogeye leaf spot?' },
    );
    const words = `${history.words}, ${field.latitude.toFixed(1)}° N${again > 1 ? ', soybeans after soybeans' : ''}`;
    return { loss: history.loss, unknownDeviation: history.deviation, words, asks: history.asks };
  },
});
