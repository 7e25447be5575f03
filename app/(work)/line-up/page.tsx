import type { Metadata } from 'next';
import { Suspense } from 'react';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { LineUpTable } from '@/features/line-up/components/line-up-table';
import { lineUp } from '@/features/line-up/queries';
import { LinkButton } from '@/lib/ui/button';
import { EmptyState, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Line-up' };

export default async function LineUpPage() {
  const viewer = await requireViewer();
  const varieties = await lineUp(viewer, viewer.season);
  const keeps = may(viewer, 'variety', 'change');
  return (
    <Page>
      <PageHeader
        trail={[{ label: viewer.dealershipName }]}
        title={`${viewer.season} line-up`}
        actions={
          <>
            <LinkButton href="/api/v1/line-up?format=csv" download>
              CSV
            </LinkButton>
            <LinkButton href="/api/v1/line-up?format=xlsx" download>
              XLSX
            </LinkButton>
            {keeps ? <LinkButton href="/line-up/import">Bring in a file</LinkButton> : null}
            {keeps ? (
              <LinkButton kind="action" href="/line-up/new">
                Add a variety
              </LinkButton>
            ) : null}
          </>
        }
      />
      {varieties.length === 0 ? (
        <EmptyState
          title="No varieties yet"
          action={
            keeps ? (
              <>
                <LinkButton kind="action" href="/line-up/new">
                  Add a variety
                </LinkButton>
                <LinkButton href="/line-up/import">Bring in a file</LinkButton>
              </>
            ) : undefined
          }
        >
          {keeps
            ? 'Write them one by one, or bring in the sheet you keep them in.'
            : 'Your dealership has not published its line-up yet.'}
        </EmptyState>
      ) : (
        <Suspense>
          <LineUpTable varieties={varieties} seesSupply={may(viewer, 'supply', 'read')} />
        </Suspense>
      )}
    </Page>
  );
}
