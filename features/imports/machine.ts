import 'server-only';
import { createHash } from 'node:crypto';
import { gunzipSync, gzipSync } from 'node:zlib';
import { and, asc, desc, eq, inArray, or, type SQL } from 'drizzle-orm';
import { database, type Transaction } from '@/db/client';
import { people, uploadChunks, uploadFiles, uploads } from '@/db/schema';
import { recordAudit } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import { operationIdInScope, requireOperation } from '@/features/accounts/scope';
import type { NamedBytes } from '@/lib/archive';
import { bad, good, NotAllowedError, NotFoundError, type Outcome } from '@/lib/errors';
import { groupBy } from '@/lib/group';
import { createId } from '@/lib/ids';
import {
  type ImportKind,
  type ImportState,
  KINDS_OF_THE_DEALERSHIP,
  LARGEST_UPLOAD_BYTES,
  MOST_FILES,
  type UploadSummary,
} from './model';

/**
 * The import machine behind every import: originals are stored as they stream in, then inspected, checked and kept by the
 * feature they belong to. An upload that was cut off says so, because its row starts as failed and is only made `received`
 * when the last byte is in.
 */
const CHUNK_BYTES = 1_048_576;
const CUT_OFF = 'The upload was cut off before it was complete. Nothing was kept. Choose the file again.';

const RIGHT_OF = {
  boundaries: ['field', 'create'],
  'soil-tests': ['soil', 'create'],
  'soil-survey': ['soil', 'create'],
  'line-up': ['variety', 'change'],
  'maturity-zones': ['dealership', 'change'],
  'climate-stations': ['dealership', 'change'],
} as const;

/** May this viewer bring in this kind at all? */
export function mayImport(viewer: Viewer, kind: ImportKind): boolean {
  const [thing, verb] = RIGHT_OF[kind];
  return may(viewer, thing, verb as never);
}

function inScope(viewer: Viewer): SQL | undefined {
  // Some kinds belong to the dealership; everything else to an operation in scope.
  const ofDealership = KINDS_OF_THE_DEALERSHIP.filter((kind) => mayImport(viewer, kind));
  return and(
    eq(uploads.dealershipId, viewer.dealershipId),
    or(
      ofDealership.length > 0 ? inArray(uploads.kind, ofDealership) : undefined,
      operationIdInScope(viewer, uploads.operationId),
    ),
  );
}

/** The sender's bytes broke off or were no form: expected on a farm's connection, so it ends in words. */
export class BrokenUpload extends Error {
  override name = 'BrokenUpload';
}

/** An incoming file: its name and its bytes as they arrive. */
export interface IncomingFile {
  name: string;
  stream: AsyncIterable<Uint8Array>;
}

/**
 * Stores an upload's originals piece by piece. Fails with words when it is too large, empty or has too many files; what was
 * stored until then is removed. Answers the upload's id.
 */
export async function receiveUpload(
  viewer: Viewer,
  about: { kind: ImportKind; operationId: string | null; season: number },
  files: AsyncIterable<IncomingFile>,
): Promise<Outcome<{ uploadId: string }>> {
  if (!mayImport(viewer, about.kind)) throw new NotAllowedError('Your account may not bring this in.');
  if (KINDS_OF_THE_DEALERSHIP.includes(about.kind)) about = { ...about, operationId: null };
  else if (!about.operationId) return bad('Say which operation the file belongs to.');
  else await requireOperation(viewer, about.operationId);

  const uploadId = createId();
  await database()
    .insert(uploads)
    .values({
      id: uploadId,
      dealershipId: viewer.dealershipId,
      personId: viewer.personId,
      ...about,
      state: 'failed',
      problems: [CUT_OFF],
    });
  const refuse = async (words: string): Promise<Outcome<{ uploadId: string }>> => {
    await database().delete(uploads).where(eq(uploads.id, uploadId));
    return bad(words);
  };
  let total = 0;
  let ordinal = 0;
  try {
    for await (const file of files) {
      if (ordinal >= MOST_FILES) return refuse(`At most ${MOST_FILES} files at a time. Nothing was kept. Zip them into one.`);
      const fileId = createId();
      await database()
        .insert(uploadFiles)
        .values({ id: fileId, uploadId, ordinal, name: cleanName(file.name), sizeBytes: 0, sha256: '' });
      ordinal += 1;
      const hash = createHash('sha256');
      let size = 0;
      let chunk = 0;
      for await (const piece of pieces(file.stream)) {
        size += piece.byteLength;
        total += piece.byteLength;
        if (total > LARGEST_UPLOAD_BYTES)
          return refuse(
            `The upload is larger than ${LARGEST_UPLOAD_BYTES / 1_000_000} MB. Nothing was kept. Split it, or zip only the layers you need.`,
          );
        hash.update(piece);
        const packed = gzipSync(piece, { level: 1 });
        const compressed = packed.byteLength < piece.byteLength * 0.95;
        await database()
          .insert(uploadChunks)
          .values({ fileId, ordinal: chunk, compressed, bytes: compressed ? packed : piece });
        chunk += 1;
      }
      await database()
        .update(uploadFiles)
        .set({ sizeBytes: size, sha256: hash.digest('hex') })
        .where(eq(uploadFiles.id, fileId));
    }
  } catch (error) {
    // The row stays, failed and saying so, for when the person comes back.
    if (error instanceof BrokenUpload) return bad(CUT_OFF);
    throw error;
  }
  if (ordinal === 0) return refuse('No file was chosen.');
  if (total === 0) return refuse('The file is empty. Nothing was kept. Choose the file again.');
  await database().update(uploads).set({ state: 'received', problems: [] }).where(eq(uploads.id, uploadId));
  return good({ uploadId });
}

function cleanName(name: string): string {
  // Control characters have no place in a name that is shown and sent back as a header.
  return (
    [...name.replace(/^.*[/\\]/, '')]
      .filter((sign) => sign.charCodeAt(0) >= 32)
      .join('')
      .slice(0, 200) || 'file'
  );
}

async function* pieces(stream: AsyncIterable<Uint8Array>): AsyncGenerator<Buffer> {
  let waiting: Buffer[] = [];
  let size = 0;
  for await (const part of stream) {
    waiting.push(Buffer.from(part));
    size += part.byteLength;
    if (size >= CHUNK_BYTES) {
      yield Buffer.concat(waiting);
      waiting = [];
      size = 0;
    }
  }
  if (size > 0) yield Buffer.concat(waiting);
}

export interface Upload extends UploadSummary {
  inspection: unknown;
  choices: unknown;
}

/** One import in the viewer's scope. Throws NotFoundError otherwise. */
export async function uploadOf(viewer: Viewer, uploadId: string): Promise<Upload> {
  const [row] = await database()
    .select({ upload: uploads, personName: people.name })
    .from(uploads)
    .leftJoin(people, eq(people.id, uploads.personId))
    .where(and(eq(uploads.id, uploadId), inScope(viewer)));
  if (!row) throw new NotFoundError('No such import.');
  const files = await database()
    .select()
    .from(uploadFiles)
    .where(eq(uploadFiles.uploadId, uploadId))
    .orderBy(asc(uploadFiles.ordinal));
  return { ...summary(row.upload, row.personName, files), inspection: row.upload.inspection, choices: row.upload.choices };
}

/** Imports of an operation (or of the line-up, without one), newest first. */
export async function uploadsOf(
  viewer: Viewer,
  kinds: ImportKind[],
  operationId: string | null,
  limit = 12,
): Promise<UploadSummary[]> {
  const rows = await database()
    .select({
      id: uploads.id,
      kind: uploads.kind,
      operationId: uploads.operationId,
      season: uploads.season,
      state: uploads.state,
      problems: uploads.problems,
      outcome: uploads.outcome,
      createdAt: uploads.createdAt,
      keptAt: uploads.keptAt,
      personName: people.name,
    })
    .from(uploads)
    .leftJoin(people, eq(people.id, uploads.personId))
    .where(and(inScope(viewer), inArray(uploads.kind, kinds), operationId ? eq(uploads.operationId, operationId) : undefined))
    .orderBy(desc(uploads.createdAt))
    .limit(limit);
  if (rows.length === 0) return [];
  const files = await database()
    .select()
    .from(uploadFiles)
    .where(
      inArray(
        uploadFiles.uploadId,
        rows.map((row) => row.id),
      ),
    )
    .orderBy(asc(uploadFiles.ordinal));
  const byUpload = groupBy(files, (file) => file.uploadId);
  return rows.map(({ personName, ...row }) => summary(row, personName, byUpload.get(row.id) ?? []));
}

function summary(
  row: Omit<typeof uploads.$inferSelect, 'inspection' | 'choices' | 'dealershipId' | 'personId' | 'undoneAt'>,
  personName: string | null,
  files: (typeof uploadFiles.$inferSelect)[],
): UploadSummary {
  return {
    id: row.id,
    kind: row.kind,
    operationId: row.operationId,
    season: row.season,
    state: row.state,
    fileNames: files.map((file) => file.name),
    sizeBytes: files.reduce((total, file) => total + file.sizeBytes, 0),
    problems: row.problems ?? [],
    outcome: row.outcome,
    personName,
    createdAt: row.createdAt,
    keptAt: row.keptAt,
  };
}

/** The originals of an import, whole. */
export async function readUploadFiles(viewer: Viewer, uploadId: string): Promise<NamedBytes[]> {
  await uploadOf(viewer, uploadId);
  const files = await database()
    .select()
    .from(uploadFiles)
    .where(eq(uploadFiles.uploadId, uploadId))
    .orderBy(asc(uploadFiles.ordinal));
  const result: NamedBytes[] = [];
  for (const file of files) {
    const parts: Buffer[] = [];
    for await (const part of chunksOf(file.id)) parts.push(part);
    result.push({ name: file.name, bytes: Buffer.concat(parts) });
  }
  return result;
}

/** One original of an import, streamed. */
export async function originalOf(
  viewer: Viewer,
  uploadId: string,
  ordinal: number,
): Promise<{ name: string; sizeBytes: number; parts: AsyncGenerator<Buffer> }> {
  await uploadOf(viewer, uploadId);
  const [file] = await database()
    .select()
    .from(uploadFiles)
    .where(and(eq(uploadFiles.uploadId, uploadId), eq(uploadFiles.ordinal, ordinal)));
  if (!file) throw new NotFoundError('No such file.');
  return { name: file.name, sizeBytes: file.sizeBytes, parts: chunksOf(file.id) };
}

async function* chunksOf(fileId: string): AsyncGenerator<Buffer> {
  for (let ordinal = 0; ; ordinal += 1) {
    const [chunk] = await database()
      .select()
      .from(uploadChunks)
      .where(and(eq(uploadChunks.fileId, fileId), eq(uploadChunks.ordinal, ordinal)));
    if (!chunk) return;
    yield chunk.compressed ? gunzipSync(chunk.bytes) : Buffer.from(chunk.bytes);
  }
}

/** Remembers what a reader understood. Only an import that keeps nothing yet can be inspected. */
export async function markChecked(
  viewer: Viewer,
  uploadId: string,
  inspection: unknown,
  choices: unknown,
  problems: string[] = [],
): Promise<void> {
  const upload = await uploadOf(viewer, uploadId);
  if (!['received', 'checked', 'failed'].includes(upload.state)) throw new NotAllowedError(`This import is ${upload.state}.`);
  await database().update(uploads).set({ inspection, choices, problems, state: 'checked' }).where(eq(uploads.id, uploadId));
}

/** Remembers that a file could not be read, with the words shown. */
export async function markFailed(viewer: Viewer, uploadId: string, problems: string[]): Promise<void> {
  const upload = await uploadOf(viewer, uploadId);
  if (upload.state === 'kept') throw new NotAllowedError('This import is kept already.');
  await database().update(uploads).set({ state: 'failed', problems }).where(eq(uploads.id, uploadId));
}

/** Marks an import kept, inside the transaction that keeps its rows: all of it or none. Keeping twice is refused. */
export async function markKept(
  transaction: Transaction,
  uploadId: string,
  outcome: string,
  choices: unknown,
): Promise<Outcome<null>> {
  const kept = await transaction
    .update(uploads)
    .set({ state: 'kept', outcome, choices, keptAt: Date.now(), inspection: null, problems: [] })
    .where(and(eq(uploads.id, uploadId), inArray(uploads.state, ['checked', 'received'])))
    .returning({ id: uploads.id });
  return kept.length === 1 ? good(null) : bad('This import was kept or put away already. Open the page again.');
}

/** Marks a kept import as taken back, inside the transaction that removes its rows. */
export async function markUndone(transaction: Transaction, uploadId: string): Promise<Outcome<null>> {
  const undone = await transaction
    .update(uploads)
    .set({ state: 'undone', undoneAt: Date.now() })
    .where(and(eq(uploads.id, uploadId), eq(uploads.state, 'kept')))
    .returning({ id: uploads.id });
  return undone.length === 1 ? good(null) : bad('This import is not kept, so there is nothing to take back.');
}

/** Puts an import away that keeps nothing. Its originals stay. */
export async function discardUpload(viewer: Viewer, uploadId: string): Promise<Outcome<null>> {
  const upload = await uploadOf(viewer, uploadId);
  const open: ImportState[] = ['received', 'checked', 'failed'];
  if (!open.includes(upload.state)) return bad('Only an import that keeps nothing can be put away.');
  await database().transaction(async (transaction) => {
    await transaction.update(uploads).set({ state: 'discarded', inspection: null }).where(eq(uploads.id, uploadId));
    await recordAudit(transaction, viewer, {
      verb: 'import.discarded',
      thing: 'upload',
      thingId: uploadId,
      operationId: upload.operationId ?? undefined,
      summary: `Put away the import of ${upload.fileNames.join(', ')}.`,
    });
  });
  return good(null);
}
