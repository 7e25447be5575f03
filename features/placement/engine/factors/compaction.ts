import { answer, type Factor } from '../factor';
import { askLayer, layerOf } from '../ground/layer';
import type { Kept } from '../model';
import { rootSumSquares } from '../numbers';
import type { Site } from '../site';

/** The same for every variety, so worked out once a field. */
function lossOf(site: Site): Kept {
  const { c, field } = site;
  const layer = layerOf(site);
  const perSeverity = c.layerLoss * (field.irrigated ? c.layerIrrigatedRemains : 1);
  const loss = layer.severity * perSeverity;
  return answer({
    field: 1 - loss,
    fieldDeviation: rootSumSquares(layer.deviation * perSeverity, c.layerUncertainty * loss) / (1 - loss),
    reason:
      layer.severity === 0
        ? `no layer to speak of: ${layer.words}`
        : layer.measured
          ? `tight layer: ${layer.words}`
          : 'not probed for a tight layer',
    detail: 'the same for every variety; it also feeds wet feet and sudden death',
    source: 'Cornell, Northeast Region CCA Competency Area 4 (200 and 300 psi); a foot of probe means no layer: common practice',
    asks: askLayer(layer, perSeverity),
  });
}

/** Compaction: a tight layer takes from every variety alike, up to 8 % at its worst, less under irrigation. Wholly field. */
export const compaction: Factor = {
  id: 'compaction',
  label: 'Compaction',
  color: 'factor-compaction',
  needs: ['probeDepthInches', 'penetrometerPsi', 'irrigated'],
  kept: ({ site }) => site.once('kept: compaction', lossOf),
};
