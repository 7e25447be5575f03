import 'server-only';
import { and, eq, isNotNull, isNull, ne } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { operationPeople, operations, people } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { requireOperation } from '@/features/accounts/scope';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { changedOperationSchema, newOperationSchema, operationIdSchema } from '../schemas';

/** Is the name free in the dealership? A second operation of the same name would be mistaken for the first. */
async function nameIsTaken(transaction: Transaction, viewer: Viewer, name: string, exceptId?: string): Promise<boolean> {
  const rows = await transaction
    .select({ id: operations.id })
    .from(operations)
    .where(
      and(
        eq(operations.dealershipId, viewer.dealershipId),
        eq(operations.name, name),
        exceptId ? ne(operations.id, exceptId) : undefined,
      ),
    );
  return rows.length > 0;
}

const TAKEN = 'Your dealership has an operation of this name already, perhaps archived. Add the town or the owner to the name.';

/** Makes an operation. A rep who makes one serves it; a manager names the rep, or nobody yet. */
export async function createOperation(viewer: Viewer, input: unknown): Promise<Outcome<{ operationId: string }>> {
  return change(viewer, {
    right: ['operation', 'create'],
    schema: newOperationSchema,
    input,
    run: async (transaction, { repId, ...form }) => {
      if (await nameIsTaken(transaction, viewer, form.name)) return bad(TAKEN, 'name');
      const serves = viewer.role === 'rep' ? viewer.personId : repId;
      if (serves) {
        const [rep] = await transaction
          .select({ id: people.id })
          .from(people)
          .where(
            and(
              eq(people.id, serves),
              eq(people.dealershipId, viewer.dealershipId),
              eq(people.role, 'rep'),
              isNull(people.disabledAt),
            ),
          );
        if (!rep) return bad('Choose a rep of your dealership.', 'repId');
      }
      const operationId = createId();
      await transaction.insert(operations).values({ id: operationId, dealershipId: viewer.dealershipId, ...form });
      if (serves) await transaction.insert(operationPeople).values({ operationId, personId: serves });
      return {
        ...good({ operationId }),
        audit: {
          verb: 'operation.created',
          thing: 'operation',
          thingId: operationId,
          operationId,
          summary: `Made the operation ${form.name}.`,
        },
      };
    },
  });
}

/** Renames an operation, or changes its county, state or note. */
export async function changeOperation(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['operation', 'change'],
    schema: changedOperationSchema,
    input,
    run: async (transaction, { operationId, ...form }) => {
      await requireOperation(viewer, operationId, transaction);
      if (await nameIsTaken(transaction, viewer, form.name, operationId)) return bad(TAKEN, 'name');
      const [before] = await transaction.select().from(operations).where(eq(operations.id, operationId));
      await transaction.update(operations).set(form).where(eq(operations.id, operationId));
      return {
        ...good(null),
        audit: {
          verb: 'operation.changed',
          thing: 'operation',
          thingId: operationId,
          operationId,
          summary:
            before?.name === form.name ? `Changed the particulars of ${form.name}.` : `Renamed ${before?.name} to ${form.name}.`,
          detail: {
            before: { name: before?.name, state: before?.state, county: before?.county, note: before?.note },
            after: form,
          },
        },
      };
    },
  });
}

async function setArchived(viewer: Viewer, input: unknown, archive: boolean): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['operation', 'change'],
    schema: operationIdSchema,
    input,
    run: async (transaction, { operationId }) => {
      await requireOperation(viewer, operationId, transaction);
      const [row] = await transaction
        .update(operations)
        .set({ archivedAt: archive ? Date.now() : null })
        .where(and(eq(operations.id, operationId), archive ? isNull(operations.archivedAt) : isNotNull(operations.archivedAt)))
        .returning();
      if (!row) throw new NotFoundError(archive ? 'This operation is archived already.' : 'This operation is not archived.');
      return {
        ...good(null),
        audit: {
          verb: archive ? 'operation.archived' : 'operation.restored',
          thing: 'operation',
          thingId: operationId,
          operationId,
          summary: archive ? `Archived the operation ${row.name}.` : `Brought the operation ${row.name} back.`,
        },
      };
    },
  });
}

/** Takes an operation out of every list. Nothing of it is lost; it can be brought back. */
export async function archiveOperation(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return setArchived(viewer, input, true);
}

/** Brings an archived operation back. */
export async function restoreOperation(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return setArchived(viewer, input, false);
}
