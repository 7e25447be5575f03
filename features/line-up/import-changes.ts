import 'server-only';
import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { lineUpImportEntries, seedLots, varieties } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { markChecked, markFailed, markKept, readUploadFiles, uploadOf } from '@/features/imports/machine';
import { bad, good, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { COLUMNS, type Column } from './columns';
import { type LineUpInspection, type PlannedLot, planLineUp, type VarietyPlan } from './import-model';
import { lineUp, lotsOfLineUp } from './queries';
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
  const headers = rows.value[0]?.cells;
  if (!headers || rows.value.length < 2) return bad(`"${file.name}" has no rows under its header. Nothing was kept.`);
  const match = form.match && form.match.length === headers.length ? form.match : matchHeaders(headers);
  const samples = headers.map((_, column) => rows.value.slice(1, 4).map((row) => row.cells[column] ?? ''));
  const read = match.includes('code') ? readRows(rows.value, match, form.flipped) : good({ rows: [], refused: [] });
  return read.ok ? good({ read: read.value, headers, samples, match }) : read;
}

async function plansFor(viewer: Viewer, read: ReadLineUp): Promise<ReturnType<typeof planLineUp>> {
  const [known, lots] = await Promise.all([lineUp(viewer, viewer.season), lotsOfLineUp(viewer, viewer.season)]);
  return planLineUp(read, known, lots);
}

/** Reads an uploaded line-up under a header match and says what it would add, change and refuse. Keeps nothing. */
export async function inspectLineUp(viewer: Viewer, input: unknown): Promise<Outcome<LineUpInspection>> {
  const parsed = inspectSchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((problem) => ({ message: problem.message })));
  const { uploadId, flipped } = parsed.data;
  const { state } = await uploadOf(viewer, uploadId);
  if (!['received', 'checked', 'failed'].includes(state)) return bad(`This import is ${state} already. Open the page again.`);
  const outcome = await readUpload(viewer, parsed.data);
  if (!outcome.ok) {
    await markFailed(
      viewer,
      uploadId,
      outcome.problems.map((problem) => problem.message),
    );
    return outcome;
  }
  const { read, headers, samples, match } = outcome.value;
  const { plans, refused } = await plansFor(viewer, read);
  await markChecked(viewer, uploadId, null, { match, flipped });
  const planned = plans.map(({ row, code, kind, changes }) => ({ row, code, kind, changes }));
  return good({ headers, samples, match, planned, refused });
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
  const { plans } = await plansFor(viewer, outcome.value.read);
  if (plans.length === 0) return bad('No row of the file can be kept. Nothing was kept.');
  return change(viewer, {
    right: ['variety', 'change'],
    schema: keepSchema,
    input,
    run: async (transaction, form) => {
      const counts = { new: 0, changed: 0, same: 0 };
      const keeping: Keeping = { transaction, viewer, uploadId: form.uploadId, published: form.publish, moment: Date.now() };
      for (const plan of plans) {
        const kept = await keepVariety(keeping, plan);
        if (!kept.ok) return kept;
        counts[plan.kind] += 1;
      }
      const words = `${counts.new} varieties added, ${counts.changed} changed, ${counts.same} as they were.`;
      const marked = await markKept(transaction, form.uploadId, words, { match: form.match, flipped: form.flipped });
      if (!marked.ok) return marked;
      return {
        ...good({ added: counts.new, changed: counts.changed, same: counts.same }),
        audit: { verb: 'variety.imported', thing: 'upload', thingId: form.uploadId, summary: `Brought in a line-up: ${words}` },
      };
    },
  });
}

interface Keeping {
  transaction: Transaction;
  viewer: Viewer;
  uploadId: string;
  published: boolean;
  moment: number;
}

function meanwhile(code: string): Outcome<never> {
  return bad(`Somebody changed ${code} meanwhile. Nothing was kept. Check the file again.`);
}

async function remember(
  { transaction, uploadId }: Keeping,
  entry: Omit<typeof lineUpImportEntries.$inferInsert, 'id' | 'uploadId'>,
): Promise<void> {
  await transaction.insert(lineUpImportEntries).values({ id: createId(), uploadId, ...entry });
}

async function keepVariety(keeping: Keeping, { before, traits, traitsChange, lots }: VarietyPlan): Promise<Outcome<null>> {
  const { transaction, viewer, uploadId, published, moment } = keeping;
  const varietyId = before?.id ?? createId();
  if (!before) {
    const added = await transaction
      .insert(varieties)
      .values({ id: varietyId, dealershipId: viewer.dealershipId, season: viewer.season, ...traits, published, uploadId })
      .onConflictDoNothing()
      .returning({ revision: varieties.revision });
    if (!added[0]) return meanwhile(traits.code);
    await remember(keeping, { thing: 'variety', thingId: varietyId, before: null, mark: added[0].revision });
  } else if (traitsChange) {
    const revision = before.revision + 1;
    const changed = await transaction
      .update(varieties)
      .set({ ...traits, revision, updatedAt: moment })
      .where(and(eq(varieties.id, before.id), eq(varieties.revision, before.revision)))
      .returning({ id: varieties.id });
    if (changed.length === 0) return meanwhile(before.code);
    const was = Object.fromEntries(Object.keys(traits).map((key) => [key, before[key as keyof typeof traits]]));
    await remember(keeping, { thing: 'variety', thingId: varietyId, before: was, mark: revision });
  }
  for (const lot of lots) {
    const kept = await keepLot(keeping, varietyId, traits.code, lot);
    if (!kept.ok) return kept;
  }
  return good(null);
}

async function keepLot(keeping: Keeping, varietyId: string, code: string, lot: PlannedLot): Promise<Outcome<null>> {
  const { transaction, moment } = keeping;
  const [stored] = await transaction
    .select()
    .from(seedLots)
    .where(and(eq(seedLots.varietyId, varietyId), eq(seedLots.lotNumber, lot.lotNumber)));
  // A lot that was taken out comes back; one that is there but was not when the file was checked is somebody's change.
  const live = stored && stored.archivedAt === null ? stored : null;
  if ((live?.updatedAt ?? null) !== (lot.before?.updatedAt ?? null)) return meanwhile(code);
  if (!stored) {
    const lotId = createId();
    await transaction.insert(seedLots).values({ id: lotId, varietyId, lotNumber: lot.lotNumber, ...lot.said, updatedAt: moment });
    await remember(keeping, { thing: 'lot', thingId: lotId, before: null, mark: moment });
    return good(null);
  }
  const { id, varietyId: _, lotNumber, createdAt, updatedAt, ...was } = stored;
  await transaction
    .update(seedLots)
    .set({ ...lot.said, archivedAt: null, updatedAt: moment })
    .where(eq(seedLots.id, id));
  await remember(keeping, { thing: 'lot', thingId: id, before: was, mark: moment });
  return good(null);
}
