import { sql } from 'drizzle-orm';
import { index, integer, real, sqliteTable, text, uniqueIndex } from 'drizzle-orm/sqlite-core';
import type { MultiPolygon, Polygon } from 'geojson';
import type { Assessment } from '@/features/placement/engine/model';
import { fields } from './fields';
import { operations } from './growers';
import { seedLots, varieties } from './line-up';

const now = sql`(unixepoch() * 1000)`;

/** draft → proposed → agreed (or change asked → draft), then planted, harvested. */
export const PLAN_STATES = ['draft', 'proposed', 'change asked', 'agreed', 'planted', 'harvested'] as const;

export const plans = sqliteTable(
  'plan',
  {
    id: text('id').primaryKey(),
    operationId: text('operation_id')
      .notNull()
      .references(() => operations.id),
    season: integer('season').notNull(),
    state: text('state', { enum: PLAN_STATES }).notNull().default('draft'),
    /** Counts up with every change; a writer who read an older one is told what changed. */
    revision: integer('revision').notNull().default(1),
    /** The grower's typed name and the moment, when agreed. */
    signedName: text('signed_name'),
    signedByPersonId: text('signed_by_person_id'),
    signedAt: integer('signed_at'),
    createdAt: integer('created_at').notNull().default(now),
    updatedAt: integer('updated_at').notNull().default(now),
  },
  (table) => [uniqueIndex('plan_operation_season').on(table.operationId, table.season)],
);

export const planRows = sqliteTable(
  'plan_row',
  {
    id: text('id').primaryKey(),
    planId: text('plan_id')
      .notNull()
      .references(() => plans.id, { onDelete: 'cascade' }),
    fieldId: text('field_id')
      .notNull()
      .references(() => fields.id),
    /** '' for a whole field; 'west part' for a part, with its geometry. */
    partName: text('part_name').notNull().default(''),
    partGeometry: text('part_geometry', { mode: 'json' }).$type<Polygon | MultiPolygon>(),
    areaAcres: real('area_acres').notNull(),
    varietyId: text('variety_id').references(() => varieties.id),
    seedLotId: text('seed_lot_id').references(() => seedLots.id),
    rowWidthInches: real('row_width_inches'),
    /** Seeds dropped per acre. */
    populationSeedsPerAcre: integer('population_seeds_per_acre'),
    locked: integer('locked', { mode: 'boolean' }).notNull().default(false),
    note: text('note'),
    /** The ledger as it stood when the row was last set, and frozen when the plan is agreed. */
    assessment: text('assessment', { mode: 'json' }).$type<Assessment>(),
    updatedAt: integer('updated_at').notNull().default(now),
  },
  (table) => [uniqueIndex('plan_row_field_part').on(table.planId, table.fieldId, table.partName)],
);

/** What happened to a plan, in order: rows set (before and after), proposed, change asked (with a word), agreed (with a snapshot). */
export const planEvents = sqliteTable(
  'plan_event',
  {
    id: text('id').primaryKey(),
    planId: text('plan_id')
      .notNull()
      .references(() => plans.id, { onDelete: 'cascade' }),
    personId: text('person_id'),
    at: integer('at').notNull().default(now),
    verb: text('verb').notNull(),
    word: text('word'),
    planRowId: text('plan_row_id'),
    /** The plan's revision that this event made: what a writer who read an older one is told has changed since. */
    revision: integer('revision').notNull().default(0),
    snapshot: text('snapshot', { mode: 'json' }).$type<unknown>(),
  },
  (table) => [index('plan_event_plan').on(table.planId, table.at)],
);

export const sheetLinks = sqliteTable(
  'sheet_link',
  {
    id: text('id').primaryKey(),
    planId: text('plan_id')
      .notNull()
      .references(() => plans.id, { onDelete: 'cascade' }),
    tokenHash: text('token_hash').notNull(),
    createdByPersonId: text('created_by_person_id'),
    createdAt: integer('created_at').notNull().default(now),
    expiresAt: integer('expires_at').notNull(),
    revokedAt: integer('revoked_at'),
  },
  (table) => [uniqueIndex('sheet_link_token').on(table.tokenHash)],
);

/** What the crew marked as planted. The phone makes the id, so a report sent twice is kept once. */
export const plantedMarks = sqliteTable(
  'planted_mark',
  {
    id: text('id').primaryKey(),
    planRowId: text('plan_row_id')
      .notNull()
      .references(() => planRows.id, { onDelete: 'cascade' }),
    sheetLinkId: text('sheet_link_id'),
    plantedOn: text('planted_on').notNull(),
    lotNumber: text('lot_number'),
    areaAcres: real('area_acres'),
    note: text('note'),
    photo: text('photo'),
    receivedAt: integer('received_at').notNull().default(now),
  },
  (table) => [index('planted_mark_row').on(table.planRowId)],
);
