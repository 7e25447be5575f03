import 'server-only';
import { and, eq, inArray, type SQL } from 'drizzle-orm';
import type { SQLiteColumn } from 'drizzle-orm/sqlite-core';
import { database, type Transaction } from '@/db/client';
import { operationPeople, operations } from '@/db/schema';
import { NotFoundError } from '@/lib/errors';
import type { Viewer } from './model';

/** SQL condition: the operations this viewer may see (use where `operation` is in the query). */
export function operationInScope(viewer: Viewer): SQL {
  const ownDealership = eq(operations.dealershipId, viewer.dealershipId);
  if (viewer.role === 'manager') return ownDealership;
  return and(ownDealership, inArray(operations.id, assignedOperationIds(viewer))) as SQL;
}

/** SQL condition on any `operation_id` column: it is one of the operations this viewer may see. */
export function operationIdInScope(viewer: Viewer, operationId: SQLiteColumn): SQL {
  return inArray(operationId, database().select({ id: operations.id }).from(operations).where(operationInScope(viewer)));
}

function assignedOperationIds(viewer: Viewer) {
  return database()
    .select({ id: operationPeople.operationId })
    .from(operationPeople)
    .where(eq(operationPeople.personId, viewer.personId));
}

/** Throws NotFoundError unless the operation is in the viewer's scope; a stranger's guess learns nothing. */
export async function requireOperation(
  viewer: Viewer,
  operationId: string,
  connection: Transaction | null = null,
): Promise<void> {
  const rows = await (connection ?? database())
    .select({ id: operations.id })
    .from(operations)
    .where(and(eq(operations.id, operationId), operationInScope(viewer)))
    .limit(1);
  if (rows.length === 0) throw new NotFoundError('No such operation.');
}
