import { describe, expect, test } from 'vitest';
import { ROLES } from '@/features/accounts/model';
import { may, RIGHTS, type Thing, type Verb } from '@/features/accounts/rights';

/** Every right of the table, written out again by hand: who gains one is seen here. */
const GROWER = [
  'operation.read',
  'field.read',
  'field.create',
  'field.change',
  'soil.read',
  'soil.create',
  'variety.read',
  'score.read',
  'score.renew',
  'plan.read',
  'plan.agree',
  'plan.askChange',
  'plan.export',
  'plan.share',
  'account.change',
];
const MANAGER_ONLY = ['operation.assign', 'person.disable', 'dealership.change', 'audit.read', 'outbox.read', 'outbox.send'];
const GROWER_ONLY = ['plan.agree', 'plan.askChange'];

const all = Object.entries(RIGHTS).flatMap(([thing, verbs]) => Object.keys(verbs).map((verb) => `${thing}.${verb}`));

function has(role: (typeof ROLES)[number], right: string): boolean {
  const [thing, verb] = right.split('.') as [Thing, Verb<Thing>];
  return may({ role }, thing, verb as never);
}

describe('rights', () => {
  test('a grower has these and no other', () => {
    expect(all.filter((right) => has('grower', right)).sort()).toEqual([...GROWER].sort());
  });

  test('a rep has all but what is a manager’s, and what only a grower can say of their own farm', () => {
    expect(all.filter((right) => !has('rep', right)).sort()).toEqual([...MANAGER_ONLY, ...GROWER_ONLY].sort());
  });

  test('a manager has all but agreeing to a plan in a grower’s place', () => {
    expect(all.filter((right) => !has('manager', right)).sort()).toEqual([...GROWER_ONLY].sort());
  });

  test('growers see neither supply numbers nor draft varieties', () => {
    expect(has('grower', 'supply.read')).toBe(false);
    expect(has('grower', 'variety.readDraft')).toBe(false);
  });

  test('no right is without a holder', () => {
    expect(all.filter((right) => !ROLES.some((role) => has(role, right)))).toEqual([]);
  });
});
