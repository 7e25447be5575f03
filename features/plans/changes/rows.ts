import 'server-only';
import { eq } from 'drizzle-orm';
import { planRows } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { bad, good, NotFoundError, type Outcome } from '@/lib/errors';
import {
  addEvent,
  bumpPlan,
  changesSince,
  conflictProblem,
  groundOf,
  openPlan,
  type PlanKey,
  rowsOfPlan,
  stepProblem,
} from '../plan-record';
import { assessorOf } from '../reassess';
import { EMPTY_ROW, valuesAfter, wordsOfChange, writeRow } from '../row-values';
import { planKeySchema, proposalRowsSchema, removeRowSchema, setRowSchema } from '../schemas';
import { openSupplyBook } from '../supply-book';

/** Puts one pick on the plan (or replaces the one that is there): the same as setting the row's variety. */
export function putOnPlan(viewer: Viewer, input: PlanKey & { fieldId: string; varietyId: string; revision: number }) {
  const { varietyId, ...key } = input;
  return setRow(viewer, { ...key, set: { varietyId } });
}

/** Sets what is named of a row: variety, lot, seeds per acre, row width, lock, note. A conflict tells what changed meanwhile. */
export async function setRow(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  const known = setRowSchema.safeParse(input);
  const assessAt = known.success ? await assessorOf(viewer, known.data.fieldId, known.data.season) : null;
  return change(viewer, {
    right: ['plan', 'change'],
    schema: setRowSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted, true);
      const problem = stepProblem(viewer, plan, 'edit');
      if (problem) return bad([problem]);
      const [ground] = await groundOf(transaction, wanted, [wanted.fieldId]);
      if (!ground) throw new NotFoundError('No such field on this operation.');
      const since = await changesSince(transaction, plan, wanted.revision, wanted.fieldId);
      if (since.length > 0) return bad([conflictProblem(since)]);

      const rows = await rowsOfPlan(transaction, plan.id);
      const before = rows.find((row) => row.fieldId === wanted.fieldId && row.partName === wanted.partName);
      if (!before && wanted.partName !== '') throw new NotFoundError('No such part of the field on this plan.');
      const others = rows.filter((row) => row !== before);
      const book = await openSupplyBook(transaction, viewer, wanted.season, plan.id, others);
      const outcome = await valuesAfter(transaction, viewer, wanted.season, ground, before ?? null, wanted.set, book, assessAt);
      if (!outcome.ok) return outcome;
      const words = await wordsOfChange(transaction, before ?? EMPTY_ROW, outcome.value);
      // Leaving a cell as it was is no change: no revision, nothing in the history.
      if (before && words.length === 0) return good({ revision: plan.revision });
      const rowId = await writeRow(transaction, plan.id, ground, before ?? null, outcome.value);
      const revision = await bumpPlan(transaction, plan, { state: 'draft' });
      await addEvent(transaction, viewer, plan.id, {
        verb: 'row set',
        revision,
        planRowId: rowId,
        snapshot: { fieldId: ground.id, partName: wanted.partName, fieldName: ground.name, words },
      });
      return {
        ...good({ revision }),
        audit: {
          verb: 'plan.row-set',
          thing: 'plan',
          thingId: plan.id,
          operationId: plan.operationId,
          summary: `${ground.name}: ${words.join(', ')}.`,
        },
      };
    },
  });
}

/** Takes a field (or a part) off the plan. */
export function removeRow(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'change'],
    schema: removeRowSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      const problem = stepProblem(viewer, plan, 'edit');
      if (problem) return bad([problem]);
      const [ground] = await groundOf(transaction, wanted, [wanted.fieldId]);
      const row = (await rowsOfPlan(transaction, plan.id)).find(
        (one) => one.fieldId === wanted.fieldId && one.partName === wanted.partName,
      );
      if (!row) throw new NotFoundError('That field is not on the plan.');
      const since = await changesSince(transaction, plan, wanted.revision, wanted.fieldId);
      if (since.length > 0) return bad([conflictProblem(since)]);
      await transaction.delete(planRows).where(eq(planRows.id, row.id));
      const words = await wordsOfChange(transaction, row, EMPTY_ROW);
      const revision = await bumpPlan(transaction, plan, { state: 'draft' });
      const fieldName = ground?.name ?? 'A field';
      await addEvent(transaction, viewer, plan.id, {
        verb: 'row removed',
        revision,
        planRowId: row.id,
        snapshot: { fieldId: row.fieldId, partName: row.partName, fieldName, words },
      });
      return {
        ...good({ revision }),
        audit: {
          verb: 'plan.row-removed',
          thing: 'plan',
          thingId: plan.id,
          operationId: plan.operationId,
          summary: `Took ${fieldName} off the plan.`,
        },
      };
    },
  });
}

/** Puts the first pick that supply still covers on every field that has none. Says how many it placed and which it could not. */
export function fillFromPicks(
  viewer: Viewer,
  input: unknown,
): Promise<Outcome<{ revision: number; placed: number; left: string[] }>> {
  return change(viewer, {
    right: ['plan', 'change'],
    schema: planKeySchema,
    input,
    run: async (transaction, key) => {
      const plan = await openPlan(transaction, viewer, key, true);
      const problem = stepProblem(viewer, plan, 'edit');
      if (problem) return bad([problem]);
      const rows = await rowsOfPlan(transaction, plan.id);
      const book = await openSupplyBook(transaction, viewer, key.season, plan.id, rows);
      const placed: string[] = [];
      const left: string[] = [];
      // Biggest fields first: they have the most to lose by a second choice.
      const ground = (await groundOf(transaction, key)).sort((a, b) => b.areaAcres - a.areaAcres);
      for (const field of ground) {
        const own = rows.filter((row) => row.fieldId === field.id);
        if (own.some((row) => row.varietyId !== null)) continue;
        const before = own[0] ?? null;
        let done = false;
        for (const pick of field.ranking?.picks ?? []) {
          const outcome = await valuesAfter(transaction, viewer, key.season, field, before, { varietyId: pick.varietyId }, book);
          if (!outcome.ok) continue;
          if (!book.take({ ...outcome.value, areaAcres: field.areaAcres })) continue;
          await writeRow(transaction, plan.id, field, before, outcome.value);
          placed.push(`${field.name} ${pick.code}`);
          done = true;
          break;
        }
        if (!done) left.push(field.name);
      }
      if (placed.length === 0) {
        return bad(
          left.length === 0
            ? 'Every field has a variety already.'
            : `No field could be filled: ${left.join(', ')} ${left.length === 1 ? 'has' : 'have'} no pick in supply. Score the fields first.`,
        );
      }
      const revision = await bumpPlan(transaction, plan, { state: 'draft' });
      await addEvent(transaction, viewer, plan.id, { verb: 'filled from picks', revision, snapshot: { words: placed } });
      return {
        ...good({ revision, placed: placed.length, left }),
        audit: {
          verb: 'plan.filled',
          thing: 'plan',
          thingId: plan.id,
          operationId: plan.operationId,
          summary: `Filled ${placed.length} fields from the picks.`,
        },
      };
    },
  });
}

/** Takes over a proposal of the solver: one variety for each named field; locked rows stay as they are. */
export function applyProposal(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'change'],
    schema: proposalRowsSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted, true);
      const problem = stepProblem(viewer, plan, 'edit');
      if (problem) return bad([problem]);
      const since = await changesSince(transaction, plan, wanted.revision, null);
      if (since.length > 0) return bad([conflictProblem(since)]);
      const rows = await rowsOfPlan(transaction, plan.id);
      const ground = new Map((await groundOf(transaction, wanted)).map((field) => [field.id, field]));
      const replaced = new Set(wanted.rows.map((one) => one.fieldId));
      const standing = rows.filter((row) => row.locked || !replaced.has(row.fieldId));
      const book = await openSupplyBook(transaction, viewer, wanted.season, plan.id, standing);
      const words: string[] = [];
      for (const one of wanted.rows) {
        const field = ground.get(one.fieldId);
        if (!field) throw new NotFoundError('No such field on this operation.');
        const before = rows.find((row) => row.fieldId === one.fieldId && row.partName === '') ?? null;
        if (before?.locked || before?.varietyId === one.varietyId) continue;
        const outcome = await valuesAfter(transaction, viewer, wanted.season, field, before, { varietyId: one.varietyId }, book);
        if (!outcome.ok) return outcome;
        book.take({ ...outcome.value, areaAcres: field.areaAcres });
        await writeRow(transaction, plan.id, field, before, outcome.value);
        words.push(`${field.name}: ${(await wordsOfChange(transaction, before ?? EMPTY_ROW, outcome.value))[0]}`);
      }
      const revision = await bumpPlan(transaction, plan, { state: 'draft' });
      await addEvent(transaction, viewer, plan.id, { verb: 'took the solver’s proposal', revision, snapshot: { words } });
      return {
        ...good({ revision }),
        audit: {
          verb: 'plan.solved',
          thing: 'plan',
          thingId: plan.id,
          operationId: plan.operationId,
          summary: `Took over the solver’s proposal: ${words.length} rows changed.`,
        },
      };
    },
  });
}
