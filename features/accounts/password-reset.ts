import 'server-only';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { database } from '@/db/client';
import { passwordResets, people } from '@/db/schema';
import { environment } from '@/lib/env';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId, createToken, sha256 } from '@/lib/ids';
import { queueMail } from '@/lib/mail/outbox';
import { recordAudit } from './gate';
import { rememberBrowser } from './lock-out';
import { passwordChangedMail, passwordResetMail } from './mails';
import { passwordProblem } from './password-rules';
import { hashPassword } from './passwords';
import { askPasswordResetSchema, resetPasswordSchema } from './schemas';
import { browserCookie, closeAllSessions, type SessionCookie } from './sessions';

const RESET_MINUTES = 60;
const MOST_MAILS_A_DAY = 10;
const SHORTEST_ANSWER_MILLISECONDS = 400;

function problemsOf(error: { issues: { message: string; path: PropertyKey[] }[] }) {
  return bad(error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
}

/**
 * Mails a link for a new password when there is such an account. Answers the same, and no sooner, when there is none, so
 * that nobody learns here who has an account.
 */
export async function askPasswordReset(input: unknown): Promise<Outcome<null>> {
  const parsed = askPasswordResetSchema.safeParse(input);
  if (!parsed.success) return problemsOf(parsed.error);
  await Promise.all([
    mailResetLink(parsed.data.email),
    new Promise((resolve) => setTimeout(resolve, SHORTEST_ANSWER_MILLISECONDS)),
  ]);
  return good(null);
}

async function mailResetLink(email: string): Promise<void> {
  const rows = await database()
    .select()
    .from(people)
    .where(and(eq(people.email, email), isNull(people.disabledAt)));
  const person = rows[0];
  if (!person) return;
  const token = createToken();
  const mail = passwordResetMail({
    name: person.name,
    link: `${environment().address}/reset-password/${token}`,
    minutes: RESET_MINUTES,
  });
  await database().transaction(
    async (transaction) => {
      // One mail a minute and ten a day: asking again must not flood somebody's mailbox.
      const now = Date.now();
      const recent = await transaction
        .select({ createdAt: passwordResets.createdAt })
        .from(passwordResets)
        .where(and(eq(passwordResets.personId, person.id), gt(passwordResets.createdAt, now - 86_400_000)));
      if (recent.length >= MOST_MAILS_A_DAY || recent.some((one) => one.createdAt > now - 60_000)) return;
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
}

function stillGood(token: string) {
  return and(
    eq(passwordResets.tokenHash, sha256(token)),
    isNull(passwordResets.usedAt),
    gt(passwordResets.expiresAt, Date.now()),
  );
}

/** Is this link for a new password still good? */
export async function passwordResetIsOpen(token: string): Promise<boolean> {
  const rows = await database().select({ id: passwordResets.id }).from(passwordResets).where(stillGood(token));
  return rows.length === 1;
}

/**
 * Sets a new password by a mailed link, once, and signs out every session. Whoever holds the mailbox is the owner: the
 * browser becomes a known one, so that a stranger's guessing does not keep them from signing in next.
 */
export async function resetPassword(input: unknown, browserToken: string | null): Promise<Outcome<{ cookie: SessionCookie }>> {
  const parsed = resetPasswordSchema.safeParse(input);
  if (!parsed.success) return problemsOf(parsed.error);
  const passwordHash = await hashPassword(parsed.data.password);
  const outcome = await database().transaction(
    async (transaction): Promise<Outcome<{ personId: string }>> => {
      const [link] = await transaction
        .select({ personId: passwordResets.personId, email: people.email })
        .from(passwordResets)
        .innerJoin(people, eq(people.id, passwordResets.personId))
        .where(and(stillGood(parsed.data.token), isNull(people.disabledAt)));
      if (!link) return bad('This link was used already or is too old. Ask for a new one.');
      const personId = link.personId;
      const problem = passwordProblem(parsed.data.password, link.email);
      if (problem) return bad(problem, 'password');
      // Every open link of the person ends with the first one used.
      await transaction
        .update(passwordResets)
        .set({ usedAt: Date.now() })
        .where(and(eq(passwordResets.personId, personId), isNull(passwordResets.usedAt)));
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
  const token = browserToken ?? createToken();
  await rememberBrowser(outcome.value.personId, token);
  return good({ cookie: browserCookie(token) });
}
