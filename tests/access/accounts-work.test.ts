import { beforeAll, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { auditEntries } from '@/db/schema';
import { auditTrail } from '@/features/accounts/queries';
import { archiveOperation, changeOperation, createOperation, restoreOperation } from '@/features/growers/changes/operations';
import { operationsFor, progressOf } from '@/features/growers/queries';
import { createId } from '@/lib/ids';
import { aScenario, type Scenario } from './helpers';

let world: Scenario;

beforeAll(async () => {
  world = await aScenario();
});

describe('what those who may, do', () => {
  test('a rep makes an operation and serves it', async () => {
    const outcome = await createOperation(world.rep, { name: 'Bergan and Sons', state: 'IA' });
    if (!outcome.ok) throw new Error(JSON.stringify(outcome));
    expect((await operationsFor(world.rep)).map((one) => one.name)).toContain('Bergan and Sons');
    const again = await createOperation(world.rep, { name: 'Bergan and Sons' });
    expect(again.ok).toBe(false);
  });

  test('an archived operation leaves the lists and comes back whole', async () => {
    const made = await createOperation(world.rep, { name: 'Lonetree Acres' });
    if (!made.ok) throw new Error('not made');
    const operationId = made.value.operationId;
    expect((await archiveOperation(world.rep, { operationId })).ok).toBe(true);
    expect((await operationsFor(world.rep)).map((one) => one.id)).not.toContain(operationId);
    expect((await progressOf(world.rep, { archived: true })).map((one) => one.id)).toEqual([operationId]);
    expect((await restoreOperation(world.rep, { operationId })).ok).toBe(true);
    expect((await operationsFor(world.rep)).map((one) => one.id)).toContain(operationId);
  });

  test('every write leaves a line in the audit trail that a person can read', async () => {
    const outcome = await changeOperation(world.manager, {
      operationId: world.operationId,
      name: 'Teal Creek Farms',
    });
    expect(outcome.ok).toBe(true);
    const [line] = await auditTrail(world.manager, { operationId: world.operationId });
    expect(line).toMatchObject({ verb: 'operation.changed', personName: world.manager.name, operationName: 'Teal Creek Farms' });
    expect(line?.summary).toMatch(/^Renamed .+ to Teal Creek Farms\.$/);
  });

  test('the audit trail pages without losing or repeating an entry made in the same millisecond', async () => {
    const at = 1_700_000_000_000;
    const ids = Array.from({ length: 7 }, () => createId());
    await database()
      .insert(auditEntries)
      .values(ids.map((id) => ({ id, dealershipId: world.dealership.id, at, verb: 'paging.test', thing: 'test', summary: id })));
    const seen: string[] = [];
    let before: { at: number; id: string } | undefined;
    for (;;) {
      const page = await auditTrail(world.manager, { verbs: ['paging.'], before, limit: 3 });
      seen.push(...page.map((line) => line.id));
      before = page.at(-1);
      if (page.length < 3) break;
    }
    expect(seen.sort()).toEqual(ids.sort());
  });
});
