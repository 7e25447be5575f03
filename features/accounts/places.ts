import type { Role } from './model';

export interface Place {
  label: string;
  href: string;
  /** Paths that belong to the place, for underlining it. */
  match: RegExp;
  roles: readonly Role[];
}

const ALL: readonly Role[] = ['grower', 'rep', 'manager'];

/** The places of the top bar, in order; a role sees its own. */
export const PLACES: readonly Place[] = [
  { label: 'Growers', href: '/growers', match: /^\/growers/, roles: ['rep', 'manager'] },
  { label: 'Fields', href: '/fields', match: /^\/(fields|soil)/, roles: ALL },
  { label: 'Line-up', href: '/line-up', match: /^\/line-up/, roles: ALL },
  { label: 'Plans', href: '/plans', match: /^\/plans/, roles: ALL },
  { label: 'Season', href: '/season', match: /^\/season/, roles: ['rep', 'manager'] },
];

/** Where a role starts after signing in. */
export function startOf(role: Role): string {
  return role === 'grower' ? '/fields' : role === 'rep' ? '/growers' : '/season';
}
