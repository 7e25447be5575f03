import type { Metadata } from 'next';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { archiveLot, archiveVariety, saveLot, setPublished, updateVariety } from '@/features/line-up/actions';
import { Lots } from '@/features/line-up/components/lots';
import { SeedTag } from '@/features/line-up/components/seed-tag';
import { VarietyForm } from '@/features/line-up/components/variety-form';
import { VarietySteps } from '@/features/line-up/components/variety-steps';
import { lotsOf, varietyOf } from '@/features/line-up/queries';
import { found } from '@/lib/found';
import { CAUTIONS } from '@/lib/ui/cautions';
import { Caution, Page, PageHeader, Tag } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Variety' };

export default async function VarietyPage({ params }: { params: Promise<{ varietyId: string }> }) {
  const viewer = await requireViewer();
  const { varietyId } = await params;
  const [variety, lots] = await found(Promise.all([varietyOf(viewer, varietyId), lotsOf(viewer, varietyId)]));
  const keeps = may(viewer, 'variety', 'change');
  return (
    <Page>
      <PageHeader
        trail={[{ label: 'Line-up', href: '/line-up' }]}
        title={variety.code}
        aside={
          <p className="flex flex-wrap gap-2">
            <Tag kind={variety.supplyWord === 'available' ? 'good' : variety.supplyWord === 'limited' ? 'attention' : 'error'}>
              {variety.supplyWord}
            </Tag>
            <Tag>{variety.release} release</Tag>
            {variety.published ? null : <Tag kind="attention">draft: growers do not see it</Tag>}
          </p>
        }
        actions={keeps ? <VarietySteps variety={variety} setPublished={setPublished} archive={archiveVariety} /> : undefined}
      />
      <div className="grid items-start gap-7 lg:grid-cols-[minmax(0,25rem)_minmax(0,1fr)]">
        <SeedTag variety={variety} />
        <div className="flex flex-col gap-7">
          <section aria-labelledby="lots">
            <h2 id="lots" className="mb-3 text-xl">
              Seed lots
            </h2>
            <Lots
              varietyId={variety.id}
              lots={lots}
              actions={may(viewer, 'supply', 'change') ? { save: saveLot, archive: archiveLot } : null}
            />
            <Caution className="mt-2">{CAUTIONS.treatedSeed}</Caution>
          </section>
          {variety.note ? <p>{variety.note}</p> : null}
          {keeps ? (
            <section aria-labelledby="traits">
              <h2 id="traits" className="mb-3 text-xl">
                Change the traits
              </h2>
              <VarietyForm key={variety.revision} variety={variety} save={updateVariety} />
            </section>
          ) : null}
        </div>
      </div>
    </Page>
  );
}
