import { and, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { fieldFacts, outboxMails, planEvents, planRows, plans, seedLots } from '@/db/schema';
import { fillFromPicks, removeRow, setRow } from '@/features/plans/changes/rows';
import { agree, askChange, propose, reopen, withdraw } from '@/features/plans/changes/steps';
import { planOf, seasonOf } from '@/features/plans/queries';
import { aPlanWorld, aScore, SEASON } from '../support/plan-world';

type World = Awaited<ReturnType<typeof aPlanWorld>>;

function key(operationId: string) {
  return { operationId, season: SEASON };
}

async function put(world: World, operationId: string, fieldId: string, varietyId: string, viewer = world.rep) {
  const { revision } = await planOf(viewer, operationId, SEASON);
  return setRow(viewer, { ...key(operationId), fieldId, revision, set: { varietyId, populationSeedsPerAcre: 140_000 } });
}

function words(outcome: { ok: boolean; problems?: { message: string }[] }): string {
  return outcome.problems?.map((problem) => problem.message).join(' ') ?? '';
}

describe('a plan from draft to agreed', () => {
  test('a rep puts picks, proposes, the grower agrees by name, ledgers freeze and mail goes out at each step', async () => {
    const world = await aPlanWorld();
    const { a } = world.operations;
    expect(await put(world, a, world.fields.home, world.varieties.early.id)).toMatchObject({ ok: true, value: { revision: 1 } });
    const filled = await fillFromPicks(world.rep, key(a));
    expect(filled).toMatchObject({ ok: true, value: { placed: 1, left: [] } });
    let plan = await planOf(world.rep, a, SEASON);
    expect(plan.lines.map((line) => line.variety?.code)).toEqual(['CR 21', 'CR 21']);
    expect(plan.lines[0]?.runnerUp).toEqual({ code: 'CR 24', differenceBushels: expect.closeTo(-0.6, 6) });

    expect(await propose(world.rep, { ...key(a), revision: plan.revision, word: 'Early ones first.' })).toMatchObject({
      ok: true,
    });
    expect((await planOf(world.growerA, a, SEASON)).state).toBe('proposed');
    plan = await planOf(world.growerA, a, SEASON);
    expect(await agree(world.growerA, { ...key(a), revision: plan.revision, signedName: 'A' })).toMatchObject({ ok: false });
    expect(await agree(world.growerA, { ...key(a), revision: plan.revision, signedName: 'Ada Holt' })).toMatchObject({
      ok: true,
    });

    // The field is scored anew after the agreement: the agreed ledger stays as it was.
    await aScore(world.fields.home, [{ variety: world.varieties.late, expected: 70 }]);
    plan = await planOf(world.growerA, a, SEASON);
    expect(plan.state).toBe('agreed');
    expect(plan.signedName).toBe('Ada Holt');
    expect(plan.lines.find((line) => line.fieldName === 'Home 80')?.assessment?.expected).toBe(61.2);

    const mails = await database().select().from(outboxMails).where(eq(outboxMails.dealershipId, world.dealershipId));
    expect(mails.filter((mail) => mail.to === world.growerA.email).map((mail) => mail.subject)).toEqual([
      'Your 2027 planting plan is ready to look at',
      'You agreed to the 2027 planting plan',
    ]);
    expect(mails.filter((mail) => mail.to === world.rep.email)).toHaveLength(1);
    expect(mails.some((mail) => mail.text.includes('Early ones first.'))).toBe(true);
    const [agreed] = await database()
      .select()
      .from(planEvents)
      .where(and(eq(planEvents.planId, plan.planId as string), eq(planEvents.verb, 'agreed')));
    expect(JSON.stringify(agreed?.snapshot)).toContain('21 % below pH 6.0');
  });

  test('a proposed or agreed plan cannot be edited; a change asked frees it and the first edit makes it a draft', async () => {
    const world = await aPlanWorld();
    const { a } = world.operations;
    await put(world, a, world.fields.home, world.varieties.early.id);
    await propose(world.rep, { ...key(a), revision: 1 });
    expect(words(await put(world, a, world.fields.home, world.varieties.late.id))).toContain('withdraw it');
    expect(await withdraw(world.rep, key(a))).toMatchObject({ ok: true });
    const { revision } = await planOf(world.rep, a, SEASON);
    await propose(world.rep, { ...key(a), revision });
    expect(words(await askChange(world.growerA, { ...key(a), word: '' }))).toContain('what should change');
    expect(
      await askChange(world.growerA, { ...key(a), word: 'Not on the home place.', fieldId: world.fields.home }),
    ).toMatchObject({
      ok: true,
    });
    expect((await planOf(world.rep, a, SEASON)).state).toBe('change asked');
    expect(await put(world, a, world.fields.home, world.varieties.late.id)).toMatchObject({ ok: true });
    expect((await planOf(world.rep, a, SEASON)).state).toBe('draft');
    expect(words(await reopen(world.rep, { ...key(a), word: 'Too late.' }))).toContain('cannot take that step');
  });

  test('a stopped variety is refused with its reason, and so is another season’s or dealership’s', async () => {
    const world = await aPlanWorld();
    const other = await aPlanWorld();
    const { a } = world.operations;
    await aScore(world.fields.home, [{ variety: world.varieties.early, expected: 60 }], [world.varieties.late]);
    expect(words(await put(world, a, world.fields.home, world.varieties.late.id))).toContain('sprays dicamba');
    expect(words(await put(world, a, world.fields.home, other.varieties.late.id))).toContain('No such variety');
    expect(await database().select().from(planRows).where(eq(planRows.fieldId, world.fields.home))).toEqual([]);
  });

  test('wrong numbers are refused in words that say the range', async () => {
    const world = await aPlanWorld();
    const base = { ...key(world.operations.a), fieldId: world.fields.home, revision: 0 };
    expect(words(await setRow(world.rep, { ...base, set: { populationSeedsPerAcre: 14 } }))).toContain('40,000 to 300,000');
    expect(words(await setRow(world.rep, { ...base, set: { rowWidthInches: 400 } }))).toContain('4 to 60 in');
    expect(words(await setRow(world.rep, { ...base, set: {} }))).toContain('Nothing to change');
  });
});

describe('a row planted otherwise than the field’s facts', () => {
  test('is assessed anew by the engine at its own row width, and keeps that when the plan is proposed', async () => {
    const world = await aPlanWorld();
    const { a } = world.operations;
    await database().insert(fieldFacts).values({ fieldId: world.fields.home, season: SEASON, rowWidthInches: 30 });
    await put(world, a, world.fields.home, world.varieties.early.id);
    const expectedOf = async () =>
      (await planOf(world.rep, a, SEASON)).lines.find((line) => line.fieldId === world.fields.home)?.assessment;
    expect((await expectedOf())?.expected).toBe(61.2);
    const base = { ...key(a), fieldId: world.fields.home };
    expect(await setRow(world.rep, { ...base, revision: 1, set: { rowWidthInches: 7.5 } })).toMatchObject({ ok: true });
    const narrow = await expectedOf();
    expect(narrow?.expected).not.toBe(61.2);
    expect(narrow?.ledger.length).toBeGreaterThan(0);
    await propose(world.rep, { ...key(a), revision: 2 });
    expect((await expectedOf())?.expected).toBe(narrow?.expected);
    await withdraw(world.rep, key(a));
    expect(await setRow(world.rep, { ...base, revision: 4, set: { rowWidthInches: 30 } })).toMatchObject({ ok: true });
    expect((await expectedOf())?.expected).toBe(61.2);
  });
});

describe('two writers', () => {
  test('the second writer of the same row is told who changed what, and nothing is overwritten', async () => {
    const world = await aPlanWorld();
    const { a } = world.operations;
    await put(world, a, world.fields.home, world.varieties.early.id);
    const read = (await planOf(world.rep, a, SEASON)).revision;
    const base = { ...key(a), fieldId: world.fields.home, revision: read };
    const [first, second] = await Promise.all([
      setRow(world.manager, { ...base, set: { varietyId: world.varieties.middle.id } }),
      setRow(world.rep, { ...base, set: { varietyId: world.varieties.late.id } }),
    ]);
    expect([first.ok, second.ok].filter(Boolean)).toHaveLength(1);
    const loser = first.ok ? second : first;
    const winner = first.ok ? world.manager : world.rep;
    expect(words(loser)).toContain(winner.name);
    expect(words(loser)).toMatch(/variety CR 21 → CR 2[46]/);
    expect(words(loser)).toContain('not kept');
    const kept = (await planOf(world.rep, a, SEASON)).lines.find((line) => line.fieldId === world.fields.home);
    expect(kept?.variety?.code).toBe(first.ok ? 'CR 24' : 'CR 26');
  });

  test('two writers on different rows both succeed', async () => {
    const world = await aPlanWorld();
    const { a } = world.operations;
    const outcomes = await Promise.all([
      setRow(world.manager, { ...key(a), fieldId: world.fields.home, revision: 0, set: { varietyId: world.varieties.early.id } }),
      setRow(world.rep, { ...key(a), fieldId: world.fields.slough, revision: 0, set: { varietyId: world.varieties.late.id } }),
    ]);
    expect(outcomes.every((outcome) => outcome.ok)).toBe(true);
    expect((await planOf(world.rep, a, SEASON)).totals.placedAcres).toBeCloseTo(119.6, 6);
  });

  test('a grower cannot agree to a plan that changed since they read it', async () => {
    const world = await aPlanWorld();
    const { a } = world.operations;
    await put(world, a, world.fields.home, world.varieties.early.id);
    await propose(world.rep, { ...key(a), revision: 1 });
    const { revision } = await planOf(world.growerA, a, SEASON);
    await withdraw(world.rep, key(a));
    await put(world, a, world.fields.home, world.varieties.late.id);
    await propose(world.rep, { ...key(a), revision: (await planOf(world.rep, a, SEASON)).revision });
    const outcome = await agree(world.growerA, { ...key(a), revision, signedName: 'Ada Holt' });
    expect(words(outcome)).toContain('variety CR 21 → CR 26');
    expect((await planOf(world.growerA, a, SEASON)).state).toBe('proposed');
  });

  test('a row taken off meanwhile is told to the one who would change it', async () => {
    const world = await aPlanWorld();
    const { a } = world.operations;
    await put(world, a, world.fields.home, world.varieties.early.id);
    const base = { ...key(a), fieldId: world.fields.home, revision: 1 };
    expect(await removeRow(world.manager, base)).toMatchObject({ ok: true });
    expect(words(await setRow(world.rep, { ...base, set: { rowWidthInches: 15 } }))).toContain('CR 21 → none');
  });
});

describe('the last units', () => {
  test('two reps proposing the last 40 units at the same moment: one gets them, the other a clear answer', async () => {
    const world = await aPlanWorld({ scarceUnits: 40 });
    const { a, b } = world.operations;
    // 40 ac at 140,000 seeds are 40 units, on each of two plans.
    await put(world, a, world.fields.slough, world.varieties.early.id);
    await put(world, b, world.fields.creek, world.varieties.early.id, world.otherRep);
    const [first, second] = await Promise.all([
      propose(world.rep, { ...key(a), revision: 1 }),
      propose(world.otherRep, { ...key(b), revision: 1 }),
    ]);
    expect([first.ok, second.ok].filter(Boolean)).toHaveLength(1);
    const loser = first.ok ? second : first;
    expect(words(loser)).toContain('40 units of CR 21 are asked, 0 are free (40 on hand, 40 held by other plans).');
    expect(words(loser)).toContain('nothing was proposed');

    // When the first plan is asked to change, its units are free for the other.
    const winnerId = first.ok ? a : b;
    const loserId = first.ok ? b : a;
    await askChange(first.ok ? world.growerA : world.growerB, { ...key(winnerId), word: 'Another one, please.' });
    const again = await propose(world.rep, { ...key(loserId), revision: 1 });
    expect(again.ok).toBe(true);
    const early = (await seasonOf(world.manager, SEASON)).varieties.find((one) => one.code === 'CR 21');
    expect(early).toMatchObject({ unitsOnHand: 40, unitsProposed: 40, unitsFree: 0, unitsDraft: 40 });
  });

  test('filling from picks goes on to the runner-up when the first pick runs out', async () => {
    const world = await aPlanWorld({ scarceUnits: 120 });
    const { a } = world.operations;
    const filled = await fillFromPicks(world.rep, key(a));
    expect(filled.ok).toBe(true);
    const plan = await planOf(world.rep, a, SEASON);
    const totals = Object.fromEntries(plan.totals.varieties.map((one) => [one.variety.code, one.units]));
    expect(totals['CR 21']).toBeLessThanOrEqual(120);
    expect(Object.keys(totals).sort()).toEqual(['CR 21', 'CR 24']);
    const [stored] = await database().select().from(plans).where(eq(plans.operationId, a));
    expect(stored?.state).toBe('draft');
  });

  test('filling takes the second lot when the first is used up, and a plan filled so can be proposed', async () => {
    const world = await aPlanWorld({ scarceUnits: 100 });
    const { a } = world.operations;
    await database()
      .insert(seedLots)
      .values({
        id: `second ${a}`,
        varietyId: world.varieties.early.id,
        lotNumber: 'CR 21-2',
        germinationPercent: 90,
        unitsOnHand: 60,
      });
    expect(await fillFromPicks(world.rep, key(a))).toMatchObject({ ok: true, value: { placed: 2 } });
    const plan = await planOf(world.rep, a, SEASON);
    expect(plan.lines.map((line) => line.lot?.lotNumber)).toEqual(['CR 21-1', 'CR 21-2']);
    expect(await propose(world.rep, { ...key(a), revision: plan.revision })).toMatchObject({ ok: true });
  });
});
