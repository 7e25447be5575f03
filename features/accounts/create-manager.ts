import 'server-only';
import { eq } from 'drizzle-orm';
import { database } from '@/db/client';
import { dealerships, people } from '@/db/schema';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { recordAudit } from './gate';
import { hashPassword } from './passwords';
import { newManagerSchema } from './schemas';

/** The crop year people plan in a month: from July on, the next one. */
export function seasonAt(date: Date): number {
  return date.getUTCMonth() >= 6 ? date.getUTCFullYear() + 1 : date.getUTCFullYear();
}

/**
 * Makes a manager from the command line, and the dealership when its name is new. Nobody can do this over the web:
 * everyone else comes by invitation.
 */
export async function createManager(input: unknown): Promise<Outcome<{ personId: string; dealershipId: string }>> {
  const parsed = newManagerSchema.safeParse(input);
  if (!parsed.success) {
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  }
  const { dealershipName, name, email, password } = parsed.data;
  const passwordHash = await hashPassword(password);
  return database().transaction(
    async (transaction) => {
      const taken = await transaction.select({ id: people.id }).from(people).where(eq(people.email, email));
      if (taken.length > 0) return bad(`There is an account for ${email} already.`, 'email');
      const known = await transaction
        .select({ id: dealerships.id })
        .from(dealerships)
        .where(eq(dealerships.name, dealershipName));
      const dealershipId = known[0]?.id ?? createId();
      if (known.length === 0) {
        await transaction
          .insert(dealerships)
          .values({ id: dealershipId, name: dealershipName, currentSeason: seasonAt(new Date()) });
      }
      const personId = createId();
      await transaction.insert(people).values({ id: personId, dealershipId, email, name, role: 'manager', passwordHash });
      await recordAudit(
        transaction,
        { dealershipId, personId: null },
        { verb: 'person.created', thing: 'person', thingId: personId, summary: `Made ${name} a manager from the command line.` },
      );
      return good({ personId, dealershipId });
    },
    { behavior: 'immediate' },
  );
}
