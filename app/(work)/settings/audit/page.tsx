import type { Metadata } from 'next';
import { beginningsOf, cursorOf, readCursor } from '@/features/accounts/audit';
import { AuditFilter } from '@/features/accounts/components/audit-filter';
import { AuditTable } from '@/features/accounts/components/audit-table';
import { auditTrail, peopleOf } from '@/features/accounts/queries';
import { requireViewer } from '@/features/accounts/viewer';
import { operationsFor } from '@/features/growers/queries';
import { found } from '@/lib/found';
import { LinkButton } from '@/lib/ui/button';
import { EmptyState, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Audit trail' };

const PAGE_LENGTH = 50;

interface Search {
  kind?: string;
  person?: string;
  operation?: string;
  before?: string;
}

/** Every write of the dealership as a sentence, filtered and paged through the address. */
export default async function AuditPage({ searchParams }: { searchParams: Promise<Search> }) {
  const viewer = await requireViewer();
  const search = await searchParams;
  const lines = await found(
    auditTrail(viewer, {
      verbs: beginningsOf(search.kind),
      personId: search.person,
      operationId: search.operation,
      before: readCursor(search.before),
      limit: PAGE_LENGTH + 1,
    }),
  );
  const [people, operations] = await Promise.all([peopleOf(viewer), operationsFor(viewer)]);
  const shown = lines.slice(0, PAGE_LENGTH);
  const last = shown.at(-1);
  const chosen = Object.fromEntries(
    Object.entries({ kind: search.kind, person: search.person, operation: search.operation }).filter(([, value]) => value),
  ) as Record<string, string>;
  const newest = `/settings/audit?${new URLSearchParams(chosen)}`;
  return (
    <Page>
      <PageHeader title="Audit trail" />
      <AuditFilter
        chosen={search}
        people={people.map(({ id, name }) => ({ id, name }))}
        operations={operations.map(({ id, name }) => ({ id, name }))}
      />
      {shown.length === 0 ? (
        <EmptyState title="Nothing here">No entry fits this choice. Choose wider.</EmptyState>
      ) : (
        <AuditTable lines={shown} />
      )}
      <div className="mt-4 flex gap-2">
        {search.before ? <LinkButton href={newest}>Newest</LinkButton> : null}
        {last && lines.length > PAGE_LENGTH ? (
          <LinkButton href={`/settings/audit?${new URLSearchParams({ ...chosen, before: cursorOf(last) })}`}>Older</LinkButton>
        ) : null}
      </div>
    </Page>
  );
}
