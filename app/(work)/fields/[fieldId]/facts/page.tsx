import type { Metadata } from 'next';
import { requireViewer } from '@/features/accounts/viewer';
import { archiveField, copyFacts, renameField, saveFacts } from '@/features/fields/actions';
import { CopyFacts } from '@/features/fields/components/copy-facts';
import { FactsForm } from '@/features/fields/components/facts-form';
import { FieldNameForm } from '@/features/fields/components/field-name-form';
import { factsOf, fieldOf, fieldsOf } from '@/features/fields/queries';
import { farmsOf, operationOf } from '@/features/growers/queries';
import { SoilHistory } from '@/features/soil/components/soil-history';
import { soilSummaryOf } from '@/features/soil/queries';
import { formatAcres } from '@/lib/format';
import { found } from '@/lib/found';
import { Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Facts of a field' };

export default async function FactsPage({ params }: { params: Promise<{ fieldId: string }> }) {
  const viewer = await requireViewer();
  const field = await found(fieldOf(viewer, (await params).fieldId));
  const [facts, all, operation, farms, soil] = await Promise.all([
    factsOf(viewer, field.id, viewer.season),
    fieldsOf(viewer, field.operationId),
    operationOf(viewer, field.operationId),
    farmsOf(viewer, field.operationId),
    soilSummaryOf(viewer, field.id),
  ]);
  return (
    <Page>
      <PageHeader
        trail={[
          { label: operation.name, href: `/fields?operation=${field.operationId}` },
          { label: field.name, href: `/fields/${field.id}` },
        ]}
        title={`Facts of ${field.name}, ${viewer.season}`}
        aside={
          <p className="text-mute">
            {formatAcres(field.areaAcres, 2)} ac. Leave empty what you do not know: it stays unknown and widens the range.
          </p>
        }
      />
      <FactsForm key={field.id} fieldId={field.id} season={viewer.season} facts={facts} save={saveFacts} />
      <div className="mt-8">
        <SoilHistory years={soil.years} />
      </div>
      <CopyFacts
        fieldId={field.id}
        season={viewer.season}
        facts={facts}
        others={all.filter((one) => one.id !== field.id).map(({ id, name, farmName }) => ({ id, name, farmName }))}
        copy={copyFacts}
      />
      <FieldNameForm
        field={{ id: field.id, name: field.name, farmName: field.farmName, operationId: field.operationId }}
        farmNames={farms.map((farm) => farm.name)}
        rename={renameField}
        archive={archiveField}
      />
    </Page>
  );
}
