import 'server-only';
import { and, asc, count, countDistinct, eq, gt, isNotNull, isNull, max, type SQL, sql } from 'drizzle-orm';
import { database } from '@/db/client';
import {
  auditEntries,
  farms,
  fieldFacts,
  fieldScores,
  fields,
  invitations,
  operationPeople,
  operations,
  people,
  plans,
  soilSamples,
} from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import { operationInScope, requireOperation } from '@/features/accounts/scope';
import { NotAllowedError, NotFoundError } from '@/lib/errors';
import type { Farm, Operation, OperationProgress } from './model';

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

/**
 * How far each operation in the viewer's scope is in the season being planned, by name: `archived` ones or those at work.
 * For reps and managers. One query a figure, whatever the number of operations.
 */
export async function progressOf(viewer: Viewer, options: { archived?: boolean } = {}): Promise<OperationProgress[]> {
  if (!may(viewer, 'person', 'read')) throw new NotAllowedError('Growers see their own fields and plans.');
  return readProgress(viewer, options.archived ? isNotNull(operations.archivedAt) : isNull(operations.archivedAt));
}

/** How far one operation is, archived or not. Throws NotFoundError outside the viewer's scope. */
export async function progressOfOperation(
  viewer: Viewer,
  operationId: string,
): Promise<OperationProgress & { note: string | null }> {
  if (!may(viewer, 'person', 'read')) throw new NotFoundError('No such operation.');
  const [progress] = await readProgress(viewer, eq(operations.id, operationId));
  if (!progress) throw new NotFoundError('No such operation.');
  const [row] = await database().select({ note: operations.note }).from(operations).where(eq(operations.id, operationId));
  return { ...progress, note: row?.note ?? null };
}

async function readProgress(viewer: Viewer, which: SQL): Promise<OperationProgress[]> {
  const mine = and(operationInScope(viewer), which);
  const ofField = and(mine, isNull(fields.archivedAt));
  const [rows, farmCounts, fieldCounts, soilCounts, factCounts, scoreCounts, planStates, persons, invited, activity] =
    await Promise.all([
      database()
        .select({
          id: operations.id,
          name: operations.name,
          state: operations.state,
          county: operations.county,
          archivedAt: operations.archivedAt,
        })
        .from(operations)
        .where(mine)
        .orderBy(asc(operations.name)),
      database()
        .select({ id: operations.id, value: count() })
        .from(operations)
        .innerJoin(farms, eq(farms.operationId, operations.id))
        .where(mine)
        .groupBy(operations.id),
      database()
        .select({ id: operations.id, value: count(), acres: sql<number>`sum(${fields.areaAcres})` })
        .from(operations)
        .innerJoin(fields, eq(fields.operationId, operations.id))
        .where(ofField)
        .groupBy(operations.id),
      database()
        .select({ id: operations.id, value: countDistinct(fields.id) })
        .from(operations)
        .innerJoin(fields, eq(fields.operationId, operations.id))
        .innerJoin(soilSamples, eq(soilSamples.fieldId, fields.id))
        .where(ofField)
        .groupBy(operations.id),
      database()
        .select({ id: operations.id, value: count() })
        .from(operations)
        .innerJoin(fields, eq(fields.operationId, operations.id))
        .innerJoin(fieldFacts, and(eq(fieldFacts.fieldId, fields.id), eq(fieldFacts.season, viewer.season)))
        .where(ofField)
        .groupBy(operations.id),
      database()
        .select({ id: operations.id, value: count() })
        .from(operations)
        .innerJoin(fields, eq(fields.operationId, operations.id))
        .innerJoin(fieldScores, and(eq(fieldScores.fieldId, fields.id), eq(fieldScores.season, viewer.season)))
        .where(ofField)
        .groupBy(operations.id),
      database()
        .select({ id: operations.id, value: plans.state })
        .from(operations)
        .innerJoin(plans, and(eq(plans.operationId, operations.id), eq(plans.season, viewer.season)))
        .where(mine),
      database()
        .select({ operationId: operations.id, id: people.id, name: people.name, role: people.role })
        .from(operations)
        .innerJoin(operationPeople, eq(operationPeople.operationId, operations.id))
        .innerJoin(people, eq(people.id, operationPeople.personId))
        .where(and(mine, isNull(people.disabledAt)))
        .orderBy(asc(people.name)),
      database()
        .select({ id: operations.id, value: count() })
        .from(operations)
        .innerJoin(invitations, eq(invitations.operationId, operations.id))
        .where(and(mine, isNull(invitations.acceptedAt), isNull(invitations.withdrawnAt), gt(invitations.expiresAt, Date.now())))
        .groupBy(operations.id),
      database()
        .select({ id: operations.id, value: max(auditEntries.at) })
        .from(operations)
        .innerJoin(auditEntries, eq(auditEntries.operationId, operations.id))
        .where(mine)
        .groupBy(operations.id),
    ]);
  const number = (list: { id: string; value: number }[], id: string) => list.find((one) => one.id === id)?.value ?? 0;
  return rows.map(({ archivedAt, ...row }) => ({
    ...row,
    archived: archivedAt !== null,
    farmCount: number(farmCounts, row.id),
    fieldCount: number(fieldCounts, row.id),
    areaAcres: fieldCounts.find((one) => one.id === row.id)?.acres ?? 0,
    fieldsWithSoilTests: number(soilCounts, row.id),
    fieldsWithFacts: number(factCounts, row.id),
    fieldsScored: number(scoreCounts, row.id),
    planState: planStates.find((one) => one.id === row.id)?.value ?? null,
    growers: persons.filter((one) => one.operationId === row.id && one.role === 'grower').map(({ id, name }) => ({ id, name })),
    reps: persons.filter((one) => one.operationId === row.id && one.role === 'rep').map(({ id, name }) => ({ id, name })),
    invitedGrowers: number(invited, row.id),
    lastActivityAt: activity.find((one) => one.id === row.id)?.value ?? null,
  }));
}
