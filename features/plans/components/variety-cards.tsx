import { formatAcres, formatNumber, formatPercent, formatTenth } from '@/lib/format';
import { Tag } from '@/lib/ui/page';
import type { LotTotal, PlanView } from '../model';

/** One card a variety on the plan: units by lot against supply. A grower sees the word for supply, not its numbers. */
export function VarietyCards({ view, dealershipSide }: { view: PlanView; dealershipSide: boolean }) {
  if (view.totals.varieties.length === 0) return null;
  return (
    <section aria-label="Varieties on the plan">
      <h2 className="sr-only">Varieties on the plan</h2>
      <ul className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
        {view.totals.varieties.map((one) => {
          const supply = view.supply.find((found) => found.varietyId === one.variety.id);
          const onHand = dealershipSide ? (supply?.unitsOnHand ?? null) : null;
          const held = supply?.unitsHeldByOthers ?? 0;
          const short = onHand !== null && one.units > onHand - held;
          return (
            <li key={one.variety.id} className="border border-line bg-paper p-4">
              <div className="flex items-baseline justify-between gap-2">
                <h3 className="text-lg">
                  {one.variety.code}{' '}
                  <span className="font-normal font-sans text-mute text-sm">RM {formatTenth(one.variety.relativeMaturity)}</span>
                </h3>
                {supply && supply.word !== 'available' ? (
                  <Tag kind={supply.word === 'limited' ? 'attention' : 'error'}>{supply.word}</Tag>
                ) : null}
              </div>
              <SupplyBar share={onHand ? one.units / onHand : one.shareOfAcres} held={onHand ? held / onHand : 0} short={short} />
              <p>
                {onHand === null
                  ? `${formatNumber(one.units)} units`
                  : `${formatNumber(one.units)} units of ${formatNumber(onHand)}${held > 0 ? `, ${formatNumber(held)} held by other plans` : ''}`}{' '}
                · {formatAcres(one.acres)} ac · {formatPercent(one.shareOfAcres)} of acres
              </p>
              {short ? (
                <p className="text-rust-deep font-semibold">
                  {formatNumber(one.units - (onHand ?? 0) + held)} units short. Take another variety or fewer acres.
                </p>
              ) : null}
              <ul className="mt-1 text-mute text-[0.92em]">
                {one.lots.map((lot) => (
                  <li key={lot.lot?.id ?? 'any'} className={overLot(lot) ? 'text-rust-deep font-semibold' : undefined}>
                    {lot.lot ? `Lot ${lot.lot.lotNumber}` : 'Any lot'}: {formatNumber(lot.units)} units
                    {overLot(lot) ? `, ${formatNumber(lot.lot?.unitsFree)} free` : ''}
                    {lot.lot?.treatment ? `, ${lot.lot.treatment}` : ''}
                  </li>
                ))}
              </ul>
            </li>
          );
        })}
      </ul>
    </section>
  );
}

function overLot(lot: LotTotal): boolean {
  return lot.lot !== null && lot.lot.unitsFree !== null && lot.units > lot.lot.unitsFree;
}

function SupplyBar({ share, held, short }: { share: number; held: number; short: boolean }) {
  const own = Math.min(1, share) * 100;
  const others = Math.min(100 - own, held * 100);
  return (
    <div className="my-2 flex h-2.5 bg-hull-deep" aria-hidden="true">
      <div className={short ? 'bg-rust' : 'bg-leaf'} style={{ width: `${own}%` }} />
      <div className="bg-straw" style={{ width: `${others}%` }} />
    </div>
  );
}
