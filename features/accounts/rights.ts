import type { Role } from './model';

/**
 * One table of rights: thing × verb → roles. Which rows of a thing a person sees is the scope's business (scope.ts);
 * this says whether the role may do it to a row in scope at all.
 */
export const RIGHTS = {
  operation: { read: ['grower', 'rep', 'manager'], create: ['rep', 'manager'], change: ['rep', 'manager'], assign: ['manager'] },
  person: { read: ['rep', 'manager'], invite: ['rep', 'manager'], disable: ['manager'] },
  field: { read: ['grower', 'rep', 'manager'], create: ['grower', 'rep', 'manager'], change: ['grower', 'rep', 'manager'] },
  soil: { read: ['grower', 'rep', 'manager'], create: ['grower', 'rep', 'manager'] },
  variety: { read: ['grower', 'rep', 'manager'], readDraft: ['rep', 'manager'], change: ['rep', 'manager'] },
  supply: { read: ['rep', 'manager'], change: ['rep', 'manager'] },
  score: { read: ['grower', 'rep', 'manager'], renew: ['grower', 'rep', 'manager'] },
  plan: {
    read: ['grower', 'rep', 'manager'],
    change: ['rep', 'manager'],
    propose: ['rep', 'manager'],
    agree: ['grower'],
    askChange: ['grower'],
    export: ['grower', 'rep', 'manager'],
    share: ['rep', 'manager', 'grower'],
  },
  season: { read: ['rep', 'manager'] },
  dealership: { change: ['manager'] },
  account: { change: ['grower', 'rep', 'manager'] },
  audit: { read: ['manager'] },
  outbox: { read: ['manager'], send: ['manager'] },
} as const satisfies Record<string, Record<string, readonly Role[]>>;

export type Thing = keyof typeof RIGHTS;
export type Verb<T extends Thing> = keyof (typeof RIGHTS)[T];

/** May this role do this to a thing that is in its scope? */
export function may<T extends Thing>(viewer: { role: Role }, thing: T, verb: Verb<T>): boolean {
  return (RIGHTS[thing][verb] as readonly Role[]).includes(viewer.role);
}
