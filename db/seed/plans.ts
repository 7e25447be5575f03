import { eq } from 'drizzle-orm';
import { database } from '@/db/client';
import { operations, people } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { viewerOfPerson } from '@/features/accounts/viewer-of-person';
import { scoreOperation } from '@/features/placement/changes/score';
import { fillFromPicks } from '@/features/plans/changes/rows';
import { agree, propose } from '@/features/plans/changes/steps';
import { planOf } from '@/features/plans/queries';
import type { Outcome } from '@/lib/errors';
import { DEMO_ACCOUNTS } from './accounts';
import { DEMO_OPERATIONS } from './operations';

type AccountKey = (typeof DEMO_ACCOUNTS)[number]['key'];

async function viewerOf(key: AccountKey): Promise<Viewer> {
  const account = DEMO_ACCOUNTS.find((one) => one.key === key) as (typeof DEMO_ACCOUNTS)[number];
  const [person] = await database().select({ id: people.id }).from(people).where(eq(people.email, account.email));
  const viewer = person ? await viewerOfPerson(person.id) : null;
  if (!viewer) throw new Error(`The demo has no ${account.email}.`);
  return viewer;
}

async function operationId(key: (typeof DEMO_OPERATIONS)[number]['key']): Promise<string> {
  const name = DEMO_OPERATIONS.find((one) => one.key === key)?.name as string;
  const [row] = await database().select({ id: operations.id }).from(operations).where(eq(operations.name, name));
  if (!row) throw new Error(`The demo has no operation ${name}.`);
  return row.id;
}

function must<Value>(outcome: Outcome<Value>): Value {
  if (!outcome.ok) throw new Error(`Seeding the plans: ${outcome.problems.map((problem) => problem.message).join(' ')}`);
  return outcome.value;
}

/**
 * Scores the demo's fields and makes its plans through the product's own doors: one agreed, one proposed, the third empty.
 */
export async function seedPlans(): Promise<void> {
  const steps = [
    { operation: 'berg', rep: 'rep2', grower: 'grower2', signedName: 'Tove Bergan' },
    { operation: 'teal', rep: 'rep', grower: 'grower', signedName: null },
  ] as const;
  for (const { operation, rep, grower, signedName } of steps) {
    const [repViewer, growerViewer, id] = [await viewerOf(rep), await viewerOf(grower), await operationId(operation)];
    const key = { operationId: id, season: repViewer.season };
    must(await scoreOperation(repViewer, key));
    must(await fillFromPicks(repViewer, key));
    const filled = await planOf(repViewer, id, key.season);
    must(
      await propose(repViewer, {
        ...key,
        revision: filled.revision,
        word: 'First picks within supply. Look at the wet ground with me.',
      }),
    );
    if (!signedName) continue;
    const proposed = await planOf(growerViewer, id, key.season);
    must(await agree(growerViewer, { ...key, revision: proposed.revision, signedName }));
  }
}
