import type { Metadata } from 'next';
import { requireViewer } from '@/features/accounts/viewer';
import { chosenOperation, operationsFor } from '@/features/growers/queries';
import { scoreOperation } from '@/features/placement/actions';
import { FieldsBoard } from '@/features/placement/components/fields-board';
import { ScoreButton } from '@/features/placement/components/score-button';
import { scoredFieldsOf } from '@/features/placement/queries';
import { fieldLine } from '@/features/placement/view';
import { formatAcres } from '@/lib/format';
import { found } from '@/lib/found';
import { configuredTiles } from '@/lib/map/tiles';
import { LinkButton } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { OperationSwitch } from '@/lib/ui/operation-switch';
import { Caution, EmptyState, Figure, Notice, Page, PageHeader } from '@/lib/ui/page';

export const metadata: Metadata = { title: 'Fields' };

export default async function FieldsPage({ searchParams }: { searchParams: Promise<{ operation?: string }> }) {
  const viewer = await requireViewer();
  const operation = await found(chosenOperation(viewer, (await searchParams).operation));
  if (!operation) {
    return (
      <Page narrow>
        <PageHeader title="Fields" />
        <EmptyState
          title="No operation yet"
          action={viewer.role === 'grower' ? undefined : <LinkButton href="/growers">Growers</LinkButton>}
        >
          {viewer.role === 'grower'
            ? 'Your rep adds you to an operation; then its fields stand here.'
            : 'Make an operation and invite its grower.'}
        </EmptyState>
      </Page>
    );
  }
  const [operations, scored] = await Promise.all([operationsFor(viewer), scoredFieldsOf(viewer, operation.id, viewer.season)]);
  const lines = scored.map(fieldLine);
  const staleCount = lines.filter((line) => line.stale).length;
  const unscoredCount = lines.filter((line) => !line.scored).length;
  const scoredLines = lines.filter((line) => line.expected !== null);
  const acres = lines.reduce((sum, line) => sum + line.areaAcres, 0);
  const scoredAcres = scoredLines.reduce((sum, line) => sum + line.areaAcres, 0);
  const bushels =
    scoredLines.reduce((sum, line) => sum + line.areaAcres * (line.expected as number), 0) / Math.max(scoredAcres, 1e-9);
  return (
    <Page>
      <PageHeader
        trail={[{ label: operation.name }]}
        title="Fields"
        aside={
          <div className="flex gap-8 max-sm:w-full">
            <Figure value={formatAcres(acres)} label={`acres, ${lines.length} ${lines.length === 1 ? 'field' : 'fields'}`} />
            {scoredLines.length > 0 ? <Figure value={bushels.toFixed(1)} label="bu/ac with the best picks" /> : null}
          </div>
        }
        actions={
          <>
            <OperationSwitch
              operations={operations.map(({ id, name }) => ({ id, name }))}
              chosenId={operation.id}
              path="/fields"
            />
            <LinkButton href={`/fields/import?operation=${operation.id}`}>Bring in boundaries</LinkButton>
            <LinkButton href={`/soil/import?operation=${operation.id}`}>Bring in soil tests</LinkButton>
          </>
        }
      />
      {lines.length === 0 ? (
        <EmptyState
          title="No fields yet"
          action={
            <LinkButton kind="action" href={`/fields/import?operation=${operation.id}`}>
              Bring in boundaries
            </LinkButton>
          }
        >
          Bring a zipped shapefile, GeoJSON or KML of the field outlines. You see each one with its acres before anything is kept.
        </EmptyState>
      ) : (
        <>
          {staleCount + unscoredCount > 0 ? (
            <Notice kind="attention" className="mb-4">
              <div className="flex flex-wrap items-center gap-4">
                <p>{staleWords(unscoredCount, staleCount)}</p>
                <ScoreButton
                  operationId={operation.id}
                  action={scoreOperation}
                  label={unscoredCount === lines.length ? 'Score the fields' : 'Score again'}
                />
              </div>
            </Notice>
          ) : null}
          <FieldsBoard lines={lines} tiles={configuredTiles()} />
          <Caution className="mt-4">
            {CAUTIONS.yield} {CAUTIONS.soil} {CAUTIONS.herbicide}
          </Caution>
        </>
      )}
    </Page>
  );
}

function staleWords(unscoredCount: number, staleCount: number): string {
  const parts = [
    unscoredCount > 0 ? `${unscoredCount} ${unscoredCount === 1 ? 'field is' : 'fields are'} not scored yet.` : '',
    staleCount > 0
      ? `${staleCount} ${staleCount === 1 ? 'score is' : 'scores are'} stale: facts, soil tests, the line-up or the rules changed since.`
      : '',
  ];
  return parts.filter(Boolean).join(' ');
}
