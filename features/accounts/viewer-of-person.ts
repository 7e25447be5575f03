import 'server-only';
import { and, eq, isNull } from 'drizzle-orm';
import { database } from '@/db/client';
import { dealerships, people } from '@/db/schema';
import type { Viewer } from './model';

/** The viewer of a person's id; `null` when the person is unknown or disabled. */
export async function viewerOfPerson(personId: string): Promise<Viewer | null> {
  const rows = await database()
    .select({
      personId: people.id,
      dealershipId: people.dealershipId,
      dealershipName: dealerships.name,
      season: dealerships.currentSeason,
      role: people.role,
      name: people.name,
      email: people.email,
    })
    .from(people)
    .innerJoin(dealerships, eq(dealerships.id, people.dealershipId))
    .where(and(eq(people.id, personId), isNull(people.disabledAt)));
  return rows[0] ?? null;
}
