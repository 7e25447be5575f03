import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { invitations, outboxMails, sessions } from '@/db/schema';
import { invitePerson, withdrawInvitation } from '@/features/accounts/changes/invitations';
import { changeOwnPassword, signOutEverywhere } from '@/features/accounts/changes/own-account';
import { disablePerson, enablePerson } from '@/features/accounts/changes/people';
import { createManager } from '@/features/accounts/create-manager';
import { acceptInvitation, openInvitation } from '@/features/accounts/invitation';
import { askPasswordReset, passwordResetIsOpen } from '@/features/accounts/password-reset';
import { personOfSession, SESSION_COOKIE_NAME } from '@/features/accounts/sessions';
import { viewerOfPerson } from '@/features/accounts/viewer-of-person';
import { createId, sha256 } from '@/lib/ids';
import { aDealership, anOperation, aPerson, signInCookie } from '../support/viewers';

const PASSWORD = 'gate barn wrench creek';
const NEW_PASSWORD = 'seven mile slough north';

/** The link in the newest mail to an address. */
async function mailedToken(to: string, kind: 'invitation' | 'reset-password'): Promise<string> {
  const mails = await database().select().from(outboxMails).where(eq(outboxMails.to, to));
  const token = new RegExp(`/${kind}/([\\w-]+)`).exec(mails.map((mail) => mail.text).join('\n'))?.[1];
  if (!token) throw new Error(`No ${kind} mail to ${to}.`);
  return token;
}

describe('an invitation', () => {
  test('opens one account of the role and operation it names, once', async () => {
    const operation = await anOperation();
    const rep = await aPerson({ role: 'rep', dealership: operation.dealership, operationIds: [operation.id] });
    const email = `${createId()}@example.test`;
    const invited = await invitePerson(rep, { email, name: 'Lena', role: 'grower', operationId: operation.id });
    expect(invited.ok).toBe(true);
    const token = await mailedToken(email, 'invitation');
    expect(await openInvitation(token)).toMatchObject({ email, role: 'grower' });
    const form = { token, name: 'Lena Aldous', password: NEW_PASSWORD, repeated: NEW_PASSWORD, role: 'manager' };
    const accepted = await acceptInvitation(form, null);
    if (!accepted.ok) throw new Error(JSON.stringify(accepted));
    const session = accepted.value.cookies.find((one) => one.name === SESSION_COOKIE_NAME);
    const who = await personOfSession(session?.value ?? '');
    expect(await viewerOfPerson(who?.personId ?? '')).toMatchObject({ role: 'grower', dealershipId: operation.dealership.id });
    expect((await acceptInvitation(form, null)).ok).toBe(false);
    expect(await openInvitation(token)).toBeNull();
  });

  test('asked for twice leaves only the newer link good', async () => {
    const manager = await aPerson({ role: 'manager' });
    const email = `${createId()}@example.test`;
    const first = await invitePerson(manager, { email, name: 'Jon', role: 'rep' });
    const second = await invitePerson(manager, { email, name: 'Jon', role: 'rep' });
    const tokenOf = (outcome: typeof first) => (outcome.ok ? (outcome.value.link.split('/').at(-1) as string) : '');
    expect(await openInvitation(tokenOf(first))).toBeNull();
    expect(await openInvitation(tokenOf(second))).not.toBeNull();
  });

  test('taken back is good no more', async () => {
    const manager = await aPerson({ role: 'manager' });
    const outcome = await invitePerson(manager, { email: `${createId()}@example.test`, name: 'Jon', role: 'rep' });
    if (!outcome.ok) throw new Error('not invited');
    expect((await withdrawInvitation(manager, { invitationId: outcome.value.invitationId })).ok).toBe(true);
    expect(await openInvitation(outcome.value.link.split('/').at(-1) as string)).toBeNull();
    expect((await withdrawInvitation(manager, { invitationId: outcome.value.invitationId })).ok).toBe(false);
  });

  test('tells an inviter nothing of accounts with other dealerships', async () => {
    const elsewhere = await aPerson({ role: 'grower' });
    const manager = await aPerson({ role: 'manager' });
    const outcome = await invitePerson(manager, { email: elsewhere.email, name: 'Someone', role: 'rep' });
    if (!outcome.ok) throw new Error(JSON.stringify(outcome));
    const token = outcome.value.link.split('/').at(-1) as string;
    const accepted = await acceptInvitation({ token, name: 'Someone', password: NEW_PASSWORD, repeated: NEW_PASSWORD }, null);
    expect(accepted.ok ? '' : accepted.problems[0]?.message).toContain('one e-mail serves one dealership');
    expect(
      (
        await database()
          .select()
          .from(invitations)
          .where(eq(invitations.tokenHash, sha256(token)))
      )[0]?.acceptedAt,
    ).toBeNull();
  });
});

describe('sessions', () => {
  test('all end when one signs out everywhere', async () => {
    const person = await aPerson();
    const [one, two] = [await signInCookie(person.personId), await signInCookie(person.personId)];
    await signOutEverywhere(person);
    expect([await personOfSession(one.value), await personOfSession(two.value)]).toEqual([null, null]);
  });

  test('end with a changed password, and a link asked for before is good no more', async () => {
    const person = await aPerson({ password: PASSWORD });
    const session = await signInCookie(person.personId);
    await askPasswordReset({ email: person.email });
    const token = await mailedToken(person.email, 'reset-password');
    const outcome = await changeOwnPassword(person, { current: PASSWORD, password: NEW_PASSWORD, repeated: NEW_PASSWORD });
    expect(outcome.ok).toBe(true);
    expect(await personOfSession(session.value)).toBeNull();
    expect(await passwordResetIsOpen(token)).toBe(false);
  });

  test('of a disabled account end, and it is no viewer until it is enabled again', async () => {
    const dealership = await aDealership();
    const manager = await aPerson({ role: 'manager', dealership });
    const rep = await aPerson({ role: 'rep', dealership });
    const session = await signInCookie(rep.personId);
    expect((await disablePerson(manager, { personId: rep.personId })).ok).toBe(true);
    expect(await personOfSession(session.value)).toBeNull();
    expect(await viewerOfPerson(rep.personId)).toBeNull();
    expect((await enablePerson(manager, { personId: rep.personId })).ok).toBe(true);
    expect((await viewerOfPerson(rep.personId))?.role).toBe('rep');
  });

  test('roll on while used and end when not', async () => {
    const person = await aPerson();
    const session = await signInCookie(person.personId);
    const id = sha256(session.value);
    const inDays = (days: number) => Math.floor(Date.now() / 1000 + days * 86_400);
    await database()
      .update(sessions)
      .set({ expiresAt: inDays(10) })
      .where(eq(sessions.id, id));
    expect((await personOfSession(session.value))?.personId).toBe(person.personId);
    const [row] = await database().select().from(sessions).where(eq(sessions.id, id));
    expect(row?.expiresAt ?? 0).toBeGreaterThan(inDays(29));
    await database()
      .update(sessions)
      .set({ expiresAt: inDays(-1) })
      .where(eq(sessions.id, id));
    expect(await personOfSession(session.value)).toBeNull();
  });
});

describe('the first manager', () => {
  test('makes the dealership when its name is new, and joins it when it is known', async () => {
    const input = { dealershipName: 'North Fork Seed', name: 'Dana Holt', email: 'dana@example.test', password: NEW_PASSWORD };
    const first = await createManager(input);
    const second = await createManager({ ...input, email: 'eli@example.test', name: 'Eli Holt' });
    if (!first.ok || !second.ok) throw new Error('not made');
    expect(second.value.dealershipId).toBe(first.value.dealershipId);
    expect((await createManager(input)).ok).toBe(false);
    expect((await createManager({ ...input, email: 'fay@example.test', password: 'short' })).ok).toBe(false);
  });
});
