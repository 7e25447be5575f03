import 'server-only';
import { and, eq, gt, isNull } from 'drizzle-orm';
import { z } from 'zod';
import { database } from '@/db/client';
import { dealerships, invitations, people } from '@/db/schema';
import { environment } from '@/lib/env';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId, createToken, sha256 } from '@/lib/ids';
import { queueMail } from '@/lib/mail/outbox';
import { change, recordAudit } from './gate';
import { invitationMail, passwordChangedMail } from './mails';
import type { Viewer } from './model';
import { hashPassword, passwordFits } from './passwords';
import { changePasswordSchema, inviteSchema, ownAccountSchema, personIdSchema } from './schemas';
import { requireOperation } from './scope';
import { closeAllSessions } from './sessions';

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
      const taken = await transaction.select({ id: people.id }).from(people).where(eq(people.email, form.email));
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
    schema: z.object({ invitationId: z.string().min(1) }),
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
            gt(invitations.expiresAt, 0),
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

/** Disables an account: it is kept in every record, and can no longer sign in. */
export async function disablePerson(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  const outcome = await change(viewer, {
    right: ['person', 'disable'],
    schema: personIdSchema,
    input,
    run: async (transaction, { personId }) => {
      if (personId === viewer.personId) return bad('You cannot disable your own account. Ask another manager.');
      const [person] = await transaction
        .update(people)
        .set({ disabledAt: Date.now() })
        .where(and(eq(people.id, personId), eq(people.dealershipId, viewer.dealershipId)))
        .returning();
      if (!person) throw new NotFoundError('No such person.');
      return {
        ...good({ personId }),
        audit: {
          verb: 'person.disabled',
          thing: 'person',
          thingId: personId,
          summary: `Disabled the account of ${person.name}.`,
        },
      };
    },
  });
  if (!outcome.ok) return outcome;
  await closeAllSessions(outcome.value.personId);
  return good(null);
}

/** Lets a disabled account sign in again. */
export async function enablePerson(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['person', 'disable'],
    schema: personIdSchema,
    input,
    run: async (transaction, { personId }) => {
      const [person] = await transaction
        .update(people)
        .set({ disabledAt: null })
        .where(and(eq(people.id, personId), eq(people.dealershipId, viewer.dealershipId)))
        .returning();
      if (!person) throw new NotFoundError('No such person.');
      return {
        ...good(null),
        audit: {
          verb: 'person.enabled',
          thing: 'person',
          thingId: personId,
          summary: `Enabled the account of ${person.name} again.`,
        },
      };
    },
  });
}

/** A person's own name and mail wishes. */
export async function changeOwnAccount(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  const parsed = ownAccountSchema.safeParse(input);
  if (!parsed.success)
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  await database().transaction(async (transaction) => {
    await transaction.update(people).set(parsed.data).where(eq(people.id, viewer.personId));
    await recordAudit(transaction, viewer, {
      verb: 'person.changed',
      thing: 'person',
      thingId: viewer.personId,
      summary: `${parsed.data.name} changed their account.`,
    });
  });
  return good(null);
}

/** A person's own password; signs out every session, this one too. */
export async function changeOwnPassword(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  const parsed = changePasswordSchema.safeParse(input);
  if (!parsed.success)
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  const [person] = await database().select().from(people).where(eq(people.id, viewer.personId));
  if (!person || !(await passwordFits(person.passwordHash, parsed.data.current)))
    return bad('This is not your present password.', 'current');
  const passwordHash = await hashPassword(parsed.data.password);
  await database().transaction(async (transaction) => {
    await transaction.update(people).set({ passwordHash }).where(eq(people.id, viewer.personId));
    const mail = passwordChangedMail({ name: person.name, address: environment().address });
    await queueMail(transaction, {
      dealershipId: viewer.dealershipId,
      to: person.email,
      ...mail,
      dedupeKey: `password-changed:${createId()}`,
    });
    await recordAudit(transaction, viewer, {
      verb: 'person.password-changed',
      thing: 'person',
      thingId: viewer.personId,
      summary: `${person.name} changed their password.`,
    });
  });
  await closeAllSessions(viewer.personId);
  return good(null);
}

/** The season being planned and the soybean price used for dollars. */
export async function changeDealership(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: z.object({
      name: z.string().trim().min(2, 'Write the name of the dealership.').max(100),
      currentSeason: z.coerce.number('Write the season as a year.').int().min(2000).max(2100),
      soybeanPriceDollarsPerBushel: z.coerce.number('Write the price in dollars.').min(1, 'At least $1.').max(50, 'At most $50.'),
    }),
    input,
    run: async (transaction, form) => {
      await transaction
        .update(dealerships)
        .set({
          name: form.name,
          currentSeason: form.currentSeason,
          soybeanPriceCentsPerBushel: Math.round(form.soybeanPriceDollarsPerBushel * 100),
        })
        .where(eq(dealerships.id, viewer.dealershipId));
      return {
        ...good(null),
        audit: {
          verb: 'dealership.changed',
          thing: 'dealership',
          thingId: viewer.dealershipId,
          summary: `Set the season to ${form.currentSeason} and soybeans to $${form.soybeanPriceDollarsPerBushel.toFixed(2)} a bushel.`,
        },
      };
    },
  });
}
