import 'server-only';
import { and, eq, isNull } from 'drizzle-orm';
import { invitations, people } from '@/db/schema';
import { environment } from '@/lib/env';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId, createToken, sha256 } from '@/lib/ids';
import { queueMail } from '@/lib/mail/outbox';
import { change } from '../gate';
import { invitationMail } from '../mails';
import type { Viewer } from '../model';
import { invitationIdSchema, inviteSchema } from '../schemas';
import { requireOperation } from '../scope';

const INVITATION_DAYS = 14;

/** Invites a person by mail. Reps invite growers of operations they serve; managers invite anyone of the dealership. */
export async function invitePerson(viewer: Viewer, input: unknown): Promise<Outcome<{ invitationId: string; link: string }>> {
  const token = createToken();
  const link = `${environment().address}/invitation/${token}`;
  return change(viewer, {
    right: ['person', 'invite'],
    schema: inviteSchema,
    input,
    run: async (transaction, form) => {
      if (form.role !== 'grower' && viewer.role !== 'manager') return bad('Only a manager invites reps and managers.', 'role');
      const operationId = form.role === 'grower' ? (form.operationId as string) : null;
      if (operationId) await requireOperation(viewer, operationId, transaction);
      // An account with another dealership is nobody's business here; its owner is told when they open the link.
      const taken = await transaction
        .select({ id: people.id })
        .from(people)
        .where(and(eq(people.email, form.email), eq(people.dealershipId, viewer.dealershipId)));
      if (taken.length > 0) return bad('There is an account for this e-mail already.', 'email');
      await transaction
        .update(invitations)
        .set({ withdrawnAt: Date.now() })
        .where(
          and(
            eq(invitations.dealershipId, viewer.dealershipId),
            eq(invitations.email, form.email),
            isNull(invitations.acceptedAt),
          ),
        );
      const id = createId();
      await transaction.insert(invitations).values({
        id,
        dealershipId: viewer.dealershipId,
        email: form.email,
        name: form.name,
        role: form.role,
        operationId,
        tokenHash: sha256(token),
        invitedByPersonId: viewer.personId,
        expiresAt: Date.now() + INVITATION_DAYS * 86_400_000,
      });
      const mail = invitationMail({
        name: form.name,
        inviter: viewer.name,
        dealership: viewer.dealershipName,
        role: form.role,
        link,
        days: INVITATION_DAYS,
      });
      await queueMail(transaction, { dealershipId: viewer.dealershipId, to: form.email, ...mail, dedupeKey: `invitation:${id}` });
      return {
        ...good({ invitationId: id, link }),
        audit: {
          verb: 'person.invited',
          thing: 'invitation',
          thingId: id,
          operationId: operationId ?? undefined,
          summary: `Invited ${form.name} (${form.email}) as ${form.role}.`,
        },
      };
    },
  });
}

/** Takes an open invitation back; its link stops working. */
export async function withdrawInvitation(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['person', 'invite'],
    schema: invitationIdSchema,
    input,
    run: async (transaction, { invitationId }) => {
      const own = viewer.role === 'manager' ? undefined : eq(invitations.invitedByPersonId, viewer.personId);
      const [row] = await transaction
        .update(invitations)
        .set({ withdrawnAt: Date.now() })
        .where(
          and(
            eq(invitations.id, invitationId),
            eq(invitations.dealershipId, viewer.dealershipId),
            isNull(invitations.acceptedAt),
            isNull(invitations.withdrawnAt),
            own,
          ),
        )
        .returning();
      if (!row) throw new NotFoundError('No such open invitation.');
      return {
        ...good(null),
        audit: {
          verb: 'invitation.withdrawn',
          thing: 'invitation',
          thingId: invitationId,
          summary: `Withdrew the invitation of ${row.name}.`,
        },
      };
    },
  });
}
