import { formatAcres, formatBushels, formatDollars, formatNumber, formatTenth } from '@/lib/format';
import { Figure } from '@/lib/ui/page';
import type { PlanTotals } from '../model';

/** The plan in five numbers, beside its title. */
export function PlanFigures({ totals, dealershipSide }: { totals: PlanTotals; dealershipSide: boolean }) {
  const { relativeMaturityFrom: from, relativeMaturityTo: to } = totals;
  return (
    <div className="flex flex-wrap gap-x-7 gap-y-2">
      <Figure value={formatAcres(totals.acres)} label={`acres, ${totals.fields} ${totals.fields === 1 ? 'field' : 'fields'}`} />
      <Figure value={formatBushels(totals.expectedPerAcre)} label="bu/ac expected" />
      <Figure value={formatNumber(totals.units)} label="units" />
      <Figure
        value={from === null || to === null ? '—' : from === to ? formatTenth(from) : `${formatTenth(from)}–${formatTenth(to)}`}
        label="RM spread"
      />
      {dealershipSide && totals.seedCostCents !== null ? (
        <Figure value={formatDollars(totals.seedCostCents)} label="seed" />
      ) : null}
    </div>
  );
}
