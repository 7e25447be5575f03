import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { createVariety } from '@/features/line-up/actions';
import { VarietyForm } from '@/features/line-up/components/variety-form';
import { Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Add a variety' };

export default async function NewVarietyPage() {
  const viewer = await requireViewer();
  if (!may(viewer, 'variety', 'change')) notFound();
  return (
    <Page>
      <PageHeader trail={[{ label: 'Line-up', href: '/line-up' }]} title={`Add a variety to ${viewer.season}`} />
      <VarietyForm variety={null} save={createVariety} />
    </Page>
  );
}
