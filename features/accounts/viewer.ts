import 'server-only';
import { and, eq, isNull } from 'drizzle-orm';
import { cookies } from 'next/headers';
import { redirect } from 'next/navigation';
import { cache } from 'react';
import { database } from '@/db/client';
import { dealerships, people } from '@/db/schema';
import type { Viewer } from './model';
import { personOfSession, SESSION_COOKIE_NAME } from './sessions';

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

/** Who is signed in, read once a request; `null` when nobody is. */
export const currentViewer = cache(async (): Promise<Viewer | null> => {
  const jar = await cookies();
  const value = jar.get(SESSION_COOKIE_NAME)?.value;
  if (!value) return null;
  const found = await personOfSession(value);
  if (!found) return null;
  if (found.renewed) {
    try {
      jar.set(found.renewed.name, found.renewed.value, found.renewed.attributes);
    } catch {
      // A page may not set cookies; the next action or route renews it.
    }
  }
  return viewerOfPerson(found.personId);
});

/** Who is signed in; sends a signed-out visitor to the sign-in page. */
export async function requireViewer(): Promise<Viewer> {
  const viewer = await currentViewer();
  if (!viewer) redirect('/sign-in');
  return viewer;
}
