import { sql } from 'drizzle-orm';
import { blob, index, integer, primaryKey, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import { dealerships, people } from './accounts';
import { operations } from './growers';

const now = sql`(unixepoch() * 1000)`;

/**
 * One import: a file (or several) as it was sent, what was understood of it, and what became of it.
 * received → checked → kept | failed | discarded; kept → undone. Rows of other tables made by it carry its id.
 */
export const uploads = sqliteTable(
  'upload',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    /** `null` for the line-up, which belongs to the dealership. */
    operationId: text('operation_id').references(() => operations.id),
    personId: text('person_id')
      .notNull()
      .references(() => people.id),
    kind: text('kind', {
      enum: ['boundaries', 'soil-tests', 'soil-survey', 'line-up', 'maturity-zones', 'climate-stations'],
    }).notNull(),
    season: integer('season').notNull(),
    state: text('state', { enum: ['received', 'checked', 'kept', 'failed', 'discarded', 'undone'] }).notNull(),
    /** What the reader understood (features, rows, columns, notes), JSON of the kind's own shape. */
    inspection: text('inspection', { mode: 'json' }).$type<unknown>(),
    /** What the person chose: name column, column matches, units, CRS. */
    choices: text('choices', { mode: 'json' }).$type<unknown>(),
    problems: text('problems', { mode: 'json' }).$type<string[]>(),
    /** One sentence of what was kept. */
    outcome: text('outcome'),
    createdAt: integer('created_at').notNull().default(now),
    keptAt: integer('kept_at'),
    undoneAt: integer('undone_at'),
  },
  (table) => [index('upload_operation').on(table.operationId), index('upload_dealership').on(table.dealershipId)],
);

export const uploadFiles = sqliteTable(
  'upload_file',
  {
    id: text('id').primaryKey(),
    uploadId: text('upload_id')
      .notNull()
      .references(() => uploads.id, { onDelete: 'cascade' }),
    ordinal: integer('ordinal').notNull(),
    name: text('name').notNull(),
    sizeBytes: integer('size_bytes').notNull(),
    sha256: text('sha256').notNull(),
  },
  (table) => [index('upload_file_upload').on(table.uploadId)],
);

/** The original bytes in pieces of about 1 MiB, each gzip-compressed where that helps. */
export const uploadChunks = sqliteTable(
  'upload_chunk',
  {
    fileId: text('file_id')
      .notNull()
      .references(() => uploadFiles.id, { onDelete: 'cascade' }),
    ordinal: integer('ordinal').notNull(),
    compressed: integer('compressed', { mode: 'boolean' }).notNull(),
    bytes: blob('bytes', { mode: 'buffer' }).notNull(),
  },
  (table) => [primaryKey({ columns: [table.fileId, table.ordinal] })],
);

/** A laboratory's column layout, remembered per dealership by the signature of its header. */
export const laboratoryLayouts = sqliteTable(
  'laboratory_layout',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    headerSignature: text('header_signature').notNull(),
    laboratory: text('laboratory'),
    columns: text('columns', { mode: 'json' }).$type<Record<string, string>>().notNull(),
    updatedAt: integer('updated_at').notNull().default(now),
  },
  (table) => [index('laboratory_layout_signature').on(table.dealershipId, table.headerSignature)],
);
