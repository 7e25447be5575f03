import clsx from 'clsx';
import Link from 'next/link';
import { formatMoment } from '@/lib/dates';
import { formatAcres } from '@/lib/format';
import { Tag } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';
import type { OperationProgress } from '../model';
import { SORTS, type SortKey } from '../sort';
import { nextThing, stepsOf } from '../steps';
import { StepMarks } from './steps';

const HIDDEN: Partial<Record<SortKey | 'plan' | 'next', string>> = {
  acres: 'max-sm:hidden',
  fields: 'max-md:hidden',
  soil: 'max-lg:hidden',
  steps: 'max-lg:hidden',
  next: 'max-lg:hidden',
  activity: 'max-xl:hidden',
};

const PLAN_KIND: Record<string, 'good' | 'attention' | 'bloom' | 'plain'> = {
  agreed: 'good',
  planted: 'good',
  harvested: 'good',
  proposed: 'bloom',
  'change asked': 'attention',
};

/** The operations one serves, how far each one is, and what comes next. Heads sort by a link. */
export function GrowersTable({
  operations,
  season,
  sort,
  archived,
}: {
  operations: OperationProgress[];
  season: number;
  sort: { key: SortKey; descending: boolean };
  archived: boolean;
}) {
  const keep = archived ? '&archived=yes' : '';
  const head = (key: SortKey) => {
    const here = sort.key === key;
    const next = here && !sort.descending ? `-${key}` : key;
    return (
      <Th
        numeric={SORTS[key].numeric}
        className={HIDDEN[key]}
        aria-sort={here ? (sort.descending ? 'descending' : 'ascending') : undefined}
      >
        <Link href={`/growers?sort=${next}${keep}`} className="hover:text-ink" scroll={false}>
          {SORTS[key].label}
          <span aria-hidden="true" className={clsx('pl-1', !here && 'invisible')}>
            {here && sort.descending ? '↓' : '↑'}
          </span>
        </Link>
      </Th>
    );
  };
  return (
    <Table caption={`Operations in the ${season} season`}>
      <thead>
        <tr>
          {head('name')}
          {head('acres')}
          {head('fields')}
          {head('soil')}
          {head('steps')}
          <Th>{season} plan</Th>
          <Th className={HIDDEN.next}>Next</Th>
          {head('activity')}
        </tr>
      </thead>
      <tbody>
        {operations.map((one) => {
          const steps = stepsOf(one, season);
          const next = nextThing(one, season);
          return (
            <tr key={one.id} className="relative hover:bg-hull/60">
              <Td>
                <Link
                  href={`/growers/${one.id}`}
                  className="font-semibold underline decoration-line underline-offset-4 after:absolute after:inset-0"
                >
                  {one.name}
                </Link>
                <span className="block text-mute">
                  {[one.county, one.state].filter(Boolean).join(', ')}
                  {one.reps.length > 0 ? ` · ${one.reps.map((rep) => rep.name).join(', ')}` : ' · no rep'}
                </span>
                <span className="mt-1 block lg:hidden">
                  <StepMarks steps={steps} />
                </span>
              </Td>
              <Td numeric className={HIDDEN.acres}>
                {formatAcres(one.areaAcres)}
              </Td>
              <Td numeric className={HIDDEN.fields}>
                {one.fieldCount}
              </Td>
              <Td numeric className={HIDDEN.soil}>
                {one.fieldsWithSoilTests}
              </Td>
              <Td className={HIDDEN.steps}>
                <StepMarks steps={steps} />
              </Td>
              <Td>
                {one.planState ? (
                  <Tag kind={PLAN_KIND[one.planState] ?? 'plain'}>{one.planState}</Tag>
                ) : (
                  <span className="text-mute">none</span>
                )}
              </Td>
              <Td className={HIDDEN.next}>
                {next ? (
                  <Link href={next.href} className="relative z-10 underline underline-offset-4">
                    {next.label}
                  </Link>
                ) : (
                  <span className="text-mute">—</span>
                )}
              </Td>
              <Td className={clsx('text-mute', HIDDEN.activity)}>{formatMoment(one.lastActivityAt)}</Td>
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}
