import { formatAcres } from '@/lib/format';
import type { OperationProgress } from './model';

/** One step of the season's work for an operation: what is there, and the next thing to do while it is not done. */
export interface Step {
  key: 'grower' | 'fields' | 'soil' | 'facts' | 'picks' | 'plan';
  title: string;
  done: boolean;
  /** What is there, number first. */
  words: string;
  /** The next thing to do; `null` when there is none. */
  next: { label: string; href: string } | null;
}

const PLAN_NEXT: Record<string, string | null> = {
  draft: 'Finish the plan and propose it',
  proposed: 'Wait for the grower to agree',
  'change asked': 'Change the plan as asked',
  agreed: 'Export the planting plan',
  planted: 'Record the harvest',
  harvested: null,
};

/** `7 of 9 fields`. */
function share(count: number, total: number): string {
  return `${count} of ${total} ${total === 1 ? 'field' : 'fields'}`;
}

/** The steps from a new operation to an agreed plan, in order, for the season being planned. */
export function stepsOf(progress: OperationProgress, season: number): Step[] {
  const { id, fieldCount } = progress;
  const of = `operation=${id}`;
  const hasFields = fieldCount > 0;
  const people = progress.growers.length;
  return [
    {
      key: 'grower',
      title: 'Grower',
      done: people > 0,
      words:
        people > 0
          ? progress.growers.map((one) => one.name).join(', ')
          : progress.invitedGrowers > 0
            ? 'Invited, has not opened the account yet'
            : 'Nobody yet',
      next: people > 0 ? null : { label: 'Invite the grower', href: `/growers/${id}#invite` },
    },
    {
      key: 'fields',
      title: 'Fields',
      done: hasFields,
      words: hasFields
        ? `${fieldCount} ${fieldCount === 1 ? 'field' : 'fields'}, ${formatAcres(progress.areaAcres)} ac`
        : 'No boundaries yet',
      next: hasFields ? null : { label: 'Bring in field boundaries', href: `/fields/import?${of}` },
    },
    {
      key: 'soil',
      title: 'Soil tests',
      done: hasFields && progress.fieldsWithSoilTests === fieldCount,
      words: hasFields ? share(progress.fieldsWithSoilTests, fieldCount) : 'After the fields',
      next:
        hasFields && progress.fieldsWithSoilTests < fieldCount
          ? { label: 'Bring in soil tests', href: `/soil/import?${of}` }
          : null,
    },
    {
      key: 'facts',
      title: 'How it is farmed',
      done: hasFields && progress.fieldsWithFacts === fieldCount,
      words: hasFields ? share(progress.fieldsWithFacts, fieldCount) : 'After the fields',
      next:
        hasFields && progress.fieldsWithFacts < fieldCount
          ? { label: 'Say how the fields are farmed', href: `/fields?${of}` }
          : null,
    },
    {
      key: 'picks',
      title: 'Picks',
      done: hasFields && progress.fieldsScored === fieldCount,
      words: hasFields ? `${share(progress.fieldsScored, fieldCount)} scored` : 'After the fields',
      next: hasFields && progress.fieldsScored < fieldCount ? { label: 'Score the fields', href: `/fields?${of}` } : null,
    },
    {
      key: 'plan',
      title: 'Plan',
      done: ['agreed', 'planted', 'harvested'].includes(progress.planState ?? ''),
      words: progress.planState ?? 'None yet',
      next: planNext(progress, season),
    },
  ];
}

function planNext(progress: OperationProgress, season: number): Step['next'] {
  if (progress.fieldsScored === 0 && progress.planState === null) return null;
  const label = progress.planState === null ? 'Put picks on the plan' : (PLAN_NEXT[progress.planState] ?? null);
  return label === null ? null : { label, href: `/plans/${progress.id}/${season}` };
}

/**
 * The first thing to do; `null` when the season's work is done. Soil tests and facts that are there for some fields do not
 * hold up the picks and the plan: what is unknown widens the band. They are named when nothing else is left.
 */
export function nextThing(progress: OperationProgress, season: number): { label: string; href: string } | null {
  const open = stepsOf(progress, season).filter((step) => step.next !== null);
  const begun = (step: Step) =>
    (step.key === 'soil' && progress.fieldsWithSoilTests > 0) || (step.key === 'facts' && progress.fieldsWithFacts > 0);
  return (open.find((step) => !begun(step)) ?? open[0])?.next ?? null;
}
