import { eq, inArray } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { database } from '@/db/client';
import { auditEntries, dealerships, farms, invitations, operationPeople, operations, outboxMails, people } from '@/db/schema';
import * as dealershipChanges from '@/features/accounts/changes/dealership';
import * as invitationChanges from '@/features/accounts/changes/invitations';
import * as outboxChanges from '@/features/accounts/changes/outbox';
import * as ownChanges from '@/features/accounts/changes/own-account';
import * as peopleChanges from '@/features/accounts/changes/people';
import type { Viewer } from '@/features/accounts/model';
import * as accountQueries from '@/features/accounts/queries';
import * as assignmentChanges from '@/features/growers/changes/assignments';
import * as farmChanges from '@/features/growers/changes/farms';
import * as operationChanges from '@/features/growers/changes/operations';
import * as growerQueries from '@/features/growers/queries';
import { createId } from '@/lib/ids';
import { aScenario, refuses, type Scenario, type Stranger, strangers } from './helpers';

/**
 * Everything that accounts and growers read or write, tried by everybody who must not. The two registries below name each
 * exported query and change; a new one that is not named fails the first test of its list.
 */

interface World extends Scenario {
  farmId: string;
  invitationId: string;
  mailId: string;
}

let world: World;
let outsiders: Stranger[];

beforeAll(async () => {
  const scenario = await aScenario();
  const farmId = createId();
  const invitationId = createId();
  const mailId = createId();
  await database().insert(farms).values({ id: farmId, operationId: scenario.operationId, name: 'Secret farm' });
  await database()
    .insert(invitations)
    .values({
      id: invitationId,
      dealershipId: scenario.dealership.id,
      email: 'secret-invited@example.test',
      name: 'Secret Invited',
      role: 'grower',
      operationId: scenario.operationId,
      tokenHash: createId(),
      invitedByPersonId: scenario.rep.personId,
      expiresAt: Date.now() + 86_400_000,
    });
  await database().insert(outboxMails).values({
    id: mailId,
    dealershipId: scenario.dealership.id,
    to: 'secret-mail@example.test',
    subject: 'Secret',
    text: 'Secret',
    html: 'Secret',
    dedupeKey: mailId,
    state: 'failed',
  });
  await database().insert(auditEntries).values({
    id: createId(),
    dealershipId: scenario.dealership.id,
    operationId: scenario.operationId,
    personId: scenario.grower.personId,
    verb: 'secret.verb',
    thing: 'operation',
    summary: 'Secret summary.',
  });
  world = { ...scenario, farmId, invitationId, mailId };
  outsiders = await strangers(scenario);
});

type Read = (viewer: Viewer) => Promise<unknown>;
const READS: Record<string, Read> = {
  peopleOf: (viewer) => accountQueries.peopleOf(viewer),
  openInvitationsOf: (viewer) => accountQueries.openInvitationsOf(viewer),
  auditTrail: (viewer) => accountQueries.auditTrail(viewer, { operationId: world.operationId, personId: world.grower.personId }),
  outboxOf: (viewer) => accountQueries.outboxOf(viewer),
  dealershipOf: (viewer) => accountQueries.dealershipOf(viewer),
  ownAccountOf: (viewer) => accountQueries.ownAccountOf(viewer),
  namesOfPeople: (viewer) => accountQueries.namesOfPeople(viewer, [world.grower.personId]),
  operationsFor: (viewer) => growerQueries.operationsFor(viewer),
  operationOf: (viewer) => growerQueries.operationOf(viewer, world.operationId),
  chosenOperation: (viewer) => growerQueries.chosenOperation(viewer, world.operationId),
  farmsOf: (viewer) => growerQueries.farmsOf(viewer, world.operationId),
  progressOf: (viewer) => growerQueries.progressOf(viewer),
  progressOfOperation: (viewer) => growerQueries.progressOfOperation(viewer, world.operationId),
};

/** Names of colleagues stand in histories: within a dealership they are no secret. */
const OPEN_WITHIN_THE_DEALERSHIP = ['namesOfPeople'];

function secretsFrom(stranger: Stranger): string[] {
  const own = [world.operationId, world.farmId, world.grower.email, world.grower.personId, world.grower.name, 'Secret', 'secret'];
  const ofDealership = [world.dealership.id, world.dealership.name, world.rep.email, world.rep.name, world.manager.email];
  return stranger.sameDealership ? own : [...own, ...ofDealership];
}

async function whatIsRead(read: Read, viewer: Viewer): Promise<string> {
  try {
    const value = await read(viewer);
    return JSON.stringify(value instanceof Map ? [...value] : value) ?? '';
  } catch (error) {
    if (error instanceof Error && ['NotFoundError', 'NotAllowedError'].includes(error.name)) return error.message;
    throw error;
  }
}

describe('what strangers read', () => {
  test('every query of accounts and growers is tried', () => {
    const exported = [...Object.keys(accountQueries), ...Object.keys(growerQueries)].sort();
    expect(Object.keys(READS).sort()).toEqual(exported);
  });

  test.each(Object.keys(READS))('%s tells a stranger nothing', async (name) => {
    for (const stranger of outsiders) {
      if (stranger.sameDealership && OPEN_WITHIN_THE_DEALERSHIP.includes(name)) continue;
      const text = await whatIsRead(READS[name] as Read, stranger.viewer);
      const leaked = secretsFrom(stranger).filter((secret) => text.includes(secret));
      expect({ who: stranger.who, leaked }).toEqual({ who: stranger.who, leaked: [] });
    }
  });

  test('those who may see the operation do see it', async () => {
    for (const viewer of [world.grower, world.rep, world.manager]) {
      expect(await whatIsRead(READS.operationOf as Read, viewer)).toContain(world.operationId);
      expect(await whatIsRead(READS.farmsOf as Read, viewer)).toContain('Secret farm');
    }
    for (const viewer of [world.rep, world.manager]) {
      expect(await whatIsRead(READS.progressOf as Read, viewer)).toContain(world.operationId);
    }
    expect(await whatIsRead(READS.auditTrail as Read, world.manager)).toContain('Secret summary.');
    expect(await whatIsRead(READS.outboxOf as Read, world.manager)).toContain('secret-mail@example.test');
  });

  test('a grower sees neither other growers, nor the audit trail, nor the outbox', async () => {
    for (const name of ['auditTrail', 'outboxOf', 'progressOf']) {
      await expect((READS[name] as Read)(world.grower)).rejects.toThrow();
    }
    const people = await accountQueries.peopleOf(world.grower);
    expect(people.map((person) => person.id).sort()).toEqual([world.grower.personId, world.rep.personId].sort());
  });

  test('a rep sees neither the audit trail nor the outbox', async () => {
    for (const name of ['auditTrail', 'outboxOf']) await expect((READS[name] as Read)(world.rep)).rejects.toThrow();
  });
});

type Write = (viewer: Viewer) => Promise<{ ok: boolean }>;
const WRITES: Record<string, { try: Write; ownThing?: true }> = {
  invitePerson: {
    try: (viewer) =>
      invitationChanges.invitePerson(viewer, {
        email: `${createId()}@example.test`,
        name: 'Foot in the door',
        role: 'grower',
        operationId: world.operationId,
      }),
  },
  withdrawInvitation: { try: (viewer) => invitationChanges.withdrawInvitation(viewer, { invitationId: world.invitationId }) },
  disablePerson: { try: (viewer) => peopleChanges.disablePerson(viewer, { personId: world.grower.personId }) },
  enablePerson: { try: (viewer) => peopleChanges.enablePerson(viewer, { personId: world.grower.personId }) },
  sendMailAgain: { try: (viewer) => outboxChanges.sendMailAgain(viewer, { mailId: world.mailId }) },
  changeOwnAccount: {
    ownThing: true,
    try: (viewer) =>
      ownChanges.changeOwnAccount(viewer, { name: 'Another Name', wantsMail: false, personId: world.grower.personId }),
  },
  changeOwnPassword: {
    try: (viewer) =>
      ownChanges.changeOwnPassword(viewer, {
        current: 'not the one',
        password: 'gate barn wrench',
        repeated: 'gate barn wrench',
        personId: world.grower.personId,
      }),
  },
  signOutEverywhere: { ownThing: true, try: (viewer) => ownChanges.signOutEverywhere(viewer) },
  changeDealership: {
    ownThing: true,
    try: (viewer) =>
      dealershipChanges.changeDealership(viewer, {
        name: 'Taken over',
        currentSeason: 2030,
        soybeanPriceDollarsPerBushel: 1,
        dealershipId: world.dealership.id,
      }),
  },
  createOperation: {
    ownThing: true,
    try: (viewer) => operationChanges.createOperation(viewer, { name: `New ${createId()}`, dealershipId: world.dealership.id }),
  },
  changeOperation: {
    try: (viewer) => operationChanges.changeOperation(viewer, { operationId: world.operationId, name: 'Taken over' }),
  },
  archiveOperation: { try: (viewer) => operationChanges.archiveOperation(viewer, { operationId: world.operationId }) },
  restoreOperation: { try: (viewer) => operationChanges.restoreOperation(viewer, { operationId: world.operationId }) },
  assignPerson: {
    try: (viewer) => assignmentChanges.assignPerson(viewer, { operationId: world.operationId, personId: viewer.personId }),
  },
  unassignPerson: {
    try: (viewer) => assignmentChanges.unassignPerson(viewer, { operationId: world.operationId, personId: world.rep.personId }),
  },
  addFarm: { try: (viewer) => farmChanges.addFarm(viewer, { operationId: world.operationId, name: 'Squatted' }) },
  renameFarm: {
    try: (viewer) => farmChanges.renameFarm(viewer, { operationId: world.operationId, farmId: world.farmId, name: 'Taken over' }),
  },
};

/** Everything of the scenario that a stranger could have changed. */
async function stateOfTheScenario() {
  const persons = [world.grower.personId, world.rep.personId, world.manager.personId];
  return {
    dealership: await database().select().from(dealerships).where(eq(dealerships.id, world.dealership.id)),
    operation: await database().select().from(operations).where(eq(operations.id, world.operationId)),
    people: await database().select().from(people).where(inArray(people.id, persons)),
    assigned: await database().select().from(operationPeople).where(eq(operationPeople.operationId, world.operationId)),
    farms: await database().select().from(farms).where(eq(farms.operationId, world.operationId)),
    invitations: await database().select().from(invitations).where(eq(invitations.operationId, world.operationId)),
    mail: await database().select().from(outboxMails).where(eq(outboxMails.id, world.mailId)),
    audit: await database().select().from(auditEntries).where(eq(auditEntries.operationId, world.operationId)),
  };
}

describe('what strangers change', () => {
  test('every change of accounts and growers is tried', () => {
    const modules = [
      dealershipChanges,
      invitationChanges,
      outboxChanges,
      ownChanges,
      peopleChanges,
      assignmentChanges,
      farmChanges,
      operationChanges,
    ];
    expect(Object.keys(WRITES).sort()).toEqual(modules.flatMap((one) => Object.keys(one)).sort());
  });

  test.each(Object.keys(WRITES))('%s leaves a stranger’s neighbour as they were', async (name) => {
    const { try: write, ownThing } = WRITES[name] as { try: Write; ownThing?: true };
    const before = await stateOfTheScenario();
    for (const stranger of outsiders) {
      const refused = await refuses(() => write(stranger.viewer));
      if (!ownThing) expect({ who: stranger.who, refused }).toEqual({ who: stranger.who, refused: true });
      expect(await stateOfTheScenario()).toEqual(before);
    }
  });

  test('a grower of the operation itself invites nobody, renames nothing and assigns nobody', async () => {
    const before = await stateOfTheScenario();
    for (const name of [
      'invitePerson',
      'changeOperation',
      'archiveOperation',
      'assignPerson',
      'unassignPerson',
      'addFarm',
      'renameFarm',
    ]) {
      expect(await refuses(() => (WRITES[name] as { try: Write }).try(world.grower))).toBe(true);
    }
    expect(await stateOfTheScenario()).toEqual(before);
  });

  test('a rep of the operation neither assigns, disables, nor invites another rep', async () => {
    const before = await stateOfTheScenario();
    for (const name of ['assignPerson', 'unassignPerson', 'disablePerson', 'sendMailAgain', 'changeDealership']) {
      expect(await refuses(() => (WRITES[name] as { try: Write }).try(world.rep))).toBe(true);
    }
    const invited = await invitationChanges.invitePerson(world.rep, { email: 'x@example.test', name: 'Xe', role: 'rep' });
    expect(invited).toEqual({ ok: false, problems: [{ message: 'Only a manager invites reps and managers.', path: 'role' }] });
    expect(await stateOfTheScenario()).toEqual(before);
  });

  test('a manager assigns nobody of another dealership, and no manager', async () => {
    const farAway = outsiders.find((one) => one.who === 'a rep of another dealership') as Stranger;
    for (const personId of [farAway.viewer.personId, world.manager.personId]) {
      const outcome = await assignmentChanges.assignPerson(world.manager, { operationId: world.operationId, personId });
      expect(outcome.ok).toBe(false);
    }
  });
});
