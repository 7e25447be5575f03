import type { Metadata } from 'next';
import Link from 'next/link';
import { notFound } from 'next/navigation';
import { peopleOf } from '@/features/accounts/queries';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { createOperation } from '@/features/growers/actions';
import { GrowersTable } from '@/features/growers/components/growers-table';
import { OperationForm } from '@/features/growers/components/operation-form';
import { progressOf } from '@/features/growers/queries';
import { sorted, sortOf } from '@/features/growers/sort';
import { formatAcres } from '@/lib/format';
import { EmptyState, Figure, Page, PageHeader, Panel } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Growers' };

/** Whom one serves, and how far each one is. */
export default async function GrowersPage({ searchParams }: { searchParams: Promise<{ sort?: string; archived?: string }> }) {
  const viewer = await requireViewer();
  if (!may(viewer, 'person', 'read')) notFound();
  const { sort, archived } = await searchParams;
  const showArchived = archived === 'yes';
  const operations = await progressOf(viewer, { archived: showArchived });
  const people = may(viewer, 'operation', 'assign') ? await peopleOf(viewer) : [];
  const acres = operations.reduce((sum, one) => sum + one.areaAcres, 0);
  const agreed = operations.filter((one) => ['agreed', 'planted', 'harvested'].includes(one.planState ?? '')).length;
  return (
    <Page>
      <PageHeader
        title={showArchived ? 'Archived growers' : 'Growers'}
        aside={
          <div className="flex gap-8 max-sm:w-full">
            <Figure value={operations.length} label={operations.length === 1 ? 'operation' : 'operations'} />
            <Figure value={formatAcres(acres)} label="acres" />
            <Figure value={agreed} label={`${viewer.season} ${agreed === 1 ? 'plan' : 'plans'} agreed`} />
          </div>
        }
      />
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_20rem]">
        <div>
          {operations.length === 0 ? (
            <EmptyState title={showArchived ? 'Nothing is archived' : 'No operation yet'}>
              {showArchived
                ? 'An archived operation is in no list; nothing of it is lost.'
                : 'Make the first one here, then invite its grower and bring in its fields.'}
            </EmptyState>
          ) : (
            <GrowersTable
              operations={sorted(operations, sortOf(sort), viewer.season)}
              season={viewer.season}
              sort={sortOf(sort)}
              archived={showArchived}
            />
          )}
          <p className="mt-4">
            <Link
              href={showArchived ? '/growers' : '/growers?archived=yes'}
              className="inline-flex min-h-11 items-center text-mute underline underline-offset-4"
            >
              {showArchived ? 'Back to those at work' : 'Show archived ones'}
            </Link>
          </p>
        </div>
        <Panel aria-label="New operation">
          <h2 className="mb-3 text-xl">New operation</h2>
          <OperationForm
            action={createOperation}
            reps={people.filter((one) => one.role === 'rep' && !one.disabled).map(({ id, name }) => ({ id, name }))}
          />
        </Panel>
      </div>
    </Page>
  );
}
