import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { POST } from '@/app/api/v1/sheet/[token]/planted/route';
import { database } from '@/db/client';
import { plans, plantedMarks, sheetLinks } from '@/db/schema';
import { setRow } from '@/features/plans/changes/rows';
import { makeLink, revokeLink } from '@/features/plans/changes/sheet-links';
import { agree, propose } from '@/features/plans/changes/steps';
import { planOf } from '@/features/plans/queries';
import { markPlanted, sheetOf } from '@/features/plans/sheet';
import { aPlanWorld, SEASON } from '../support/plan-world';

type World = Awaited<ReturnType<typeof aPlanWorld>>;
let world: World;
let key: { operationId: string; season: number };
let token: string;
let linkId: string;

async function linkFor(days = 30): Promise<{ token: string; linkId: string }> {
  const made = await makeLink(world.growerA, { ...key, days });
  if (!made.ok) throw new Error(made.problems[0]?.message);
  return { token: made.value.link.split('/').at(-1) as string, linkId: made.value.linkId };
}

function send(to: string, body: unknown): Promise<Response> {
  const request = new Request('http://localhost/api', {
    method: 'POST',
    body: typeof body === 'string' ? body : JSON.stringify(body),
  });
  return POST(request, { params: Promise.resolve({ token: to }) });
}

beforeAll(async () => {
  world = await aPlanWorld();
  key = { operationId: world.operations.a, season: SEASON };
  for (const [fieldId, variety] of [
    [world.fields.home, world.varieties.early],
    [world.fields.slough, world.varieties.late],
  ] as const) {
    const { revision } = await planOf(world.rep, key.operationId, SEASON);
    await setRow(world.rep, { ...key, fieldId, revision, set: { varietyId: variety.id, rowWidthInches: 15 } });
  }
  const { revision } = await planOf(world.rep, key.operationId, SEASON);
  expect((await propose(world.rep, { ...key, revision })).ok).toBe(true);
  expect((await agree(world.growerA, { ...key, revision: revision + 1, signedName: 'Ada Holt' })).ok).toBe(true);
  ({ token, linkId } = await linkFor());
});

describe('the crew link', () => {
  test('shows the sheet and nothing else: no yield, no price, no supply, no other operation', async () => {
    const sheet = await sheetOf(token);
    expect(sheet?.blocks.map((block) => [block.name, block.code])).toEqual([
      ['Home 80', 'CR 21'],
      ['Slough', 'CR 26'],
    ]);
    expect(sheet?.blocks[1]).toMatchObject({ lotNumber: 'CR 26-1', rowWidthInches: 15, largeSeed: true });
    const text = JSON.stringify(sheet);
    for (const hidden of [
      '6200',
      '61.2',
      'expected',
      'ledger',
      'price',
      'Creek Bend',
      'CR 24',
      world.growerA.email,
      key.operationId,
    ]) {
      expect(text).not.toContain(hidden);
    }
  });

  test('a guess, a cut or an empty token opens nothing', async () => {
    for (const guess of ['', 'x', token.slice(0, -1), `${token}x`, 'A'.repeat(32), "' or 1=1 --"]) {
      expect(await sheetOf(guess)).toBeNull();
      expect((await send(guess, { id: 'abcdefgh', rowId: 'x', plantedOn: '2027-05-08' })).status).toBe(404);
    }
  });

  test('the database holds only the hash of the token', async () => {
    const rows = await database().select().from(sheetLinks).where(eq(sheetLinks.id, linkId));
    expect(JSON.stringify(rows)).not.toContain(token);
  });
});

describe('marks from the phone', () => {
  test('a mark sent three times at once is kept once, and says so', async () => {
    const sheet = await sheetOf(token);
    const mark = {
      id: 'phone-made-1',
      rowId: sheet?.blocks[0]?.rowId,
      plantedOn: '2027-05-08',
      lotNumber: 'CR 21-1',
      note: 'wet',
    };
    const answers = await Promise.all([send(token, mark), send(token, mark), send(token, mark)]);
    expect(answers.map((answer) => answer.status)).toEqual([200, 200, 200]);
    expect(await database().select().from(plantedMarks).where(eq(plantedMarks.id, mark.id))).toHaveLength(1);
    expect((await sheetOf(token))?.blocks[0]?.plantedOn).toBe('2027-05-08');
    const events = (await planOf(world.rep, key.operationId, SEASON)).events.filter((event) => event.verb === 'planted');
    expect(events).toHaveLength(1);
  });

  test('the plan is planted when its last field is', async () => {
    const sheet = await sheetOf(token);
    const last = { id: 'phone-made-2', rowId: sheet?.blocks[1]?.rowId, plantedOn: '2027-05-09' };
    expect(await markPlanted(token, last)).toMatchObject({ ok: true, value: { already: false } });
    const [plan] = await database().select().from(plans).where(eq(plans.operationId, key.operationId));
    expect(plan?.state).toBe('planted');
  });

  test('a row of another plan, nonsense and too much are refused, and nothing is kept', async () => {
    const b = { operationId: world.operations.b, season: SEASON };
    await setRow(world.rep, { ...b, fieldId: world.fields.creek, revision: 0, set: { varietyId: world.varieties.middle.id } });
    const foreign = (await planOf(world.rep, b.operationId, SEASON)).lines[0]?.id;
    const before = (await database().select().from(plantedMarks)).length;
    expect((await send(token, { id: 'phone-made-3', rowId: foreign, plantedOn: '2027-05-08' })).status).toBe(422);
    expect((await send(token, { id: 'short', rowId: foreign, plantedOn: 'today' })).status).toBe(422);
    expect((await send(token, '{"id":')).status).toBe(400);
    expect((await send(token, 'x'.repeat(2_100_000))).status).toBe(413);
    const photo = 'data:text/html;base64,PHNjcmlwdD4=';
    expect((await send(token, { id: 'phone-made-4', rowId: foreign, plantedOn: '2027-05-08', photo })).status).toBe(422);
    expect((await database().select().from(plantedMarks)).length).toBe(before);
  });

  test('a revoked link and one that has run out open nothing and take nothing', async () => {
    const revoked = await linkFor();
    expect(await sheetOf(revoked.token)).not.toBeNull();
    expect((await revokeLink(world.rep, { ...key, linkId: revoked.linkId })).ok).toBe(true);
    const old = await linkFor();
    await database()
      .update(sheetLinks)
      .set({ expiresAt: Date.now() - 1 })
      .where(eq(sheetLinks.id, old.linkId));
    for (const closed of [revoked.token, old.token]) {
      expect(await sheetOf(closed)).toBeNull();
      const answer = await send(closed, { id: 'phone-made-5', rowId: 'any', plantedOn: '2027-05-08' });
      expect(answer.status).toBe(404);
      expect(await answer.text()).toContain('the mark stays on this phone');
    }
  });
});
