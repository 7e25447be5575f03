import type { Metadata } from 'next';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { fieldOf } from '@/features/fields/queries';
import { operationOf } from '@/features/growers/queries';
import { scoreOperation } from '@/features/placement/actions';
import { FieldHeader } from '@/features/placement/components/field-header';
import { FieldView } from '@/features/placement/components/field-view';
import { placementOf, scoredFieldsOf } from '@/features/placement/queries';
import { fieldLine, layerOf } from '@/features/placement/view';
import { putPickOnPlan } from '@/features/plans/actions';
import { planOf } from '@/features/plans/queries';
import { found } from '@/lib/found';
import { configuredTiles } from '@/lib/map/tiles';

interface FieldPageProps {
  params: Promise<{ fieldId: string }>;
  searchParams: Promise<{ layer?: string }>;
}

export async function generateMetadata({ params }: FieldPageProps): Promise<Metadata> {
  const viewer = await requireViewer();
  return { title: (await found(fieldOf(viewer, (await params).fieldId))).name };
}

export default async function FieldPage({ params, searchParams }: FieldPageProps) {
  const viewer = await requireViewer();
  const { fieldId } = await params;
  const { layer } = await searchParams;
  const placement = await found(placementOf(viewer, fieldId, viewer.season));
  const { field, facts } = placement.inputs;
  const [operation, scored, plan] = await Promise.all([
    operationOf(viewer, field.operationId),
    scoredFieldsOf(viewer, field.operationId, viewer.season),
    planOf(viewer, field.operationId, viewer.season),
  ]);
  return (
    <FieldView
      key={field.id}
      field={field}
      header={<FieldHeader field={field} facts={facts} profile={placement.engine.profile} operationName={operation.name} />}
      profile={placement.engine.profile}
      season={placement.engine.season}
      rules={placement.engine.rules}
      varieties={placement.varieties}
      stored={placement.score?.ranking ?? null}
      stale={placement.score?.stale ?? false}
      neighbours={scored.map(fieldLine).map((line) => ({
        id: line.id,
        name: line.name,
        boundary: line.geometry,
        areaAcres: line.areaAcres,
        pickCode: line.pickCode,
        expected: line.expected,
      }))}
      surface={placement.surface}
      samples={placement.samples}
      mapUnits={placement.mapUnits}
      statedDrainage={facts.drainage}
      layer={layerOf(layer)}
      tiles={configuredTiles()}
      planCode={plan.lines.find((line) => line.fieldId === field.id)?.variety?.code ?? null}
      putOnPlan={
        may(viewer, 'plan', 'change')
          ? putPickOnPlan.bind(null, { operationId: field.operationId, season: viewer.season, revision: plan.revision })
          : null
      }
      score={scoreOperation}
    />
  );
}
