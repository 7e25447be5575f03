import 'server-only';
import { and, eq, ne } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { farms } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { requireOperation } from '@/features/accounts/scope';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { newFarmSchema, renamedFarmSchema } from '../schemas';

async function nameIsTaken(transaction: Transaction, operationId: string, name: string, exceptId = ''): Promise<boolean> {
  const rows = await transaction
    .select({ id: farms.id })
    .from(farms)
    .where(and(eq(farms.operationId, operationId), eq(farms.name, name), ne(farms.id, exceptId)));
  return rows.length > 0;
}

/** Adds a farm to an operation. */
export async function addFarm(viewer: Viewer, input: unknown): Promise<Outcome<{ farmId: string }>> {
  return change(viewer, {
    right: ['operation', 'change'],
    schema: newFarmSchema,
    input,
    run: async (transaction, { operationId, name }) => {
      await requireOperation(viewer, operationId, transaction);
      if (await nameIsTaken(transaction, operationId, name)) return bad('The operation has a farm of this name already.', 'name');
      const farmId = createId();
      await transaction.insert(farms).values({ id: farmId, operationId, name });
      return {
        ...good({ farmId }),
        audit: { verb: 'farm.added', thing: 'farm', thingId: farmId, operationId, summary: `Added the farm ${name}.` },
      };
    },
  });
}

/** Renames a farm; its fields stay on it. */
export async function renameFarm(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['operation', 'change'],
    schema: renamedFarmSchema,
    input,
    run: async (transaction, { operationId, farmId, name }) => {
      await requireOperation(viewer, operationId, transaction);
      if (await nameIsTaken(transaction, operationId, name, farmId))
        return bad('The operation has a farm of this name already.', 'name');
      const [before] = await transaction
        .select({ name: farms.name })
        .from(farms)
        .where(and(eq(farms.id, farmId), eq(farms.operationId, operationId)));
      if (!before) throw new NotFoundError('No such farm.');
      await transaction.update(farms).set({ name }).where(eq(farms.id, farmId));
      return {
        ...good(null),
        audit: {
          verb: 'farm.renamed',
          thing: 'farm',
          thingId: farmId,
          operationId,
          summary: `Renamed the farm ${before.name} to ${name}.`,
        },
      };
    },
  });
}
