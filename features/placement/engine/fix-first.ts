/** What costs the field bushels whatever is planted: lime, a tight layer, drainage, each with its remedy and its worth. */
import { evaluate } from './evaluate';
import { acidityOf } from './ground/acidity';
import { layerOf } from './ground/layer';
import { wetnessOf } from './ground/wetness';
import type { FieldProfile, FixFirst, VarietyProfile } from './model';
import { type Site, siteOf } from './site';
import { withLime, withoutLayer, withTile } from './what-if';
import { listed, percent } from './words';

/** A remedy worth less than this on its acres is not named, bu/ac; nor is one on less ground than this, ac. */
const WORTH_NAMING = 0.2;
const LEAST_ACRES = 0.5;
/** pH bands that the lime remedy names, upper ends. */
const SOUR_BANDS = [5, 5.5, 6, 6.3];

const ADVISER = 'Estimate for planning; check with a certified crop adviser or the state extension service.';

function expectedOn(site: Site, field: FieldProfile, variety: VarietyProfile): number {
  return evaluate(siteOf(field, site.season, site.rules), variety).assessment.expected;
}

/** Acres of the surface below `limit`, told by band: `4.2 ac below 5.5, 16.8 ac from 5.5 to 6.0`. */
export function sourAcresInWords(field: FieldProfile, limit: number): string {
  const parts: string[] = [];
  let from = 0;
  for (const to of [...SOUR_BANDS.filter((band) => band < limit), limit]) {
    const share = (field.phShares ?? []).reduce((sum, one) => sum + (one.value >= from && one.value < to ? one.share : 0), 0);
    const acres = share * field.areaAcres;
    if (acres >= 0.05)
      parts.push(`${acres.toFixed(1)} ac ${from === 0 ? 'below' : `from ${from.toFixed(1)} to`} ${to.toFixed(1)}`);
    from = to;
  }
  return listed(parts);
}

function lime(site: Site, variety: VarietyProfile, now: number): FixFirst | null {
  const { c, field } = site;
  const acidity = acidityOf(site);
  const share = acidity.shareBelow(c.limeBelowPh);
  const acres = share * field.areaAcres;
  if (!acidity.tested || acres < LEAST_ACRES) return null;
  const worth = (expectedOn(site, withLime(field, c.limeTargetPh, c.limeBelowPh), variety) - now) / share;
  if (worth < WORTH_NAMING) return null;
  const rate = field.limeTonsPerAcre;
  const tons = rate?.tons ?? null;
  const unknownRate = field.bufferPh === null ? 'rate unknown, take a buffer test' : 'take the rate from the laboratory’s report';
  const rateWords = tons === null ? unknownRate : `${tons.toFixed(1)} t/ac by ${rate?.method ?? 'the buffer test'}`;
  return {
    factor: 'soil-ph',
    title: `Lime ${acres.toFixed(1)} ac`,
    remedy: `Lime the ${acres.toFixed(1)} ac below pH ${c.limeBelowPh.toFixed(1)} (${sourAcresInWords(field, c.limeBelowPh)}): ${rateWords}, worth about ${worth.toFixed(1)} bu/ac there.`,
    worthBushelsPerAcre: worth,
    acres,
    costDollarsPerAcre: tons === null ? null : tons * c.limeDollarsPerTon,
    caution: `Lime takes one to three years to do all of this. ${ADVISER}`,
    source: rate?.source ?? 'Mallarino, Iowa State (liming below pH 5.9–6.0); Michigan State Extension 2012 (optimum 6.3–6.5)',
  };
}

function openLayer(site: Site, variety: VarietyProfile, now: number): FixFirst | null {
  const { c, field } = site;
  const layer = layerOf(site);
  if (!layer.measured || layer.severity <= 0.05) return null;
  const worth = expectedOn(site, withoutLayer(field), variety) - now;
  if (worth < WORTH_NAMING) return null;
  const depth = field.probeDepthInches === null ? 'the layer' : `${Math.round(field.probeDepthInches)} in`;
  return {
    factor: 'compaction',
    title: 'Open the tight layer',
    remedy: `${layer.words[0]?.toUpperCase()}${layer.words.slice(1)}: open it an inch or two below ${depth}, worth about ${worth.toFixed(1)} bu/ac where it is.`,
    worthBushelsPerAcre: worth,
    acres: field.areaAcres,
    costDollarsPerAcre: c.deepTillageDollarsPerAcre,
    caution:
      'Not when wet: dig first, and till only if soil from the layer crumbles in the hand. Wet soil smears, and the layer is back by harvest.',
    source: 'Cornell, Northeast Region CCA Competency Area 4 (300 psi); worth by the ledger, planning coefficients',
  };
}

function drain(site: Site, variety: VarietyProfile): FixFirst | null {
  const { field } = site;
  const { wetShare } = wetnessOf(site);
  const acres = wetShare * field.areaAcres;
  if (field.tiled === true || field.drainageShares === null || acres < LEAST_ACRES) return null;
  const without = expectedOn(site, { ...field, tiled: false }, variety);
  const worth = (expectedOn(site, withTile(field), variety) - without) / wetShare;
  if (worth < WORTH_NAMING) return null;
  const unsure = field.tiled === null ? 'If it has no tile, drain' : 'Drain';
  return {
    factor: 'wet-feet',
    title: `Drain ${acres.toFixed(1)} ac`,
    remedy: `${unsure} the ${acres.toFixed(1)} ac somewhat poorly drained or worse (${percent(wetShare)} of the field) by tile, or by grading and ditches, worth about ${worth.toFixed(1)} bu/ac there.`,
    worthBushelsPerAcre: worth,
    acres,
    costDollarsPerAcre: null,
    caution: `Ask the NRCS office about wetland rules before any tile goes in. ${ADVISER}`,
    source: 'NRCS Soil Survey Manual ch. 3 (drainage classes); gain from tile from memory, low confidence',
  };
}

/** Remedies worth naming, the most bushels on the field first. `first` is the leading pick, or any fitting variety. */
export function fixFirstOf(site: Site, first: VarietyProfile): FixFirst[] {
  const now = evaluate(site, first).assessment.expected;
  return [lime(site, first, now), openLayer(site, first, now), drain(site, first)]
    .filter((one) => one !== null)
    .sort((a, b) => b.worthBushelsPerAcre * b.acres - a.worthBushelsPerAcre * a.acres);
}
