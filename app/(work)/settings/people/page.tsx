import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { disablePerson, enablePerson, invitePerson, withdrawInvitation } from '@/features/accounts/actions';
import { InvitationsTable } from '@/features/accounts/components/invitations-table';
import { InviteForm } from '@/features/accounts/components/invite-form';
import { PeopleTable } from '@/features/accounts/components/people-table';
import { openInvitationsOf, peopleOf } from '@/features/accounts/queries';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { assignPerson } from '@/features/growers/actions';
import { AssignForm } from '@/features/growers/components/assign-form';
import { operationsFor } from '@/features/growers/queries';
import { Page, PageHeader, Panel } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'People' };

/** Who is here, who is invited, who serves whom. */
export default async function PeoplePage() {
  const viewer = await requireViewer();
  if (!may(viewer, 'person', 'read')) notFound();
  const [people, invitations, operations] = await Promise.all([
    peopleOf(viewer),
    openInvitationsOf(viewer),
    operationsFor(viewer),
  ]);
  const isManager = may(viewer, 'person', 'disable');
  const assignable = people.filter((person) => person.role !== 'manager' && !person.disabled);
  return (
    <Page>
      <PageHeader title="People" />
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_24rem]">
        <div className="grid gap-6">
          <PeopleTable
            people={people}
            ownId={viewer.personId}
            switches={isManager ? { disable: disablePerson, enable: enablePerson } : null}
          />
          {invitations.length > 0 ? (
            <section aria-labelledby="invited">
              <h2 id="invited" className="mb-3 text-xl">
                Open invitations
              </h2>
              <InvitationsTable invitations={invitations} withdraw={withdrawInvitation} />
            </section>
          ) : null}
        </div>
        <div className="grid gap-6">
          <Panel aria-label="Invite a person">
            <h2 className="mb-3 text-xl">Invite a person</h2>
            <InviteForm
              action={invitePerson}
              roles={isManager ? ['grower', 'rep', 'manager'] : ['grower']}
              operations={operations.map(({ id, name }) => ({ id, name }))}
            />
          </Panel>
          {isManager && operations.length > 0 && assignable.length > 0 ? (
            <Panel aria-label="Assign to an operation">
              <h2 className="mb-3 text-xl">Who serves whom</h2>
              <AssignForm action={assignPerson} people={assignable} operations={operations} />
            </Panel>
          ) : null}
        </div>
      </div>
    </Page>
  );
}
