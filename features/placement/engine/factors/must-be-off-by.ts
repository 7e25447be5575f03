import { normalCdf, STAGE_STANDARD_DEVIATION_DAYS } from '@/features/placement/climate/freeze';
import { formatDay } from '@/lib/dates';
import { answer, type Factor } from '../factor';
import { daysBetween, shiftedDate } from '../what-if';
import { yearsIn } from '../words';

/**
 * Must be off by: chance that R8 and a few drying days miss the date wheat or a cover crop needs, charged at the grower's
 * own figure. Early maturities go where something follows. All match.
 */
export const mustBeOffBy: Factor = {
  id: 'must-be-off-by',
  label: 'Must be off by',
  color: 'factor-must-be-off-by',
  needs: ['mustBeOffBy', 'mustBeOffChargeBushelsPerAcre', 'relativeMaturity'],
  kept({ site, variety }) {
    const { c, field } = site;
    const source = 'Season line by CROPGRO-Soybean; R7 varies by 5 days from year to year; the charge is the grower’s own';
    if (field.mustBeOffBy === null) return answer({ reason: 'no date to be clear by', source });
    const { r8 } = site.line(variety.relativeMaturity);
    const charge = Math.max(0, field.mustBeOffChargeBushelsPerAcre ?? c.mustBeOffCharge);
    const spare = r8 ? daysBetween(r8, field.mustBeOffBy) - c.mustBeOffHarvestDays : null;
    const chance = spare === null ? 1 : normalCdf(-spare / STAGE_STANDARD_DEVIATION_DAYS);
    const loss = Math.min(0.9, (chance * charge) / site.potential.bushelsPerAcre);
    return answer({
      match: 1 - loss,
      sharedSlope: (-0.3 * loss) / (1 - loss),
      reason: r8
        ? `R8 on ${formatDay(r8)}, misses ${formatDay(field.mustBeOffBy)} ${yearsIn(chance)}`
        : `not ripe before the year ends, misses ${formatDay(field.mustBeOffBy)}`,
      detail: `${charge} bu/ac for a miss; combined by ${r8 ? formatDay(shiftedDate(r8, c.mustBeOffHarvestDays)) : 'never'}`,
      source,
    });
  },
};
