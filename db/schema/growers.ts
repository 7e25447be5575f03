import { sql } from 'drizzle-orm';
import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import { dealerships, people } from './accounts';

const now = sql`(unixepoch() * 1000)`;

export const operations = sqliteTable(
  'operation',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    name: text('name').notNull(),
    /** Two-letter postal code and county name, where known; for a default yield and the state's lime method. */
    state: text('state'),
    county: text('county'),
    note: text('note'),
    createdAt: integer('created_at').notNull().default(now),
    archivedAt: integer('archived_at'),
  },
  (table) => [uniqueIndex('operation_name').on(table.dealershipId, table.name)],
);

/** Growers who belong to an operation and reps assigned to it. The person's role says which of the two it is. */
export const operationPeople = sqliteTable(
  'operation_person',
  {
    operationId: text('operation_id')
      .notNull()
      .references(() => operations.id, { onDelete: 'cascade' }),
    personId: text('person_id')
      .notNull()
      .references(() => people.id, { onDelete: 'cascade' }),
  },
  (table) => [primaryKey({ columns: [table.operationId, table.personId] }), index('operation_person_person').on(table.personId)],
);

export const farms = sqliteTable(
  'farm',
  {
    id: text('id').primaryKey(),
    operationId: text('operation_id')
      .notNull()
      .references(() => operations.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [uniqueIndex('farm_name').on(table.operationId, table.name)],
);
