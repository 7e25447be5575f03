import Link from 'next/link';
import { formatAcres, formatNumber, formatTenth } from '@/lib/format';
import { Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import type { SeasonBook } from '../season-book';
import { StateTag } from './state-tag';

/** Units asked against units on hand, a line a variety. */
export function SeasonSupply({ book }: { book: SeasonBook }) {
  return (
    <section aria-labelledby="supply" className="min-w-0">
      <h2 id="supply" className="mb-2 text-xl">
        Seed asked and on hand
      </h2>
      <Table caption="Units asked and on hand by variety">
        <thead>
          <tr>
            <Th>Variety</Th>
            <Th numeric className="max-sm:hidden">
              Acres
            </Th>
            <Th numeric className="max-sm:hidden">
              Draft
            </Th>
            <Th numeric className="max-sm:px-2">
              Proposed
            </Th>
            <Th numeric className="max-sm:px-2">
              Agreed
            </Th>
            <Th numeric className="max-sm:hidden">
              On hand
            </Th>
            <Th numeric>Free</Th>
            <Th className="max-lg:hidden">Of what is on hand</Th>
          </tr>
        </thead>
        <tbody>
          {book.varieties.map((variety) => (
            <tr key={variety.varietyId}>
              <Td>
                <strong>{variety.code}</strong>{' '}
                <span className="text-mute whitespace-nowrap">RM {formatTenth(variety.relativeMaturity)}</span>{' '}
                {variety.release === 'full' ? null : <Tag>{variety.release}</Tag>}
              </Td>
              <Td numeric className="max-sm:hidden">
                {formatAcres(variety.acres)}
              </Td>
              <Td numeric className="max-sm:hidden text-mute">
                {formatNumber(variety.unitsDraft)}
              </Td>
              <Td numeric>{formatNumber(variety.unitsProposed)}</Td>
              <Td numeric>{formatNumber(variety.unitsAgreed)}</Td>
              <Td numeric className="max-sm:hidden">
                {formatNumber(variety.unitsOnHand)}
              </Td>
              <Td numeric className={short(variety) ? 'font-semibold text-rust-deep' : 'font-semibold'}>
                {formatNumber(variety.unitsFree)}
                {short(variety) ? <span className="block text-[0.85em] font-normal">drafts ask more</span> : null}
              </Td>
              <Td className="max-lg:hidden">
                <Share variety={variety} />
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}

function short(variety: SeasonBook['varieties'][number]): boolean {
  return variety.unitsFree !== null && variety.unitsFree < variety.unitsDraft;
}

function Share({ variety }: { variety: SeasonBook['varieties'][number] }) {
  if (!variety.unitsOnHand) return null;
  const width = (units: number) => `${Math.min(100, (units / (variety.unitsOnHand as number)) * 100)}%`;
  return (
    <div className="flex h-2.5 min-w-24 bg-hull-deep" aria-hidden="true">
      <div className="bg-leaf" style={{ width: width(variety.unitsAgreed) }} />
      <div className="bg-bloom" style={{ width: width(variety.unitsProposed) }} />
      <div className="bg-straw" style={{ width: width(variety.unitsDraft) }} />
    </div>
  );
}

/** Whose plan stands where; those who have not agreed first. */
export function SeasonAgreements({ book }: { book: SeasonBook }) {
  const order = ['change asked', 'proposed', 'draft', 'not begun', 'agreed', 'planted', 'harvested'];
  const sorted = [...book.operations].sort((a, b) => order.indexOf(a.state) - order.indexOf(b.state));
  return (
    <section aria-labelledby="agreements">
      <h2 id="agreements" className="mb-2 text-xl">
        Plans
      </h2>
      <Table caption="Plans by operation">
        <thead>
          <tr>
            <Th>Operation</Th>
            <Th>State</Th>
            <Th numeric>Placed</Th>
          </tr>
        </thead>
        <tbody>
          {sorted.map((one) => (
            <tr key={one.operationId}>
              <Td>
                <Link
                  href={`/plans/${one.operationId}/${book.season}`}
                  className="inline-block py-1 font-semibold underline decoration-line underline-offset-4"
                >
                  {one.operationName}
                </Link>
              </Td>
              <Td>
                <StateTag state={one.state} />
              </Td>
              <Td numeric>
                {one.fieldsPlaced} of {one.fields}
              </Td>
            </tr>
          ))}
        </tbody>
      </Table>
    </section>
  );
}

/** Acres by half a maturity group, as bars with their figures. */
export function SeasonMaturities({ book }: { book: SeasonBook }) {
  const most = Math.max(...book.maturities.map((one) => one.acres), 1);
  return (
    <section aria-labelledby="maturities">
      <h2 id="maturities" className="mb-2 text-xl">
        Acres by RM
      </h2>
      {book.maturities.length === 0 ? (
        <p className="text-mute">Nothing is placed yet.</p>
      ) : (
        <dl className="bg-white">
          {book.maturities.map((one) => (
            <div key={one.group} className="grid grid-cols-[5rem_1fr_5rem] items-center gap-3 border-b border-line px-3 py-2">
              <dt>{one.group}</dt>
              <dd className="h-3 bg-slate" style={{ width: `${(one.acres / most) * 100}%` }} aria-hidden="true" />
              <dd className="text-right">{formatAcres(one.acres)} ac</dd>
            </div>
          ))}
        </dl>
      )}
    </section>
  );
}
