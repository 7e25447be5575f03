import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { auditEntries, planRows, plans, sheetLinks } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { applyProposal, fillFromPicks, putOnPlan, removeRow, setRow } from '@/features/plans/changes/rows';
import { makeLink, revokeLink } from '@/features/plans/changes/sheet-links';
import { agree, askChange, comment, propose, reopen, withdraw } from '@/features/plans/changes/steps';
import { planOf, plansOf, seasonOf, sheetLinksOf } from '@/features/plans/queries';
import { NotAllowedError, NotFoundError } from '@/lib/errors';
import { aPlanWorld, SEASON } from '../support/plan-world';

type World = Awaited<ReturnType<typeof aPlanWorld>>;
let world: World;
let strangers: World;
let key: { operationId: string; season: number };

/** Everybody who must not reach operation A: by name, with the viewer. */
let outsiders: [string, Viewer][];

beforeAll(async () => {
  world = await aPlanWorld();
  strangers = await aPlanWorld();
  key = { operationId: world.operations.a, season: SEASON };
  outsiders = [
    ['a grower of another operation', world.growerB],
    ['a rep who is not assigned', world.otherRep],
    ['a rep of another dealership', strangers.rep],
    ['a manager of another dealership', strangers.manager],
    ['a grower of another dealership', strangers.growerA],
  ];
  const placed = await setRow(world.rep, {
    ...key,
    fieldId: world.fields.home,
    revision: 0,
    set: { varietyId: world.varieties.early.id },
  });
  expect(placed.ok).toBe(true);
});

async function untouched(): Promise<void> {
  const [plan] = await database().select().from(plans).where(eq(plans.operationId, key.operationId));
  expect(plan).toMatchObject({ state: 'draft', revision: 1 });
  const rows = await database()
    .select()
    .from(planRows)
    .where(eq(planRows.planId, plan?.id as string));
  expect(rows.map((row) => row.varietyId)).toEqual([world.varieties.early.id]);
  expect(
    await database()
      .select()
      .from(sheetLinks)
      .where(eq(sheetLinks.planId, plan?.id as string)),
  ).toEqual([]);
}

describe('reading a plan', () => {
  test('nobody outside learns that it exists', async () => {
    for (const [who, viewer] of outsiders) {
      await expect(planOf(viewer, key.operationId, SEASON), who).rejects.toThrow(NotFoundError);
      await expect(sheetLinksOf(viewer, key.operationId, SEASON), who).rejects.toThrow(NotFoundError);
      const listed = (await plansOf(viewer, SEASON)).map((plan) => plan.operationId);
      expect(listed, who).not.toContain(key.operationId);
    }
  });

  test('its own grower, rep and manager read it', async () => {
    for (const viewer of [world.growerA, world.rep, world.manager]) {
      expect((await planOf(viewer, key.operationId, SEASON)).lines).toHaveLength(2);
      expect((await plansOf(viewer, SEASON)).map((plan) => plan.operationId)).toContain(key.operationId);
      expect(await sheetLinksOf(viewer, key.operationId, SEASON)).toEqual([]);
    }
  });

  test('a grower is sent no price, no number of supply, no other variety of the line-up', async () => {
    const text = JSON.stringify(await planOf(world.growerA, key.operationId, SEASON));
    const plan = await planOf(world.growerA, key.operationId, SEASON);
    expect(plan.lines.every((line) => line.lot === null || line.lot.priceCentsPerUnit === null)).toBe(true);
    expect(plan.totals.seedCostCents).toBeNull();
    expect(plan.supply).toEqual([
      { varietyId: world.varieties.early.id, word: 'available', unitsOnHand: null, unitsHeldByOthers: null },
    ]);
    expect(text).not.toContain('6200');
    expect(plan.choices).toEqual({});
    expect(plan.lots).toEqual({});
    const repPlan = await planOf(world.rep, key.operationId, SEASON);
    expect(repPlan.supply.find((one) => one.varietyId === world.varieties.early.id)?.unitsOnHand).toBe(500);
    expect(repPlan.totals.seedCostCents).toBeGreaterThan(0);
  });

  test('the season is for the dealership’s own people, each with their own operations', async () => {
    await expect(seasonOf(world.growerA, SEASON)).rejects.toThrow(NotAllowedError);
    expect((await seasonOf(world.manager, SEASON)).operations).toHaveLength(2);
    expect((await seasonOf(world.otherRep, SEASON)).operations.map((one) => one.operationId)).toEqual([world.operations.b]);
    const foreign = await seasonOf(strangers.manager, SEASON);
    expect(foreign.operations.map((one) => one.operationId)).not.toContain(key.operationId);
    expect(foreign.varieties.map((one) => one.varietyId)).not.toContain(world.varieties.early.id);
  });
});

describe('changing a plan', () => {
  const revision = 1;

  test('no outsider changes anything, whatever they try', async () => {
    const row = { ...key, fieldId: world.fields.home, revision };
    for (const [who, viewer] of outsiders) {
      const tries = [
        setRow(viewer, { ...row, set: { rowWidthInches: 30 } }),
        putOnPlan(viewer, { ...row, varietyId: world.varieties.late.id }),
        removeRow(viewer, row),
        fillFromPicks(viewer, key),
        applyProposal(viewer, { ...key, revision, rows: [{ fieldId: world.fields.home, varietyId: world.varieties.late.id }] }),
        propose(viewer, { ...key, revision }),
        withdraw(viewer, key),
        reopen(viewer, { ...key, word: 'let me in' }),
        agree(viewer, { ...key, revision, signedName: 'Mallory Smith' }),
        askChange(viewer, { ...key, word: 'let me in' }),
        comment(viewer, { ...key, word: 'let me in' }),
        makeLink(viewer, key),
        revokeLink(viewer, { ...key, linkId: 'any' }),
      ];
      for (const outcome of await Promise.all(tries)) expect(outcome.ok, who).toBe(false);
    }
    await untouched();
  });

  test('a grower does not edit or propose their own plan, and a rep does not agree to it', async () => {
    const row = { ...key, fieldId: world.fields.home, revision };
    for (const outcome of await Promise.all([
      setRow(world.growerA, { ...row, set: { rowWidthInches: 30 } }),
      putOnPlan(world.growerA, { ...row, varietyId: world.varieties.late.id }),
      removeRow(world.growerA, row),
      fillFromPicks(world.growerA, key),
      applyProposal(world.growerA, {
        ...key,
        revision,
        rows: [{ fieldId: world.fields.home, varietyId: world.varieties.late.id }],
      }),
      propose(world.growerA, { ...key, revision }),
      withdraw(world.growerA, key),
      reopen(world.growerA, { ...key, word: 'change it' }),
      agree(world.rep, { ...key, revision, signedName: 'Rita Rep' }),
      agree(world.manager, { ...key, revision, signedName: 'Max Manager' }),
      askChange(world.rep, { ...key, word: 'change it' }),
    ])) {
      expect(outcome.ok).toBe(false);
    }
    await untouched();
  });

  test('a row of another operation’s field cannot be put on one’s own plan', async () => {
    const outcome = await setRow(world.growerB.role === 'grower' ? world.otherRep : world.rep, {
      operationId: world.operations.b,
      season: SEASON,
      fieldId: world.fields.home,
      revision: 0,
      set: { varietyId: world.varieties.early.id },
    });
    expect(outcome.ok).toBe(false);
    await untouched();
  });

  test('a crew link of one plan cannot be revoked through another', async () => {
    const b = { operationId: world.operations.b, season: SEASON };
    await setRow(world.otherRep, { ...b, fieldId: world.fields.creek, revision: 0, set: { varietyId: world.varieties.late.id } });
    expect((await makeLink(world.otherRep, b)).ok).toBe(false);
    expect((await propose(world.otherRep, { ...b, revision: 1 })).ok).toBe(true);
    const made = await makeLink(world.growerB, b);
    expect(made.ok).toBe(true);
    if (!made.ok) return;
    expect((await revokeLink(world.rep, { ...key, linkId: made.value.linkId })).ok).toBe(false);
    const [stored] = await database().select().from(sheetLinks).where(eq(sheetLinks.id, made.value.linkId));
    expect(stored?.revokedAt).toBeNull();
    expect(made.value.link).not.toContain(stored?.tokenHash as string);
    expect((await revokeLink(world.otherRep, { ...b, linkId: made.value.linkId })).ok).toBe(true);
  });

  test('every change leaves its audit row under the right dealership', async () => {
    const rows = await database().select().from(auditEntries).where(eq(auditEntries.dealershipId, world.dealershipId));
    expect(rows.map((row) => row.verb)).toEqual(expect.arrayContaining(['plan.row-set', 'plan.proposed', 'sheet.link-made']));
    expect(await database().select().from(auditEntries).where(eq(auditEntries.dealershipId, strangers.dealershipId))).toEqual([]);
  });
});
