import { Tag } from '@/lib/ui/page';
import type { PlanState } from '../states';

const KIND: Record<PlanState | 'not begun', 'plain' | 'good' | 'attention' | 'bloom'> = {
  'not begun': 'plain',
  draft: 'plain',
  proposed: 'bloom',
  'change asked': 'attention',
  agreed: 'good',
  planted: 'good',
  harvested: 'good',
};

/** The state of a plan as a word in a box. */
export function StateTag({ state }: { state: PlanState | 'not begun' }) {
  return <Tag kind={KIND[state]}>{state}</Tag>;
}
