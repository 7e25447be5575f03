/** What a rating makes of a pressure: the one rule that diseases, rot, chlorosis, lodging and stand share. */

import type { Coefficients } from './coefficients';
import type { AskedQuestion, Rating, VarietyProfile } from './model';
import { ask } from './words';

/** Stands in for a rating that is not known. */
export const UNKNOWN_RATING = 5;

/** Share of a pressure that a variety of this rating suffers: 1 at rating 1, 0 at rating 9. */
export function susceptibility(rating: Rating): number {
  return (9 - Math.min(9, Math.max(1, rating ?? UNKNOWN_RATING))) / 8;
}

/** Spread of the susceptibility: a printed rating's own, or that of one nobody has given. */
export function susceptibilityDeviation(rating: Rating, c: Coefficients): number {
  return (rating === null ? c.unknownRatingDeviation : c.ratingDeviation) / 8;
}

export interface RatedLoss {
  /** Fraction of yield kept by this variety. */
  match: number;
  sharedSlope: number;
  ownDeviation: number;
  asks: AskedQuestion[];
}

export interface RatedPressure {
  /** Fraction lost by a variety rated 1. */
  pressure: number;
  /** Spread of the pressure: what is unknown of field and weather. */
  deviation: number;
  rating: Rating;
  trait: keyof VarietyProfile;
  /** The trait in words, for the question. */
  traitWords: string;
}

/** A pressure as this variety meets it. The pressure's spread is shared by all varieties, the rating's is its own. */
export function ratedLoss(c: Coefficients, { pressure, deviation, rating, trait, traitWords }: RatedPressure): RatedLoss {
  const share = susceptibility(rating);
  const match = 1 - Math.min(0.9, pressure * share);
  const ownDeviation = (pressure * susceptibilityDeviation(rating, c)) / match;
  const known = (pressure * susceptibilityDeviation(UNKNOWN_RATING, c)) / match;
  return {
    match,
    sharedSlope: (-deviation * share) / match,
    ownDeviation,
    asks:
      rating === null && pressure > 0.0005
        ? [ask(trait, `What is this variety's ${traitWords} rating?`, Math.sqrt(ownDeviation ** 2 - known ** 2))]
        : [],
  };
}

/** Field-side questions (deviation as a fraction of pressure lost at rating 1) as this variety feels them, in logs. */
export function felt(asks: readonly AskedQuestion[], rating: Rating, match: number): AskedQuestion[] {
  if (asks.length === 0) return [];
  const share = susceptibility(rating);
  return asks.map((one) => ({ ...one, logDeviation: (one.logDeviation * share) / match }));
}
