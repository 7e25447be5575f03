import 'server-only';
import type { Transaction } from '@/db/client';
import { outboxMails } from '@/db/schema';
import { environment } from '@/lib/env';
import { createId } from '@/lib/ids';

export interface Mail {
  dealershipId: string | null;
  to: string;
  subject: string;
  text: string;
  html: string;
  /** The same key is queued once, however often it is asked for. */
  dedupeKey: string;
}

// Kept on the process, because Next may load this module more than once.
const holder = globalThis as unknown as { hilumMailQueued?: () => void };

/** Sets what happens in this process after a mail was queued: the sender wakes. */
export function onMailQueued(wake: () => void): void {
  holder.hilumMailQueued = wake;
}

/** Puts a mail into the outbox, in the transaction that causes it. Without an SMTP address it is kept for /outbox. */
export async function queueMail(transaction: Transaction, mail: Mail): Promise<void> {
  await transaction
    .insert(outboxMails)
    .values({ id: createId(), ...mail, state: environment().SMTP_URL ? 'queued' : 'kept' })
    .onConflictDoNothing({ target: outboxMails.dedupeKey });
  holder.hilumMailQueued?.();
}
