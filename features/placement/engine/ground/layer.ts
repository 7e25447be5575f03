/** A tight layer: how severe, 0 (none) to 1 (roots stop), from a hand probe or a penetrometer. */
import type { AskedQuestion } from '../model';
import { along, type Curve, expectation, type Scenario } from '../numbers';
import type { Site } from '../site';
import { inches } from '../words';

/**
 * Severity by the highest reading in the top 15 in: roots suffer from 200 psi, a layer is called compacted at 300 psi
 * (Cornell, Northeast Region CCA, Competency Area 4). 400 psi as the worst is a planning figure.
 */
export const SEVERITY_BY_PSI: Curve = [
  [200, 0],
  [300, 0.5],
  [400, 1],
];
/** Severity by how deep a person can push a probe: a foot means no layer to speak of (common practice, no source). */
export const SEVERITY_BY_PROBE_INCHES: Curve = [
  [4, 1],
  [12, 0],
];
/** When nothing was measured: most fields have no layer worth the name (planning spread). */
const UNMEASURED: readonly Scenario[] = [
  { weight: 0.65, value: 0 },
  { weight: 0.25, value: 0.3 },
  { weight: 0.1, value: 0.8 },
];

export interface Layer {
  severity: number;
  /** Spread of the severity when nothing was measured; 0 when something was. */
  deviation: number;
  measured: boolean;
  words: string;
}

/** The penetrometer speaks when there is one and no probe; of two readings the worse counts. */
function measure(site: Site): Layer {
  const { probeDepthInches, penetrometerPsi } = site.field;
  if (probeDepthInches === null && penetrometerPsi === null) {
    const { mean, deviation } = expectation(UNMEASURED);
    return { severity: mean, deviation, measured: false, words: 'not probed' };
  }
  const byProbe = probeDepthInches === null ? -1 : along(SEVERITY_BY_PROBE_INCHES, probeDepthInches);
  const byPsi = penetrometerPsi === null ? -1 : along(SEVERITY_BY_PSI, penetrometerPsi);
  const words =
    byProbe >= byPsi
      ? `a probe stops at ${inches(probeDepthInches as number)}`
      : `${Math.round(penetrometerPsi as number)} psi in the top 15 in`;
  return { severity: Math.max(byProbe, byPsi), deviation: 0, measured: true, words };
}

export function layerOf(site: Site): Layer {
  return site.once('layer', measure);
}

/** The question that settles it. `perSeverity` is the loss (fraction) a full layer adds where it is asked. */
export function askLayer(layer: Layer, perSeverity: number): AskedQuestion[] {
  if (layer.measured) return [];
  return [
    {
      fact: 'probeDepthInches',
      words: 'How deep does a hand probe go before it stops, in inches, in moist soil?',
      logDeviation: layer.deviation * perSeverity,
    },
  ];
}
