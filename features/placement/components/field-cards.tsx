import Link from 'next/link';
import { formatAcres, formatBand, formatBushels } from '@/lib/format';
import { Tag } from '@/lib/ui/page';
import { type FieldLine, holdWords, missingWords } from '../view';

/** The fields on a phone: what the table says, a card a field, in the table's order. */
export function FieldCards({ lines, colours }: { lines: FieldLine[]; colours: Map<string, string> }) {
  return (
    <ul className="border-line border-t bg-white sm:hidden">
      {lines.map((line) => (
        <li key={line.id} className="relative border-line border-b px-4 py-3">
          <div className="flex items-start justify-between gap-4">
            <div className="min-w-0">
              <Link href={`/fields/${line.id}`} className="font-bold font-display text-[1.15em] after:absolute after:inset-0">
                {line.name}
              </Link>
              <p className="text-mute">
                {formatAcres(line.areaAcres)} ac · {line.farmName ?? 'no farm'}
              </p>
            </div>
            {line.expected === null ? null : (
              <p className="shrink-0 text-right">
                <span className="font-bold font-display text-[1.25em]">{formatBushels(line.expected)}</span>
                <span className="block text-[0.92em] text-mute">{formatBand(line.low as number, line.high as number)} bu/ac</span>
              </p>
            )}
          </div>
          <p className="mt-1 flex flex-wrap items-center gap-x-2">
            {line.pickCode ? (
              <>
                <span
                  aria-hidden="true"
                  className="inline-block size-3.5 border border-ink/50"
                  style={{ background: colours.get(line.pickCode) }}
                />
                <b>{line.pickCode}</b>
                <span className="text-mute">
                  RM {line.pickRelativeMaturity?.toFixed(1)}
                  {line.hold === null ? '' : ` · ${holdWords(line.hold)}`}
                </span>
              </>
            ) : (
              <span className="text-mute">{line.scored ? 'no variety fits' : 'not scored yet'}</span>
            )}
            {line.stale ? <Tag kind="attention">stale</Tag> : null}
          </p>
          {line.fixFirstBushels >= 0.05 ? (
            <p className="mt-1 border-straw border-l-4 pl-2">
              Fix first: {line.fixFirstTitle}, +{formatBushels(line.fixFirstBushels)} bu/ac
            </p>
          ) : null}
          {line.missing.length > 0 ? <p className="mt-1 text-[0.92em] text-mute">Missing: {missingWords(line.missing)}</p> : null}
        </li>
      ))}
    </ul>
  );
}
