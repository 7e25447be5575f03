import 'server-only';
import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { fields, laboratoryLayouts, soilMapUnits, soilSamples } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { markKept, markUndone, uploadOf } from '@/features/imports/machine';
import { uploadIdSchema } from '@/features/imports/schemas';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import type { InspectedSample, SoilChoices } from './import-model';
import { type PreparedSoil, prepareSoil } from './inspect';
import { keepSoilSchema, keepSurveySchema } from './schemas';
import { prepareSurvey } from './survey/prepare';

/** Rows of one insert: SQLite takes a limited number of values in a statement. */
const ROWS_AT_ONCE = 500;

/** Are these still fields of the operation? Boundaries may change between checking and keeping. */
async function areFieldsOf(transaction: Transaction, operationId: string, ids: string[]): Promise<boolean> {
  const rows = await transaction
    .select({ id: fields.id })
    .from(fields)
    .where(and(eq(fields.operationId, operationId), isNull(fields.archivedAt)));
  const known = new Set(rows.map((row) => row.id));
  return ids.every((id) => known.has(id));
}

/**
 * Keeps the samples of an import: reads the original again, then writes all of them in one transaction or none. Points in no
 * field are kept and wait for a field; rows with neither point nor field, and repeats, are left out. What was matched by hand
 * is remembered for the dealership.
 */
export async function keepSoilTests(
  viewer: Viewer,
  input: unknown,
): Promise<Outcome<{ keptCount: number; strayCount: number; leftOutCount: number; operationId: string; words: string }>> {
  const parsed = keepSoilSchema.safeParse(input);
  if (!parsed.success)
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  const upload = await uploadOf(viewer, parsed.data.uploadId);
  const operationId = upload.operationId;
  if (!operationId || upload.kind !== 'soil-tests') return bad('This import holds no soil tests.');
  const prepared = await prepareSoil(viewer, { id: upload.id, operationId }, parsed.data.choices);
  if (!prepared.ok) return prepared;
  const kept = prepared.value.samples.filter(
    (sample) => (sample.fieldId !== null || sample.longitude !== null) && (parsed.data.keepRepeats || sample.repeats === null),
  );
  if (kept.length === 0)
    return bad('Nothing is left to keep: every sample repeats one that is kept, or has neither a place nor a field.');
  return change(viewer, {
    right: ['soil', 'create'],
    schema: keepSoilSchema,
    input,
    run: async (transaction, { choices }) => {
      const fieldIds = [...new Set(kept.flatMap((sample) => sample.fieldId ?? []))];
      if (!(await areFieldsOf(transaction, operationId, fieldIds)))
        return bad('The fields changed meanwhile. Nothing was kept. Check the file again.');
      const laboratory = prepared.value.read.laboratory;
      const rows = kept.map((sample) => rowOf(sample, { operationId, uploadId: upload.id, laboratory }));
      for (let at = 0; at < rows.length; at += ROWS_AT_ONCE)
        await transaction.insert(soilSamples).values(rows.slice(at, at + ROWS_AT_ONCE));
      await rememberLayouts(transaction, viewer.dealershipId, prepared.value, choices);
      const strayCount = kept.filter((sample) => sample.fieldId === null).length;
      const leftOutCount = prepared.value.samples.length - kept.length;
      const words = `${kept.length.toLocaleString('en-US')} soil ${kept.length === 1 ? 'test' : 'tests'} kept in ${fieldIds.length} ${fieldIds.length === 1 ? 'field' : 'fields'}${strayCount > 0 ? `, ${strayCount} of them in no field yet` : ''}.`;
      const marked = await markKept(transaction, upload.id, words, choices);
      if (!marked.ok) return marked;
      return {
        ...good({ keptCount: kept.length, strayCount, leftOutCount, operationId, words }),
        audit: {
          verb: 'soil.imported',
          thing: 'upload',
          thingId: upload.id,
          operationId,
          summary: `Brought in soil tests from ${upload.fileNames.join(', ')}: ${words}`,
        },
      };
    },
  });
}

function rowOf(
  sample: InspectedSample,
  about: { operationId: string; uploadId: string; laboratory: string | null },
): typeof soilSamples.$inferInsert {
  const { id, depthInches, cec, row, how, nearest, repeats, fieldName, ...values } = sample;
  return {
    ...values,
    ...about,
    id: createId(),
    sampleNumber: id,
    depthFromInches: depthInches?.[0] ?? null,
    depthToInches: depthInches?.[1] ?? null,
    cationExchangeCapacity: cec,
  };
}

async function rememberLayouts(
  transaction: Transaction,
  dealershipId: string,
  { read }: PreparedSoil,
  choices: SoilChoices,
): Promise<void> {
  const answers = Object.fromEntries(
    (['bufferMethod', 'phosphorusMethod', 'nutrientUnit'] as const).flatMap((name) =>
      choices[name] ? [[`@${name}`, choices[name]]] : [],
    ),
  );
  if (!choices.columns && Object.keys(answers).length === 0) return;
  for (const { table, signature } of read.signatures) {
    const matched = read.columns.filter((column) => column.table === table);
    const columns = { ...Object.fromEntries(matched.map((column) => [column.header, column.meaning ?? ''])), ...answers };
    const here = and(eq(laboratoryLayouts.dealershipId, dealershipId), eq(laboratoryLayouts.headerSignature, signature));
    await transaction.delete(laboratoryLayouts).where(here);
    await transaction
      .insert(laboratoryLayouts)
      .values({ id: createId(), dealershipId, headerSignature: signature, laboratory: read.laboratory, columns });
  }
}

/** Keeps the map units of a soil survey for every field it covers, in place of those kept before, in one transaction. */
export async function keepSurvey(
  viewer: Viewer,
  input: unknown,
): Promise<Outcome<{ fieldCount: number; unitCount: number; operationId: string; words: string }>> {
  const parsed = keepSurveySchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((problem) => ({ message: problem.message })));
  const upload = await uploadOf(viewer, parsed.data.uploadId);
  const operationId = upload.operationId;
  if (!operationId || upload.kind !== 'soil-survey') return bad('This import holds no soil survey.');
  const prepared = await prepareSurvey(viewer, { id: upload.id, operationId });
  if (!prepared.ok) return prepared;
  const covered = prepared.value.fields.filter((field) => field.mapUnits.length > 0);
  if (covered.length === 0) return bad('The survey covers none of the fields, so there is nothing to keep.');
  return change(viewer, {
    right: ['soil', 'create'],
    schema: keepSurveySchema,
    input,
    run: async (transaction) => {
      const ids = covered.map((field) => field.id);
      if (!(await areFieldsOf(transaction, operationId, ids)))
        return bad('The fields changed meanwhile. Nothing was kept. Check the file again.');
      await transaction.delete(soilMapUnits).where(inArray(soilMapUnits.fieldId, ids));
      const rows = covered.flatMap((field) =>
        field.mapUnits.map((unit) => ({ ...unit, id: createId(), fieldId: field.id, uploadId: upload.id })),
      );
      for (let at = 0; at < rows.length; at += ROWS_AT_ONCE)
        await transaction.insert(soilMapUnits).values(rows.slice(at, at + ROWS_AT_ONCE));
      const words = `Soil survey kept for ${covered.length} ${covered.length === 1 ? 'field' : 'fields'}: ${rows.length} map-unit areas.`;
      const marked = await markKept(transaction, upload.id, words, {});
      if (!marked.ok) return marked;
      return {
        ...good({ fieldCount: covered.length, unitCount: rows.length, operationId, words }),
        audit: {
          verb: 'soil.survey-imported',
          thing: 'upload',
          thingId: upload.id,
          operationId,
          summary: `Brought in a soil survey from ${upload.fileNames.join(', ')}: ${words}`,
        },
      };
    },
  });
}

/** Takes a kept import of soil tests or of a soil survey back whole, within its season. */
export async function undoSoilImport(viewer: Viewer, input: unknown): Promise<Outcome<{ count: number }>> {
  return change(viewer, {
    right: ['soil', 'create'],
    schema: uploadIdSchema,
    input,
    run: async (transaction, { uploadId }) => {
      const upload = await uploadOf(viewer, uploadId);
      if (upload.kind !== 'soil-tests' && upload.kind !== 'soil-survey') return bad('This import holds no soil data.');
      if (upload.season !== viewer.season)
        return bad(`This import is of the ${upload.season} season and can no longer be taken back.`);
      const table = upload.kind === 'soil-tests' ? soilSamples : soilMapUnits;
      const gone = await transaction.delete(table).where(eq(table.uploadId, uploadId)).returning({ id: table.id });
      const marked = await markUndone(transaction, uploadId);
      if (!marked.ok) return marked;
      return {
        ...good({ count: gone.length }),
        audit: {
          verb: 'soil.import-undone',
          thing: 'upload',
          thingId: uploadId,
          operationId: upload.operationId ?? undefined,
          summary: `Took back ${gone.length} rows of ${upload.fileNames.join(', ')}.`,
        },
      };
    },
  });
}
