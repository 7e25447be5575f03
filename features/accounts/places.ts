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
  { label: 'Fields', href: '/fields', match: /^\/(fields|soil)/, roles: ALL },
  { label: 'Line-up', href: '/line-up', match: /^\/line-up/, roles: ALL },
  { label: 'Plans', href: '/plans', match: /^\/plans/, roles: ALL },
  { label: 'Growers', href: '/growers', match: /^\/growers/, roles: ['rep', 'manager'] },
  { label: 'Season', href: '/season', match: /^\/season/, roles: ['rep', 'manager'] },
];

/** Where a role starts after signing in. */
export function startOf(role: Role): string {
  return role === 'grower' ? '/fields' : role === 'rep' ? '/growers' : '/season';
}

/** Pages of the dealership's and one's own settings that a role may open, in order. */
export function settingsOf(role: Role, showOutbox: boolean): { label: string; href: string }[] {
  const ofManager = [
    { label: 'Maturity zones', href: '/settings/zones' },
    { label: 'Placement rules', href: '/settings/rules' },
    { label: 'Weather stations', href: '/settings/stations' },
    { label: 'Audit trail', href: '/settings/audit' },
    ...(showOutbox ? [{ label: 'Outbox', href: '/outbox' }] : []),
  ];
  return [
    ...(role === 'grower' ? [] : [{ label: 'People', href: '/settings/people' }]),
    ...(role === 'manager' ? ofManager : []),
    { label: 'My account', href: '/settings/account' },
  ];
}
