/**
 * The words the engine speaks: what a field, a variety and a season are to it, and what it answers.
 *
 * Missing is `null`, never zero. A factor that meets a `null` uses the stated spread of that input, says so in its reason,
 * and names the question that would narrow it (`Kept.asks`).
 */
import type { ClimateForPlace, SeasonParameters } from '@/features/placement/climate/model';

/** Fraction of something as 10th percentile, middle and 90th percentile; low ≤ mid ≤ high. */
export interface Spread {
  low: number;
  mid: number;
  high: number;
}

/** ISO calendar date without time, `2027-05-08`. */
export type IsoDate = string;

/** The seven natural drainage classes of the NRCS Soil Survey Manual, driest first. Tile does not change the class. */
export const DRAINAGE_CLASSES = [
  'excessively',
  'somewhat excessively',
  'well',
  'moderately well',
  'somewhat poorly',
  'poorly',
  'very poorly',
] as const;
export type DrainageClass = (typeof DRAINAGE_CLASSES)[number];

export const HEIGHTS = ['short', 'medium', 'tall'] as const;
export type Height = (typeof HEIGHTS)[number];

export const BUSH_TYPES = ['upright', 'medium', 'bushy'] as const;
export type BushType = (typeof BUSH_TYPES)[number];

export const RELEASES = ['full', 'limited', 'test'] as const;
export type Release = (typeof RELEASES)[number];

export const CYST_SOURCES = ['none', 'PI 88788', 'Peking'] as const;
export type CystSource = (typeof CYST_SOURCES)[number];

export const TOLERANCES = ['glyphosate', 'glufosinate', 'dicamba', '2,4-D', 'isoxaflutole', 'sulfonylurea'] as const;
export type Tolerance = (typeof TOLERANCES)[number];

export const TILLAGES = ['no-till', 'reduced', 'conventional'] as const;
export type Tillage = (typeof TILLAGES)[number];

export const FLOODING_FREQUENCIES = ['none', 'very rare', 'rare', 'occasional', 'frequent', 'very frequent'] as const;
export type FloodingFrequency = (typeof FLOODING_FREQUENCIES)[number];

/** 1 to 9, 9 best. `null`: not rated. */
export type Rating = number | null;

/** A share of the field's area with one value, e.g. 0.21 of the field at pH 5.7. Shares of a list sum to 1. */
export interface ValueShare {
  value: number;
  /** Fraction of the field's area, 0..1. */
  share: number;
}

export interface FieldProfile {
  id: string;
  name: string;
  areaAcres: number;
  latitude: number;
  longitude: number;
  elevationFt: number | null;
  /** Two-letter postal code of the state the field lies in. */
  state: string | null;

  yieldGoalBushelsPerAcre: number | null;
  /** Past soybean yields of this field, bu/ac at 13 %. Empty when there are none. */
  yieldHistoryBushelsPerAcre: number[];

  rowWidthInches: number | null;
  plantingDate: IsoDate | null;
  populationSeedsPerAcre: number | null;
  seedTreated: boolean | null;
  tillage: Tillage | null;
  irrigated: boolean | null;
  /** Free crop name in lower case: 'corn', 'soybean', 'wheat'… */
  lastCrop: string | null;
  /** Soybeans in how many of the last 4 years, if known. */
  soybeanYearsOfLastFour: number | null;
  mustBeOffBy: IsoDate | null;
  /** The grower's own charge for missing `mustBeOffBy`, bu/ac. */
  mustBeOffChargeBushelsPerAcre: number | null;
  /** Tolerances the programme needs. `null`: unknown. `[]`: asks for nothing. */
  weedProgramme: Tolerance[] | null;
  /** Herbicides the programme sprays (common names), for counting sites of action. */
  weedProgrammeActives: string[];
  /** Crops next door that herbicide drift would hurt, as the grower names them. */
  sensitiveNeighbours: string[];

  /** Shares of the field by natural drainage class; shares sum to 1. `null`: unknown. */
  drainageShares: { class: DrainageClass; share: number }[] | null;
  tiled: boolean | null;
  floodingFrequency: FloodingFrequency | null;
  slopePercent: number | null;
  hydrologicGroup: string | null;
  /** Plant-available water the top 100 cm can store, inches of water (area-weighted). */
  availableWaterInches: number | null;
  /** Depth a hand-pushed probe reached, inches. 12 or more: no layer to speak of. */
  probeDepthInches: number | null;
  /** Highest penetrometer reading in the top 15 in, psi. */
  penetrometerPsi: number | null;

  /** Histogram of the water-pH surface over the field, ascending; `null`: not tested. */
  phShares: ValueShare[] | null;
  /** Number of soil points behind `phShares` and the leave-one-out error of the surface, pH units. */
  phPointCount: number;
  phErrorStandardDeviation: number | null;
  bufferPh: number | null;
  /** Named buffer test: 'SMP' | 'Sikora' | 'Mehlich' | 'Adams-Evans' | 'Woodruff'. */
  bufferMethod: string | null;
  /** Lime the buffer test calls for on the sour part, with the method's name and source; `null`: not worked out. */
  limeTonsPerAcre: { tons: number | null; method: string; source: string } | null;
  organicMatterPercent: number | null;
  cationExchangeCapacity: number | null;
  carbonatePercent: number | null;
  /** EC (1:1), dS/m. */
  electricalConductivity: number | null;
  cystEggsPer100cc: number | null;
  /** Resistance source of the soybeans grown here last. */
  cystSourceLastGrown: CystSource | null;

  whiteMouldHistory: boolean | null;
  suddenDeathHistory: boolean | null;
  brownStemRotHistory: boolean | null;
  frogeyeHistory: boolean | null;
  ironChlorosisHistory: boolean | null;
  crustingSoil: boolean | null;
}

export interface VarietyProfile {
  id: string;
  code: string;
  relativeMaturity: number;
  height: Height | null;
  bushType: BushType | null;
  standability: Rating;
  emergence: Rating;
  /** Rps genes as listed, e.g. ['1k', '3a']. Empty: none known. */
  phytophthoraGenes: string[];
  /** Field tolerance (partial resistance). */
  phytophthora: Rating;
  suddenDeath: Rating;
  brownStemRot: Rating;
  whiteMould: Rating;
  frogeye: Rating;
  stemCanker: Rating;
  charcoalRot: Rating;
  ironChlorosis: Rating;
  /** Root health / drought rating. */
  drought: Rating;
  cystNematodeSource: CystSource | null;
  tolerances: Tolerance[];
  seedsPerLb: number | null;
  germinationPercent: number | null;
  /** `null`: not said, so supply does not stop it. 0: sold out. */
  unitsOnHand: number | null;
  release: Release;
  /** Shrunken trial advantage g (fraction, e.g. 0.02) and its standard error; 0 until trials say otherwise. */
  trialAdvantage: number;
  trialAdvantageStandardError: number;
}

export interface SeasonContext {
  /** Crop year, e.g. 2027. */
  year: number;
  climate: ClimateForPlace;
  parameters: SeasonParameters;
}

/** What a dealership has changed from the table in coefficients.ts, plus zones that cover this field. */
export interface PlacementRules {
  /** Coefficient name → value; names and ranges in coefficients.ts. */
  overrides: Record<string, number>;
  /** The dealership's zone that covers the field, if any. */
  zone: { name: string; relativeMaturityFrom: number; relativeMaturityTo: number } | null;
  /** Releases that may be placed; usually full and limited. */
  releasesPlaced: Release[];
}

export type FactorId =
  | 'maturity-zone'
  | 'freeze'
  | 'soil-ph'
  | 'wet-feet'
  | 'compaction'
  | 'row-width'
  | 'standability'
  | 'height'
  | 'emergence'
  | 'cyst-nematode'
  | 'sudden-death'
  | 'brown-stem-rot'
  | 'white-mould'
  | 'frogeye'
  | 'stem-canker'
  | 'charcoal-rot'
  | 'drought'
  | 'planting-date'
  | 'must-be-off-by'
  | 'weed-programme';

/** A question whose answer would narrow the band, as the screen asks it, and the fact it would set. */
export interface Question {
  fact: keyof FieldProfile | keyof VarietyProfile;
  words: string;
}

/** A question together with how much of the factor's deviation (in logs) comes from not knowing its answer. */
export interface AskedQuestion extends Question {
  logDeviation: number;
}

/** What one factor says of one variety on one field. */
export interface Kept {
  /** Fraction of yield kept by everything this factor covers: field part × match part. */
  kept: Spread;
  /** The part any variety would suffer here (`field`) and the part that is this variety's own (`match`); field × match = kept. */
  field: Spread;
  match: Spread;
  /** The number first, in the trade's words: "38 % somewhat poorly drained". */
  reason: string;
  /** A second, smaller line: what of the variety or of the unknowns matters. Empty when there is nothing to add. */
  detail: string;
  source: string;
  /** Inputs that were unknown. */
  asks: AskedQuestion[];
  /**
   * How this variety's match moves, in logs, when what is unknown of the field turns out one deviation worse. Varieties share
   * that shock, each with its own response: that is what makes a resistant variety's lead firm or shaky.
   */
  sharedLogSlope: number;
  /** The rest of the match deviation, in logs: this variety's own ratings. */
  ownLogDeviation: number;
  /** Set when the variety must leave the picks. */
  stop: string | null;
}

/** A line of a ledger. `bushels` ≤ 0 normally; a small gain is possible. */
export interface LedgerLine {
  factor: FactorId;
  label: string;
  bushels: number;
  fieldBushels: number;
  matchBushels: number;
  reason: string;
  detail: string;
  source: string;
}

export interface Assessment {
  varietyId: string;
  code: string;
  relativeMaturity: number;
  /** What the field can carry, bu/ac, and where that figure comes from. */
  potential: number;
  potentialSource: 'goal' | 'history' | 'default';
  ledger: LedgerLine[];
  /** Lines that cost under 0.1 bu together with their sum, so that ledger + gathered + trial = expected. */
  gatheredBushels: number;
  /** Bushels from trial evidence (g), zero until trials say otherwise. */
  trialBushels: number;
  expected: number;
  low: number;
  high: number;
  /** Standard deviations in logs, kept apart: field-side moves every variety together. */
  fieldLogDeviation: number;
  varietyLogDeviation: number;
  /** Advice that costs nothing: sites of action counted, drift next door… */
  advice: string[];
  season: { r1: IsoDate | null; r5: IsoDate | null; r7: IsoDate | null; r8: IsoDate | null; chanceOfFreezeBeforeR7: number };
}

export interface Stopped {
  varietyId: string;
  code: string;
  factor: FactorId | 'supply' | 'release';
  reason: string;
}

/** What costs the field bushels whatever is planted, the remedy and its worth. */
export interface FixFirst {
  factor: FactorId;
  title: string;
  /** Remedy in words, the number first. */
  remedy: string;
  worthBushelsPerAcre: number;
  acres: number;
  costDollarsPerAcre: number | null;
  caution: string;
  source: string;
}

export interface QuestionWorth extends Question {
  /** Drop in width of the first pick's band if it were known, bu/ac. */
  narrowsBushels: number;
}

/** A ranked assessment with the share of draws in which it comes first, 0..1. */
export interface Pick extends Assessment {
  hold: number;
}

export interface Ranking {
  engineVersion: string;
  fieldId: string;
  potential: number;
  potentialSource: Assessment['potentialSource'];
  /** Best first. */
  picks: Pick[];
  stopped: Stopped[];
  fixFirst: FixFirst[];
  /** Most helpful first. */
  questions: QuestionWorth[];
}
