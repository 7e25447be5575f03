import 'server-only';
import { pointOnFeature } from '@turf/turf';
import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { farms, fieldFacts, fields, planRows, soilMapUnits, soilSamples } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { operationIdInScope } from '@/features/accounts/scope';
import { markKept, markUndone, uploadOf } from '@/features/imports/machine';
import { uploadIdSchema } from '@/features/imports/schemas';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import type { Boundary } from './model';
import { readUpload } from './read-upload';
import { copyFactsSchema, fieldIdSchema, keepBoundariesSchema, renameFieldSchema, saveFactsSchema } from './schemas';
import { stateOf } from './state';

async function requireField(transaction: Transaction, viewer: Viewer, fieldId: string): Promise<typeof fields.$inferSelect> {
  const [row] = await transaction
    .select()
    .from(fields)
    .where(and(eq(fields.id, fieldId), isNull(fields.archivedAt), operationIdInScope(viewer, fields.operationId)));
  if (!row) throw new NotFoundError('No such field.');
  return row;
}

/** The farm of that name in the operation, made when it is new; `null` for no farm. */
async function farmIdOf(transaction: Transaction, operationId: string, name: string | null): Promise<string | null> {
  if (!name) return null;
  const [known] = await transaction
    .select({ id: farms.id })
    .from(farms)
    .where(and(eq(farms.operationId, operationId), eq(farms.name, name)));
  if (known) return known.id;
  const id = createId();
  await transaction.insert(farms).values({ id, operationId, name });
  return id;
}

/** Columns that follow from a boundary. */
function placeOf(boundary: Boundary, areaAcres: number) {
  const [longitude, latitude] = pointOnFeature(boundary).geometry.coordinates as [number, number];
  return { boundary, areaAcres, latitude, longitude, state: stateOf(latitude, longitude) };
}

/** Keeps the facts of a field for a season; an empty fact is unknown. */
export async function saveFacts(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['field', 'change'],
    schema: saveFactsSchema,
    input,
    run: async (transaction, { fieldId, season, facts }) => {
      const field = await requireField(transaction, viewer, fieldId);
      const values = { ...facts, updatedAt: Date.now() };
      await transaction
        .insert(fieldFacts)
        .values({ fieldId, season, ...values })
        .onConflictDoUpdate({ target: [fieldFacts.fieldId, fieldFacts.season], set: values });
      return {
        ...good(null),
        audit: {
          verb: 'field.facts-changed',
          thing: 'field',
          thingId: fieldId,
          operationId: field.operationId,
          summary: `Changed the ${season} facts of ${field.name}.`,
        },
      };
    },
  });
}

/** Copies chosen facts of one field to others of the same operation. */
export async function copyFacts(viewer: Viewer, input: unknown): Promise<Outcome<{ count: number }>> {
  return change(viewer, {
    right: ['field', 'change'],
    schema: copyFactsSchema,
    input,
    run: async (transaction, { fieldId, season, toFieldIds, names }) => {
      const from = await requireField(transaction, viewer, fieldId);
      const [facts] = await transaction
        .select()
        .from(fieldFacts)
        .where(and(eq(fieldFacts.fieldId, fieldId), eq(fieldFacts.season, season)));
      if (!facts) return bad(`Nothing is known of ${from.name} for ${season} yet, so there is nothing to copy.`);
      const chosen = Object.fromEntries(names.map((name) => [name, facts[name as keyof typeof facts]]));
      const targets = await transaction
        .select({ id: fields.id })
        .from(fields)
        .where(and(inArray(fields.id, toFieldIds), eq(fields.operationId, from.operationId), isNull(fields.archivedAt)));
      if (targets.length !== new Set(toFieldIds).size)
        return bad('One of the fields is not of this operation. Nothing was copied.');
      for (const { id } of targets) {
        const values = { ...chosen, updatedAt: Date.now() };
        await transaction
          .insert(fieldFacts)
          .values({ fieldId: id, season, ...values })
          .onConflictDoUpdate({ target: [fieldFacts.fieldId, fieldFacts.season], set: values });
      }
      return {
        ...good({ count: targets.length }),
        audit: {
          verb: 'field.facts-copied',
          thing: 'field',
          thingId: fieldId,
          operationId: from.operationId,
          summary: `Copied ${names.length} facts of ${from.name} to ${targets.length} fields.`,
        },
      };
    },
  });
}

/** Changes a field's name and farm. */
export async function renameField(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['field', 'change'],
    schema: renameFieldSchema,
    input,
    run: async (transaction, { fieldId, name, farm }) => {
      const field = await requireField(transaction, viewer, fieldId);
      const farmId = await farmIdOf(transaction, field.operationId, farm);
      await transaction.update(fields).set({ name, farmId, updatedAt: Date.now() }).where(eq(fields.id, fieldId));
      return {
        ...good(null),
        audit: {
          verb: 'field.renamed',
          thing: 'field',
          thingId: fieldId,
          operationId: field.operationId,
          summary: field.name === name ? `Moved ${name} to ${farm ?? 'no farm'}.` : `Renamed ${field.name} to ${name}.`,
        },
      };
    },
  });
}

/** Takes a field out of the lists; its soil tests and plans are kept. */
export async function archiveField(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['field', 'change'],
    schema: fieldIdSchema,
    input,
    run: async (transaction, { fieldId }) => {
      const field = await requireField(transaction, viewer, fieldId);
      await transaction.update(fields).set({ archivedAt: Date.now() }).where(eq(fields.id, fieldId));
      return {
        ...good(null),
        audit: {
          verb: 'field.archived',
          thing: 'field',
          thingId: fieldId,
          operationId: field.operationId,
          summary: `Took ${field.name} out of the fields.`,
        },
      };
    },
  });
}

/**
 * Keeps the chosen shapes of an import: reads the original again, then writes all of them in one transaction or none.
 */
export async function keepBoundaries(
  viewer: Viewer,
  input: unknown,
): Promise<Outcome<{ keptCount: number; replacedCount: number; areaAcres: number; operationId: string }>> {
  const parsed = keepBoundariesSchema.safeParse(input);
  if (!parsed.success)
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  const upload = await uploadOf(viewer, parsed.data.uploadId);
  const operationId = upload.operationId;
  if (!operationId || upload.kind !== 'boundaries') return bad('This import holds no boundaries.');
  const read = await readUpload(viewer, parsed.data);
  if (!read.ok) return read;
  const shapes = read.value.features;
  return change(viewer, {
    right: ['field', 'create'],
    schema: keepBoundariesSchema,
    input,
    run: async (transaction, form) => {
      let areaAcres = 0;
      let replacedCount = 0;
      for (const shape of form.shapes) {
        const source = shapes[shape.index];
        if (!source?.geometry)
          return bad(
            `Shape ${shape.index + 1} cannot be kept: ${source?.problems[0] ?? 'it is not in the file.'} Nothing was kept.`,
          );
        const farmId = await farmIdOf(transaction, operationId, shape.farm);
        const place = placeOf(source.geometry, source.areaAcres);
        areaAcres += source.areaAcres;
        if (shape.replaces) {
          const [replaced] = await transaction
            .update(fields)
            .set({ ...place, name: shape.name, farmId, updatedAt: Date.now() })
            .where(and(eq(fields.id, shape.replaces), eq(fields.operationId, operationId)))
            .returning({ id: fields.id });
          if (!replaced) return bad(`The field that "${shape.name}" should replace is not there any more. Nothing was kept.`);
          replacedCount += 1;
        } else {
          await transaction
            .insert(fields)
            .values({ id: createId(), operationId, farmId, name: shape.name, uploadId: upload.id, ...place });
        }
      }
      const keptCount = form.shapes.length - replacedCount;
      const words = `${keptCount} ${keptCount === 1 ? 'field' : 'fields'} kept${replacedCount > 0 ? `, ${replacedCount} replaced` : ''}, ${areaAcres.toFixed(1)} ac.`;
      const marked = await markKept(transaction, upload.id, words, { crs: form.crs, nameColumn: form.nameColumn });
      if (!marked.ok) return marked;
      return {
        ...good({ keptCount, replacedCount, areaAcres, operationId }),
        audit: {
          verb: 'field.imported',
          thing: 'upload',
          thingId: upload.id,
          operationId,
          summary: `Brought in boundaries from ${upload.fileNames.join(', ')}: ${words}`,
        },
      };
    },
  });
}

/** Takes a kept boundary import back whole, within its season and while nothing depends on its fields. */
export async function undoBoundaries(viewer: Viewer, input: unknown): Promise<Outcome<{ count: number }>> {
  return change(viewer, {
    right: ['field', 'create'],
    schema: uploadIdSchema,
    input,
    run: async (transaction, { uploadId }) => {
      const upload = await uploadOf(viewer, uploadId);
      if (upload.season !== viewer.season)
        return bad(`This import is of the ${upload.season} season and can no longer be taken back.`);
      const own = await transaction
        .select({ id: fields.id, name: fields.name })
        .from(fields)
        .where(eq(fields.uploadId, uploadId));
      const ids = own.map((field) => field.id);
      const blocked = await dependants(transaction, own);
      if (blocked) return bad(`${blocked} Take that back first. Nothing was changed.`);
      if (ids.length > 0) await transaction.delete(fields).where(inArray(fields.id, ids));
      const marked = await markUndone(transaction, uploadId);
      if (!marked.ok) return marked;
      return {
        ...good({ count: ids.length }),
        audit: {
          verb: 'field.import-undone',
          thing: 'upload',
          thingId: uploadId,
          operationId: upload.operationId ?? undefined,
          summary: `Took back ${ids.length} fields of ${upload.fileNames.join(', ')}.`,
        },
      };
    },
  });
}

async function dependants(transaction: Transaction, own: { id: string; name: string }[]): Promise<string | null> {
  const ids = own.map((field) => field.id);
  if (ids.length === 0) return null;
  const called = (fieldId: string | null) => own.find((field) => field.id === fieldId)?.name ?? 'A field';
  const [sample] = await transaction
    .select({ fieldId: soilSamples.fieldId })
    .from(soilSamples)
    .where(inArray(soilSamples.fieldId, ids))
    .limit(1);
  if (sample) return `${called(sample.fieldId)} has soil tests.`;
  const [unit] = await transaction
    .select({ fieldId: soilMapUnits.fieldId })
    .from(soilMapUnits)
    .where(inArray(soilMapUnits.fieldId, ids))
    .limit(1);
  if (unit) return `${called(unit.fieldId)} has a soil survey.`;
  const [row] = await transaction
    .select({ fieldId: planRows.fieldId })
    .from(planRows)
    .where(inArray(planRows.fieldId, ids))
    .limit(1);
  return row ? `${called(row.fieldId)} is on a plan.` : null;
}
