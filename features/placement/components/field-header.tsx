import Link from 'next/link';
import type { Field, FieldFacts } from '@/features/fields/model';
import { formatDay } from '@/lib/dates';
import { formatAcres, formatTenth } from '@/lib/format';
import type { FieldProfile } from '../engine/model';

/** Trail, name and the facts of a field in two lines; what is unknown says so. */
export function FieldHeader({
  field,
  facts,
  profile,
  operationName,
}: {
  field: Field;
  facts: FieldFacts;
  profile: FieldProfile;
  operationName: string;
}) {
  const phs = profile.phShares;
  const mean = phs ? phs.reduce((sum, one) => sum + one.value * one.share, 0) : null;
  const wettest = profile.drainageShares ? [...profile.drainageShares].sort((one, other) => other.share - one.share)[0] : null;
  return (
    <header>
      <nav aria-label="Breadcrumb" className="mb-1 text-mute">
        <Link
          href={`/fields?operation=${field.operationId}`}
          className="underline decoration-line underline-offset-4 hover:decoration-ink"
        >
          {operationName}
        </Link>{' '}
        / {field.farmName ?? 'no farm'}
      </nav>
      <h1 className="text-[2rem]">{field.name}</h1>
      <p className="mt-1 flex flex-wrap gap-x-4 gap-y-0.5">
        <span>
          <b>{formatAcres(field.areaAcres, 2)}</b> ac
        </span>
        <span>
          {facts.rowWidthInches === null ? (
            <Unknown>rows</Unknown>
          ) : (
            <>
              <b>{facts.rowWidthInches} in</b> rows
            </>
          )}
        </span>
        <span>
          {wettest ? (
            <>
              <b>{capital(wettest.class)}</b> drained{wettest.share < 0.995 ? ` on ${Math.round(wettest.share * 100)} %` : ''}
            </>
          ) : (
            <Unknown>drainage</Unknown>
          )}
          {facts.tiled === null ? '' : facts.tiled ? ', tiled' : ', not tiled'}
        </span>
        <span>
          {mean === null || !phs ? (
            <Unknown>pH</Unknown>
          ) : (
            <>
              pH <b>{formatTenth(mean)}</b>{' '}
              <span className="text-mute">
                ({formatTenth(phs[0]?.value)}–{formatTenth(phs.at(-1)?.value)})
              </span>
            </>
          )}
        </span>
        <span>
          {facts.lastCrop === null ? (
            <Unknown>last crop</Unknown>
          ) : (
            <>
              after <b>{facts.lastCrop}</b>
            </>
          )}
        </span>
        <span>
          {facts.plantingDate === null ? (
            <Unknown>planting date</Unknown>
          ) : (
            <>
              planted <b>{formatDay(facts.plantingDate)}</b>
            </>
          )}
        </span>
        <span>
          {facts.yieldGoalBushelsPerAcre === null ? (
            <Unknown>yield goal</Unknown>
          ) : (
            <>
              goal <b>{facts.yieldGoalBushelsPerAcre}</b> bu/ac
            </>
          )}
        </span>
        {facts.irrigated ? <b>irrigated</b> : null}
        <Link href={`/fields/${field.id}/facts`} className="font-semibold underline underline-offset-4">
          Change the facts
        </Link>
      </p>
    </header>
  );
}

function Unknown({ children }: { children: string }) {
  return <span className="text-mute">{children} unknown</span>;
}

function capital(words: string): string {
  return words.charAt(0).toUpperCase() + words.slice(1);
}
