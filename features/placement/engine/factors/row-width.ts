import { formatDay } from '@/lib/dates';
import type { Coefficients } from '../coefficients';
import { answer, type Factor } from '../factor';
import type { AskedQuestion, BushType, VarietyProfile } from '../model';
import { along, type Curve, clamp, expectation, rootSumSquares } from '../numbers';
import type { Site } from '../site';
import { shiftedDate } from '../what-if';
import { ask, inches } from '../words';

/**
 * Relative yield by row width, inches. North: synthesis of Iowa State (over 30 trials: narrow rows +4 bu/ac, nothing between
 * 7.5 and 20 in), Naeve (Minnesota, six states: +2.9 bu/ac for 20 in and less over 30), De Bruin & Pedersen 2008 (15 over 30 in:
 * +4 %). South of 38° N with full-season types 30 in keeps 0.97.
 */
export const RELATIVE_YIELD_NORTH: Curve = [
  [15, 1],
  [20, 0.99],
  [30, 0.95],
  [36, 0.92],
  [38, 0.91],
];
export const RELATIVE_YIELD_SOUTH: Curve = [
  [15, 1],
  [20, 0.995],
  [30, 0.97],
  [38, 0.95],
];
/** Days from planting in May until the canopy closes: 7–10 in 35–40, 15 in 45–50, 30 in 60–70 (from memory, medium). */
export const CLOSURE_DAYS: Curve = [
  [8.5, 37.5],
  [15, 47.5],
  [30, 65],
  [38, 73],
];
/** How much sooner (−) or later a bush type closes, days (planning figures). */
const CLOSURE_SHIFT: Readonly<Record<BushType, number>> = { upright: 5, medium: 0, bushy: -6 };
/** Row widths when nobody has said, with weights (planning spread). */
const UNKNOWN_ROWS = [
  { weight: 0.4, value: 15 },
  { weight: 0.1, value: 20 },
  { weight: 0.5, value: 30 },
] as const;
const MAY_25 = 145;

/** Loss of a medium plant to wide rows, fraction, by latitude (north from 40, south to 38) and planting day. */
export function wideRowLoss(rowWidthInches: number, latitude: number, plantingDay: number, c: Coefficients): number {
  const north = clamp((latitude - 38) / 2, 0, 1);
  const kept = north * along(RELATIVE_YIELD_NORTH, rowWidthInches) + (1 - north) * along(RELATIVE_YIELD_SOUTH, rowWidthInches);
  return (1 - kept) * (1 + c.lateRowRaise * clamp(plantingDay - MAY_25, 0, 45));
}

/** What a bush type keeps in a row width: wide rows cost the upright more, narrow rows the bushy. */
function keptBy(bushType: BushType, loss: number, rowWidthInches: number, c: Coefficients): number {
  const narrow = clamp((20 - rowWidthInches) / 5, 0, 1);
  if (bushType === 'bushy') return 1 - loss * c.wideRowBushyShare - narrow * c.narrowRowBushyLoss;
  if (bushType === 'upright') return 1 - loss * c.wideRowUprightShare;
  return 1 - loss - narrow * c.narrowRowMediumLoss;
}

interface RowsFor {
  field: number;
  kept: Record<BushType, number>;
  /** Spread from the row width being unknown. */
  deviation: Record<BushType, number>;
}

/** Both parts for all bush types, once a field. The field's part is what the best bush type loses there. */
function rowsOf(site: Site): RowsFor {
  const { c, field } = site;
  const widths = site.rowWidthInches === null ? UNKNOWN_ROWS : [{ weight: 1, value: site.rowWidthInches }];
  const kept = {} as Record<BushType, number>;
  const deviation = {} as Record<BushType, number>;
  for (const bushType of ['upright', 'medium', 'bushy'] as const) {
    const over = expectation(
      widths.map((one) => ({
        weight: one.weight,
        value: keptBy(bushType, wideRowLoss(one.value, field.latitude, site.plantingDay, c), one.value, c),
      })),
    );
    kept[bushType] = over.mean;
    deviation[bushType] = over.deviation;
  }
  return { field: Math.max(kept.upright, kept.medium, kept.bushy), kept, deviation };
}

/** Day on which a bush type closes rows of a width: later plantings grow faster (15 % from June on). */
export function closureDays(rowWidthInches: number, bushType: BushType | null, plantingDay: number): number {
  const pace = plantingDay > 152 ? 0.85 : 1;
  return Math.round((along(CLOSURE_DAYS, rowWidthInches) + (bushType ? CLOSURE_SHIFT[bushType] : 0)) * pace);
}

function reasonOf(site: Site, variety: VarietyProfile): string {
  const plant = variety.bushType ? `${variety.bushType} plant` : 'plant of unknown bush type';
  if (site.rowWidthInches === null) return `row width unknown, ${plant}`;
  const closed = shiftedDate(site.plantingDate, closureDays(site.rowWidthInches, variety.bushType, site.plantingDay));
  return `${inches(site.rowWidthInches)} rows, ${plant} closes them by ${formatDay(closed)}`;
}

/** Row width × bush type: wide rows cost any plant (field); bushy closes them, upright pays in narrow ones (match). */
export const rowWidth: Factor = {
  id: 'row-width',
  label: 'Row width',
  color: 'factor-row-width',
  needs: ['rowWidthInches', 'latitude', 'plantingDate', 'bushType'],
  kept({ site, variety }) {
    const { c } = site;
    const rows = site.once('rows', rowsOf);
    const { bushType } = variety;
    const { r1 } = site.line(variety.relativeMaturity);
    const { upright, medium, bushy } = rows.kept;
    const keptHere = bushType ? rows.kept[bushType] : (upright + medium + bushy) / 3;
    const match = keptHere / rows.field;
    const unknownRow = rows.deviation[bushType ?? 'medium'] / keptHere;
    const unknownBush = bushType
      ? 0
      : expectation([upright, medium, bushy].map((value) => ({ weight: 1, value }))).deviation / keptHere;
    const fieldUnknown = Math.min(rows.deviation.upright, rows.deviation.medium, rows.deviation.bushy) / rows.field;
    const asks: AskedQuestion[] = [];
    if (site.rowWidthInches === null) asks.push(ask('rowWidthInches', 'How wide are the rows, in inches?', unknownRow));
    if (!bushType) asks.push(ask('bushType', "What is this variety's bush type: upright, medium or bushy?", unknownBush));
    // Which way an unknown width tips the match: against upright plants when wide, against bushy ones when narrow.
    const tip = bushType === 'bushy' ? 1 : -1;
    const sharedUnknown = Math.sqrt(Math.max(0, unknownRow ** 2 - fieldUnknown ** 2));
    return answer({
      field: rows.field,
      fieldDeviation: rootSumSquares((c.rowUncertainty * (1 - rows.field)) / rows.field, fieldUnknown),
      match,
      sharedSlope: tip * rootSumSquares((c.rowUncertainty * (1 - match)) / match, sharedUnknown),
      ownDeviation: unknownBush,
      reason: site.once(`rows ${bushType}`, () => reasonOf(site, variety)),
      detail: r1 ? `the canopy should close by first flower, ${formatDay(r1)}` : '',
      source:
        'Iowa State soybean production (30 trials); Naeve, University of Minnesota; De Bruin & Pedersen 2008; bush type: extension practice, from memory',
      asks,
    });
  },
};
