import 'server-only';
import type { z } from 'zod';
import { database, type Transaction } from '@/db/client';
import { auditEntries } from '@/db/schema';
import { bad, NotAllowedError, NotFoundError, type Outcome } from '@/lib/errors';
import { createId } from '@/lib/ids';
import type { Viewer } from './model';
import { may, type Thing, type Verb } from './rights';

export interface AuditNote {
  /** 'plan.agreed' */
  verb: string;
  thing: string;
  thingId?: string;
  operationId?: string;
  /** One sentence: "Agreed the 2027 plan of Teal Creek Farms." */
  summary: string;
  detail?: Record<string, unknown>;
}

export interface Change<Input, Value, T extends Thing> {
  right: readonly [T, Verb<T>];
  schema: z.ZodType<Input>;
  input: unknown;
  /** One short transaction: no network, no parsing of files inside. Return `bad(…)` to undo everything. */
  run: (transaction: Transaction, input: Input) => Promise<Outcome<Value> & { audit?: AuditNote | AuditNote[] }>;
}

class Undo extends Error {
  constructor(readonly outcome: { ok: false; problems: { message: string; path?: string }[] }) {
    super('undone');
  }
}

/**
 * The one gate for writes: may they → parse → one transaction → audit row. Every feature's `changes.ts` goes through it.
 * Scope (whose row it is) is checked inside `run` with scope.ts, in the same transaction as the write.
 */
export async function change<Input, Value, T extends Thing>(
  viewer: Viewer,
  task: Change<Input, Value, T>,
): Promise<Outcome<Value>> {
  const [thing, verb] = task.right;
  if (!may(viewer, thing, verb)) return bad(`Your account may not do this (${String(verb)} ${thing}).`);
  const parsed = task.schema.safeParse(task.input);
  if (!parsed.success) {
    return bad(parsed.error.issues.map((problem) => ({ message: problem.message, path: problem.path.join('.') })));
  }
  try {
    return await database().transaction(
      async (transaction) => {
        const { audit, ...outcome } = await task.run(transaction, parsed.data);
        if (!outcome.ok) throw new Undo(outcome);
        for (const note of audit === undefined ? [] : [audit].flat()) await recordAudit(transaction, viewer, note);
        return outcome as Outcome<Value>;
      },
      { behavior: 'immediate' },
    );
  } catch (error) {
    if (error instanceof Undo) return error.outcome;
    if (error instanceof NotFoundError || error instanceof NotAllowedError) return bad(error.message);
    throw error;
  }
}

/** Writes one audit row; exported for the few writes that have no viewer's right (signing in, accepting an invitation). */
export async function recordAudit(
  transaction: Transaction,
  viewer: { dealershipId: string; personId: string | null },
  note: AuditNote,
): Promise<void> {
  await transaction.insert(auditEntries).values({
    id: createId(),
    dealershipId: viewer.dealershipId,
    personId: viewer.personId,
    operationId: note.operationId ?? null,
    verb: note.verb,
    thing: note.thing,
    thingId: note.thingId ?? null,
    summary: note.summary,
    detail: note.detail ?? null,
  });
}
