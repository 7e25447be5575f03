import 'server-only';
import { and, eq } from 'drizzle-orm';
import { database } from '@/db/client';
import { laboratoryLayouts } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { fieldsOf } from '@/features/fields/queries';
import { markChecked, markFailed, readUploadFiles, uploadOf } from '@/features/imports/machine';
import { bad, good, type Outcome } from '@/lib/errors';
import { groupBy } from '@/lib/group';
import { runInWorker } from '@/lib/worker/run';
import { type InspectedSample, MOST_SHOWN, type SoilChoices, type SoilInspection } from './import-model';
import { nameKey, type Placed, type PlacedField, repeatsOf, sampleKey } from './locate';
import { samplesOfOperation } from './queries';
import { type ReadSoilTests, SOIL_LIMITS } from './readers/read-soil-tests';
import type { ReadSample } from './readers/samples';
import { inspectSoilSchema } from './schemas';

/** Everything of a file as it would be kept: read in a worker, given to fields, held against what is kept. */
export interface PreparedSoil {
  read: ReadSoilTests;
  samples: InspectedSample[];
}

/** Layouts this dealership matched before, by signature. */
async function layoutsOf(viewer: Viewer): Promise<Record<string, Record<string, string>>> {
  const rows = await database()
    .select()
    .from(laboratoryLayouts)
    .where(and(eq(laboratoryLayouts.dealershipId, viewer.dealershipId)));
  return Object.fromEntries(rows.map((row) => [row.headerSignature, row.columns]));
}

/** Reads a stored upload and gives its samples to fields. Used to check and again to keep. */
export async function prepareSoil(
  viewer: Viewer,
  upload: { id: string; operationId: string },
  choices: SoilChoices,
): Promise<Outcome<PreparedSoil>> {
  const files = await readUploadFiles(viewer, upload.id);
  const { columns, bufferMethod, phosphorusMethod, nutrientUnit } = choices;
  const fields: PlacedField[] = (await fieldsOf(viewer, upload.operationId)).map(({ id, name, boundary }) => ({
    id,
    name,
    geometry: boundary,
  }));
  const outcome = await runInWorker<{ read: ReadSoilTests; placed: Placed[] }>(
    'read-soil-tests',
    {
      files,
      options: { columns, bufferMethod, phosphorusMethod, nutrientUnit, layouts: await layoutsOf(viewer) },
      fields,
      fieldNames: choices.fieldNames ?? {},
    },
    { timeoutSeconds: SOIL_LIMITS.seconds, memoryMegabytes: SOIL_LIMITS.memoryMegabytes },
  );
  if (!outcome.ok) return outcome;
  const { read, placed } = outcome.value;
  if (read.format === '') return bad(read.problems);
  const dated: ReadSample[] = read.samples.map((sample) =>
    sample.sampledOn || !choices.sampledOn ? sample : { ...sample, sampledOn: choices.sampledOn },
  );
  const kept = new Set(
    (await samplesOfOperation(viewer, upload.operationId)).flatMap(
      (sample) =>
        sampleKey(
          {
            id: sample.sampleNumber,
            longitude: sample.longitude,
            latitude: sample.latitude,
            sampledOn: sample.sampledOn,
            depthInches: sample.depthFromInches === null ? null : [sample.depthFromInches, sample.depthToInches ?? 0],
          },
          sample.fieldId,
        ) ?? [],
    ),
  );
  const repeats = repeatsOf(dated, placed, kept);
  return good({
    read,
    samples: dated.map((sample, index) => ({
      ...sample,
      ...(placed[index] as (typeof placed)[number]),
      repeats: repeats[index] ?? null,
    })),
  });
}

/** Reads a stored upload and says what it holds, without keeping any; remembers the answer for a later visit. */
export async function inspectSoilTests(viewer: Viewer, input: unknown): Promise<Outcome<SoilInspection>> {
  const parsed = inspectSoilSchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((problem) => ({ message: problem.message })));
  const { uploadId, choices } = parsed.data;
  const upload = await uploadOf(viewer, uploadId);
  if (!upload.operationId || upload.kind !== 'soil-tests') return bad('This import holds no soil tests.');
  if (['kept', 'undone', 'discarded'].includes(upload.state))
    return bad(`This import is ${upload.state} already. Choose the file again to bring it in once more.`);
  const prepared = await prepareSoil(viewer, { id: upload.id, operationId: upload.operationId }, choices);
  if (!prepared.ok) {
    await markFailed(
      viewer,
      upload.id,
      prepared.problems.map((problem) => problem.message),
    );
    return prepared;
  }
  const inspection = inspectionOf(prepared.value, choices);
  await markChecked(viewer, upload.id, { ...inspection, samples: [] }, choices);
  return good(inspection);
}

function inspectionOf({ read, samples }: PreparedSoil, choices: SoilChoices): SoilInspection {
  const count = (test: (sample: InspectedSample) => boolean) => samples.filter(test).length;
  const unmet = groupBy(
    samples.filter((sample) => sample.how === 'none' && sample.longitude === null),
    (sample) => nameKey(sample.fieldName),
  );
  return {
    format: read.format,
    laboratory: read.laboratory,
    columns: read.columns,
    remembered: !choices.columns && read.signatures.some((one) => one.remembered),
    asks: { ...read.asks, sampledOn: samples.some((sample) => sample.sampledOn === null) || choices.sampledOn !== undefined },
    notes: read.notes,
    problems: read.problems,
    counts: {
      all: samples.length,
      inFields: count((one) => one.how === 'inside' || one.how === 'edge'),
      edge: count((one) => one.how === 'edge'),
      byName: count((one) => one.how === 'name'),
      stray: count((one) => one.how === 'none' && one.longitude !== null),
      unplaced: count((one) => one.how === 'none' && one.longitude === null),
      repeated: count((one) => one.repeats !== null),
    },
    unmetNames: [...unmet].slice(0, 60).map(([key, rows]) => ({ key, name: rows[0]?.fieldName ?? '', count: rows.length })),
    samples: samples.slice(0, MOST_SHOWN),
    choices,
  };
}
