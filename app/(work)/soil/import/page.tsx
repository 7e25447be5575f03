import type { Metadata } from 'next';
import Link from 'next/link';
import { requireViewer } from '@/features/accounts/viewer';
import { fieldsOf } from '@/features/fields/queries';
import { chosenOperation } from '@/features/growers/queries';
import { ImportHistory } from '@/features/imports/components/import-history';
import { uploadsOf } from '@/features/imports/machine';
import {
  discardSoilImport,
  inspectSoilTests,
  inspectSurvey,
  keepSoilTests,
  keepSurvey,
  undoSoilImport,
} from '@/features/soil/actions';
import { ImportSurvey } from '@/features/soil/components/import-survey';
import { ImportTests } from '@/features/soil/components/import-tests';
import { found } from '@/lib/found';
import { LinkButton } from '@/lib/ui/button';
import { EmptyState, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Bring in soil' };

type Search = Promise<{ operation?: string; kind?: string }>;

export default async function ImportSoilPage({ searchParams }: { searchParams: Search }) {
  const viewer = await requireViewer();
  const { operation: requested, kind } = await searchParams;
  const operation = await found(chosenOperation(viewer, requested));
  if (!operation) {
    return (
      <Page narrow>
        <PageHeader title="Bring in soil" />
        <EmptyState title="No operation yet">
          Soil belongs to an operation’s fields. Your rep makes one and invites you.
        </EmptyState>
      </Page>
    );
  }
  const isSurvey = kind === 'survey';
  const [fields, uploads] = await Promise.all([
    fieldsOf(viewer, operation.id),
    uploadsOf(viewer, ['soil-tests', 'soil-survey'], operation.id),
  ]);
  const shapes = fields.map(({ id, name, boundary }) => ({ id, name, boundary }));
  const open = uploads.find(
    (one) => one.kind === (isSurvey ? 'soil-survey' : 'soil-tests') && (one.state === 'checked' || one.state === 'received'),
  );
  const resume = open ? { uploadId: open.id, fileName: open.fileNames.join(', ') } : null;
  const kinds = [
    { label: 'Soil tests', href: `/soil/import?operation=${operation.id}`, current: !isSurvey },
    { label: 'Soil survey', href: `/soil/import?operation=${operation.id}&kind=survey`, current: isSurvey },
  ];
  return (
    <Page>
      <PageHeader
        trail={[{ label: operation.name, href: `/fields?operation=${operation.id}` }, { label: 'Soil' }]}
        title={isSurvey ? 'Bring in a soil survey' : 'Bring in soil tests'}
      />
      <nav aria-label="What to bring in" className="mb-5 flex border-line border-b">
        {kinds.map((one) => (
          <Link
            key={one.label}
            href={one.href}
            aria-current={one.current ? 'page' : undefined}
            className={`flex min-h-11 items-center border-b-4 px-4 font-semibold ${one.current ? 'border-bloom' : 'border-transparent text-mute'}`}
          >
            {one.label}
          </Link>
        ))}
      </nav>
      {fields.length === 0 ? (
        <EmptyState
          title="Fields first"
          action={
            <LinkButton kind="action" href={`/fields/import?operation=${operation.id}`}>
              Bring in boundaries
            </LinkButton>
          }
        >
          Soil is given to the field it lies in, so the boundaries come first.
        </EmptyState>
      ) : isSurvey ? (
        <ImportSurvey
          key="survey"
          operationId={operation.id}
          fields={shapes}
          actions={{ inspect: inspectSurvey, keep: keepSurvey, undo: undoSoilImport, discard: discardSoilImport }}
          resume={resume}
        />
      ) : (
        <ImportTests
          key="tests"
          operationId={operation.id}
          fields={shapes}
          actions={{ inspect: inspectSoilTests, keep: keepSoilTests, undo: undoSoilImport, discard: discardSoilImport }}
          resume={resume}
        />
      )}
      <ImportHistory uploads={uploads} undo={undoSoilImport} />
    </Page>
  );
}
