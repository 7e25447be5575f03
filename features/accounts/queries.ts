import 'server-only';
import { and, asc, desc, eq, gt, inArray, isNull, like, lt, or, type SQL } from 'drizzle-orm';
import { database } from '@/db/client';
import { auditEntries, dealerships, invitations, operationPeople, operations, outboxMails, people } from '@/db/schema';
import { environment } from '@/lib/env';
import { NotAllowedError } from '@/lib/errors';
import type { Role, Viewer } from './model';
import { may } from './rights';
import { operationInScope } from './scope';

export interface Person {
  id: string;
  name: string;
  email: string;
  role: Role;
  disabled: boolean;
  operations: { id: string; name: string }[];
}

/** People of the dealership: all for a manager, the growers of their operations (and colleagues) for a rep, oneself for a grower. */
export async function peopleOf(viewer: Viewer): Promise<Person[]> {
  const rows = await database()
    .select({ id: people.id, name: people.name, email: people.email, role: people.role, disabledAt: people.disabledAt })
    .from(people)
    .where(eq(people.dealershipId, viewer.dealershipId))
    .orderBy(asc(people.name));
  const links = await database()
    .select({ personId: operationPeople.personId, id: operations.id, name: operations.name })
    .from(operationPeople)
    .innerJoin(operations, eq(operations.id, operationPeople.operationId))
    .where(operationInScope(viewer))
    .orderBy(asc(operations.name));
  return rows
    .map(({ disabledAt, ...person }) => ({
      ...person,
      disabled: disabledAt !== null,
      operations: links.filter((link) => link.personId === person.id).map(({ id, name }) => ({ id, name })),
    }))
    .filter((person) => {
      if (viewer.role === 'manager' || person.id === viewer.personId) return true;
      if (viewer.role === 'grower') return person.operations.length > 0 && person.role === 'rep';
      return person.role !== 'grower' || person.operations.length > 0;
    });
}

export interface Invitation {
  id: string;
  name: string;
  email: string;
  role: Role;
  operationName: string | null;
  expiresAt: number;
}

/** Invitations still open: all of the dealership for a manager, one's own for a rep. */
export async function openInvitationsOf(viewer: Viewer): Promise<Invitation[]> {
  if (!may(viewer, 'person', 'invite')) return [];
  const own: SQL | undefined = viewer.role === 'manager' ? undefined : eq(invitations.invitedByPersonId, viewer.personId);
  return database()
    .select({
      id: invitations.id,
      name: invitations.name,
      email: invitations.email,
      role: invitations.role,
      operationName: operations.name,
      expiresAt: invitations.expiresAt,
    })
    .from(invitations)
    .leftJoin(operations, eq(operations.id, invitations.operationId))
    .where(
      and(
        eq(invitations.dealershipId, viewer.dealershipId),
        isNull(invitations.acceptedAt),
        isNull(invitations.withdrawnAt),
        gt(invitations.expiresAt, Date.now()),
        own,
      ),
    )
    .orderBy(desc(invitations.createdAt));
}

export interface AuditLine {
  id: string;
  at: number;
  verb: string;
  summary: string;
  personName: string | null;
  operationName: string | null;
}

export interface AuditFilter {
  /** How the verb begins, any of these: 'plan.', 'sheet.'. */
  verbs?: readonly string[];
  personId?: string;
  operationId?: string;
  /** Entries older than this one, for the next page. */
  before?: { at: number; id: string };
  limit?: number;
}

/** The audit trail, newest first. Managers only. */
export async function auditTrail(viewer: Viewer, filter: AuditFilter = {}): Promise<AuditLine[]> {
  if (!may(viewer, 'audit', 'read')) throw new NotAllowedError('Only a manager reads the audit trail.');
  return database()
    .select({
      id: auditEntries.id,
      at: auditEntries.at,
      verb: auditEntries.verb,
      summary: auditEntries.summary,
      personName: people.name,
      operationName: operations.name,
    })
    .from(auditEntries)
    .leftJoin(people, eq(people.id, auditEntries.personId))
    .leftJoin(operations, eq(operations.id, auditEntries.operationId))
    .where(
      and(
        eq(auditEntries.dealershipId, viewer.dealershipId),
        filter.verbs && filter.verbs.length > 0
          ? or(...filter.verbs.map((beginning) => like(auditEntries.verb, `${beginning.replace(/[%_]/g, '')}%`)))
          : undefined,
        filter.personId ? eq(auditEntries.personId, filter.personId) : undefined,
        filter.operationId ? eq(auditEntries.operationId, filter.operationId) : undefined,
        filter.before
          ? or(
              lt(auditEntries.at, filter.before.at),
              and(eq(auditEntries.at, filter.before.at), lt(auditEntries.id, filter.before.id)),
            )
          : undefined,
      ),
    )
    .orderBy(desc(auditEntries.at), desc(auditEntries.id))
    .limit(Math.min(filter.limit ?? 50, 200));
}

/** Mails of the dealership as the outbox holds them, newest first. Managers only, and only where the outbox is shown at all. */
export async function outboxOf(viewer: Viewer): Promise<(typeof outboxMails.$inferSelect)[]> {
  if (!may(viewer, 'outbox', 'read')) throw new NotAllowedError('Only a manager reads the outbox.');
  // Links in it open accounts: in production nobody reads them unless the operator of this Hilum asked for it.
  if (!environment().showOutbox) throw new NotAllowedError('The outbox is not shown here.');
  return database()
    .select()
    .from(outboxMails)
    .where(eq(outboxMails.dealershipId, viewer.dealershipId))
    .orderBy(desc(outboxMails.createdAt))
    .limit(200);
}

/** The dealership's own settings. */
export async function dealershipOf(
  viewer: Viewer,
): Promise<{ name: string; currentSeason: number; soybeanPriceCentsPerBushel: number }> {
  const [row] = await database()
    .select({
      name: dealerships.name,
      currentSeason: dealerships.currentSeason,
      soybeanPriceCentsPerBushel: dealerships.soybeanPriceCentsPerBushel,
    })
    .from(dealerships)
    .where(eq(dealerships.id, viewer.dealershipId));
  if (!row) throw new Error('The dealership of a signed-in person is missing.');
  return row;
}

/** One's own wishes for mail. */
export async function ownAccountOf(viewer: Viewer): Promise<{ name: string; email: string; wantsMail: boolean }> {
  const [row] = await database()
    .select({ name: people.name, email: people.email, wantsMail: people.wantsMail })
    .from(people)
    .where(eq(people.id, viewer.personId));
  if (!row) throw new Error('The signed-in person is missing.');
  return row;
}

/** Names of people by id, within the dealership, for histories. */
export async function namesOfPeople(viewer: Viewer, personIds: string[]): Promise<Map<string, string>> {
  if (personIds.length === 0) return new Map();
  const rows = await database()
    .select({ id: people.id, name: people.name })
    .from(people)
    .where(and(eq(people.dealershipId, viewer.dealershipId), inArray(people.id, personIds)));
  return new Map(rows.map((row) => [row.id, row.name]));
}
