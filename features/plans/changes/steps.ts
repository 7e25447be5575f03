import 'server-only';
import { eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { planRows } from '@/db/schema';
import { change } from '@/features/accounts/gate';
import type { Viewer } from '@/features/accounts/model';
import { environment } from '@/lib/env';
import { bad, good, type Outcome } from '@/lib/errors';
import { formatAcres, formatBushels, formatNumber } from '@/lib/format';
import { agreedMail, agreedReceiptMail, changeAskedMail, proposedMail, reopenedMail, withdrawnMail } from '../mails';
import { figuresOf, lineName, type PlanView } from '../model';
import {
  addEvent,
  bumpPlan,
  changesSince,
  conflictProblem,
  groundOf,
  mailPeople,
  openPlan,
  type PlanKey,
  type PlanRecord,
  stepProblem,
} from '../plan-record';
import { readPlan } from '../read';
import { deviates } from '../reassess';
import { agreeSchema, askChangeSchema, commentSchema, proposeSchema, reopenSchema, withdrawSchema } from '../schemas';
import { shortages } from '../supply';

/** Proposes the plan to the grower: refreshes its ledgers, takes the units (first come), and sends mail. */
export function propose(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'propose'],
    schema: proposeSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      const problem = stepProblem(viewer, plan, 'propose');
      if (problem) return bad([problem]);
      const since = await changesSince(transaction, plan, wanted.revision, null);
      if (since.length > 0) return bad([conflictProblem(since)]);
      await refreshRows(transaction, plan, wanted);
      const view = await readPlan(wanted.operationId, wanted.season, { dealershipSide: true }, transaction);
      const placed = view.lines.filter((line) => line.variety);
      if (placed.length === 0) return bad('Put a variety on at least one field before proposing the plan.');
      const rateless = placed.filter((line) => line.populationSeedsPerAcre === null);
      if (rateless.length > 0) return bad(`Set seeds per acre on ${rateless.map(lineName).join(', ')} first.`);
      const stopped = placed.filter((line) => line.caution?.startsWith('stopped'));
      if (stopped.length > 0) {
        return bad(stopped.map((line) => ({ message: `${line.variety?.code} on ${lineName(line)} is ${line.caution}` })));
      }
      const short = await shortages(viewer.dealershipId, wanted.season, plan.id, transaction);
      if (short.length > 0) {
        return bad(
          short.map((one) => ({ message: `${one.message} Take another variety or fewer acres; nothing was proposed.` })),
        );
      }
      const revision = await step(transaction, viewer, plan, 'proposed', wanted.word, { state: 'proposed' });
      await mailPeople(transaction, plan, 'grower', 'proposed', revision, (to) =>
        proposedMail(aboutOf(viewer, wanted, to, wanted.word), {
          fields: placed.length,
          acres: view.totals.placedAcres,
          units: view.totals.units,
          expected: view.totals.expectedPerAcre,
        }),
      );
      return {
        ...good({ revision }),
        audit: note(plan, 'plan.proposed', `Proposed the ${wanted.season} plan of ${view.operationName}.`),
      };
    },
  });
}

/** Takes a proposal back, so that it can be changed; its units are free again. */
export function withdraw(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'propose'],
    schema: withdrawSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      const problem = stepProblem(viewer, plan, 'withdraw');
      if (problem) return bad([problem]);
      const revision = await step(transaction, viewer, plan, 'withdrawn', wanted.word, { state: 'draft' });
      await mailPeople(transaction, plan, 'grower', 'withdrawn', revision, (to) =>
        withdrawnMail(aboutOf(viewer, wanted, to, wanted.word)),
      );
      return { ...good({ revision }), audit: note(plan, 'plan.withdrawn', `Took back the ${wanted.season} plan.`) };
    },
  });
}

/** Opens an agreed plan again, with the reason; the signature is lifted, its snapshot stays in the history. */
export function reopen(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'propose'],
    schema: reopenSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      const problem = stepProblem(viewer, plan, 'reopen');
      if (problem) return bad([problem]);
      const revision = await step(transaction, viewer, plan, 'reopened', wanted.word, {
        state: 'draft',
        signedName: null,
        signedByPersonId: null,
        signedAt: null,
      });
      await mailPeople(transaction, plan, 'grower', 'reopened', revision, (to) =>
        reopenedMail(aboutOf(viewer, wanted, to, wanted.word)),
      );
      return { ...good({ revision }), audit: note(plan, 'plan.reopened', `Reopened the agreed ${wanted.season} plan.`) };
    },
  });
}

/** The grower agrees to exactly the revision they read, by typed name; ledgers freeze and the seed is reserved. */
export function agree(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'agree'],
    schema: agreeSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      const problem = stepProblem(viewer, plan, 'agree');
      if (problem) return bad([problem]);
      const since = await changesSince(transaction, plan, wanted.revision, null);
      if (since.length > 0) return bad([conflictProblem(since)]);
      const short = await shortages(viewer.dealershipId, wanted.season, plan.id, transaction);
      if (short.length > 0) {
        // A grower is not told numbers of supply.
        return bad('The seed of this plan is no longer all there. Your rep has to change it first; nothing was agreed.');
      }
      const view = await readPlan(wanted.operationId, wanted.season, { dealershipSide: false }, transaction);
      const lines = frozenLines(view);
      const revision = await step(
        transaction,
        viewer,
        plan,
        'agreed',
        '',
        { state: 'agreed', signedName: wanted.signedName, signedByPersonId: viewer.personId, signedAt: Date.now() },
        lines,
      );
      await mailPeople(transaction, plan, 'rep', 'agreed', revision, (to) =>
        agreedMail(aboutOf(viewer, wanted, to), wanted.signedName),
      );
      await mailPeople(transaction, plan, 'grower', 'agreed', revision, (to) =>
        agreedReceiptMail(
          aboutOf(viewer, wanted, to),
          wanted.signedName,
          lines.map((line) => line.words),
        ),
      );
      return {
        ...good({ revision }),
        audit: note(plan, 'plan.agreed', `${wanted.signedName} agreed the ${wanted.season} plan of ${view.operationName}.`),
      };
    },
  });
}

/** The grower asks for a change, with a word; the seed is free again until the plan is proposed anew. */
export function askChange(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'askChange'],
    schema: askChangeSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted);
      const problem = stepProblem(viewer, plan, 'ask change');
      if (problem) return bad([problem]);
      const revision = await bumpPlan(transaction, plan, {
        state: 'change asked',
        signedName: null,
        signedByPersonId: null,
        signedAt: null,
      });
      await addEvent(transaction, viewer, plan.id, {
        verb: 'change asked',
        revision,
        word: wanted.word,
        snapshot: await aboutField(transaction, wanted, wanted.fieldId),
      });
      await mailPeople(transaction, plan, 'rep', 'change asked', revision, (to) =>
        changeAskedMail(aboutOf(viewer, wanted, to, wanted.word)),
      );
      return { ...good({ revision }), audit: note(plan, 'plan.change-asked', `Asked for a change: “${wanted.word}”`) };
    },
  });
}

/** A comment on the plan or one of its fields, by anybody who may read it. It changes nothing else. */
export function comment(viewer: Viewer, input: unknown): Promise<Outcome<{ revision: number }>> {
  return change(viewer, {
    right: ['plan', 'read'],
    schema: commentSchema,
    input,
    run: async (transaction, wanted) => {
      const plan = await openPlan(transaction, viewer, wanted, true);
      await addEvent(transaction, viewer, plan.id, {
        verb: 'comment',
        revision: plan.revision,
        word: wanted.word,
        snapshot: await aboutField(transaction, wanted, wanted.fieldId),
      });
      return { ...good({ revision: plan.revision }), audit: note(plan, 'plan.comment', 'Wrote a comment on the plan.') };
    },
  });
}

/** Rows as they are proposed: today's acres and today's ledgers. */
async function refreshRows(transaction: Transaction, plan: PlanRecord, key: PlanKey): Promise<void> {
  const ground = new Map((await groundOf(transaction, key)).map((field) => [field.id, field]));
  for (const row of await transaction.select().from(planRows).where(eq(planRows.planId, plan.id))) {
    const field = ground.get(row.fieldId);
    if (!field) continue;
    const pick = field.ranking?.picks.find((one) => one.varietyId === row.varietyId) ?? null;
    await transaction
      .update(planRows)
      .set({
        areaAcres: row.partGeometry ? row.areaAcres : field.areaAcres,
        assessment: deviates(row, field.facts) ? (row.assessment ?? pick) : (pick ?? row.assessment),
      })
      .where(eq(planRows.id, row.id));
  }
}

async function step(
  transaction: Transaction,
  viewer: Viewer,
  plan: PlanRecord,
  verb: string,
  word: string,
  set: Parameters<typeof bumpPlan>[2],
  lines?: unknown,
): Promise<number> {
  const revision = await bumpPlan(transaction, plan, set);
  await addEvent(transaction, viewer, plan.id, { verb, revision, word, snapshot: lines === undefined ? {} : { lines } });
  return revision;
}

/** What was agreed, line by line, with its words and its whole ledger. */
function frozenLines(view: PlanView) {
  return view.lines
    .filter((line) => line.variety)
    .map((line) => {
      const figures = figuresOf(line);
      const name = lineName(line);
      return {
        fieldId: line.fieldId,
        name,
        areaAcres: line.areaAcres,
        code: line.variety?.code,
        lotNumber: line.lot?.lotNumber ?? null,
        rowWidthInches: line.rowWidthInches,
        populationSeedsPerAcre: line.populationSeedsPerAcre,
        units: figures.units,
        assessment: line.assessment,
        words: `${name}, ${formatAcres(line.areaAcres)} ac: ${line.variety?.code}, ${formatNumber(line.populationSeedsPerAcre)} seeds/ac, ${formatNumber(figures.units, 1)} units, ${formatBushels(figures.expected)} bu/ac expected.`,
      };
    });
}

async function aboutField(transaction: Transaction, key: PlanKey, fieldId: string | undefined) {
  if (!fieldId) return {};
  const [field] = await groundOf(transaction, key, [fieldId]);
  return field ? { fieldId: field.id, fieldName: field.name } : {};
}

function aboutOf(
  viewer: Viewer,
  key: PlanKey,
  to: { name: string; operationName: string; dealershipName: string },
  word?: string,
) {
  return {
    ...to,
    season: key.season,
    link: `${environment().address}/plans/${key.operationId}/${key.season}`,
    by: viewer.name,
    word: word || undefined,
  };
}

function note(plan: PlanRecord, verb: string, summary: string) {
  return { verb, thing: 'plan', thingId: plan.id, operationId: plan.operationId, summary };
}
