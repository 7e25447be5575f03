import { sql } from 'drizzle-orm';
import { index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import type { BushType, CystSource, Height, Release, Tolerance } from '@/features/placement/engine/model';
import { dealerships } from './accounts';
import { uploads } from './imports';

const now = sql`(unixepoch() * 1000)`;

/** A variety in a season's line-up. Ratings 1-9, 9 best; `null` not rated. */
export const varieties = sqliteTable(
  'variety',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    season: integer('season').notNull(),
    code: text('code').notNull(),
    relativeMaturity: real('relative_maturity').notNull(),
    height: text('height').$type<Height>(),
    bushType: text('bush_type').$type<BushType>(),
    standability: real('standability'),
    emergence: real('emergence'),
    phytophthoraGenes: text('phytophthora_genes', { mode: 'json' }).$type<string[]>().notNull(),
    phytophthora: real('phytophthora'),
    suddenDeath: real('sudden_death'),
    brownStemRot: real('brown_stem_rot'),
    whiteMould: real('white_mould'),
    frogeye: real('frogeye'),
    stemCanker: real('stem_canker'),
    charcoalRot: real('charcoal_rot'),
    ironChlorosis: real('iron_chlorosis'),
    drought: real('drought'),
    cystNematodeSource: text('cyst_nematode_source').$type<CystSource>(),
    tolerances: text('tolerances', { mode: 'json' }).$type<Tolerance[]>().notNull(),
    release: text('release').$type<Release>().notNull().default('full'),
    published: integer('published', { mode: 'boolean' }).notNull().default(false),
    note: text('note'),
    uploadId: text('upload_id').references(() => uploads.id),
    /** Counts up with every change: the second of two writers is told, not overwritten. */
    revision: integer('revision').notNull().default(1),
    createdAt: integer('created_at').notNull().default(now),
    updatedAt: integer('updated_at').notNull().default(now),
    archivedAt: integer('archived_at'),
  },
  (table) => [uniqueIndex('variety_code').on(table.dealershipId, table.season, table.code)],
);

export const seedLots = sqliteTable(
  'seed_lot',
  {
    id: text('id').primaryKey(),
    varietyId: text('variety_id')
      .notNull()
      .references(() => varieties.id, { onDelete: 'cascade' }),
    lotNumber: text('lot_number').notNull(),
    seedsPerLb: real('seeds_per_lb'),
    germinationPercent: real('germination_percent'),
    treatment: text('treatment'),
    unitSizeSeeds: integer('unit_size_seeds').notNull().default(140000),
    unitsOnHand: real('units_on_hand').notNull().default(0),
    priceCentsPerUnit: integer('price_cents_per_unit'),
    createdAt: integer('created_at').notNull().default(now),
    updatedAt: integer('updated_at').notNull().default(now),
    archivedAt: integer('archived_at'),
  },
  (table) => [uniqueIndex('seed_lot_number').on(table.varietyId, table.lotNumber), index('seed_lot_variety').on(table.varietyId)],
);

/** What an import of a line-up did to one variety or lot, so that it can be taken back whole. */
export const lineUpImportEntries = sqliteTable(
  'line_up_import_entry',
  {
    id: text('id').primaryKey(),
    uploadId: text('upload_id')
      .notNull()
      .references(() => uploads.id, { onDelete: 'cascade' }),
    thing: text('thing', { enum: ['variety', 'lot'] }).notNull(),
    thingId: text('thing_id').notNull(),
    /** The columns it changed, as they were; `null` when it added the thing. */
    before: text('before', { mode: 'json' }).$type<Record<string, unknown>>(),
    /** The variety's revision, or the lot's moment of change, that the import left: another one means somebody changed it since. */
    mark: integer('mark').notNull(),
  },
  (table) => [index('line_up_import_entry_upload').on(table.uploadId)],
);
