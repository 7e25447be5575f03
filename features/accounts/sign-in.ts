import 'server-only';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { database } from '@/db/client';
import { dealerships, invitations, operationPeople, passwordResets, people } from '@/db/schema';
import { environment } from '@/lib/env';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId, createToken, sha256 } from '@/lib/ids';
import { queueMail } from '@/lib/mail/outbox';
import { recordAudit } from './gate';
import { forgetFailures, noteFailure, secondsToWait } from './lock-out';
import { passwordChangedMail, passwordResetMail } from './mails';
import { hashPassword, passwordFits } from './passwords';
import { acceptInvitationSchema, askPasswordResetSchema, resetPasswordSchema, signInSchema } from './schemas';
import { closeAllSessions, openSession, type SessionCookie } from './sessions';

const RESET_MINUTES = 60;

/** Writes of people who are not signed in yet: they prove themselves by password or by a link's secret. */

function problemsOf(error: { issues: { message: string; path: PropertyKey[] }[] }) {
  return bad(error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
}

/** Signs a person in. The answer to an unknown e-mail and to a wrong password is the same, and takes as long. */
export async function signIn(
  input: unknown,
  networkAddress: string,
): Promise<Outcome<{ cookie: SessionCookie; personId: string }>> {
  const parsed = signInSchema.safeParse(input);
  if (!parsed.success) return problemsOf(parsed.error);
  const { email, password } = parsed.data;
  const wait = await secondsToWait(email, networkAddress);
  if (wait > 0)
    return bad(`Too many tries. Wait ${wait} ${wait === 1 ? 'second' : 'seconds'}, then try again, or choose a new password.`);
  const rows = await database().select().from(people).where(eq(people.email, email));
  const person = rows[0];
  const fits = await passwordFits(person?.passwordHash ?? null, password);
  if (!person || !fits || person.disabledAt !== null) {
    await noteFailure(email, networkAddress);
    return bad('E-mail and password do not fit together. Check both, or choose a new password.');
  }
  await forgetFailures(email, networkAddress);
  await database().transaction((transaction) =>
    recordAudit(
      transaction,
      { dealershipId: person.dealershipId, personId: person.id },
      { verb: 'person.signed-in', thing: 'person', thingId: person.id, summary: `${person.name} signed in.` },
    ),
  );
  return good({ cookie: await openSession(person.id), personId: person.id });
}

/** Mails a link for a new password when there is such an account. Answers the same when there is none. */
export async function askPasswordReset(input: unknown): Promise<Outcome<null>> {
  const parsed = askPasswordResetSchema.safeParse(input);
  if (!parsed.success) return problemsOf(parsed.error);
  const rows = await database()
    .select()
    .from(people)
    .where(and(eq(people.email, parsed.data.email), isNull(people.disabledAt)));
  const person = rows[0];
  if (!person) return good(null);
  const token = createToken();
  const mail = passwordResetMail({
    name: person.name,
    link: `${environment().address}/reset-password/${token}`,
    minutes: RESET_MINUTES,
  });
  await database().transaction(
    async (transaction) => {
      // One mail a minute: asking again at once must not flood somebody's mailbox.
      const recent = await transaction
        .select({ id: passwordResets.id })
        .from(passwordResets)
        .where(and(eq(passwordResets.personId, person.id), gt(passwordResets.createdAt, Date.now() - 60_000)));
      if (recent.length > 0) return;
      const id = createId();
      await transaction
        .insert(passwordResets)
        .values({ id, personId: person.id, tokenHash: sha256(token), expiresAt: Date.now() + RESET_MINUTES * 60_000 });
      await queueMail(transaction, {
        dealershipId: person.dealershipId,
        to: person.email,
        ...mail,
        dedupeKey: `password-reset:${id}`,
      });
    },
    { behavior: 'immediate' },
  );
  return good(null);
}

/** Is this link for a new password still good? */
export async function passwordResetIsOpen(token: string): Promise<boolean> {
  const rows = await database()
    .select({ id: passwordResets.id })
    .from(passwordResets)
    .where(
      and(eq(passwordResets.tokenHash, sha256(token)), isNull(passwordResets.usedAt), gt(passwordResets.expiresAt, Date.now())),
    );
  return rows.length === 1;
}

/** Sets a new password by a mailed link, once, and signs out every session. */
export async function resetPassword(input: unknown): Promise<Outcome<null>> {
  const parsed = resetPasswordSchema.safeParse(input);
  if (!parsed.success) return problemsOf(parsed.error);
  const passwordHash = await hashPassword(parsed.data.password);
  const outcome = await database().transaction(
    async (transaction): Promise<Outcome<{ personId: string }>> => {
      const used = await transaction
        .update(passwordResets)
        .set({ usedAt: Date.now() })
        .where(
          and(
            eq(passwordResets.tokenHash, sha256(parsed.data.token)),
            isNull(passwordResets.usedAt),
            gt(passwordResets.expiresAt, Date.now()),
          ),
        )
        .returning({ personId: passwordResets.personId });
      const personId = used[0]?.personId;
      if (!personId) return bad('This link was used already or is too old. Ask for a new one.');
      const [person] = await transaction.update(people).set({ passwordHash }).where(eq(people.id, personId)).returning();
      if (!person) return bad('This account is gone.');
      await queueMail(transaction, {
        dealershipId: person.dealershipId,
        to: person.email,
        ...passwordChangedMail({ name: person.name, address: environment().address }),
        dedupeKey: `password-changed:${personId}:${sha256(parsed.data.token).slice(0, 16)}`,
      });
      await recordAudit(
        transaction,
        { dealershipId: person.dealershipId, personId },
        {
          verb: 'person.password-reset',
          thing: 'person',
          thingId: personId,
          summary: `${person.name} chose a new password by a mailed link.`,
        },
      );
      return good({ personId });
    },
    { behavior: 'immediate' },
  );
  if (!outcome.ok) return outcome;
  await closeAllSessions(outcome.value.personId);
  return good(null);
}

export interface OpenInvitation {
  email: string;
  name: string;
  role: 'grower' | 'rep' | 'manager';
  dealershipName: string;
}

/** What an invitation link offers, while it is open; `null` when it was used, withdrawn or is too old. */
export async function openInvitation(token: string): Promise<OpenInvitation | null> {
  const rows = await database()
    .select({ email: invitations.email, name: invitations.name, role: invitations.role, dealershipName: dealerships.name })
    .from(invitations)
    .innerJoin(dealerships, eq(dealerships.id, invitations.dealershipId))
    .where(stillOpen(token));
  return rows[0] ?? null;
}

function stillOpen(token: string) {
  return and(
    eq(invitations.tokenHash, sha256(token)),
    isNull(invitations.acceptedAt),
    isNull(invitations.withdrawnAt),
    gt(invitations.expiresAt, Date.now()),
  );
}

/** Opens the account an invitation offers and signs its owner in. */
export async function acceptInvitation(input: unknown): Promise<Outcome<{ cookie: SessionCookie }>> {
  const parsed = acceptInvitationSchema.safeParse(input);
  if (!parsed.success) return problemsOf(parsed.error);
  const passwordHash = await hashPassword(parsed.data.password);
  const outcome = await database().transaction(
    async (transaction): Promise<Outcome<{ personId: string }>> => {
      const [invitation] = await transaction.select().from(invitations).where(stillOpen(parsed.data.token));
      if (!invitation) return bad('This invitation was used already, was withdrawn or is too old. Ask for a new one.');
      const taken = await transaction.select({ id: people.id }).from(people).where(eq(people.email, invitation.email));
      if (taken.length > 0) return bad('There is an account for this e-mail already. Sign in with it.');
      await transaction.update(invitations).set({ acceptedAt: Date.now() }).where(eq(invitations.id, invitation.id));
      const personId = createId();
      await transaction.insert(people).values({
        id: personId,
        dealershipId: invitation.dealershipId,
        email: invitation.email,
        name: parsed.data.name,
        role: invitation.role,
        passwordHash,
      });
      if (invitation.operationId)
        await transaction.insert(operationPeople).values({ operationId: invitation.operationId, personId });
      await recordAudit(
        transaction,
        { dealershipId: invitation.dealershipId, personId },
        {
          verb: 'invitation.accepted',
          thing: 'person',
          thingId: personId,
          operationId: invitation.operationId ?? undefined,
          summary: `${parsed.data.name} accepted the invitation as ${invitation.role}.`,
        },
      );
      return good({ personId });
    },
    { behavior: 'immediate' },
  );
  if (!outcome.ok) return outcome;
  return good({ cookie: await openSession(outcome.value.personId) });
}
