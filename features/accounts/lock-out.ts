import 'server-only';
import { inArray, sql } from 'drizzle-orm';
import { database } from '@/db/client';
import { signInTries } from '@/db/schema';
import { sha256 } from '@/lib/ids';

/** Free tries before waiting starts: for one e-mail from one address, and for one address over all e-mails. */
const FREE_TRIES = { pair: 5, address: 30 } as const;
const LONGEST_WAIT_SECONDS = 900;
const FORGOTTEN_AFTER_MILLISECONDS = 24 * 3_600_000;

/**
 * Guessing is slowed, an owner is not locked out: failures are counted for the pair of e-mail and network address (and, far
 * more generously, for the address), never for the e-mail alone, so that a stranger's tries do not shut the door on its owner.
 */
function keysOf(email: string, address: string): { pair: string; address: string } {
  return { pair: sha256(`${email}|${address}`), address: sha256(address) };
}

/** Wait after n failures: doubles from one second once the free tries are used up; seconds. */
export function waitSeconds(failures: number, freeTries: number): number {
  const over = failures - freeTries;
  return over < 0 ? 0 : Math.min(LONGEST_WAIT_SECONDS, 2 ** over);
}

/** Seconds this e-mail and address must still wait before another try; 0 when they may try. */
export async function secondsToWait(email: string, address: string, now = Date.now()): Promise<number> {
  const keys = keysOf(email, address);
  const rows = await database()
    .select()
    .from(signInTries)
    .where(inArray(signInTries.key, [keys.pair, keys.address]));
  return rows.reduce((longest, row) => {
    if (now - row.lastFailureAt > FORGOTTEN_AFTER_MILLISECONDS) return longest;
    const wait = waitSeconds(row.failures, row.key === keys.pair ? FREE_TRIES.pair : FREE_TRIES.address);
    return Math.max(longest, Math.ceil(wait - (now - row.lastFailureAt) / 1000));
  }, 0);
}

/** Counts a failed try. */
export async function noteFailure(email: string, address: string, now = Date.now()): Promise<void> {
  const keys = keysOf(email, address);
  for (const key of [keys.pair, keys.address]) {
    await database()
      .insert(signInTries)
      .values({ key, failures: 1, lastFailureAt: now })
      .onConflictDoUpdate({
        target: signInTries.key,
        set: {
          failures: sql`case when ${now} - ${signInTries.lastFailureAt} > ${FORGOTTEN_AFTER_MILLISECONDS} then 1 else ${signInTries.failures} + 1 end`,
          lastFailureAt: now,
        },
      });
  }
}

/** Forgets the failures of an e-mail and address after a good sign-in. */
export async function forgetFailures(email: string, address: string): Promise<void> {
  const keys = keysOf(email, address);
  await database()
    .delete(signInTries)
    .where(inArray(signInTries.key, [keys.pair]));
}
