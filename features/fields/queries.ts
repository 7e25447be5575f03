import 'server-only';
import { and, asc, eq, getTableColumns, inArray, isNull } from 'drizzle-orm';
import { database } from '@/db/client';
import { farms, fieldFacts, fields } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { operationIdInScope } from '@/features/accounts/scope';
import type { CystSource } from '@/features/placement/engine/model';
import { NotFoundError } from '@/lib/errors';
import { type Field, type FieldFacts, UNKNOWN_FACTS } from './model';

const FIELD_COLUMNS = {
  id: fields.id,
  operationId: fields.operationId,
  farmId: fields.farmId,
  farmName: farms.name,
  name: fields.name,
  boundary: fields.boundary,
  areaAcres: fields.areaAcres,
  latitude: fields.latitude,
  longitude: fields.longitude,
  state: fields.state,
  elevationFt: fields.elevationFt,
};

/** Fields of an operation in the viewer's scope, by farm and name. Archived ones are left out. */
export async function fieldsOf(viewer: Viewer, operationId: string): Promise<Field[]> {
  return database()
    .select(FIELD_COLUMNS)
    .from(fields)
    .leftJoin(farms, eq(farms.id, fields.farmId))
    .where(and(eq(fields.operationId, operationId), isNull(fields.archivedAt), operationIdInScope(viewer, fields.operationId)))
    .orderBy(asc(farms.name), asc(fields.name));
}

/** One field in the viewer's scope. Throws NotFoundError otherwise. */
export async function fieldOf(viewer: Viewer, fieldId: string): Promise<Field> {
  const [row] = await database()
    .select(FIELD_COLUMNS)
    .from(fields)
    .leftJoin(farms, eq(farms.id, fields.farmId))
    .where(and(eq(fields.id, fieldId), isNull(fields.archivedAt), operationIdInScope(viewer, fields.operationId)));
  if (!row) throw new NotFoundError('No such field.');
  return row;
}

function factsOfRow(row: typeof fieldFacts.$inferSelect): FieldFacts {
  const { fieldId, season, updatedAt, cystSourceLastGrown, ...facts } = row;
  return { ...facts, cystSourceLastGrown: cystSourceLastGrown as CystSource | null };
}

/** Facts of one field for a season; all unknown when nothing was said. Throws NotFoundError when out of scope. */
export async function factsOf(viewer: Viewer, fieldId: string, season: number): Promise<FieldFacts> {
  await fieldOf(viewer, fieldId);
  const [row] = await database()
    .select()
    .from(fieldFacts)
    .where(and(eq(fieldFacts.fieldId, fieldId), eq(fieldFacts.season, season)));
  return row ? factsOfRow(row) : UNKNOWN_FACTS;
}

/** Facts of every field of an operation for a season, by field id; fields nothing was said of are missing. */
export async function factsOfOperation(viewer: Viewer, operationId: string, season: number): Promise<Map<string, FieldFacts>> {
  const own = database()
    .select({ id: fields.id })
    .from(fields)
    .where(and(eq(fields.operationId, operationId), operationIdInScope(viewer, fields.operationId)));
  const rows = await database()
    .select(getTableColumns(fieldFacts))
    .from(fieldFacts)
    .where(and(eq(fieldFacts.season, season), inArray(fieldFacts.fieldId, own)));
  return new Map(rows.map((row) => [row.fieldId, factsOfRow(row)]));
}
