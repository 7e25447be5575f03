import 'server-only';
import { and, eq, inArray } from 'drizzle-orm';
import { addedStations } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import { markFailed, markKept, readUploadFiles, uploadOf } from '@/features/imports/machine';
import { uploadIdSchema } from '@/features/imports/schemas';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import type { Station } from '../climate/normals';
import { stationsFromNormalsFiles } from '../climate/stations-file';
import { stationIdSchema } from '../schemas';

/** A state's worth of stations is a few MB; more is the wrong file. */
const LARGEST_BYTES = 25_000_000;

async function readStations(viewer: Viewer, uploadId: string): Promise<Outcome<Station[]>> {
  const upload = await uploadOf(viewer, uploadId);
  if (upload.kind !== 'climate-stations') return bad('This import holds no climate stations.');
  if (upload.sizeBytes > LARGEST_BYTES)
    return bad(
      `The files are larger than ${LARGEST_BYTES / 1_000_000} MB. Nothing was kept. Send only the stations near your fields.`,
    );
  const files = await readUploadFiles(viewer, uploadId);
  return stationsFromNormalsFiles(files.map((file) => new TextDecoder().decode(file.bytes)));
}

/**
 * Adds the stations of uploaded NOAA normals files; a station added before is replaced by the newer file. Read outside the
 * transaction, kept in one. Managers only.
 */
export async function addStations(viewer: Viewer, input: unknown): Promise<Outcome<{ count: number; replacedCount: number }>> {
  const parsed = uploadIdSchema.safeParse(input);
  if (!parsed.success || !may(viewer, 'dealership', 'change')) return bad('Only a manager adds climate stations.');
  let read: Outcome<Station[]>;
  try {
    read = await readStations(viewer, parsed.data.uploadId);
  } catch (error) {
    if (error instanceof NotFoundError) return bad(error.message);
    throw error;
  }
  if (!read.ok) {
    const words = read.problems.map((problem) => problem.message);
    if (words[0] !== 'This import holds no climate stations.') await markFailed(viewer, parsed.data.uploadId, words);
    return read;
  }
  const stations = read.value;
  const notes = read.notes;
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: uploadIdSchema,
    input,
    run: async (transaction, { uploadId }) => {
      const kept = await markKept(transaction, uploadId, `${stations.length} climate stations`, null);
      if (!kept.ok) return kept;
      const replaced = await transaction
        .delete(addedStations)
        .where(
          and(
            eq(addedStations.dealershipId, viewer.dealershipId),
            inArray(
              addedStations.stationId,
              stations.map((station) => station.id),
            ),
          ),
        )
        .returning({ id: addedStations.id });
      await transaction.insert(addedStations).values(
        stations.map((station) => ({
          id: createId(),
          dealershipId: viewer.dealershipId,
          stationId: station.id,
          name: station.name,
          normals: station,
        })),
      );
      return {
        ...good({ count: stations.length, replacedCount: replaced.length }, notes),
        audit: {
          verb: 'station.added',
          thing: 'climate-station',
          thingId: uploadId,
          summary: `Added ${stations.length} climate ${stations.length === 1 ? 'station' : 'stations'}: ${stations
            .slice(0, 6)
            .map((station) => station.name)
            .join('; ')}${stations.length > 6 ? ' and more' : ''}.`,
        },
      };
    },
  });
}

/** Takes an added station out again. Managers only. */
export async function deleteStation(viewer: Viewer, input: unknown): Promise<Outcome<{ name: string }>> {
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: stationIdSchema,
    input,
    run: async (transaction, { stationId }) => {
      const [row] = await transaction
        .delete(addedStations)
        .where(and(eq(addedStations.id, stationId), eq(addedStations.dealershipId, viewer.dealershipId)))
        .returning({ name: addedStations.name });
      if (!row) throw new NotFoundError('No such station.');
      return {
        ...good({ name: row.name }),
        audit: {
          verb: 'station.deleted',
          thing: 'climate-station',
          thingId: stationId,
          summary: `Took out the climate station ${row.name}.`,
        },
      };
    },
  });
}
