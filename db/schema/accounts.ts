import { sql } from 'drizzle-orm';
import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';

const now = sql`(unixepoch() * 1000)`;

/** A seed dealership: every other row belongs to exactly one and is never seen by another. */
export const dealerships = sqliteTable('dealership', {
  id: text('id').primaryKey(),
  name: text('name').notNull(),
  /** Crop year being planned, e.g. 2027. */
  currentSeason: integer('current_season').notNull(),
  /** Default price of soybeans for dollars on plans, cents per bushel. */
  soybeanPriceCentsPerBushel: integer('soybean_price_cents_per_bushel').notNull().default(1050),
  createdAt: integer('created_at').notNull().default(now),
});

export const people = sqliteTable(
  'person',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    /** Lower-case, trimmed. */
    email: text('email').notNull(),
    name: text('name').notNull(),
    role: text('role', { enum: ['grower', 'rep', 'manager'] }).notNull(),
    passwordHash: text('password_hash').notNull(),
    /** Mail at each step of a plan. */
    wantsMail: integer('wants_mail', { mode: 'boolean' }).notNull().default(true),
    disabledAt: integer('disabled_at'),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [uniqueIndex('person_email').on(table.email), index('person_dealership').on(table.dealershipId)],
);

/** The id is the SHA-256 of the token in the cookie, so a copy of the database signs nobody in. */
export const sessions = sqliteTable(
  'session',
  {
    id: text('id').primaryKey(),
    userId: text('user_id')
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    /** Seconds since 1970, as Lucia's adapter stores it. */
    expiresAt: integer('expires_at').notNull(),
  },
  (table) => [index('session_user').on(table.userId)],
);

export const invitations = sqliteTable(
  'invitation',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    email: text('email').notNull(),
    name: text('name').notNull(),
    role: text('role', { enum: ['grower', 'rep', 'manager'] }).notNull(),
    /** For a grower: the operation they will belong to. */
    operationId: text('operation_id'),
    tokenHash: text('token_hash').notNull(),
    invitedByPersonId: text('invited_by_person_id').notNull(),
    expiresAt: integer('expires_at').notNull(),
    acceptedAt: integer('accepted_at'),
    withdrawnAt: integer('withdrawn_at'),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [uniqueIndex('invitation_token').on(table.tokenHash), index('invitation_dealership').on(table.dealershipId)],
);

export const passwordResets = sqliteTable(
  'password_reset',
  {
    id: text('id').primaryKey(),
    personId: text('person_id')
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    tokenHash: text('token_hash').notNull(),
    expiresAt: integer('expires_at').notNull(),
    usedAt: integer('used_at'),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [uniqueIndex('password_reset_token').on(table.tokenHash)],
);

/** Tries to sign in, by what is counted (lock-out.ts): slows guessing without locking the owner out. */
export const signInTries = sqliteTable(
  'sign_in_try',
  {
    /** What is counted, hashed. */
    key: text('key').primaryKey(),
    failures: integer('failures').notNull(),
    lastFailureAt: integer('last_failure_at').notNull(),
  },
  (table) => [index('sign_in_try_last_failure').on(table.lastFailureAt)],
);

/** Browsers a person has signed in from: a stranger's guessing never makes their owner wait. */
export const knownBrowsers = sqliteTable(
  'known_browser',
  {
    /** SHA-256 of the secret in the browser's cookie. */
    tokenHash: text('token_hash').notNull(),
    personId: text('person_id')
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [primaryKey({ columns: [table.tokenHash, table.personId] })],
);

/** Who did what, when: one row a write, made in the same transaction as the write. */
export const auditEntries = sqliteTable(
  'audit_entry',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id').notNull(),
    personId: text('person_id'),
    operationId: text('operation_id'),
    at: integer('at').notNull().default(now),
    /** e.g. 'field.kept', 'plan.agreed'. */
    verb: text('verb').notNull(),
    thing: text('thing').notNull(),
    thingId: text('thing_id'),
    /** One sentence a person can read. */
    summary: text('summary').notNull(),
    detail: text('detail', { mode: 'json' }).$type<Record<string, unknown>>(),
  },
  (table) => [index('audit_dealership_at').on(table.dealershipId, table.at)],
);

/** Every mail is written here first, in the transaction that causes it, and sent from here: never lost, never twice. */
export const outboxMails = sqliteTable(
  'outbox_mail',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id'),
    to: text('to').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    html: text('html').notNull(),
    /** The same key is never queued twice. */
    dedupeKey: text('dedupe_key').notNull(),
    state: text('state', { enum: ['queued', 'sending', 'sent', 'failed', 'kept'] }).notNull(),
    attempts: integer('attempts').notNull().default(0),
    nextAttemptAt: integer('next_attempt_at').notNull().default(now),
    lastError: text('last_error'),
    createdAt: integer('created_at').notNull().default(now),
    sentAt: integer('sent_at'),
  },
  (table) => [uniqueIndex('outbox_dedupe').on(table.dedupeKey), index('outbox_state').on(table.state, table.nextAttemptAt)],
);
