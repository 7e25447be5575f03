import type { VarietyTraits } from '@/features/line-up/model';
import type { BushType, CystSource, Height, Release, Tolerance } from '@/features/placement/engine/model';

/** The invented line-up: 28 varieties, RM 1.6 to 3.0, none good at everything. */
export interface DemoVariety {
  traits: VarietyTraits;
  published: boolean;
  lots: {
    lotNumber: string;
    seedsPerLb: number;
    germinationPercent: number;
    treatment: string | null;
    unitsOnHand: number;
    priceCentsPerUnit: number;
  }[];
}

type Row = readonly [
  code: string,
  relativeMaturity: number,
  height: Height,
  bush: BushType,
  /** standability, emergence, field tolerance, SDS, BSR, white mould, frogeye, chlorosis, drought */
  ratings: string,
  genes: string,
  cyst: CystSource,
  tolerances: string,
  release: Release,
  seedsPerLb: number,
  units: number,
  priceDollars: number,
];

const G = 'glyphosate';
const D = 'glyphosate;dicamba';
const F = 'glyphosate;2,4-D;glufosinate';
const L = 'glyphosate;glufosinate';

/** Ratings as one digit each, 9 best. */
const ROWS: readonly Row[] = [
  ['OP 16U', 1.6, 'short', 'upright', '876565575', '1c', 'none', G, 'full', 2950, 260, 56],
  ['OP 17D', 1.7, 'medium', 'medium', '775566564', '1k', 'PI 88788', D, 'full', 2860, 210, 61],
  ['OP 18F', 1.8, 'medium', 'bushy', '666755655', '1c', 'PI 88788', F, 'full', 2700, 180, 63],
  ['OP 18R', 1.8, 'short', 'upright', '885466474', '', 'none', '', 'full', 3010, 90, 48],
  ['OP 19K', 1.9, 'medium', 'upright', '777656686', '1k', 'PI 88788', D, 'full', 2820, 320, 62],
  ['OP 20B', 2.0, 'tall', 'bushy', '586765555', '1c;3a', 'PI 88788', D, 'full', 2650, 300, 63],
  ['OP 20L', 2.0, 'medium', 'medium', '767666566', '1k', 'PI 88788', L, 'full', 2780, 240, 60],
  ['OP 21K', 2.1, 'medium', 'bushy', '678776666', '1k', 'PI 88788', D, 'full', 2740, 420, 64],
  ['OP 21T', 2.1, 'short', 'medium', '867567487', '3a', 'Peking', D, 'limited', 2900, 44, 68],
  ['OP 21F', 2.1, 'medium', 'upright', '776656575', '1c', 'PI 88788', F, 'full', 2810, 200, 64],
  ['OP 22R', 2.2, 'medium', 'medium', '767766565', '1k', 'PI 88788', D, 'full', 2690, 380, 63],
  ['OP 22C', 2.2, 'short', 'bushy', '775567694', '1c', 'none', G, 'full', 2880, 150, 57],
  ['OP 22X', 2.2, 'tall', 'medium', '685776556', '1k;3a', 'Peking', F, 'test', 2720, 12, 70],
  ['OP 23L', 2.3, 'medium', 'bushy', '668675576', '1k', 'PI 88788', L, 'full', 2640, 260, 61],
  ['OP 23M', 2.3, 'tall', 'bushy', '577764655', '3a', 'PI 88788', D, 'full', 2560, 310, 64],
  ['OP 24K', 2.4, 'medium', 'medium', '778776577', '1k;3a', 'PI 88788', D, 'full', 2710, 520, 66],
  ['OP 24U', 2.4, 'short', 'upright', '986566475', '1c', 'PI 88788', D, 'full', 2930, 280, 65],
  ['OP 24P', 2.4, 'medium', 'bushy', '667856585', '1k', 'Peking', D, 'limited', 2780, 96, 69],
  ['OP 25F', 2.5, 'tall', 'bushy', '586675656', '1c', 'PI 88788', F, 'full', 2490, 260, 65],
  ['OP 25C', 2.5, 'medium', 'medium', '766557693', '1k', 'none', '', 'full', 2840, 110, 47],
  ['OP 26B', 2.6, 'medium', 'bushy', '678765678', '3a', 'PI 88788', D, 'full', 2600, 440, 66],
  ['OP 26S', 2.6, 'short', 'upright', '976667566', '1k', 'Peking', L, 'full', 2910, 170, 67],
  ['OP 26W', 2.6, 'tall', 'medium', '677485645', '1c', 'PI 88788', D, 'full', 2140, 230, 63],
  ['OP 27B', 2.7, 'tall', 'bushy', '566776754', '1k', 'PI 88788', D, 'full', 2450, 260, 64],
  ['OP 27L', 2.7, 'medium', 'upright', '866667664', '3a', 'PI 88788', L, 'full', 2760, 0, 62],
  ['OP 28D', 2.8, 'medium', 'medium', '767775756', '1k;3a', 'Peking', D, 'full', 2670, 190, 68],
  ['OP 29N', 2.9, 'tall', 'medium', '676666743', '1c', 'PI 88788', 'glyphosate;isoxaflutole', 'full', 2540, 120, 62],
  ['OP 30E', 3.0, 'medium', 'bushy', '765676855', '1k', 'PI 88788', D, 'full', 2620, 140, 63],
];

const DRAFTS = new Set(['OP 28D']);

function varietyOf(row: Row, index: number): DemoVariety {
  const [
    code,
    relativeMaturity,
    height,
    bushType,
    ratings,
    genes,
    cystNematodeSource,
    tolerances,
    release,
    seedsPerLb,
    units,
    priceDollars,
  ] = row;
  const rating = (position: number) => Number(ratings[position]);
  const split = units >= 200 ? [Math.round(units * 0.65), units - Math.round(units * 0.65)] : [units];
  return {
    published: !DRAFTS.has(code),
    traits: {
      code,
      relativeMaturity,
      height,
      bushType,
      standability: rating(0),
      emergence: rating(1),
      phytophthoraGenes: genes ? genes.split(';') : [],
      phytophthora: rating(2),
      suddenDeath: rating(3),
      brownStemRot: rating(4),
      whiteMould: rating(5),
      frogeye: rating(6),
      stemCanker: index % 4 === 0 ? null : 6,
      charcoalRot: null,
      ironChlorosis: rating(7),
      drought: rating(8),
      cystNematodeSource,
      tolerances: (tolerances ? tolerances.split(';') : []) as Tolerance[],
      release,
      note: null,
    },
    lots: split.map((unitsOnHand, part) => ({
      lotNumber: `${code.replace(/\D/g, '')}${String.fromCharCode(65 + (index % 6))}-${610 + index * 7 + part}`,
      seedsPerLb: seedsPerLb + part * 60,
      germinationPercent: 92 - ((index + part * 3) % 5),
      treatment: index % 5 === 3 ? null : 'fungicide and insecticide',
      unitsOnHand,
      priceCentsPerUnit: priceDollars * 100,
    })),
  };
}

export const DEMO_VARIETIES: readonly DemoVariety[] = ROWS.map(varietyOf);
