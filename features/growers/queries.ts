import 'server-only';
import { and, asc, count, eq, isNull, sql } from 'drizzle-orm';
import { database } from '@/db/client';
import { farms, fields, operations, plans, soilSamples } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { operationInScope, requireOperation } from '@/features/accounts/scope';
import { NotFoundError } from '@/lib/errors';
import type { Farm, Operation } from './model';

export interface OperationSummary extends Operation {
  fieldCount: number;
  areaAcres: number;
  soilSampleCount: number;
  /** State of the plan of the season being planned; `null` when there is none yet. */
  planState: string | null;
}

/** Operations the viewer may see, with how far each one is in the season being planned. */
export async function operationsFor(viewer: Viewer): Promise<OperationSummary[]> {
  const fieldTotals = database()
    .select({
      operationId: fields.operationId,
      fieldCount: count().as('field_count'),
      areaAcres: sql<number>`sum(${fields.areaAcres})`.as('area_total'),
    })
    .from(fields)
    .where(isNull(fields.archivedAt))
    .groupBy(fields.operationId)
    .as('field_totals');
  const sampleTotals = database()
    .select({ operationId: soilSamples.operationId, sampleCount: count().as('sample_count') })
    .from(soilSamples)
    .groupBy(soilSamples.operationId)
    .as('sample_totals');
  const rows = await database()
    .select({
      id: operations.id,
      name: operations.name,
      state: operations.state,
      county: operations.county,
      fieldCount: fieldTotals.fieldCount,
      areaAcres: fieldTotals.areaAcres,
      soilSampleCount: sampleTotals.sampleCount,
      planState: plans.state,
    })
    .from(operations)
    .leftJoin(fieldTotals, eq(fieldTotals.operationId, operations.id))
    .leftJoin(sampleTotals, eq(sampleTotals.operationId, operations.id))
    .leftJoin(plans, and(eq(plans.operationId, operations.id), eq(plans.season, viewer.season)))
    .where(and(operationInScope(viewer), isNull(operations.archivedAt)))
    .orderBy(asc(operations.name));
  return rows.map((row) => ({
    ...row,
    fieldCount: row.fieldCount ?? 0,
    areaAcres: row.areaAcres ?? 0,
    soilSampleCount: row.soilSampleCount ?? 0,
  }));
}

/** One operation in the viewer's scope. Throws NotFoundError otherwise. */
export async function operationOf(viewer: Viewer, operationId: string): Promise<Operation> {
  const [row] = await database()
    .select({ id: operations.id, name: operations.name, state: operations.state, county: operations.county })
    .from(operations)
    .where(and(eq(operations.id, operationId), operationInScope(viewer)));
  if (!row) throw new NotFoundError('No such operation.');
  return row;
}

/** The operation a page looks at: the one asked for when it is in scope, else the first; `null` when there is none. */
export async function chosenOperation(viewer: Viewer, requestedId?: string): Promise<OperationSummary | null> {
  const all = await operationsFor(viewer);
  if (requestedId) {
    const found = all.find((operation) => operation.id === requestedId);
    if (!found) throw new NotFoundError('No such operation.');
    return found;
  }
  return all[0] ?? null;
}

/** Farms of an operation, by name. */
export async function farmsOf(viewer: Viewer, operationId: string): Promise<Farm[]> {
  await requireOperation(viewer, operationId);
  return database()
    .select({ id: farms.id, operationId: farms.operationId, name: farms.name })
    .from(farms)
    .where(eq(farms.operationId, operationId))
    .orderBy(asc(farms.name));
}
