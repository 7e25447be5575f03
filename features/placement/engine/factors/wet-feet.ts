import type { Coefficients } from '../coefficients';
import { answer, type Factor } from '../factor';
import { wetnessOf } from '../ground/wetness';
import type { AskedQuestion, VarietyProfile } from '../model';
import { ratedLoss, susceptibility } from '../rated';
import { ask, listed, ratingWords } from '../words';

/** Chance that seed is treated when nobody has said: most soybean seed for wet ground is. */
const CHANCE_OF_TREATMENT = 0.75;

/** Share of the rot pressure that the listed Rps genes take away: the best gene or stack counts, they do not add. */
export function geneSpares(genes: readonly string[], c: Coefficients): number {
  if (genes.length === 0) return 0;
  const listedGenes = genes.map((gene) => gene.toLowerCase().replace(/^rps\s*/, ''));
  const has = (gene: string) => listedGenes.includes(gene);
  if (has('3a') || has('8')) return c.usefulGeneSpares;
  if (has('1k') || has('6')) return c.erodingGeneSpares;
  return c.defeatedGeneSpares;
}

function geneWords(variety: VarietyProfile): string {
  if (variety.phytophthoraGenes.length === 0) return 'no Rps gene';
  return listed(variety.phytophthoraGenes.map((gene) => (/^rps/i.test(gene) ? gene : `Rps${gene}`)));
}

/**
 * Wet feet: standing water takes from every variety (field); Phytophthora and Pythium take by field tolerance, Rps gene and
 * seed treatment (match). Tile eases both and erases neither.
 */
export const wetFeet: Factor = {
  id: 'wet-feet',
  label: 'Wet feet',
  color: 'factor-wet-feet',
  needs: [
    'drainageShares',
    'tiled',
    'floodingFrequency',
    'tillage',
    'probeDepthInches',
    'penetrometerPsi',
    'seedTreated',
    'phytophthora',
    'phytophthoraGenes',
  ],
  kept({ site, variety }) {
    const { c, field } = site;
    const wet = wetnessOf(site);
    const treated = field.seedTreated === null ? CHANCE_OF_TREATMENT : field.seedTreated ? 1 : 0;
    const spared = (1 - geneSpares(variety.phytophthoraGenes, c)) * (1 - treated * c.treatedSeedSpares);
    const rot = ratedLoss(c, {
      pressure: wet.rot * spared,
      deviation: wet.rotDeviation * spared,
      rating: variety.phytophthora,
      trait: 'phytophthora',
      traitWords: 'Phytophthora field tolerance',
    });
    const share = susceptibility(variety.phytophthora);
    const asks: AskedQuestion[] = rot.asks;
    for (const one of wet.asks) {
      asks.push({ ...one.question, logDeviation: Math.hypot(one.water, (one.rot * spared * share) / rot.match) });
    }
    if (field.seedTreated === null && wet.rot * share > 0.004) {
      const swing = wet.rot * share * c.treatedSeedSpares * Math.sqrt(CHANCE_OF_TREATMENT * (1 - CHANCE_OF_TREATMENT));
      asks.push(ask('seedTreated', 'Will the seed be treated against Phytophthora and Pythium?', swing));
    }
    const treatment = field.seedTreated === null ? 'treatment unknown' : field.seedTreated ? 'treated seed' : 'untreated seed';
    return answer({
      field: 1 - wet.water,
      fieldDeviation: wet.waterDeviation / (1 - wet.water),
      match: rot.match,
      sharedSlope: rot.sharedSlope,
      ownDeviation: rot.ownDeviation,
      reason: wet.words,
      detail: `${ratingWords('Phytophthora field tolerance', variety.phytophthora)}, ${geneWords(variety)}; ${treatment}`,
      source:
        'NRCS Soil Survey Manual ch. 3 (classes); Dillon & Phillips 2009; Dorrance et al. 2003; Sandhu et al. 2005; sizes are planning coefficients',
      asks,
    });
  },
};
