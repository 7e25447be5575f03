/** The season's book: what is asked against what is on hand, and where the acres stand by maturity. Pure. */
import type { PlanState } from './states';

export interface SeasonVariety {
  varietyId: string;
  code: string;
  relativeMaturity: number;
  release: string;
  unitsOnHand: number | null;
  unitsDraft: number;
  unitsProposed: number;
  unitsAgreed: number;
  /** On hand less proposed and agreed; `null` when the count on hand is not known. */
  unitsFree: number | null;
  acres: number;
}

export interface SeasonBook {
  season: number;
  varieties: SeasonVariety[];
  maturities: { group: string; acres: number }[];
  operations: {
    operationId: string;
    operationName: string;
    state: PlanState | 'not begun';
    fields: number;
    fieldsPlaced: number;
    acres: number;
    acresPlaced: number;
  }[];
  totals: { acres: number; acresPlaced: number; unitsProposed: number; unitsAgreed: number; agreed: number; notAgreed: number };
}

interface Given {
  season: number;
  lineUp: { id: string; code: string; relativeMaturity: number; release: string; unitsOnHand: number | null }[];
  asked: { varietyId: string; operationId: string; state: PlanState; units: number; acres: number }[];
  summaries: SeasonBook['operations'];
}

/**
 * Units are summed over the whole dealership (supply is common to all); acres by maturity and the list of operations
 * only over the operations given, which are those in the viewer's scope.
 */
export function seasonBookOf({ season, lineUp, asked, summaries }: Given): SeasonBook {
  const inScope = new Set(summaries.map((one) => one.operationId));
  const varieties = lineUp.map((variety): SeasonVariety => {
    const asks = asked.filter((one) => one.varietyId === variety.id);
    const units = (...states: PlanState[]) =>
      asks.filter((one) => states.includes(one.state)).reduce((total, one) => total + one.units, 0);
    const unitsProposed = units('proposed');
    const unitsAgreed = units('agreed', 'planted', 'harvested');
    return {
      varietyId: variety.id,
      code: variety.code,
      relativeMaturity: variety.relativeMaturity,
      release: variety.release,
      unitsOnHand: variety.unitsOnHand,
      unitsDraft: units('draft', 'change asked'),
      unitsProposed,
      unitsAgreed,
      unitsFree: variety.unitsOnHand === null ? null : variety.unitsOnHand - unitsProposed - unitsAgreed,
      acres: asks.filter((one) => inScope.has(one.operationId)).reduce((total, one) => total + one.acres, 0),
    };
  });
  const groups = new Map<string, number>();
  for (const variety of varieties) {
    if (variety.acres === 0) continue;
    const from = Math.floor(variety.relativeMaturity * 2) / 2;
    const group = `${from.toFixed(1)}–${(from + 0.4).toFixed(1)}`;
    groups.set(group, (groups.get(group) ?? 0) + variety.acres);
  }
  const agreedStates = ['agreed', 'planted', 'harvested'];
  const agreed = summaries.filter((one) => agreedStates.includes(one.state)).length;
  return {
    season,
    varieties,
    maturities: [...groups].map(([group, acres]) => ({ group, acres })).sort((a, b) => a.group.localeCompare(b.group)),
    operations: summaries,
    totals: {
      acres: summaries.reduce((total, one) => total + one.acres, 0),
      acresPlaced: summaries.reduce((total, one) => total + one.acresPlaced, 0),
      unitsProposed: varieties.reduce((total, one) => total + one.unitsProposed, 0),
      unitsAgreed: varieties.reduce((total, one) => total + one.unitsAgreed, 0),
      agreed,
      notAgreed: summaries.length - agreed,
    },
  };
}
