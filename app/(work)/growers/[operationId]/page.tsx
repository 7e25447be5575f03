import type { Metadata } from 'next';
import { invitePerson } from '@/features/accounts/actions';
import { InviteForm } from '@/features/accounts/components/invite-form';
import { peopleOf } from '@/features/accounts/queries';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import {
  addFarm,
  archiveOperation,
  assignPerson,
  changeOperation,
  renameFarm,
  restoreOperation,
  unassignPerson,
} from '@/features/growers/actions';
import { AssignForm } from '@/features/growers/components/assign-form';
import { AddFarmForm, RenameFarmForm } from '@/features/growers/components/farm-forms';
import { OperationForm } from '@/features/growers/components/operation-form';
import { PeopleList } from '@/features/growers/components/people-list';
import { StepList } from '@/features/growers/components/steps';
import { farmsOf, operationOf, progressOfOperation } from '@/features/growers/queries';
import { nextThing, stepsOf } from '@/features/growers/steps';
import { formatMoment } from '@/lib/dates';
import { formatAcres } from '@/lib/format';
import { found } from '@/lib/found';
import { LinkButton } from '@/lib/ui/button';
import { OneButtonForm } from '@/lib/ui/one-button-form';
import { Figure, Notice, Page, PageHeader, Panel } from '@/lib/ui/page';

interface Props {
  params: Promise<{ operationId: string }>;
}

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const viewer = await requireViewer();
  return { title: (await found(operationOf(viewer, (await params).operationId))).name };
}

/** One operation: how far it is, its people, its farms. */
export default async function GrowerPage({ params }: Props) {
  const viewer = await requireViewer();
  const { operationId } = await params;
  const operation = await found(progressOfOperation(viewer, operationId));
  const [farms, people] = await Promise.all([farmsOf(viewer, operationId), peopleOf(viewer)]);
  const mayAssign = may(viewer, 'operation', 'assign');
  const here = new Set([...operation.growers, ...operation.reps].map((one) => one.id));
  const assignable = people.filter((one) => one.role !== 'manager' && !one.disabled && !here.has(one.id));
  return (
    <Page>
      <PageHeader
        trail={[
          { label: 'Growers', href: '/growers' },
          { label: [operation.county, operation.state].filter(Boolean).join(', ') || 'Operation' },
        ]}
        title={operation.name}
        aside={
          <div className="flex gap-8 max-sm:w-full">
            <Figure
              value={formatAcres(operation.areaAcres)}
              label={`acres, ${operation.fieldCount} ${operation.fieldCount === 1 ? 'field' : 'fields'}`}
            />
            <Figure value={farms.length} label={farms.length === 1 ? 'farm' : 'farms'} />
          </div>
        }
        actions={
          <>
            <LinkButton href={`/fields?operation=${operationId}`}>Fields</LinkButton>
            <LinkButton href={`/plans/${operationId}/${viewer.season}`}>{viewer.season} plan</LinkButton>
          </>
        }
      />
      {operation.archived ? (
        <Notice kind="attention" title="Archived" className="mb-5">
          <p className="mb-2">It is in no list. Nothing of it is lost.</p>
          <OneButtonForm
            action={restoreOperation}
            label="Bring it back"
            describes={`Bring ${operation.name} back`}
            hidden={{ operationId }}
          />
        </Notice>
      ) : null}
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_24rem]">
        <div className="grid gap-6">
          <section aria-labelledby="how-far">
            <h2 id="how-far" className="mb-3 text-xl">
              How far the {viewer.season} season is
            </h2>
            <StepList steps={stepsOf(operation, viewer.season)} nextHref={nextThing(operation, viewer.season)?.href ?? null} />
            {operation.lastActivityAt === null ? null : (
              <p className="mt-2 text-mute">Last change {formatMoment(operation.lastActivityAt)}.</p>
            )}
          </section>
          <section aria-labelledby="farms">
            <h2 id="farms" className="mb-3 text-xl">
              Farms
            </h2>
            <ul className="border-ink border-t-2 bg-white">
              {farms.length === 0 ? (
                <li className="border-line border-b px-3 py-3 text-mute">No farm yet. Fields may also stand without one.</li>
              ) : null}
              {farms.map((farm) => (
                <li key={farm.id} className="border-line border-b px-3">
                  <details>
                    <summary className="flex min-h-11 cursor-pointer items-center justify-between gap-3">
                      <span className="font-semibold">{farm.name}</span>
                      <span className="underline underline-offset-4">Rename</span>
                    </summary>
                    <div className="max-w-md pb-4">
                      <RenameFarmForm action={renameFarm} operationId={operationId} farm={farm} />
                    </div>
                  </details>
                </li>
              ))}
            </ul>
            <div className="mt-4 max-w-md">
              <AddFarmForm action={addFarm} operationId={operationId} />
            </div>
          </section>
        </div>
        <div className="grid gap-6">
          <Panel aria-label="People">
            <h2 className="mb-3 text-xl">People</h2>
            <div className="grid gap-4">
              <PeopleList
                title="Growers"
                people={operation.growers}
                none={operation.invitedGrowers > 0 ? 'Invited, has not opened the account yet.' : 'Nobody yet.'}
                operationId={operationId}
                unassign={mayAssign ? unassignPerson : null}
              />
              <PeopleList
                title="Reps"
                people={operation.reps}
                none="Nobody yet. Managers see the operation anyway."
                operationId={operationId}
                unassign={mayAssign ? unassignPerson : null}
              />
              {mayAssign && assignable.length > 0 ? (
                <AssignForm action={assignPerson} people={assignable} operations={[]} operationId={operationId} />
              ) : null}
            </div>
          </Panel>
          <Panel aria-label="Invite a grower">
            <h2 id="invite" className="mb-3 scroll-mt-20 text-xl">
              Invite a grower
            </h2>
            <InviteForm action={invitePerson} roles={['grower']} operations={[]} operationId={operationId} />
          </Panel>
          <Panel aria-label="Particulars">
            <h2 className="mb-3 text-xl">Particulars</h2>
            <OperationForm action={changeOperation} operation={operation} />
            {operation.archived ? null : (
              <details className="mt-5 border-line border-t pt-2">
                <summary className="flex min-h-11 cursor-pointer items-center underline underline-offset-4">
                  Archive this operation
                </summary>
                <p className="mb-3">
                  It leaves every list, its people included. Fields, soil tests and plans stay and can be brought back.
                </p>
                <OneButtonForm
                  action={archiveOperation}
                  label="Archive"
                  describes={`Archive ${operation.name}`}
                  hidden={{ operationId }}
                  kind="danger"
                />
              </details>
            )}
          </Panel>
        </div>
      </div>
    </Page>
  );
}
