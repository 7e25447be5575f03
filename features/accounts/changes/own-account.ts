import 'server-only';
import { and, eq, isNull } from 'drizzle-orm';
import { z } from 'zod';
import { database } from '@/db/client';
import { passwordResets, people } from '@/db/schema';
import { environment } from '@/lib/env';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { queueMail } from '@/lib/mail/outbox';
import { change } from '../gate';
import { giveBackTry, takeTry } from '../lock-out';
import { passwordChangedMail } from '../mails';
import type { Viewer } from '../model';
import { passwordProblem } from '../password-rules';
import { hashPassword, passwordFits } from '../passwords';
import { changePasswordSchema, ownAccountSchema } from '../schemas';
import { closeAllSessions } from '../sessions';

/** A person's own name and mail wishes. */
export async function changeOwnAccount(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['account', 'change'],
    schema: ownAccountSchema,
    input,
    run: async (transaction, form) => {
      await transaction.update(people).set(form).where(eq(people.id, viewer.personId));
      return {
        ...good(null),
        audit: {
          verb: 'person.changed',
          thing: 'person',
          thingId: viewer.personId,
          summary: `${form.name} changed their account.`,
        },
      };
    },
  });
}

/** A person's own password; signs out every session, this one too, and ends every open link for a new password. */
export async function changeOwnPassword(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  const parsed = changePasswordSchema.safeParse(input);
  if (!parsed.success)
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  const problem = passwordProblem(parsed.data.password, viewer.email);
  if (problem) return bad(problem, 'password');
  // Guessed here by whoever found an open session, the present password is no easier to find than at the door.
  const from = { address: `own account of ${viewer.personId}`, browserToken: null };
  const wait = await takeTry(viewer.email, from);
  if (wait > 0) return bad(`Too many tries. Wait ${wait} seconds, then try again.`, 'current');
  const [person] = await database().select().from(people).where(eq(people.id, viewer.personId));
  if (!person || !(await passwordFits(person.passwordHash, parsed.data.current)))
    return bad('This is not your present password.', 'current');
  await giveBackTry(viewer.email, from);
  const passwordHash = await hashPassword(parsed.data.password);
  const outcome = await change(viewer, {
    right: ['account', 'change'],
    schema: z.object({}),
    input: {},
    run: async (transaction) => {
      await transaction.update(people).set({ passwordHash }).where(eq(people.id, viewer.personId));
      await transaction
        .update(passwordResets)
        .set({ usedAt: Date.now() })
        .where(and(eq(passwordResets.personId, viewer.personId), isNull(passwordResets.usedAt)));
      await queueMail(transaction, {
        dealershipId: viewer.dealershipId,
        to: person.email,
        ...passwordChangedMail({ name: person.name, address: environment().address }),
        dedupeKey: `password-changed:${createId()}`,
      });
      return {
        ...good(null),
        audit: {
          verb: 'person.password-changed',
          thing: 'person',
          thingId: viewer.personId,
          summary: `${person.name} changed their password.`,
        },
      };
    },
  });
  if (outcome.ok) await closeAllSessions(viewer.personId);
  return outcome;
}

/** Ends every session of one's own, on every device. */
export async function signOutEverywhere(viewer: Viewer): Promise<Outcome<null>> {
  const outcome = await change(viewer, {
    right: ['account', 'change'],
    schema: z.object({}),
    input: {},
    run: async () => ({
      ...good(null),
      audit: {
        verb: 'person.signed-out-everywhere',
        thing: 'person',
        thingId: viewer.personId,
        summary: `${viewer.name} signed out everywhere.`,
      },
    }),
  });
  if (outcome.ok) await closeAllSessions(viewer.personId);
  return outcome;
}
