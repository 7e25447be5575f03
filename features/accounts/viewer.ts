import 'server-only';
import { cookies } from 'next/headers';
import { redirect } from 'next/navigation';
import { cache } from 'react';
import type { Viewer } from './model';
import { personOfSession, SESSION_COOKIE_NAME } from './sessions';
import { viewerOfPerson } from './viewer-of-person';

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
