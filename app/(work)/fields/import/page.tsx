import type { Metadata } from 'next';
import { requireViewer } from '@/features/accounts/viewer';
import { discardBoundaries, inspectBoundaries, keepBoundaries, undoBoundaries } from '@/features/fields/actions';
import { ImportBoundaries } from '@/features/fields/components/import-boundaries';
import { fieldsOf } from '@/features/fields/queries';
import { OFFERED_CRS } from '@/features/fields/readers/crs';
import { chosenOperation, farmsOf } from '@/features/growers/queries';
import { ImportHistory } from '@/features/imports/components/import-history';
import { uploadsOf } from '@/features/imports/machine';
import { found } from '@/lib/found';
import { EmptyState, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Bring in boundaries' };

export default async function ImportBoundariesPage({ searchParams }: { searchParams: Promise<{ operation?: string }> }) {
  const viewer = await requireViewer();
  const operation = await found(chosenOperation(viewer, (await searchParams).operation));
  if (!operation) {
    return (
      <Page narrow>
        <PageHeader title="Bring in boundaries" />
        <EmptyState title="No operation yet">Fields belong to an operation. Your rep makes one and invites you to it.</EmptyState>
      </Page>
    );
  }
  const [known, farms, uploads] = await Promise.all([
    fieldsOf(viewer, operation.id),
    farmsOf(viewer, operation.id),
    uploadsOf(viewer, ['boundaries'], operation.id),
  ]);
  const open = uploads.find((one) => one.state === 'checked' || one.state === 'received');
  return (
    <Page>
      <PageHeader
        trail={[{ label: operation.name, href: `/fields?operation=${operation.id}` }, { label: 'Fields' }]}
        title="Bring in boundaries"
      />
      <ImportBoundaries
        operation={{ id: operation.id, name: operation.name }}
        knownFields={known.map(({ id, name }) => ({ id, name }))}
        farmNames={farms.map((farm) => farm.name)}
        actions={{ inspect: inspectBoundaries, keep: keepBoundaries, undo: undoBoundaries, discard: discardBoundaries }}
        resume={open ? { uploadId: open.id, fileName: open.fileNames.join(', ') } : null}
        crsChoices={OFFERED_CRS}
      />
      <ImportHistory uploads={uploads} undo={undoBoundaries} />
    </Page>
  );
}
