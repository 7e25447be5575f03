import type { Metadata } from 'next';
import { requireViewer } from '@/features/accounts/viewer';
import { CompareChooser } from '@/features/placement/components/compare-chooser';
import { CompareTable } from '@/features/placement/components/compare-table';
import { WhyNotPanel } from '@/features/placement/components/why-not-panel';
import { rank } from '@/features/placement/engine/rank';
import { placementOf } from '@/features/placement/queries';
import { comparedIds } from '@/features/placement/view';
import { found } from '@/lib/found';
import { LinkButton } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { Caution, EmptyState, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Compare varieties' };

export default async function ComparePage({
  params,
  searchParams,
}: {
  params: Promise<{ fieldId: string }>;
  searchParams: Promise<{ varieties?: string }>;
}) {
  const viewer = await requireViewer();
  const { fieldId } = await params;
  const placement = await found(placementOf(viewer, fieldId, viewer.season));
  const { engine, varieties } = placement;
  const { field } = placement.inputs;
  // Today's inputs, so that both questions below are answered for the field as it stands now.
  const ranking = rank(engine.profile, varieties, engine.season, engine.rules);
  const ids = comparedIds((await searchParams).varieties, ranking);
  const picks = ids.flatMap((id) => ranking.picks.find((pick) => pick.varietyId === id) ?? []);
  const others = picks.filter((pick) => pick.varietyId !== ranking.picks[0]?.varietyId);
  return (
    <Page>
      <PageHeader
        trail={[
          { label: 'Fields', href: `/fields?operation=${field.operationId}` },
          { label: field.name, href: `/fields/${field.id}` },
        ]}
        title={`Compare on ${field.name}`}
        actions={<LinkButton href={`/fields/${field.id}`}>Back to the picks</LinkButton>}
      />
      {picks.length < 2 ? (
        <EmptyState title="Nothing to compare yet">Fewer than two varieties of the line-up fit this field.</EmptyState>
      ) : (
        <>
          <CompareChooser
            path={`/fields/${field.id}/compare`}
            chosen={ids}
            picks={ranking.picks.map(({ varietyId, code }) => ({ varietyId, code }))}
          />
          <CompareTable picks={picks} ranking={ranking} varieties={varieties} />
          <div className="mt-5 grid gap-4 lg:grid-cols-2">
            {others.map((pick) => (
              <WhyNotPanel key={pick.varietyId} pick={pick} ranking={ranking} engine={engine} varieties={varieties} />
            ))}
          </div>
          <Caution className="mt-4">{CAUTIONS.yield}</Caution>
        </>
      )}
    </Page>
  );
}
