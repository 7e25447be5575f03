import 'server-only';
import { and, eq, inArray } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { lineUpImportEntries, planRows, seedLots, varieties } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { markUndone, uploadOf } from '@/features/imports/machine';
import { uploadIdSchema } from '@/features/imports/schemas';
import { bad, good, type Outcome } from '@/lib/errors';

type Entry = typeof lineUpImportEntries.$inferSelect;

/** Parts of a list short enough for one statement's variables. */
function parts<Value>(values: Value[], size = 500): Value[][] {
  return Array.from({ length: Math.ceil(values.length / size) }, (_, part) => values.slice(part * size, (part + 1) * size));
}

/**
 * Takes a line-up import back whole: what it added goes, what it changed becomes what it was, lots too. Refused, with the
 * varieties named, when one was changed since, has a lot that came later, or is on a plan.
 */
export async function undoLineUp(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['variety', 'change'],
    schema: uploadIdSchema,
    input,
    run: async (transaction, { uploadId }) => {
      const upload = await uploadOf(viewer, uploadId);
      if (upload.kind !== 'line-up') return bad('This import holds no line-up.');
      const marked = await markUndone(transaction, uploadId);
      if (!marked.ok) return marked;
      const entries = await transaction.select().from(lineUpImportEntries).where(eq(lineUpImportEntries.uploadId, uploadId));
      const standing = await whatStandsInTheWay(transaction, viewer, entries);
      if (standing.length > 0) return bad(`${standing.slice(0, 5).join(' ')} Nothing was taken back.`);
      // Lots first: a variety that goes takes its lots with it.
      for (const entry of entries.filter((one) => one.thing === 'lot')) await takeBackLot(transaction, entry);
      for (const entry of entries.filter((one) => one.thing === 'variety')) await takeBackVariety(transaction, entry);
      const count = (thing: Entry['thing']) => entries.filter((one) => one.thing === thing).length;
      return {
        ...good(null),
        audit: {
          verb: 'variety.import-undone',
          thing: 'upload',
          thingId: uploadId,
          summary: `Took a line-up import back: ${count('variety')} varieties and ${count('lot')} lots.`,
        },
      };
    },
  });
}

async function takeBackLot(transaction: Transaction, { thingId, before }: Entry): Promise<void> {
  if (before)
    await transaction
      .update(seedLots)
      .set({ ...before, updatedAt: Date.now() })
      .where(eq(seedLots.id, thingId));
  else await transaction.delete(seedLots).where(eq(seedLots.id, thingId));
}

async function takeBackVariety(transaction: Transaction, { thingId, before, mark }: Entry): Promise<void> {
  if (before)
    await transaction
      .update(varieties)
      .set({ ...before, revision: mark + 1, updatedAt: Date.now() })
      .where(eq(varieties.id, thingId));
  else await transaction.delete(varieties).where(eq(varieties.id, thingId));
}

async function whatStandsInTheWay(transaction: Transaction, viewer: Viewer, entries: Entry[]): Promise<string[]> {
  const of = (thing: Entry['thing']) => entries.filter((entry) => entry.thing === thing);
  const marks = new Map(entries.map((entry) => [entry.thingId, entry.mark]));
  const lotIds = of('lot').map((entry) => entry.thingId);
  const changed = new Set<string>();
  const planned = new Set<string>();
  for (const ids of parts(of('variety').map((entry) => entry.thingId))) {
    const rows = await transaction
      .select()
      .from(varieties)
      .where(and(inArray(varieties.id, ids), eq(varieties.dealershipId, viewer.dealershipId)));
    for (const row of rows) if (row.revision !== marks.get(row.id) || row.archivedAt !== null) changed.add(row.code);
    if (rows.length < ids.length) changed.add('A variety of it');
  }
  for (const ids of parts(lotIds)) {
    const rows = await transaction
      .select({ lot: seedLots, code: varieties.code })
      .from(seedLots)
      .innerJoin(varieties, eq(varieties.id, seedLots.varietyId))
      .where(inArray(seedLots.id, ids));
    for (const { lot, code } of rows)
      if (lot.updatedAt !== marks.get(lot.id) || lot.archivedAt !== null) changed.add(`${code}, lot ${lot.lotNumber},`);
  }
  const added = of('variety').filter((entry) => entry.before === null);
  for (const ids of parts(added.map((entry) => entry.thingId))) {
    const later = await transaction
      .select({ code: varieties.code, lotNumber: seedLots.lotNumber, lotId: seedLots.id })
      .from(seedLots)
      .innerJoin(varieties, eq(varieties.id, seedLots.varietyId))
      .where(inArray(seedLots.varietyId, ids));
    for (const lot of later) if (!marks.has(lot.lotId)) changed.add(`${lot.code}, lot ${lot.lotNumber},`);
    const onPlans = await transaction
      .select({ code: varieties.code })
      .from(planRows)
      .innerJoin(varieties, eq(varieties.id, planRows.varietyId))
      .where(inArray(planRows.varietyId, ids));
    for (const row of onPlans) planned.add(row.code);
  }
  const addedLots = of('lot').filter((entry) => entry.before === null);
  for (const ids of parts(addedLots.map((entry) => entry.thingId))) {
    const onPlans = await transaction
      .select({ code: varieties.code, lotNumber: seedLots.lotNumber })
      .from(planRows)
      .innerJoin(seedLots, eq(seedLots.id, planRows.seedLotId))
      .innerJoin(varieties, eq(varieties.id, seedLots.varietyId))
      .where(inArray(planRows.seedLotId, ids));
    for (const row of onPlans) planned.add(`${row.code}, lot ${row.lotNumber},`);
  }
  return [
    ...[...changed].map((name) => `${name} was changed since.`),
    ...[...planned].map((name) => `${name} is on a plan: take it off first.`),
  ];
}
