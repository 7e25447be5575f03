/** How wet the ground stands: what water itself takes, and how hard Phytophthora and Pythium press. Fractions of yield. */
import type { AskedQuestion, DrainageClass, FieldProfile } from '../model';
import { expectation, rootSumSquares, type Scenario } from '../numbers';
import type { Site } from '../site';
import { ask, percent } from '../words';
import { layerOf } from './layer';

type Shares = NonNullable<FieldProfile['drainageShares']>;

/**
 * Water and rot of each natural drainage class relative to poorly drained ground. The order is the Soil Survey Manual's
 * (NRCS, chapter 3: free water below 150 cm, 50–100, 25–50, under 25 cm, at the surface); the steps are planning figures.
 */
export const CLASS_WEIGHT: Readonly<Record<DrainageClass, { water: number; rot: number }>> = {
  excessively: { water: 0, rot: 0.05 },
  'somewhat excessively': { water: 0, rot: 0.05 },
  well: { water: 0.02, rot: 0.1 },
  'moderately well': { water: 0.08, rot: 0.25 },
  'somewhat poorly': { water: 0.35, rot: 0.6 },
  poorly: { water: 1, rot: 1 },
  'very poorly': { water: 1.75, rot: 1.5 },
};

/** Ground nobody has described: the Corn Belt's cropland, roughly (planning spread). */
const UNDESCRIBED: readonly { class: DrainageClass; weight: number }[] = [
  { class: 'well', weight: 0.3 },
  { class: 'moderately well', weight: 0.25 },
  { class: 'somewhat poorly', weight: 0.25 },
  { class: 'poorly', weight: 0.2 },
];
/** Chance that wet ground is tiled when nobody has said. */
const CHANCE_OF_TILE = 0.5;
/** From this class on tile makes a difference. */
const WET: readonly DrainageClass[] = ['somewhat poorly', 'poorly', 'very poorly'];
const FLOODING_WEIGHT: Readonly<Record<NonNullable<FieldProfile['floodingFrequency']>, number>> = {
  none: 0,
  'very rare': 0,
  rare: 0.1,
  occasional: 1,
  frequent: 3,
  'very frequent': 5,
};

export interface Wetness {
  /** Lost by any variety to standing water and flooding. */
  water: number;
  waterDeviation: number;
  /** Lost to rot by a variety rated 1, without gene, untreated. */
  rot: number;
  rotDeviation: number;
  /** Share of the field somewhat poorly drained or worse; expected share when unknown. */
  wetShare: number;
  words: string;
  asks: { question: AskedQuestion; water: number; rot: number }[];
}

interface Pressure {
  water: number;
  rot: number;
}

function pressureOf(site: Site, shares: Shares, tiled: boolean): Pressure {
  const { c, field } = site;
  let water = 0;
  let rot = 0;
  for (const one of shares) {
    const weight = CLASS_WEIGHT[one.class];
    const wet = tiled && WET.includes(one.class);
    water += one.share * weight.water * c.waterLossPoorly * (wet ? c.tileWaterRemains : 1);
    rot += one.share * weight.rot * c.rotLossPoorly * (wet ? c.tileRotRemains : 1);
  }
  const raise = (1 + c.layerRotRaise * layerOf(site).severity) * (field.tillage === 'no-till' ? 1 + c.noTillRotRaise : 1);
  return { water: water + FLOODING_WEIGHT[field.floodingFrequency ?? 'none'] * c.floodingLossOccasional, rot: rot * raise };
}

function wetShareOf(shares: Shares): number {
  return shares.reduce((sum, one) => sum + (WET.includes(one.class) ? one.share : 0), 0);
}

function drainageWords(shares: Shares, tiled: boolean | null): string {
  const tile = tiled === null ? ', tile unknown' : tiled ? ', tiled' : ', no tile';
  const wet = shares.filter((one) => WET.includes(one.class) && one.share >= 0.005);
  if (wet.length === 0) {
    const main = shares.reduce((a, b) => (b.share > a.share ? b : a));
    return `${percent(main.share)} ${main.class} drained`;
  }
  wet.sort((a, b) => b.share - a.share);
  return `${wet.map((one) => `${percent(one.share)} ${one.class} drained`).join(', ')}${tile}`;
}

/** Shares of what is known, brought to a sum of 1; `null` when nothing is. */
function wholeOf(shares: FieldProfile['drainageShares']): Shares | null {
  const total = (shares ?? []).reduce((sum, one) => sum + one.share, 0);
  if (!shares || total <= 0) return null;
  return Math.abs(total - 1) < 1e-9 ? shares : shares.map((one) => ({ ...one, share: one.share / total }));
}

function describe(site: Site): Wetness {
  const { field, c } = site;
  const known = wholeOf(field.drainageShares);
  const shareLists = known
    ? [{ weight: 1, shares: known }]
    : UNDESCRIBED.map((one) => ({
        weight: one.weight,
        shares: [{ class: one.class, share: 1 }] as Shares,
      }));
  const tiles = field.tiled === null ? [true, false] : [field.tiled];
  const tileWeight = (tiled: boolean) => (tiles.length === 1 ? 1 : tiled ? CHANCE_OF_TILE : 1 - CHANCE_OF_TILE);
  const water: Scenario[] = [];
  const rot: Scenario[] = [];
  for (const { weight, shares } of shareLists) {
    for (const tiled of tiles) {
      const pressure = pressureOf(site, shares, tiled);
      water.push({ weight: weight * tileWeight(tiled), value: pressure.water });
      rot.push({ weight: weight * tileWeight(tiled), value: pressure.rot });
    }
  }
  const waterNow = expectation(water);
  const rotNow = expectation(rot);
  const wetShare = shareLists.reduce((sum, one) => sum + one.weight * wetShareOf(one.shares), 0);
  const asks: Wetness['asks'] = [];
  if (!known) {
    const words = 'What is the natural drainage of this field: well, somewhat poorly, poorly drained, and on what share?';
    asks.push({ question: ask('drainageShares', words, 0), water: waterNow.deviation, rot: rotNow.deviation });
  } else if (field.tiled === null && wetShare > 0.02) {
    const words = 'Is this field tiled?';
    asks.push({ question: ask('tiled', words, 0), water: waterNow.deviation, rot: rotNow.deviation });
  }
  return {
    water: waterNow.mean,
    waterDeviation: rootSumSquares(waterNow.deviation, c.wetUncertainty * waterNow.mean),
    rot: rotNow.mean,
    rotDeviation: rootSumSquares(rotNow.deviation, c.wetUncertainty * rotNow.mean),
    wetShare,
    words: known ? drainageWords(known, field.tiled) : 'drainage unknown',
    asks,
  };
}

export function wetnessOf(site: Site): Wetness {
  return site.once('wetness', describe);
}
