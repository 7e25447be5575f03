import 'server-only';
import { and, eq } from 'drizzle-orm';
import { people } from '@/db/schema';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { change } from '../gate';
import type { Viewer } from '../model';
import { personIdSchema } from '../schemas';
import { closeAllSessions } from '../sessions';

/** Disables an account: it is kept in every record, and can no longer sign in. */
export async function disablePerson(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  const outcome = await change(viewer, {
    right: ['person', 'disable'],
    schema: personIdSchema,
    input,
    run: async (transaction, { personId }) => {
      if (personId === viewer.personId) return bad('You cannot disable your own account. Ask another manager.');
      const [person] = await transaction
        .update(people)
        .set({ disabledAt: Date.now() })
        .where(and(eq(people.id, personId), eq(people.dealershipId, viewer.dealershipId)))
        .returning();
      if (!person) throw new NotFoundError('No such person.');
      return {
        ...good({ personId }),
        audit: {
          verb: 'person.disabled',
          thing: 'person',
          thingId: personId,
          summary: `Disabled the account of ${person.name}.`,
        },
      };
    },
  });
  if (!outcome.ok) return outcome;
  await closeAllSessions(outcome.value.personId);
  return good(null);
}

/** Lets a disabled account sign in again. */
export async function enablePerson(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['person', 'disable'],
    schema: personIdSchema,
    input,
    run: async (transaction, { personId }) => {
      const [person] = await transaction
        .update(people)
        .set({ disabledAt: null })
        .where(and(eq(people.id, personId), eq(people.dealershipId, viewer.dealershipId)))
        .returning();
      if (!person) throw new NotFoundError('No such person.');
      return {
        ...good(null),
        audit: {
          verb: 'person.enabled',
          thing: 'person',
          thingId: personId,
          summary: `Enabled the account of ${person.name} again.`,
        },
      };
    },
  });
}
