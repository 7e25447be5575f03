import 'server-only';
import { and, asc, eq, lte, sql } from 'drizzle-orm';
import nodemailer, { type Transporter } from 'nodemailer';
import { database } from '@/db/client';
import { outboxMails } from '@/db/schema';
import { environment } from '@/lib/env';
import { sha256 } from '@/lib/ids';
import { onMailQueued } from './outbox';

/**
 * Sends what the outbox holds. A mail is claimed (its row set to `sending`) before it goes out, so that two servers never
 * send it twice; a mail whose server stopped between the claim and the answer is not sent again by itself, because it may
 * have arrived: it shows as failed, and a manager can send it again.
 */

const TICK_MILLISECONDS = 15_000;
const AFTER_QUEUEING_MILLISECONDS = 500;
const CLAIM_MILLISECONDS = 10 * 60_000;
const MOST_ATTEMPTS = 10;

type Row = typeof outboxMails.$inferSelect;

/** Wait before the next attempt after so many failed ones: 1, 2, 4 … minutes, at most 6 hours; milliseconds. */
export function retryDelayMilliseconds(attempts: number): number {
  return Math.min(6 * 3_600_000, 60_000 * 2 ** Math.max(0, attempts - 1));
}

async function claimNext(now: number): Promise<Row | null> {
  return database().transaction(
    async (transaction) => {
      const [due] = await transaction
        .select({ id: outboxMails.id })
        .from(outboxMails)
        .where(and(eq(outboxMails.state, 'queued'), lte(outboxMails.nextAttemptAt, now)))
        .orderBy(asc(outboxMails.nextAttemptAt), asc(outboxMails.createdAt))
        .limit(1);
      if (!due) return null;
      const [claimed] = await transaction
        .update(outboxMails)
        .set({ state: 'sending', attempts: sql`${outboxMails.attempts} + 1`, nextAttemptAt: now + CLAIM_MILLISECONDS })
        .where(eq(outboxMails.id, due.id))
        .returning();
      return claimed ?? null;
    },
    { behavior: 'immediate' },
  );
}

/** Mails whose claim ran out: the server stopped while they were on their way. */
async function reportLostClaims(now: number): Promise<void> {
  await database()
    .update(outboxMails)
    .set({
      state: 'failed',
      lastError: 'The server stopped while this mail was on its way. It may have arrived. Send it again if it did not.',
    })
    .where(and(eq(outboxMails.state, 'sending'), lte(outboxMails.nextAttemptAt, now)));
}

/** Does the mail server refuse this mail for good, so that trying again is idle? */
function isRefusedForGood(error: unknown): boolean {
  const { responseCode, code } = error as { responseCode?: number; code?: string };
  return code === 'EENVELOPE' && responseCode !== undefined && responseCode >= 500;
}

/** A sent mail without the secrets of its links, so that a copy of the database opens no account. */
export function withoutSecrets(text: string): string {
  return text.replace(/\/(invitation|reset-password|sheet)\/[\w-]{16,}/g, '/$1/…');
}

async function sendOne(mail: Row, transporter: Transporter, now: number): Promise<void> {
  let failure: unknown = null;
  try {
    await transporter.sendMail({
      from: environment().MAIL_FROM,
      to: { name: '', address: mail.to },
      subject: mail.subject,
      text: mail.text,
      html: mail.html,
      // The same mail has the same id, so that a mail server can drop one sent again.
      messageId: `<${sha256(mail.dedupeKey).slice(0, 32)}@${new URL(environment().address).hostname}>`,
      headers: { 'Auto-Submitted': 'auto-generated' },
    });
  } catch (error) {
    failure = error;
  }
  if (failure === null) {
    await database()
      .update(outboxMails)
      .set({
        state: 'sent',
        sentAt: now,
        lastError: null,
        text: withoutSecrets(mail.text),
        html: withoutSecrets(mail.html),
      })
      .where(eq(outboxMails.id, mail.id));
    return;
  }
  const over = mail.attempts >= MOST_ATTEMPTS || isRefusedForGood(failure);
  await database()
    .update(outboxMails)
    .set({
      state: over ? 'failed' : 'queued',
      nextAttemptAt: now + retryDelayMilliseconds(mail.attempts),
      lastError: failure instanceof Error ? failure.message.slice(0, 500) : String(failure),
    })
    .where(eq(outboxMails.id, mail.id));
}

/**
 * Sends every mail that is due, one after the other, over SMTP_URL; answers how many it took in hand. Without SMTP_URL
 * it does nothing. `now` is a moment in milliseconds.
 */
export async function sendDueMails(now = Date.now()): Promise<number> {
  const { SMTP_URL } = environment();
  if (!SMTP_URL) return 0;
  await reportLostClaims(now);
  let taken = 0;
  let transporter: Transporter | null = null;
  try {
    for (let mail = await claimNext(now); mail; mail = await claimNext(now)) {
      transporter ??= nodemailer.createTransport({ url: SMTP_URL, connectionTimeout: 20_000, greetingTimeout: 20_000 });
      await sendOne(mail, transporter, now);
      taken += 1;
    }
  } finally {
    transporter?.close();
  }
  return taken;
}

const holder = globalThis as unknown as { hilumMailSender?: NodeJS.Timeout };

/** Starts the sender in this process: at once, every quarter minute, and shortly after a mail is queued. */
export function startMailSender(): void {
  if (holder.hilumMailSender || !environment().SMTP_URL) return;
  let busy = false;
  const run = async () => {
    if (busy) return;
    busy = true;
    try {
      await sendDueMails();
    } catch (error) {
      console.error('The mail sender failed and will try again.', error);
    } finally {
      busy = false;
    }
  };
  holder.hilumMailSender = setInterval(run, TICK_MILLISECONDS);
  holder.hilumMailSender.unref();
  onMailQueued(() => setTimeout(run, AFTER_QUEUEING_MILLISECONDS).unref());
  void run();
}
