import 'server-only';
import { and, eq } from 'drizzle-orm';
import { sheetLinks } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { environment } from '@/lib/env';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId, createToken, sha256 } from '@/lib/ids';
import { addEvent, openPlan } from '../plan-record';
import { makeLinkSchema, revokeLinkSchema } from '../schemas';
import { HOLDING_STATES } from '../states';

const DAY_MILLISECONDS = 86_400_000;

/** Makes a link to the planting sheet for the crew: good for some days, shown once, only its hash kept. */
export function makeLink(viewer: Viewer, input: unknown): Promise<Outcome<{ linkId: string; link: string; expiresAt: number }>> {
  return change(viewer, {
    right: ['plan', 'share'],
    schema: makeLinkSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      if (!HOLDING_STATES.includes(plan.state)) return bad('Propose the plan first: the crew plants what stands, not a draft.');
      const token = createToken();
      const linkId = createId();
      const expiresAt = Date.now() + wanted.days * DAY_MILLISECONDS;
      await transaction.insert(sheetLinks).values({
        id: linkId,
        planId: plan.id,
        tokenHash: sha256(token),
        createdByPersonId: viewer.personId,
        expiresAt,
      });
      await addEvent(transaction, viewer, plan.id, {
        verb: 'crew link made',
        revision: plan.revision,
        snapshot: { words: [`good for ${wanted.days} days`] },
      });
      return {
        ...good({ linkId, link: `${environment().address}/sheet/${token}`, expiresAt }),
        audit: {
          verb: 'sheet.link-made',
          thing: 'plan',
          thingId: plan.id,
          operationId: plan.operationId,
          summary: `Made a crew link, good for ${wanted.days} days.`,
        },
      };
    },
  });
}

/** Revokes a crew link at once. Marks that were sent through it stay. */
export function revokeLink(viewer: Viewer, input: unknown): Promise<Outcome<{ linkId: string }>> {
  return change(viewer, {
    right: ['plan', 'share'],
    schema: revokeLinkSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      const [found] = await transaction
        .update(sheetLinks)
        .set({ revokedAt: Date.now() })
        .where(and(eq(sheetLinks.id, wanted.linkId), eq(sheetLinks.planId, plan.id)))
        .returning({ id: sheetLinks.id });
      if (!found) throw new NotFoundError('No such crew link on this plan.');
      await addEvent(transaction, viewer, plan.id, { verb: 'crew link revoked', revision: plan.revision });
      return {
        ...good({ linkId: found.id }),
        audit: {
          verb: 'sheet.link-revoked',
          thing: 'plan',
          thingId: plan.id,
          operationId: plan.operationId,
          summary: 'Revoked a crew link.',
        },
      };
    },
  });
}
