import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { auditEntries, outboxMails, passwordResets, people, sessions, signInTries } from '@/db/schema';
import { changeOwnPassword } from '@/features/accounts/changes/own-account';
import { takeTry } from '@/features/accounts/lock-out';
import { askPasswordReset, passwordResetIsOpen, resetPassword } from '@/features/accounts/password-reset';
import { BROWSER_COOKIE_NAME, personOfSession, SESSION_COOKIE_NAME } from '@/features/accounts/sessions';
import { signIn } from '@/features/accounts/sign-in';
import { createId, sha256 } from '@/lib/ids';
import { aPerson, signInCookie } from '../support/viewers';

const PASSWORD = 'gate barn wrench creek';
const NEW_PASSWORD = 'seven mile slough north';
const from = (address: string, browserToken: string | null = null) => ({ address, browserToken });

/** Failed tries as the lock-out counts them, all in one moment, without the slow hashing. */
async function failedTries(email: string, count: number, address: (n: number) => string): Promise<void> {
  const now = Date.now();
  for (let n = 0; n < count; n += 1) await takeTry(email, from(address(n)), now);
}

/** Makes a wait that has begun a long one, so that a slow machine cannot outwait it. */
async function makeItLong(counted: string): Promise<void> {
  const rows = await database()
    .update(signInTries)
    .set({ failures: 200 })
    .where(eq(signInTries.key, sha256(counted)))
    .returning();
  expect(rows.length).toBe(1);
}

/** The link in the newest mail to an address. */
async function mailedToken(to: string, kind: 'invitation' | 'reset-password'): Promise<string> {
  const mails = await database().select().from(outboxMails).where(eq(outboxMails.to, to));
  const token = new RegExp(`/${kind}/([\\w-]+)`).exec(mails.map((mail) => mail.text).join('\n'))?.[1];
  if (!token) throw new Error(`No ${kind} mail to ${to}.`);
  return token;
}

describe('signing in', () => {
  test('with the right password opens a session; the database holds neither its secret nor the password', async () => {
    const person = await aPerson({ password: PASSWORD });
    const outcome = await signIn({ email: person.email.toUpperCase(), password: PASSWORD }, from('10.0.0.1'));
    if (!outcome.ok) throw new Error(JSON.stringify(outcome));
    const cookie = outcome.value.cookies.find((one) => one.name === SESSION_COOKIE_NAME);
    expect(cookie?.attributes).toMatchObject({ httpOnly: true, sameSite: 'lax', path: '/' });
    const rows = await database().select().from(sessions).where(eq(sessions.userId, person.personId));
    expect(rows.map((row) => row.id)).toEqual([sha256(cookie?.value ?? '')]);
    expect((await personOfSession(cookie?.value ?? ''))?.personId).toBe(person.personId);
    expect(await personOfSession(rows[0]?.id ?? '')).toBeNull();
    const [row] = await database().select().from(people).where(eq(people.id, person.personId));
    expect(row?.passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
  });

  test('with a wrong password, an unknown e-mail and a disabled account gets one and the same answer', async () => {
    const person = await aPerson({ password: PASSWORD });
    const disabled = await aPerson({ password: PASSWORD, disabled: true });
    const answers = [
      await signIn({ email: person.email, password: 'wrong' }, from('10.0.1.1')),
      await signIn({ email: 'nobody@example.test', password: 'wrong' }, from('10.0.1.2')),
      await signIn({ email: disabled.email, password: PASSWORD }, from('10.0.1.3')),
    ];
    expect(new Set(answers.map((answer) => JSON.stringify(answer))).size).toBe(1);
    expect(answers[0]?.ok).toBe(false);
  });

  test('leaves a line in the audit trail', async () => {
    const person = await aPerson({ password: PASSWORD });
    await signIn({ email: person.email, password: PASSWORD }, from('10.0.2.1'));
    const lines = await database().select().from(auditEntries).where(eq(auditEntries.personId, person.personId));
    expect(lines.map((line) => line.verb)).toEqual(['person.signed-in']);
  });
});

describe('guessing', () => {
  test('from one place is slowed after five tries, and the right password waits too', async () => {
    const person = await aPerson({ password: PASSWORD });
    const now = Date.now();
    const waits = [];
    for (let n = 0; n < 6; n += 1) waits.push(await takeTry(person.email, from('10.1.0.1'), now));
    expect(waits).toEqual([0, 0, 0, 0, 0, 1]);
    expect(await takeTry(person.email, from('10.1.0.1'), now + 1000)).toBe(0);
    expect(await takeTry(person.email, from('10.1.0.1'), now + 1000)).toBe(2);
    await makeItLong(`pair|${person.email}|10.1.0.1`);
    const right = await signIn({ email: person.email, password: PASSWORD }, from('10.1.0.1'));
    expect(right.ok ? '' : right.problems[0]?.message).toMatch(/^Too many tries\. Wait \d+ seconds/);
  });

  test('does not shut the door on the owner at another address', async () => {
    const person = await aPerson({ password: PASSWORD });
    await failedTries(person.email, 5, () => '10.1.1.1');
    await makeItLong(`pair|${person.email}|10.1.1.1`);
    expect((await signIn({ email: person.email, password: PASSWORD }, from('10.1.1.2'))).ok).toBe(true);
  });

  test('a hundred tries at once are a hundred tries', async () => {
    const person = await aPerson({ password: PASSWORD });
    const all = await Promise.all(
      Array.from({ length: 100 }, () => signIn({ email: person.email, password: 'wrong' }, from('10.1.2.1'))),
    );
    const looked = all.filter((one) => !one.ok && one.problems[0]?.message.startsWith('E-mail and password'));
    expect(looked.length).toBeLessThanOrEqual(9);
  });

  test('many accounts from one address is slowed', async () => {
    const now = Date.now();
    const waits = [];
    for (let n = 0; n < 31; n += 1) waits.push(await takeTry(`u${n}@example.test`, from('10.1.3.1'), now));
    expect(waits).toEqual([...Array.from({ length: 30 }, () => 0), 1]);
  });

  test('one account from ever new addresses is slowed, and its owner’s own browser is not', async () => {
    const person = await aPerson({ password: PASSWORD });
    const first = await signIn({ email: person.email, password: PASSWORD }, from('10.1.4.0'));
    const browser = first.ok ? (first.value.cookies.find((one) => one.name === BROWSER_COOKIE_NAME)?.value ?? null) : null;
    await failedTries(person.email, 42, (n) => `10.2.${n}.1`);
    await makeItLong(`email|${person.email}`);
    const stranger = await signIn({ email: person.email, password: PASSWORD }, from('10.3.0.1'));
    expect(stranger.ok).toBe(false);
    expect((await signIn({ email: person.email, password: PASSWORD }, from('10.3.0.2', browser))).ok).toBe(true);
  });

  test('a browser known for one person is none for another', async () => {
    const one = await aPerson({ password: PASSWORD });
    const other = await aPerson({ password: PASSWORD });
    const first = await signIn({ email: one.email, password: PASSWORD }, from('10.1.5.1'));
    const browser = first.ok ? (first.value.cookies.find((cookie) => cookie.name === BROWSER_COOKIE_NAME)?.value ?? null) : null;
    for (let n = 0; n < 6; n += 1) await signIn({ email: other.email, password: 'wrong' }, from('10.1.5.2', browser));
    const pair = await database()
      .select()
      .from(signInTries)
      .where(eq(signInTries.key, sha256(`pair|${other.email}|10.1.5.2`)));
    expect(pair[0]?.failures).toBeGreaterThanOrEqual(5);
  });

  test('the present password through an open session is slowed too', async () => {
    const person = await aPerson({ password: PASSWORD });
    const form = { current: 'wrong', password: NEW_PASSWORD, repeated: NEW_PASSWORD };
    for (let n = 0; n < 5; n += 1) await changeOwnPassword(person, form);
    await makeItLong(`pair|${person.email}|own account of ${person.personId}`);
    const sixth = await changeOwnPassword(person, { ...form, current: PASSWORD });
    expect(sixth.ok ? '' : sixth.problems[0]?.message).toMatch(/^Too many tries/);
  });
});

describe('a forgotten password', () => {
  test('is answered the same, and no sooner, whether or not there is an account', async () => {
    const person = await aPerson({ password: PASSWORD });
    const timed = async (email: string) => {
      const start = performance.now();
      const outcome = await askPasswordReset({ email });
      return { outcome, took: performance.now() - start };
    };
    const known = await timed(person.email);
    const unknown = await timed('nobody@example.test');
    expect(known.outcome).toEqual(unknown.outcome);
    for (const one of [known, unknown]) expect(one.took).toBeGreaterThanOrEqual(395);
    expect(await database().select().from(outboxMails).where(eq(outboxMails.to, 'nobody@example.test'))).toEqual([]);
  });

  test('is chosen anew once by the mailed link, which ends every session and every other link', async () => {
    const person = await aPerson({ password: PASSWORD });
    const session = await signInCookie(person.personId);
    await askPasswordReset({ email: person.email });
    await askPasswordReset({ email: person.email });
    const links = await database().select().from(passwordResets).where(eq(passwordResets.personId, person.personId));
    expect(links.length).toBe(1);
    await database()
      .insert(passwordResets)
      .values({ id: createId(), personId: person.personId, tokenHash: sha256('older-link'), expiresAt: Date.now() + 60_000 });
    const token = await mailedToken(person.email, 'reset-password');
    expect(links[0]?.tokenHash).toBe(sha256(token));

    const form = { token, password: NEW_PASSWORD, repeated: NEW_PASSWORD };
    expect((await resetPassword({ ...form, repeated: 'another' }, null)).ok).toBe(false);
    expect((await resetPassword(form, null)).ok).toBe(true);
    expect((await resetPassword(form, null)).ok).toBe(false);
    expect(await passwordResetIsOpen('older-link')).toBe(false);
    expect(await personOfSession(session.value)).toBeNull();
    expect((await signIn({ email: person.email, password: PASSWORD }, from('10.4.0.1'))).ok).toBe(false);
    expect((await signIn({ email: person.email, password: NEW_PASSWORD }, from('10.4.0.1'))).ok).toBe(true);
  });

  test('is not chosen by a link that is too old', async () => {
    const person = await aPerson({ password: PASSWORD });
    await database()
      .insert(passwordResets)
      .values({ id: createId(), personId: person.personId, tokenHash: sha256('old-link'), expiresAt: Date.now() - 1 });
    expect(await passwordResetIsOpen('old-link')).toBe(false);
    expect((await resetPassword({ token: 'old-link', password: NEW_PASSWORD, repeated: NEW_PASSWORD }, null)).ok).toBe(false);
  });
});
