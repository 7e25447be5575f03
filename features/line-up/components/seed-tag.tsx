import { formatCell } from '../cells';
import { COLUMNS } from '../columns';
import type { LineUpVariety } from '../model';

const RATED = COLUMNS.filter((column) => column.kind === 'rating');
const PLAIN = COLUMNS.filter((column) => !column.ofLot && !['rating', 'text'].includes(column.kind));

/** A variety's traits as a printed tag: ratings as bars of nine with their number. */
export function SeedTag({ variety }: { variety: LineUpVariety }) {
  return (
    <div className="border-2 border-ink bg-white">
      <div className="flex items-baseline justify-between border-ink border-b-2 px-4 py-3">
        <span className="font-display font-bold text-2xl">{variety.code}</span>
        <span className="font-display font-bold text-2xl">RM {variety.relativeMaturity.toFixed(1)}</span>
      </div>
      <dl className="grid grid-cols-2 gap-x-5 gap-y-1 border-line border-b px-4 py-3">
        {PLAIN.filter((column) => column.key !== 'relativeMaturity').map((column) => (
          <div key={column.key} className="contents">
            <dt className="text-mute">{column.label}</dt>
            <dd className="text-right font-semibold">
              {formatCell(column, variety[column.key as keyof LineUpVariety]).replaceAll(';', ', ') ||
                (column.key === 'tolerances' ? 'conventional' : column.key === 'phytophthoraGenes' ? 'none listed' : 'not said')}
            </dd>
          </div>
        ))}
      </dl>
      <dl className="grid gap-y-1.5 px-4 py-3">
        {RATED.map((column) => {
          const rating = variety[column.key as keyof LineUpVariety] as number | null;
          return (
            <div key={column.key} className="grid grid-cols-[minmax(0,1fr)_7.5rem_3.2rem] items-center gap-3">
              <dt>{column.label}</dt>
              <dd aria-hidden="true" className="flex gap-0.5">
                {[1, 2, 3, 4, 5, 6, 7, 8, 9].map((step) => (
                  <span
                    key={step}
                    className={`h-3 grow ${rating !== null && step <= Math.round(rating) ? 'bg-leaf' : 'bg-hull-deep'}`}
                  />
                ))}
              </dd>
              <dd className="text-right">{rating === null ? <span className="text-mute">—</span> : `${rating} of 9`}</dd>
            </div>
          );
        })}
      </dl>
      <p className="border-line border-t px-4 py-2 text-[0.9em] text-mute">
        9 is best. — is not rated: an average is used with a wide range.
      </p>
    </div>
  );
}
