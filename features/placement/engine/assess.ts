import { evaluate } from './evaluate';
import type { Assessment, FieldProfile, PlacementRules, SeasonContext, VarietyProfile } from './model';
import { siteOf } from './site';

/**
 * One variety on one field: what it is expected to yield, bu/ac, with its ledger and band. Stops are `rank`'s to apply: a
 * stopped variety can still be assessed. Throws RangeError for a coefficient out of range, a date that is none or an RM that is
 * no number.
 */
export function assess(field: FieldProfile, variety: VarietyProfile, season: SeasonContext, rules: PlacementRules): Assessment {
  return evaluate(siteOf(field, season, rules), variety).assessment;
}
