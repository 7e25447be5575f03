import 'server-only';
import { and, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import { planRows, seedLots, varieties } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { markChecked, markFailed, markKept, markUndone, readUploadFiles, uploadOf } from '@/features/imports/machine';
import { uploadIdSchema } from '@/features/imports/schemas';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { COLUMNS, type Column } from './columns';
import { type LineUpInspection, mergedTraits, planRow, saysOfLot } from './import-model';
import { lineUp } from './queries';
import { rowsOfFile } from './read-file';
import { type HeaderMatch, matchHeaders, type ReadLineUp, readRows } from './read-line-up';

const KEYS = COLUMNS.map((column) => column.key) as [Column['key'], ...Column['key'][]];
const matchSchema = z.array(z.enum(KEYS).nullable()).max(500);

const inspectSchema = z.object({
  uploadId: z.string().min(1),
  match: matchSchema.optional(),
  /** Rating columns whose file has 1 as the best end. */
  flipped: z.array(z.enum(KEYS)).max(50).optional(),
});

const keepSchema = inspectSchema.extend({ publish: z.boolean() });

async function readUpload(
  viewer: Viewer,
  form: z.infer<typeof inspectSchema>,
): Promise<Outcome<{ read: ReadLineUp; headers: string[]; samples: string[][]; match: HeaderMatch }>> {
  const upload = await uploadOf(viewer, form.uploadId);
  if (upload.kind !== 'line-up') return bad('This import holds no line-up.');
  const [file] = await readUploadFiles(viewer, form.uploadId);
  if (!file) return bad('The file of this import is missing.');
  const rows = await rowsOfFile(file);
  if (!rows.ok) return rows;
  const headers = rows.value[0];
  if (!headers || rows.value.length < 2) return bad(`"${file.name}" has no rows under its header. Nothing was kept.`);
  const match = form.match && form.match.length === headers.length ? form.match : matchHeaders(headers);
  const samples = headers.map((_, column) => rows.value.slice(1, 4).map((row) => row[column] ?? ''));
  const read = match.includes('code')
    ? readRows(rows.value, match, form.flipped)
    : good({ rows: [], refused: [], withoutMaturity: [] });
  return read.ok ? good({ read: read.value, headers, samples, match }) : read;
}

/** Reads an uploaded line-up under a header match and says what it would add, change and refuse. Keeps nothing. */
export async function inspectLineUp(viewer: Viewer, input: unknown): Promise<Outcome<LineUpInspection>> {
  const parsed = inspectSchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((problem) => ({ message: problem.message })));
  const outcome = await readUpload(viewer, parsed.data);
  if (!outcome.ok) {
    await markFailed(
      viewer,
      parsed.data.uploadId,
      outcome.problems.map((problem) => problem.message),
    );
    return outcome;
  }
  const { read, headers, samples, match } = outcome.value;
  const known = new Map((await lineUp(viewer, viewer.season)).map((variety) => [variety.code.toLowerCase(), variety]));
  const unplaceable = read.withoutMaturity.map((code) => ({ row: 0, code, problems: ['The relative maturity is missing.'] }));
  const inspection: LineUpInspection = {
    headers,
    samples,
    match,
    planned: read.rows.map((row) => planRow(row, known)),
    refused: [...read.refused, ...unplaceable],
  };
  await markChecked(viewer, parsed.data.uploadId, null, { match, flipped: parsed.data.flipped });
  return good(inspection);
}

/** Keeps a line-up file: adds and changes varieties and their lots in one transaction. Refused rows are left out. */
export async function keepLineUp(
  viewer: Viewer,
  input: unknown,
): Promise<Outcome<{ added: number; changed: number; same: number }>> {
  const parsed = keepSchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((problem) => ({ message: problem.message })));
  const outcome = await readUpload(viewer, parsed.data);
  if (!outcome.ok) return outcome;
  const { rows } = outcome.value.read;
  if (rows.length === 0) return bad('No row of the file can be kept. Nothing was kept.');
  const known = new Map((await lineUp(viewer, viewer.season)).map((variety) => [variety.code.toLowerCase(), variety]));
  return change(viewer, {
    right: ['variety', 'change'],
    schema: keepSchema,
    input,
    run: async (transaction, form) => {
      const counts = { added: 0, changed: 0, same: 0 };
      for (const row of rows) {
        const before = known.get(row.traits.code.toLowerCase()) ?? null;
        const planned = planRow(row, known);
        const varietyId = before?.id ?? createId();
        if (!before) {
          await transaction.insert(varieties).values({
            id: varietyId,
            dealershipId: viewer.dealershipId,
            season: viewer.season,
            ...row.traits,
            published: form.publish,
            uploadId: form.uploadId,
          });
          counts.added += 1;
        } else if (planned.changes.length > 0) {
          const changed = await transaction
            .update(varieties)
            .set({ ...mergedTraits(row, before), revision: before.revision + 1, updatedAt: Date.now() })
            .where(and(eq(varieties.id, before.id), eq(varieties.revision, before.revision)))
            .returning({ id: varieties.id });
          if (changed.length === 0)
            return bad(`Somebody changed ${before.code} meanwhile. Nothing was kept. Check the file again.`);
        }
        if (before) counts[planned.kind === 'same' ? 'same' : 'changed'] += 1;
        if (saysOfLot(row.lot)) {
          const { lotNumber, germination, ...lot } = row.lot;
          const values = {
            ...(lot.seedsPerLb === null ? {} : { seedsPerLb: lot.seedsPerLb }),
            ...(germination === null ? {} : { germinationPercent: germination }),
            ...(lot.treatment === null ? {} : { treatment: lot.treatment }),
            ...(lot.unitsOnHand === null ? {} : { unitsOnHand: lot.unitsOnHand }),
            updatedAt: Date.now(),
          };
          await transaction
            .insert(seedLots)
            .values({ id: createId(), varietyId, lotNumber: lotNumber ?? 'main', ...values })
            .onConflictDoUpdate({ target: [seedLots.varietyId, seedLots.lotNumber], set: values });
        }
      }
      const words = `${counts.added} varieties added, ${counts.changed} changed, ${counts.same} as they were.`;
      const marked = await markKept(transaction, form.uploadId, words, { match: form.match, flipped: form.flipped });
      if (!marked.ok) return marked;
      return {
        ...good(counts),
        audit: { verb: 'variety.imported', thing: 'upload', thingId: form.uploadId, summary: `Brought in a line-up: ${words}` },
      };
    },
  });
}

/** Takes the varieties a line-up import added back out, while no plan has one of them. Changed ones stay as they are. */
export async function undoLineUp(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['variety', 'change'],
    schema: uploadIdSchema,
    input,
    run: async (transaction, { uploadId }) => {
      await uploadOf(viewer, uploadId);
      const added = await transaction
        .select({ id: varieties.id, code: varieties.code })
        .from(varieties)
        .where(and(eq(varieties.uploadId, uploadId), eq(varieties.dealershipId, viewer.dealershipId)));
      const ids = added.map((one) => one.id);
      if (ids.length > 0) {
        const [planned] = await transaction
          .select({ varietyId: planRows.varietyId })
          .from(planRows)
          .where(inArray(planRows.varietyId, ids))
          .limit(1);
        if (planned)
          return bad(
            `${added.find((one) => one.id === planned.varietyId)?.code} is on a plan. Take it off first. Nothing was changed.`,
          );
        await transaction.delete(varieties).where(inArray(varieties.id, ids));
      }
      const marked = await markUndone(transaction, uploadId);
      if (!marked.ok) return marked;
      return {
        ...good(null),
        audit: {
          verb: 'variety.import-undone',
          thing: 'upload',
          thingId: uploadId,
          summary: `Took back ${ids.length} varieties of a line-up import.`,
        },
      };
    },
  });
}
