/** What a factor is: one file, one object, one question about yield. */
import type { AskedQuestion, FactorId, FieldProfile, Kept, VarietyProfile } from './model';
import { keptSpread, rootSumSquares } from './numbers';
import type { Site } from './site';

/** What a factor is given: the field in its season (worked out once for all varieties) and one variety. */
export interface FactorContext {
  site: Site;
  variety: VarietyProfile;
}

export interface Factor {
  id: FactorId;
  /** Name of its ledger line. */
  label: string;
  /** Colour token key; one colour per factor everywhere. */
  color: string;
  /** Facts and traits it reads. */
  needs: readonly (keyof FieldProfile | keyof VarietyProfile)[];
  /** Fraction of yield kept, with its reason: the score and its words come from the same call. */
  kept(context: FactorContext): Kept;
}

/** What a factor's own arithmetic yields; `answer` turns it into a `Kept`. All deviations in logs, ≥ 0 but the slope. */
export interface Finding {
  /** Fraction any variety keeps here, and how unsure that is. */
  field?: number;
  fieldDeviation?: number;
  /** Fraction kept by this variety of what the field leaves. */
  match?: number;
  /** See `Kept.sharedLogSlope`. */
  sharedSlope?: number;
  ownDeviation?: number;
  reason: string;
  detail?: string;
  source: string;
  asks?: AskedQuestion[];
  stop?: string | null;
}

const NOTHING_ASKED: AskedQuestion[] = [];
/** No factor takes more than this of the yield: the lowest fraction kept. */
export const LOWEST_KEPT = 0.05;

/** Build the `Kept` of a finding: field × match = kept, each with its 10th to 90th percentile. */
export function answer(finding: Finding): Kept {
  const field = Math.max(LOWEST_KEPT, finding.field ?? 1);
  const match = Math.max(LOWEST_KEPT, finding.match ?? 1);
  const fieldDeviation = finding.fieldDeviation ?? 0;
  const sharedLogSlope = finding.sharedSlope ?? 0;
  const ownLogDeviation = finding.ownDeviation ?? 0;
  const matchDeviation = rootSumSquares(sharedLogSlope, ownLogDeviation);
  return {
    kept: keptSpread(field * match, rootSumSquares(fieldDeviation, matchDeviation)),
    field: keptSpread(field, fieldDeviation),
    match: keptSpread(match, matchDeviation),
    reason: finding.reason,
    detail: finding.detail ?? '',
    source: finding.source,
    asks: finding.asks ?? NOTHING_ASKED,
    sharedLogSlope,
    ownLogDeviation,
    stop: finding.stop ?? null,
  };
}
