import 'server-only';
import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { maturityZones } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import { cleanBoundary } from '@/features/fields/clean';
import { markKept } from '@/features/imports/machine';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { addZoneSchema, changeZoneSchema, keepZonesSchema, zoneIdSchema } from '../schemas';
import { readZoneFile } from '../zone-file';
import { rangeWords, simplerOutline } from '../zones';

/** The zone in the viewer's dealership. Throws NotFoundError otherwise. */
async function requireZone(transaction: Transaction, viewer: Viewer, zoneId: string): Promise<typeof maturityZones.$inferSelect> {
  const [row] = await transaction
    .select()
    .from(maturityZones)
    .where(and(eq(maturityZones.id, zoneId), eq(maturityZones.dealershipId, viewer.dealershipId)));
  if (!row) throw new NotFoundError('No such zone.');
  return row;
}

/** Keeps one zone drawn on the map or said as a box. Managers only. */
export async function addZone(viewer: Viewer, input: unknown): Promise<Outcome<{ name: string }>> {
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: addZoneSchema,
    input,
    run: async (transaction, { geometry, ...zone }) => {
      const cleaned = cleanBoundary(geometry);
      if (!cleaned.geometry) return bad(cleaned.problems[0] ?? 'This outline holds no ground. Draw it again.');
      const id = createId();
      await transaction
        .insert(maturityZones)
        .values({ id, dealershipId: viewer.dealershipId, ...zone, geometry: simplerOutline(cleaned.geometry) });
      return {
        ...good({ name: zone.name }),
        audit: noteOf('zone.added', id, `Added the maturity zone ${zone.name}, ${rangeWords(zone)}.`),
      };
    },
  });
}

/** Renames a zone or sets its range. Managers only. */
export async function changeZone(viewer: Viewer, input: unknown): Promise<Outcome<{ name: string }>> {
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: changeZoneSchema,
    input,
    run: async (transaction, { zoneId, ...zone }) => {
      const before = await requireZone(transaction, viewer, zoneId);
      await transaction
        .update(maturityZones)
        .set({ ...zone, updatedAt: Date.now() })
        .where(eq(maturityZones.id, zoneId));
      const summary = `Changed the maturity zone ${before.name} from ${rangeWords(before)} to ${zone.name}, ${rangeWords(zone)}.`;
      return { ...good({ name: zone.name }), audit: noteOf('zone.changed', zoneId, summary) };
    },
  });
}

/** Removes a zone; fields in it go back to the latitude table. Managers only. */
export async function deleteZone(viewer: Viewer, input: unknown): Promise<Outcome<{ name: string }>> {
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: zoneIdSchema,
    input,
    run: async (transaction, { zoneId }) => {
      const zone = await requireZone(transaction, viewer, zoneId);
      await transaction.delete(maturityZones).where(eq(maturityZones.id, zoneId));
      const audit = noteOf('zone.deleted', zoneId, `Deleted the maturity zone ${zone.name}, ${rangeWords(zone)}.`);
      return { ...good({ name: zone.name }), audit: { ...audit, detail: { zone } } };
    },
  });
}

/** Keeps chosen shapes of an uploaded file as zones: all of them or none. Managers only. */
export async function keepZones(viewer: Viewer, input: unknown): Promise<Outcome<{ count: number }>> {
  const parsed = keepZonesSchema.safeParse(input);
  if (!parsed.success || !may(viewer, 'dealership', 'change')) {
    // The gate refuses with its own words; reading the file first would be for nothing.
    return change(viewer, {
      right: ['dealership', 'change'],
      schema: keepZonesSchema,
      input,
      run: async () => bad('Nothing was kept.'),
    });
  }
  const read = await readZoneFile(viewer, parsed.data.uploadId);
  if (!read.ok) return read;
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: keepZonesSchema,
    input,
    run: async (transaction, { uploadId, shapes }) => {
      const rows: (typeof maturityZones.$inferInsert)[] = [];
      for (const { index, ...zone } of shapes) {
        const geometry = read.value.features[index]?.geometry;
        if (!geometry) return bad(`Shape ${index + 1} of the file holds no ground. Nothing was kept. Leave it out.`);
        rows.push({ id: createId(), dealershipId: viewer.dealershipId, ...zone, geometry: simplerOutline(geometry) });
      }
      const kept = await markKept(transaction, uploadId, `${rows.length} maturity zones`, null);
      if (!kept.ok) return kept;
      await transaction.insert(maturityZones).values(rows);
      const names = rows.map((row) => row.name).join(', ');
      return {
        ...good({ count: rows.length }),
        audit: noteOf('zone.added', uploadId, `Brought in ${rows.length} maturity zones: ${names}.`),
      };
    },
  });
}

function noteOf(verb: string, thingId: string, summary: string) {
  return { verb, thing: 'maturity-zone', thingId, summary };
}
