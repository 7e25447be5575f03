import 'server-only';
import { and, eq } from 'drizzle-orm';
import { outboxMails } from '@/db/schema';
import { environment } from '@/lib/env';
import { good, NotFoundError, type Outcome } from '@/lib/errors';
import { change } from '../gate';
import type { Viewer } from '../model';
import { mailIdSchema } from '../schemas';

/** Puts a failed mail back into the queue, with its attempts counted anew. */
export async function sendMailAgain(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['outbox', 'send'],
    schema: mailIdSchema,
    input,
    run: async (transaction, { mailId }) => {
      const [mail] = await transaction
        .update(outboxMails)
        .set({ state: environment().SMTP_URL ? 'queued' : 'kept', attempts: 0, nextAttemptAt: Date.now(), lastError: null })
        .where(
          and(eq(outboxMails.id, mailId), eq(outboxMails.dealershipId, viewer.dealershipId), eq(outboxMails.state, 'failed')),
        )
        .returning();
      if (!mail) throw new NotFoundError('No such failed mail.');
      return {
        ...good(null),
        audit: {
          verb: 'mail.sent-again',
          thing: 'mail',
          thingId: mailId,
          summary: `Sent the mail “${mail.subject}” to ${mail.to} again.`,
        },
      };
    },
  });
}
