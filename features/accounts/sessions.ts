import 'server-only';
import { DrizzleSQLiteAdapter } from '@lucia-auth/adapter-drizzle';
import { type Adapter, type DatabaseSession, Lucia, TimeSpan } from 'lucia';
import { database } from '@/db/client';
import { people, sessions } from '@/db/schema';
import { environment } from '@/lib/env';
import { sha256 } from '@/lib/ids';

/**
 * Lucia with hashed session ids: the cookie carries a secret, the database only its SHA-256, so a stolen copy of the
 * database signs nobody in. Everything else of the project asks viewer.ts and never sees Lucia.
 */
function hashingAdapter(): Adapter {
  const inner = new DrizzleSQLiteAdapter(database(), sessions, people);
  return {
    deleteSession: (id) => inner.deleteSession(sha256(id)),
    deleteUserSessions: (userId) => inner.deleteUserSessions(userId),
    deleteExpiredSessions: () => inner.deleteExpiredSessions(),
    getUserSessions: (userId) => inner.getUserSessions(userId),
    setSession: (session: DatabaseSession) => inner.setSession({ ...session, id: sha256(session.id) }),
    updateSessionExpiration: (id, expiresAt) => inner.updateSessionExpiration(sha256(id), expiresAt),
    async getSessionAndUser(id) {
      const [session, user] = await inner.getSessionAndUser(sha256(id));
      return [session && { ...session, id }, user];
    },
  };
}

let made: Lucia | null = null;

function lucia(): Lucia {
  made ??= new Lucia(hashingAdapter(), {
    // Rolling: used in the second half of its life, a session is renewed.
    sessionExpiresIn: new TimeSpan(30, 'd'),
    sessionCookie: {
      name: 'hilum_session',
      // The cookie outlives the session: a page cannot send a new cookie, so the database alone says when it ends.
      expires: false,
      attributes: { sameSite: 'lax', path: '/', secure: environment().address.startsWith('https:') },
    },
  });
  return made;
}

export interface SessionCookie {
  name: string;
  value: string;
  attributes: {
    httpOnly?: boolean;
    secure?: boolean;
    sameSite?: 'lax' | 'strict' | 'none';
    path?: string;
    maxAge?: number;
    expires?: Date;
  };
}

export const SESSION_COOKIE_NAME = 'hilum_session';
export const BROWSER_COOKIE_NAME = 'hilum_browser';

/** The cookie by which a browser is known again (lock-out.ts). It signs nobody in. */
export function browserCookie(token: string): SessionCookie {
  return {
    name: BROWSER_COOKIE_NAME,
    value: token,
    attributes: {
      httpOnly: true,
      sameSite: 'lax',
      path: '/',
      secure: environment().address.startsWith('https:'),
      maxAge: 400 * 86_400,
    },
  };
}

/** Opens a session for a person and answers the cookie that carries it (httpOnly, same-site, secure over https). */
export async function openSession(personId: string): Promise<SessionCookie> {
  await lucia().deleteExpiredSessions();
  const session = await lucia().createSession(personId, {});
  const cookie = lucia().createSessionCookie(session.id);
  return { name: cookie.name, value: cookie.value, attributes: cookie.attributes };
}

/** The person behind a cookie's value, and a new cookie when the session was just renewed. */
export async function personOfSession(value: string): Promise<{ personId: string; renewed: SessionCookie | null } | null> {
  const { session } = await lucia().validateSession(value);
  if (!session) return null;
  const cookie = session.fresh ? lucia().createSessionCookie(session.id) : null;
  return {
    personId: session.userId,
    renewed: cookie && { name: cookie.name, value: cookie.value, attributes: cookie.attributes },
  };
}

/** Ends one session and answers the cookie that clears it. */
export async function closeSession(value: string): Promise<SessionCookie> {
  await lucia().invalidateSession(value);
  const cookie = lucia().createBlankSessionCookie();
  return { name: cookie.name, value: cookie.value, attributes: cookie.attributes };
}

/** Ends every session of a person: sign out everywhere, a changed password, a disabled account. */
export async function closeAllSessions(personId: string): Promise<void> {
  await lucia().invalidateUserSessions(personId);
}
