import { dayOfYear } from '@/lib/dates';
import { byHistory, diseaseFactor } from '../disease';
import { clamp, rootSumSquares } from '../numbers';
import type { Site } from '../site';
import { ask, inches } from '../words';

/** Bloom this cool (mean daily maximum, °C; 80 °F) is all a white mould needs; this warm stops it. */
const COOL_BLOOM_C = 26.7;
const WARM_BLOOM_C = 31;
const BLOOM_DAYS = 24;

/** How cool bloom is, 0 to 1, from the season line of a variety of the optimum RM (R1 and the 24 days after it). */
function coolBloom(site: Site): number {
  const { r1 } = site.line(site.optimum);
  if (!r1) return 0;
  const start = dayOfYear(r1);
  let sum = 0;
  for (let day = start; day < start + BLOOM_DAYS; day++) sum += site.season.climate.dailyMaximumC[day - 1] ?? WARM_BLOOM_C;
  return clamp((WARM_BLOOM_C - sum / BLOOM_DAYS) / (WARM_BLOOM_C - COOL_BLOOM_C), 0, 1);
}

function rowFactor(site: Site): number {
  const { c, rowWidthInches } = site;
  if (rowWidthInches === null) return (c.whiteMouldNarrow + 1 + c.whiteMouldWide) / 3;
  return rowWidthInches <= 15 ? c.whiteMouldNarrow : rowWidthInches >= 30 ? c.whiteMouldWide : 1;
}

/** White mould: cool bloom over a closed wet canopy in a field that holds sclerotia; narrow, thick, bushy and rich raise it. */
export const whiteMould = diseaseFactor({
  id: 'white-mould',
  label: 'White mould',
  color: 'factor-white-mould',
  trait: 'whiteMould',
  traitWords: 'white mould',
  needs: ['whiteMouldHistory', 'rowWidthInches', 'populationSeedsPerAcre', 'yieldGoalBushelsPerAcre', 'irrigated', 'bushType'],
  source:
    'University of Wisconsin (0.25–0.50 bu/ac per 1 % mortality); Iowa State and Wisconsin (cool bloom, narrow rows, high yield); sizes are planning coefficients',
  pressure(site) {
    const { c, field } = site;
    const cool = site.once('cool bloom', coolBloom);
    const rich = clamp(1 + 0.015 * (site.potential.bushelsPerAcre - 55), 0.5, 1.6) * (field.irrigated ? 1.3 : 1);
    const thick = clamp(site.populationSeedsPerAcre / 140000, 0.5, 1.8);
    const canopy = rowFactor(site) * rich * thick;
    const history = byHistory(
      field.whiteMouldHistory,
      0.04 + 0.11 * cool,
      {
        without: c.whiteMouldBase * 0.4 * cool * canopy,
        // Where it has struck it can strike again, though the normals are warm.
        with: c.whiteMouldHistory * Math.max(0.4, cool) * canopy,
      },
      { fact: 'whiteMouldHistory', words: 'Has this field had white mould?' },
    );
    const rowUnknown = field.rowWidthInches === null ? 0.33 * history.loss : 0;
    const asks = history.asks.slice();
    if (rowUnknown > 0) asks.push(ask('rowWidthInches', 'How wide are the rows, in inches?', rowUnknown));
    const rows = site.rowWidthInches === null ? 'row width unknown' : `${inches(site.rowWidthInches)} rows`;
    return {
      loss: history.loss,
      unknownDeviation: rootSumSquares(history.deviation, rowUnknown),
      words: `${history.words}, ${rows}, ${cool > 0.6 ? 'cool' : cool > 0.2 ? 'mild' : 'warm'} at bloom`,
      asks,
    };
  },
  plant({ site, variety }) {
    if (variety.bushType === 'bushy') return site.c.whiteMouldBushy;
    return variety.bushType === 'upright' ? 1 / site.c.whiteMouldBushy : 1;
  },
});
