import 'server-only';
import { and, eq, inArray, isNull } from 'drizzle-orm';
import { operationPeople, operations, people } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { requireOperation } from '@/features/accounts/scope';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { assignmentSchema } from '../schemas';

/** Assigns a rep to an operation, or gives a grower of the dealership a further one. */
export async function assignPerson(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['operation', 'assign'],
    schema: assignmentSchema,
    input,
    run: async (transaction, { operationId, personId }) => {
      await requireOperation(viewer, operationId, transaction);
      const [person] = await transaction
        .select({ name: people.name, role: people.role })
        .from(people)
        .where(
          and(
            eq(people.id, personId),
            eq(people.dealershipId, viewer.dealershipId),
            inArray(people.role, ['rep', 'grower']),
            isNull(people.disabledAt),
          ),
        );
      if (!person) return bad('Choose a rep or grower of your dealership. Managers see every operation without it.', 'personId');
      const [operation] = await transaction
        .select({ name: operations.name })
        .from(operations)
        .where(eq(operations.id, operationId));
      const added = await transaction
        .insert(operationPeople)
        .values({ operationId, personId })
        .onConflictDoNothing()
        .returning({ personId: operationPeople.personId });
      if (added.length === 0) return bad(`${person.name} is assigned already.`, 'personId');
      return {
        ...good(null),
        audit: {
          verb: 'operation.assigned',
          thing: 'operation',
          thingId: operationId,
          operationId,
          summary: `Assigned ${person.name} (${person.role}) to ${operation?.name}.`,
          detail: { personId },
        },
      };
    },
  });
}

/** Takes a rep or a grower off an operation: they see it no more. Their name stays in its history. */
export async function unassignPerson(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['operation', 'assign'],
    schema: assignmentSchema,
    input,
    run: async (transaction, { operationId, personId }) => {
      await requireOperation(viewer, operationId, transaction);
      const removed = await transaction
        .delete(operationPeople)
        .where(and(eq(operationPeople.operationId, operationId), eq(operationPeople.personId, personId)))
        .returning();
      if (removed.length === 0) throw new NotFoundError('This person is not assigned to the operation.');
      const [person] = await transaction.select({ name: people.name }).from(people).where(eq(people.id, personId));
      const [operation] = await transaction
        .select({ name: operations.name })
        .from(operations)
        .where(eq(operations.id, operationId));
      return {
        ...good(null),
        audit: {
          verb: 'operation.unassigned',
          thing: 'operation',
          thingId: operationId,
          operationId,
          summary: `Took ${person?.name} off ${operation?.name}.`,
          detail: { personId },
        },
      };
    },
  });
}
