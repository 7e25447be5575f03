import 'server-only';
import { and, eq, gt, inArray, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import {
  dealerships,
  fieldFacts,
  fieldScores,
  fields,
  operationPeople,
  operations,
  people,
  planEvents,
  planRows,
  plans,
} from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { requireOperation } from '@/features/accounts/scope';
import type { Ranking } from '@/features/placement/engine/model';
import { NotFoundError, type Problem } from '@/lib/errors';
import { createId } from '@/lib/ids';
import { queueMail } from '@/lib/mail/outbox';
import type { EventSnapshot } from './read';
import { mayStep, type PlanState, type PlanStep, whyNot } from './states';

export type PlanRecord = typeof plans.$inferSelect;
export type RowRecord = typeof planRows.$inferSelect;

export interface PlanKey {
  operationId: string;
  season: number;
}

/** The plan in the viewer's scope; begun as a draft when `begin`, else NotFoundError. */
export async function openPlan(transaction: Transaction, viewer: Viewer, key: PlanKey, begin = false): Promise<PlanRecord> {
  await requireOperation(viewer, key.operationId, transaction);
  const [found] = await transaction
    .select()
    .from(plans)
    .where(and(eq(plans.operationId, key.operationId), eq(plans.season, key.season)));
  if (found) return found;
  if (!begin) throw new NotFoundError('There is no plan for this season yet.');
  const [made] = await transaction
    .insert(plans)
    .values({ id: createId(), operationId: key.operationId, season: key.season, revision: 0 })
    .returning();
  return made as PlanRecord;
}

/** The problem that keeps a step from being taken; `null` when it is open to this viewer. */
export function stepProblem(viewer: Viewer, plan: { state: PlanState }, step: PlanStep): Problem | null {
  return mayStep(step, plan.state, viewer.role) ? null : { message: whyNot(step, plan.state) };
}

/** Counts the plan's revision up, with whatever else changes on it. */
export async function bumpPlan(
  transaction: Transaction,
  plan: PlanRecord,
  set: Partial<typeof plans.$inferInsert> = {},
): Promise<number> {
  const revision = plan.revision + 1;
  await transaction
    .update(plans)
    .set({ ...set, revision, updatedAt: Date.now() })
    .where(eq(plans.id, plan.id));
  return revision;
}

/** Writes one event of the plan. */
export async function addEvent(
  transaction: Transaction,
  viewer: { personId: string | null },
  planId: string,
  event: { verb: string; revision: number; word?: string; planRowId?: string; snapshot?: EventSnapshot },
): Promise<void> {
  await transaction.insert(planEvents).values({
    id: createId(),
    planId,
    personId: viewer.personId,
    at: Date.now(),
    verb: event.verb,
    word: event.word || null,
    planRowId: event.planRowId ?? null,
    revision: event.revision,
    snapshot: event.snapshot ?? null,
  });
}

/**
 * What others did since the revision this writer read. With a field: only what touched that field (or the whole plan).
 * Empty when nothing stands in the way. The words name who, what, before and after.
 */
export async function changesSince(
  transaction: Transaction,
  plan: PlanRecord,
  revision: number,
  fieldId: string | null,
): Promise<string[]> {
  if (revision >= plan.revision) return [];
  const events = await transaction
    .select({ verb: planEvents.verb, snapshot: planEvents.snapshot, name: people.name })
    .from(planEvents)
    .leftJoin(people, eq(people.id, planEvents.personId))
    .where(and(eq(planEvents.planId, plan.id), gt(planEvents.revision, revision)))
    .orderBy(planEvents.revision);
  return events.flatMap(({ verb, snapshot, name }) => {
    const { fieldId: touched, fieldName, words = [] } = (snapshot ?? {}) as EventSnapshot;
    if (verb === 'comment') return [];
    if (fieldId !== null && touched !== undefined && touched !== fieldId) return [];
    return [`${name ?? 'Somebody'}: ${[fieldName, words.join(', ') || verb].filter(Boolean).join(' – ')}.`];
  });
}

/** One problem that tells the second writer what changed meanwhile and that theirs was not kept. */
export function conflictProblem(changes: string[]): Problem {
  return {
    message: `The plan was changed meanwhile. ${changes.join(' ')} Your change was not kept: look at it and decide again.`,
    path: 'revision',
  };
}

export interface FieldGround {
  id: string;
  name: string;
  areaAcres: number;
  facts: typeof fieldFacts.$inferSelect | null;
  ranking: Ranking | null;
}

/** Fields of the operation with this season's facts and stored ranking; all of them or the ones named. */
export async function groundOf(transaction: Transaction, key: PlanKey, fieldIds?: string[]): Promise<FieldGround[]> {
  const rows = await transaction
    .select({ id: fields.id, name: fields.name, areaAcres: fields.areaAcres, facts: fieldFacts, ranking: fieldScores.ranking })
    .from(fields)
    .leftJoin(fieldFacts, and(eq(fieldFacts.fieldId, fields.id), eq(fieldFacts.season, key.season)))
    .leftJoin(fieldScores, and(eq(fieldScores.fieldId, fields.id), eq(fieldScores.season, key.season)))
    .where(
      and(
        eq(fields.operationId, key.operationId),
        isNull(fields.archivedAt),
        fieldIds === undefined ? undefined : inArray(fields.id, fieldIds),
      ),
    );
  return rows.map((row) => ({ ...row, ranking: row.ranking ?? null }));
}

/** Queues one mail to each person of the operation with this role who wants mail, once per plan, verb and revision. */
export async function mailPeople(
  transaction: Transaction,
  plan: PlanRecord,
  role: 'grower' | 'rep',
  verb: string,
  revision: number,
  mailFor: (person: { name: string; operationName: string; dealershipName: string }) => {
    subject: string;
    text: string;
    html: string;
  },
): Promise<void> {
  const [operation] = await transaction
    .select({ name: operations.name, dealershipId: operations.dealershipId, dealershipName: dealerships.name })
    .from(operations)
    .innerJoin(dealerships, eq(dealerships.id, operations.dealershipId))
    .where(eq(operations.id, plan.operationId));
  if (!operation) return;
  const assigned = await transaction
    .select({ id: people.id, name: people.name, email: people.email, wantsMail: people.wantsMail })
    .from(people)
    .innerJoin(operationPeople, eq(operationPeople.personId, people.id))
    .where(and(eq(operationPeople.operationId, plan.operationId), eq(people.role, role), isNull(people.disabledAt)));
  // An operation without a rep is the managers' to answer.
  const to =
    role === 'rep' && assigned.length === 0
      ? await transaction
          .select({ id: people.id, name: people.name, email: people.email, wantsMail: people.wantsMail })
          .from(people)
          .where(and(eq(people.dealershipId, operation.dealershipId), eq(people.role, 'manager'), isNull(people.disabledAt)))
      : assigned;
  for (const person of to.filter((one) => one.wantsMail)) {
    await queueMail(transaction, {
      dealershipId: operation.dealershipId,
      to: person.email,
      ...mailFor({ name: person.name, operationName: operation.name, dealershipName: operation.dealershipName }),
      dedupeKey: `plan ${plan.id} ${verb} ${revision} ${person.id}`,
    });
  }
}

/** Rows of a plan. */
export async function rowsOfPlan(transaction: Transaction, planId: string): Promise<RowRecord[]> {
  return transaction.select().from(planRows).where(eq(planRows.planId, planId)).orderBy(sql`rowid`);
}
