import 'server-only';
import { and, eq, gt, inArray, lt, sql } from 'drizzle-orm';
import { database, type Transaction } from '@/db/client';
import { knownBrowsers, people, signInTries } from '@/db/schema';
import { sha256 } from '@/lib/ids';

/**
 * Guessing is slowed, an owner is not locked out. Failures are counted by three things at once:
 *
 * | counted by | free tries | longest wait | slows |
 * |---|---|---|---|
 * | e-mail and network address | 5 | 15 min | one guesser at one account |
 * | network address | 30 | 15 min | one guesser at many accounts |
 * | e-mail | 40 | 1 min | many addresses, or invented ones, at one account |
 *
 * A browser its owner has signed in from before is counted by itself alone, so that strangers never make an owner wait;
 * a new browser becomes known by the mailed link for a new password.
 */
const LIMITS = {
  browser: { freeTries: 5, longestWaitSeconds: 900 },
  pair: { freeTries: 5, longestWaitSeconds: 900 },
  address: { freeTries: 30, longestWaitSeconds: 900 },
  email: { freeTries: 40, longestWaitSeconds: 60 },
} as const;
type Counted = keyof typeof LIMITS;

const FORGOTTEN_AFTER_MILLISECONDS = 24 * 3_600_000;

/** Where a try to sign in comes from. */
export interface TryFrom {
  address: string;
  /** The secret of the browser's cookie, if it has one. */
  browserToken: string | null;
}

function keysOf(email: string, from: TryFrom, known: boolean): Map<string, Counted> {
  if (known) return new Map([[sha256(`browser|${email}|${from.browserToken}`), 'browser']]);
  return new Map([
    [sha256(`pair|${email}|${from.address}`), 'pair'],
    [sha256(`address|${from.address}`), 'address'],
    [sha256(`email|${email}`), 'email'],
  ]);
}

/** Wait after so many failures: doubles from one second once the free tries are used up; seconds. */
export function waitSeconds(failures: number, counted: Counted): number {
  const { freeTries, longestWaitSeconds } = LIMITS[counted];
  const over = failures - freeTries;
  return over < 0 ? 0 : Math.min(longestWaitSeconds, 2 ** over);
}

async function isKnownBrowser(connection: Transaction, email: string, token: string | null): Promise<boolean> {
  if (!token) return false;
  const rows = await connection
    .select({ id: people.id })
    .from(knownBrowsers)
    .innerJoin(people, eq(people.id, knownBrowsers.personId))
    .where(and(eq(knownBrowsers.tokenHash, sha256(token)), eq(people.email, email)));
  return rows.length > 0;
}

/**
 * Takes one try: answers the seconds still to wait, or 0 after counting this try as a failure. It is counted before the
 * password is looked at, so that a thousand tries at once are a thousand tries; a good one is given back.
 */
export async function takeTry(email: string, from: TryFrom, now = Date.now()): Promise<number> {
  return database().transaction(
    async (transaction) => {
      const forgotten = now - FORGOTTEN_AFTER_MILLISECONDS;
      await transaction.delete(signInTries).where(lt(signInTries.lastFailureAt, forgotten));
      const keys = keysOf(email, from, await isKnownBrowser(transaction, email, from.browserToken));
      const rows = await transaction
        .select()
        .from(signInTries)
        .where(inArray(signInTries.key, [...keys.keys()]));
      const wait = Math.max(
        0,
        ...rows.map((row) =>
          Math.ceil(waitSeconds(row.failures, keys.get(row.key) as Counted) - (now - row.lastFailureAt) / 1000),
        ),
      );
      if (wait > 0) return wait;
      for (const key of keys.keys()) {
        await transaction
          .insert(signInTries)
          .values({ key, failures: 1, lastFailureAt: now })
          .onConflictDoUpdate({
            target: signInTries.key,
            set: { failures: sql`${signInTries.failures} + 1`, lastFailureAt: now },
          });
      }
      return 0;
    },
    { behavior: 'immediate' },
  );
}

/** Gives a good try back: its own counter starts anew, the shared ones forget this one try only. */
export async function giveBackTry(email: string, from: TryFrom): Promise<void> {
  await database().transaction(
    async (transaction) => {
      const known = await isKnownBrowser(transaction, email, from.browserToken);
      const keys = [...keysOf(email, from, known)];
      const own = keys.filter(([, counted]) => counted === 'pair' || counted === 'browser').map(([key]) => key);
      const shared = keys.filter(([, counted]) => counted === 'address' || counted === 'email').map(([key]) => key);
      await transaction.delete(signInTries).where(inArray(signInTries.key, own));
      await transaction
        .update(signInTries)
        .set({ failures: sql`${signInTries.failures} - 1` })
        .where(and(inArray(signInTries.key, shared), gt(signInTries.failures, 0)));
    },
    { behavior: 'immediate' },
  );
}

/** Remembers a browser as one its owner has signed in from. */
export async function rememberBrowser(personId: string, token: string): Promise<void> {
  await database()
    .insert(knownBrowsers)
    .values({ tokenHash: sha256(token), personId })
    .onConflictDoNothing();
}
