import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { ImportHistory } from '@/features/imports/components/import-history';
import { uploadsOf } from '@/features/imports/machine';
import { discardLineUp, inspectLineUp, keepLineUp, undoLineUp } from '@/features/line-up/actions';
import { ImportLineUp } from '@/features/line-up/components/import-line-up';
import { Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Bring in a line-up' };

export default async function ImportLineUpPage() {
  const viewer = await requireViewer();
  if (!may(viewer, 'variety', 'change')) notFound();
  const uploads = await uploadsOf(viewer, ['line-up'], null);
  return (
    <Page>
      <PageHeader trail={[{ label: 'Line-up', href: '/line-up' }]} title="Bring in a line-up" />
      <ImportLineUp actions={{ inspect: inspectLineUp, keep: keepLineUp, discard: discardLineUp }} />
      <ImportHistory uploads={uploads} undo={undoLineUp} />
    </Page>
  );
}
