import type { Metadata } from 'next';
import { AuditTable } from '@/features/accounts/components/audit-table';
import { auditTrail } from '@/features/accounts/queries';
import { requireViewer } from '@/features/accounts/viewer';
import { fieldsOf } from '@/features/fields/queries';
import { operationsFor } from '@/features/growers/queries';
import { setRules } from '@/features/placement/actions';
import { RulesBoard } from '@/features/placement/components/rules-board';
import { SampleFieldChooser } from '@/features/placement/components/sample-field-chooser';
import { placementOf, rulesOf } from '@/features/placement/queries';
import { found } from '@/lib/found';
import { CAUTIONS } from '@/lib/ui/cautions';
import { Caution, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Placement rules' };

export default async function RulesPage({ searchParams }: { searchParams: Promise<{ field?: string }> }) {
  const viewer = await requireViewer();
  const values = await found(rulesOf(viewer));
  const operations = await operationsFor(viewer);
  const fields = (
    await Promise.all(
      operations.map(async (operation) =>
        (await fieldsOf(viewer, operation.id)).map(({ id, name }) => ({ id, name, operationName: operation.name })),
      ),
    )
  ).flat();
  const asked = (await searchParams).field;
  const sampleId = (fields.find((field) => field.id === asked) ?? fields[0])?.id;
  const [placement, history] = await Promise.all([
    sampleId ? placementOf(viewer, sampleId, viewer.season) : null,
    auditTrail(viewer, { verbs: ['coefficient.'], limit: 20 }),
  ]);
  return (
    <Page>
      <PageHeader title="Placement rules" />
      <p className="mb-4 max-w-prose">
        Planning coefficients that no publication fixes for every dealership. Curves that were read from a publication are not
        here: they stand in the engine with their source.
      </p>
      {fields.length > 0 && sampleId ? <SampleFieldChooser fields={fields} chosenId={sampleId} /> : null}
      <RulesBoard
        key={sampleId}
        values={values}
        sample={
          placement
            ? {
                id: placement.inputs.field.id,
                name: placement.inputs.field.name,
                engine: placement.engine,
                varieties: placement.varieties,
              }
            : null
        }
        save={setRules}
      />
      <section aria-labelledby="history" className="mt-8">
        <h2 id="history" className="mb-2 text-lg">
          Who changed what
        </h2>
        {history.length === 0 ? (
          <p className="text-mute">Nothing was changed yet: every value stands as usual.</p>
        ) : (
          <AuditTable lines={history} />
        )}
      </section>
      <Caution className="mt-4">{CAUTIONS.yield}</Caution>
    </Page>
  );
}
