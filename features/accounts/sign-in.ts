import 'server-only';
import { eq } from 'drizzle-orm';
import { database } from '@/db/client';
import { people } from '@/db/schema';
import { bad, good, type Outcome } from '@/lib/errors';
import { createToken } from '@/lib/ids';
import { recordAudit } from './gate';
import { giveBackTry, rememberBrowser, type TryFrom, takeTry } from './lock-out';
import { passwordFits } from './passwords';
import { signInSchema } from './schemas';
import { browserCookie, openSession, type SessionCookie } from './sessions';

/**
 * Opens a session and makes this browser one its owner has signed in from.
 * Answers the cookies to set: the session, and the browser's own.
 */
export async function letIn(personId: string, browserToken: string | null): Promise<SessionCookie[]> {
  const token = browserToken ?? createToken();
  await rememberBrowser(personId, token);
  return [await openSession(personId), browserCookie(token)];
}

/** Signs a person in. The answer to an unknown e-mail and to a wrong password is the same, and takes as long. */
export async function signIn(input: unknown, from: TryFrom): Promise<Outcome<{ cookies: SessionCookie[]; personId: string }>> {
  const parsed = signInSchema.safeParse(input);
  if (!parsed.success)
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  const { email, password } = parsed.data;
  const wait = await takeTry(email, from);
  if (wait > 0)
    return bad(`Too many tries. Wait ${wait} ${wait === 1 ? 'second' : 'seconds'}, then try again, or choose a new password.`);
  const rows = await database().select().from(people).where(eq(people.email, email));
  const person = rows[0];
  const fits = await passwordFits(person?.passwordHash ?? null, password);
  if (!person || !fits || person.disabledAt !== null)
    return bad('E-mail and password do not fit together. Check both, or choose a new password.');
  await giveBackTry(email, from);
  await database().transaction(
    (transaction) =>
      recordAudit(
        transaction,
        { dealershipId: person.dealershipId, personId: person.id },
        { verb: 'person.signed-in', thing: 'person', thingId: person.id, summary: `${person.name} signed in.` },
      ),
    { behavior: 'immediate' },
  );
  return good({ cookies: await letIn(person.id, from.browserToken), personId: person.id });
}
