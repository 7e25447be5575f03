import { database } from '@/db/client';
import { dealerships, operationPeople, operations, people } from '@/db/schema';
import type { Role, Viewer } from '@/features/accounts/model';
import { hashPassword } from '@/features/accounts/passwords';
import { openSession, type SessionCookie } from '@/features/accounts/sessions';
import { createId } from '@/lib/ids';

/** Builders of dealerships, people and operations for tests. Everything made here is invented. */

const SEASON = 2027;

export interface MadeDealership {
  id: string;
  name: string;
  season: number;
}

/** A dealership planning the 2027 season. */
export async function aDealership(name = `Cedar Ridge Seed ${createId().slice(0, 6)}`): Promise<MadeDealership> {
  const id = createId();
  await database().insert(dealerships).values({ id, name, currentSeason: SEASON });
  return { id, name, season: SEASON };
}

/** An operation of the dealership (a new one when none is given). */
export async function anOperation(
  options: { dealership?: MadeDealership; name?: string } = {},
): Promise<{ id: string; name: string; dealership: MadeDealership }> {
  const dealership = options.dealership ?? (await aDealership());
  const id = createId();
  const name = options.name ?? `Farm ${id.slice(0, 6)}`;
  await database().insert(operations).values({ id, dealershipId: dealership.id, name, state: 'IA', county: 'Hancock' });
  return { id, name, dealership };
}

/** A person of a role with an account, assigned to operations. Give a password only where it is tried: hashing is slow by design. */
export async function aPerson(
  options: {
    role?: Role;
    dealership?: MadeDealership;
    operationIds?: string[];
    password?: string;
    email?: string;
    name?: string;
    wantsMail?: boolean;
    disabled?: boolean;
  } = {},
): Promise<Viewer> {
  const dealership = options.dealership ?? (await aDealership());
  const role = options.role ?? 'grower';
  const personId = createId();
  const email = options.email ?? `${personId}@example.test`;
  const name = options.name ?? `${role[0]?.toUpperCase()}${role.slice(1)} ${personId.slice(0, 5)}`;
  await database()
    .insert(people)
    .values({
      id: personId,
      dealershipId: dealership.id,
      email,
      name,
      role,
      passwordHash: options.password ? await hashPassword(options.password) : 'none',
      wantsMail: options.wantsMail ?? true,
      disabledAt: options.disabled ? Date.now() : null,
    });
  for (const operationId of options.operationIds ?? [])
    await database().insert(operationPeople).values({ operationId, personId });
  return { personId, dealershipId: dealership.id, dealershipName: dealership.name, season: SEASON, role, name, email };
}

/** A viewer of a role; a grower or rep without `operationIds` gets an operation of their own. */
export async function viewerAs(
  role: Role,
  options: { dealership?: MadeDealership; operationIds?: string[] } = {},
): Promise<Viewer> {
  const dealership = options.dealership ?? (await aDealership());
  const operationIds = options.operationIds ?? (role === 'manager' ? [] : [(await anOperation({ dealership })).id]);
  return aPerson({ role, dealership, operationIds });
}

/** The cookie that signs a person in, for tests that go through the browser or a route. */
export async function signInCookie(personId: string): Promise<SessionCookie> {
  return openSession(personId);
}
