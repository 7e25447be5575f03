import type { Release, VarietyProfile } from '@/features/placement/engine/model';

/** What the engine reads of a variety that belongs to its seed, its supply or its trials, not to the line-up's traits. */
type NotATrait = 'id' | 'seedsPerLb' | 'germinationPercent' | 'unitsOnHand' | 'trialAdvantage' | 'trialAdvantageStandardError';

/** What a line-up says of a variety: the engine's traits and a note. Ratings 1 to 9, 9 best; `null` is not rated. */
export interface VarietyTraits extends Omit<VarietyProfile, NotATrait> {
  note: string | null;
}

export const SUPPLY_WORDS = ['available', 'limited', 'sold out'] as const;
export type SupplyWord = (typeof SUPPLY_WORDS)[number];

/** Fewer units than this on hand is "limited": about one quarter section at 140,000 seeds an acre. */
export const LIMITED_BELOW_UNITS = 160;

export interface LineUpVariety extends VarietyTraits {
  id: string;
  season: number;
  published: boolean;
  revision: number;
  supplyWord: SupplyWord;
  /** Sum over its lots; `null` when no lot says, and always for growers. */
  unitsOnHand: number | null;
}

export interface SeedLot {
  id: string;
  varietyId: string;
  lotNumber: string;
  seedsPerLb: number | null;
  germinationPercent: number | null;
  treatment: string | null;
  unitSizeSeeds: number;
  /** `null` for growers. */
  unitsOnHand: number | null;
  /** `null` for growers, and where no price is set. */
  priceCentsPerUnit: number | null;
  /** Moment of its last change (ms), by which the second of two writers is told. */
  updatedAt: number;
}

/** The word growers see for a supply. No lot at all is not sold out: nobody has said yet. */
export function supplyWord(unitsOnHand: number | null, release: Release): SupplyWord {
  if (unitsOnHand !== null && unitsOnHand <= 0) return 'sold out';
  if (release !== 'full') return 'limited';
  return unitsOnHand !== null && unitsOnHand < LIMITED_BELOW_UNITS ? 'limited' : 'available';
}

/** Is a seed count large enough that pounds run high and plates need care (about 2,200 seeds/lb or fewer)? */
export const LARGE_SEED_BELOW_SEEDS_PER_LB = 2200;
