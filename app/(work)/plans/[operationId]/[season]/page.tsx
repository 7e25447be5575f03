import { notFound } from 'next/navigation';
import { cache } from 'react';
import { may } from '@/features/accounts/rights';
import { requireViewer } from '@/features/accounts/viewer';
import { scoreOperation } from '@/features/placement/actions';
import { ScoreButton } from '@/features/placement/components/score-button';
import { scoresOf } from '@/features/placement/queries';
import {
  agreePlan,
  askPlanChange,
  commentOnPlan,
  editRow,
  fillPlan,
  makeSheetLink,
  proposePlan,
  reopenPlan,
  revokeSheetLink,
  takeOffRow,
  takeProposal,
  withdrawPlan,
} from '@/features/plans/actions';
import { CrewLinks } from '@/features/plans/components/crew-links';
import { ExportMenu } from '@/features/plans/components/export-menu';
import { PlanBoard } from '@/features/plans/components/plan-board';
import { PlanHistory } from '@/features/plans/components/plan-history';
import { PlanSteps } from '@/features/plans/components/plan-steps';
import { PlanWatch } from '@/features/plans/components/plan-watch';
import { SolverPanel } from '@/features/plans/components/solver-panel';
import { StateTag } from '@/features/plans/components/state-tag';
import { planOf, sheetLinksOf } from '@/features/plans/queries';
import { mayStep } from '@/features/plans/states';
import { formatMoment } from '@/lib/dates';
import { found } from '@/lib/found';
import { LinkButton } from '@/lib/ui/button';
import { CAUTIONS } from '@/lib/ui/cautions';
import { Caution, EmptyState, Notice, Page, PageHeader } from '@/lib/ui/page';

interface Props {
  params: Promise<{ operationId: string; season: string }>;
}

/** Read once a request, for the title and the page. */
const planFor = cache(async (operationId: string, season: string) => {
  const viewer = await requireViewer();
  if (!/^20\d\d$/.test(season)) notFound();
  return { viewer, view: await found(planOf(viewer, operationId, Number(season))) };
});

export async function generateMetadata({ params }: Props) {
  const { operationId, season } = await params;
  const { view } = await planFor(operationId, season);
  return { title: `${view.season} plan of ${view.operationName}` };
}

/** The plan of an operation: a row a field, from draft to agreed. */
export default async function PlanPage({ params }: Props) {
  const asked = await params;
  const { viewer, view } = await planFor(asked.operationId, asked.season);
  const { operationId, season } = view;
  const dealershipSide = may(viewer, 'supply', 'read');
  const placed = view.lines.filter((line) => line.variety).length;
  const editable = may(viewer, 'plan', 'change') && mayStep('edit', view.state, viewer.role);
  const scores = editable ? await scoresOf(viewer, operationId, season) : new Map();
  const stale = [...scores.values()].filter((score) => score.stale).length;
  const unscored = view.lines.filter((line) => line.caution === 'not scored yet').length;
  const shared = ['proposed', 'agreed', 'planted', 'harvested'].includes(view.state);
  return (
    <Page>
      <PageHeader
        trail={[{ label: 'Plans', href: '/plans' }, { label: view.operationName }]}
        title={`${season} planting plan`}
        aside={<StateTag state={view.state} />}
        actions={
          <div className="no-print flex flex-wrap gap-2">
            {editable && view.lines.length > 0 ? (
              <SolverPanel
                operationId={operationId}
                season={season}
                revision={view.revision}
                lines={view.lines.map(({ fieldId, fieldName, partName, variety, locked }) => ({
                  fieldId,
                  fieldName,
                  partName,
                  variety,
                  locked,
                }))}
                take={takeProposal}
              />
            ) : null}
            {placed > 0 ? <ExportMenu operationId={operationId} season={season} /> : null}
            <PlanSteps
              role={viewer.role}
              state={view.state}
              operationId={operationId}
              season={season}
              revision={view.revision}
              placed={placed}
              actions={{
                propose: proposePlan,
                withdraw: withdrawPlan,
                reopen: reopenPlan,
                agree: agreePlan,
                askChange: askPlanChange,
              }}
            />
          </div>
        }
      />
      <div className="flex flex-col gap-6">
        {editable ? null : <PlanWatch operationId={operationId} season={season} revision={view.revision} />}
        {view.signedName ? (
          <Notice kind="good">
            Agreed by {view.signedName}, {formatMoment(view.signedAt)}. The plan and its ledgers are frozen as agreed.
          </Notice>
        ) : null}
        {viewer.role === 'grower' && view.state === 'draft' && placed > 0 ? (
          <Notice>Your rep is still working on this plan. You will have mail when it is proposed.</Notice>
        ) : null}
        {editable && view.lines.length > 0 && (stale > 0 || unscored > 0) ? (
          <Notice kind="attention">
            {[
              ...(stale > 0 ? [`${stale} ${stale === 1 ? 'score is' : 'scores are'} stale`] : []),
              ...(unscored > 0 ? [`${unscored} ${unscored === 1 ? 'field is' : 'fields are'} not scored`] : []),
            ].join(', ')}
            . <ScoreButton operationId={operationId} action={scoreOperation} label="Score the fields" kind="plain" />
          </Notice>
        ) : null}
        {view.lines.length === 0 ? (
          <EmptyState
            title="No fields yet"
            action={
              <LinkButton href={`/fields/import?operation=${operationId}`} kind="action">
                Bring in fields
              </LinkButton>
            }
          >
            A plan has a row a field. Bring in the boundaries first.
          </EmptyState>
        ) : (
          <PlanBoard
            view={view}
            dealershipSide={dealershipSide}
            editable={editable}
            actions={{ editRow, takeOffRow, fillPlan }}
          />
        )}
        <Caution>
          {CAUTIONS.yield} {CAUTIONS.treatedSeed} {CAUTIONS.herbicide} Units are rounded up once per seed lot.
        </Caution>
        {shared && may(viewer, 'plan', 'share') ? (
          <CrewLinks
            links={await sheetLinksOf(viewer, operationId, season)}
            now={Date.now()}
            operationId={operationId}
            season={season}
            make={makeSheetLink}
            revoke={revokeSheetLink}
          />
        ) : null}
        <PlanHistory events={view.events} lines={view.lines} operationId={operationId} season={season} comment={commentOnPlan} />
      </div>
    </Page>
  );
}
