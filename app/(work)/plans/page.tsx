import Link from 'next/link';
import { requireViewer } from '@/features/accounts/viewer';
import { StateTag } from '@/features/plans/components/state-tag';
import { plansOf } from '@/features/plans/queries';
import { formatMoment } from '@/lib/dates';
import { formatAcres } from '@/lib/format';
import { EmptyState, Page, PageHeader } from '@/lib/ui/page';
import { Table, Td, Th } from '@/lib/ui/table';

export const metadata = { title: 'Plans' };

/** Every operation in reach and how far its plan is. */
export default async function PlansPage() {
  const viewer = await requireViewer();
  const plans = await plansOf(viewer, viewer.season);
  return (
    <Page>
      <PageHeader title={`${viewer.season} plans`} />
      {plans.length === 0 ? (
        <EmptyState title="No operation yet">Plans are made for operations. Growers are added on the Growers page.</EmptyState>
      ) : (
        <Table caption={`Plans of the ${viewer.season} season`}>
          <thead>
            <tr>
              <Th>Operation</Th>
              <Th>State</Th>
              <Th numeric>Fields placed</Th>
              <Th numeric className="max-sm:hidden">
                Acres placed
              </Th>
              <Th className="max-lg:hidden">Last change</Th>
              <Th className="max-lg:hidden">Signed</Th>
            </tr>
          </thead>
          <tbody>
            {plans.map((plan) => (
              <tr key={plan.operationId} className="relative hover:bg-hull/60">
                <Td>
                  <Link
                    href={`/plans/${plan.operationId}/${viewer.season}`}
                    className="font-semibold underline decoration-line underline-offset-4 after:absolute after:inset-0"
                  >
                    {plan.operationName}
                  </Link>
                  {plan.county ? <span className="block text-mute">{plan.county}</span> : null}
                </Td>
                <Td>
                  <StateTag state={plan.state} />
                </Td>
                <Td numeric>
                  {plan.fieldsPlaced} of {plan.fields}
                </Td>
                <Td numeric className="max-sm:hidden">
                  {formatAcres(plan.acresPlaced)} of {formatAcres(plan.acres)}
                </Td>
                <Td className="max-lg:hidden">{formatMoment(plan.updatedAt)}</Td>
                <Td className="max-lg:hidden">{plan.signedName ?? '—'}</Td>
              </tr>
            ))}
          </tbody>
        </Table>
      )}
    </Page>
  );
}
