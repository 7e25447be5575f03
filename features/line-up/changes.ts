import 'server-only';
import { and, eq, isNull, ne, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { seedLots, varieties } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { formatCell } from './cells';
import { COLUMNS } from './columns';
import { lotIdSchema, lotSchema, publishSchema, updateVarietySchema, varietyIdSchema, varietySchema } from './schemas';

type VarietyRow = typeof varieties.$inferSelect;

async function requireVariety(transaction: Transaction, viewer: Viewer, varietyId: string): Promise<VarietyRow> {
  const [row] = await transaction
    .select()
    .from(varieties)
    .where(and(eq(varieties.id, varietyId), eq(varieties.dealershipId, viewer.dealershipId), isNull(varieties.archivedAt)));
  if (!row) throw new NotFoundError('No such variety.');
  return row;
}

async function codeTaken(transaction: Transaction, viewer: Viewer, season: number, code: string, except = ''): Promise<boolean> {
  const rows = await transaction
    .select({ id: varieties.id })
    .from(varieties)
    .where(
      and(
        eq(varieties.dealershipId, viewer.dealershipId),
        eq(varieties.season, season),
        // Whatever its case: an import finds a variety by its code that way.
        sql`lower(${varieties.code}) = ${code.toLowerCase()}`,
        ne(varieties.id, except),
      ),
    );
  return rows.length > 0;
}

/** Adds a variety to the line-up of the season being planned. */
export async function createVariety(viewer: Viewer, input: unknown): Promise<Outcome<{ varietyId: string }>> {
  return change(viewer, {
    right: ['variety', 'change'],
    schema: varietySchema,
    input,
    run: async (transaction, form) => {
      if (await codeTaken(transaction, viewer, viewer.season, form.code))
        return bad(`${form.code} is in the ${viewer.season} line-up already.`, 'code');
      const varietyId = createId();
      await transaction
        .insert(varieties)
        .values({ id: varietyId, dealershipId: viewer.dealershipId, season: viewer.season, ...form });
      return {
        ...good({ varietyId }),
        audit: {
          verb: 'variety.created',
          thing: 'variety',
          thingId: varietyId,
          summary: `Added ${form.code} to the ${viewer.season} line-up.`,
        },
      };
    },
  });
}

function differences(before: VarietyRow, after: Record<string, unknown>): string[] {
  return COLUMNS.filter((column) => !column.ofLot)
    .map((column) => ({
      label: column.label,
      from: formatCell(column, before[column.key as keyof VarietyRow]),
      to: formatCell(column, after[column.key]),
    }))
    .filter((one) => one.from !== one.to)
    .map((one) => `${one.label}: ${one.from || 'unknown'} → ${one.to || 'unknown'}`);
}

/** Changes a variety. When somebody changed it since the form was opened, nothing is overwritten and what differs is told. */
export async function updateVariety(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['variety', 'change'],
    schema: updateVarietySchema,
    input,
    run: async (transaction, { varietyId, revision, ...form }) => {
      const before = await requireVariety(transaction, viewer, varietyId);
      if (before.revision !== revision) {
        const other = differences(before, form);
        return bad(
          `Somebody changed ${before.code} while you had it open. Your form was not kept. ${other.length > 0 ? `Where the two differ (theirs → yours): ${other.join('; ')}. ` : ''}Open it again and repeat what is still right.`,
        );
      }
      if (await codeTaken(transaction, viewer, before.season, form.code, varietyId))
        return bad(`${form.code} is in the line-up already.`, 'code');
      await transaction
        .update(varieties)
        .set({ ...form, revision: revision + 1, updatedAt: Date.now() })
        .where(eq(varieties.id, varietyId));
      const changed = differences(before, form);
      return {
        ...good({ revision: revision + 1 }),
        audit: {
          verb: 'variety.changed',
          thing: 'variety',
          thingId: varietyId,
          summary: `Changed ${form.code}${changed.length > 0 ? `: ${changed.join('; ')}` : ''}.`,
        },
      };
    },
  });
}

/** Shows a variety to growers and to placement, or takes it back to draft. */
export async function setPublished(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['variety', 'change'],
    schema: publishSchema,
    input,
    run: async (transaction, { varietyId, published }) => {
      const before = await requireVariety(transaction, viewer, varietyId);
      await transaction
        .update(varieties)
        .set({ published, revision: before.revision + 1, updatedAt: Date.now() })
        .where(eq(varieties.id, varietyId));
      return {
        ...good(null),
        audit: {
          verb: published ? 'variety.published' : 'variety.unpublished',
          thing: 'variety',
          thingId: varietyId,
          summary: published ? `Published ${before.code}.` : `Took ${before.code} back to draft.`,
        },
      };
    },
  });
}

/** Takes a variety out of the line-up; plans that have it keep it. */
export async function archiveVariety(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['variety', 'change'],
    schema: varietyIdSchema,
    input,
    run: async (transaction, { varietyId }) => {
      const before = await requireVariety(transaction, viewer, varietyId);
      // The code is freed for a new variety; the old row keeps its name for the plans that have it.
      await transaction
        .update(varieties)
        .set({ archivedAt: Date.now(), published: false, code: `${before.code} (out ${new Date().toISOString()})` })
        .where(eq(varieties.id, varietyId));
      return {
        ...good(null),
        audit: {
          verb: 'variety.archived',
          thing: 'variety',
          thingId: varietyId,
          summary: `Took ${before.code} out of the line-up.`,
        },
      };
    },
  });
}

/** Adds a seed lot to a variety, or changes one. */
export async function saveLot(viewer: Viewer, input: unknown): Promise<Outcome<{ lotId: string }>> {
  return change(viewer, {
    right: ['supply', 'change'],
    schema: lotSchema,
    input,
    run: async (transaction, { lotId, varietyId, updatedAt, priceDollarsPerUnit, ...form }) => {
      const variety = await requireVariety(transaction, viewer, varietyId);
      const values = {
        ...form,
        priceCentsPerUnit: priceDollarsPerUnit === null ? null : Math.round(priceDollarsPerUnit * 100),
        updatedAt: Date.now(),
      };
      const [namesake] = await transaction
        .select()
        .from(seedLots)
        .where(and(eq(seedLots.varietyId, varietyId), eq(seedLots.lotNumber, form.lotNumber), ne(seedLots.id, lotId ?? '')));
      if (namesake && (namesake.archivedAt === null || lotId))
        return bad(
          `${variety.code} ${namesake.archivedAt === null ? 'has a lot' : 'had a lot'} ${form.lotNumber} already.`,
          'lotNumber',
        );
      const id = lotId ?? namesake?.id ?? createId();
      if (lotId) {
        const [before] = await transaction
          .select()
          .from(seedLots)
          .where(and(eq(seedLots.id, lotId), eq(seedLots.varietyId, varietyId), isNull(seedLots.archivedAt)));
        if (!before) throw new NotFoundError('No such lot.');
        if (updatedAt !== undefined && before.updatedAt !== updatedAt)
          return bad(
            `Somebody changed lot ${before.lotNumber} while you had it open: it has ${before.unitsOnHand} units now. Your form was not kept. Open the page again and repeat what is still right.`,
          );
        await transaction.update(seedLots).set(values).where(eq(seedLots.id, lotId));
      } else if (namesake) {
        // The number of a lot that was taken out: the same lot comes back, with what the form says.
        await transaction
          .update(seedLots)
          .set({ ...values, archivedAt: null })
          .where(eq(seedLots.id, namesake.id));
      } else {
        await transaction.insert(seedLots).values({ id, varietyId, ...values });
      }
      return {
        ...good({ lotId: id }),
        audit: {
          verb: lotId ? 'lot.changed' : 'lot.created',
          thing: 'seed lot',
          thingId: id,
          summary: `${lotId ? 'Changed' : 'Added'} lot ${form.lotNumber} of ${variety.code}: ${form.unitsOnHand} units on hand.`,
        },
      };
    },
  });
}

/** Takes a lot out; plans that have it keep it. */
export async function archiveLot(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['supply', 'change'],
    schema: lotIdSchema,
    input,
    run: async (transaction, { lotId }) => {
      const [lot] = await transaction
        .select()
        .from(seedLots)
        .where(and(eq(seedLots.id, lotId), isNull(seedLots.archivedAt)));
      if (!lot) throw new NotFoundError('No such lot.');
      const variety = await requireVariety(transaction, viewer, lot.varietyId);
      await transaction.update(seedLots).set({ archivedAt: Date.now(), updatedAt: Date.now() }).where(eq(seedLots.id, lotId));
      return {
        ...good(null),
        audit: {
          verb: 'lot.archived',
          thing: 'seed lot',
          thingId: lotId,
          summary: `Took lot ${lot.lotNumber} of ${variety.code} out.`,
        },
      };
    },
  });
}
