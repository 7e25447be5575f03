import { sql } from 'drizzle-orm';
import { customType, index, integer, primaryKey, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import type { MultiPolygon, Polygon } from 'geojson';
import type { Ranking } from '@/features/placement/engine/model';
import { packRanking, unpackRanking } from '../packed-ranking';
import { dealerships } from './accounts';
import { fields } from './fields';

const now = sql`(unixepoch() * 1000)`;

/** A ranking as packed JSON text; everything that reads or writes it sees the plain ranking. */
const storedRanking = customType<{ data: Ranking; driverData: string }>({
  dataType: () => 'text',
  toDriver: (ranking) => JSON.stringify(packRanking(ranking)),
  fromDriver: (text) => unpackRanking(JSON.parse(text)),
});

/** The stored answer for one field and season, with what it was computed from. */
export const fieldScores = sqliteTable(
  'field_score',
  {
    fieldId: text('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'cascade' }),
    season: integer('season').notNull(),
    engineVersion: text('engine_version').notNull(),
    /** SHA-256 of everything the engine was given; another hash today means the score is stale. */
    inputsHash: text('inputs_hash').notNull(),
    ranking: storedRanking('ranking').notNull(),
    scoredAt: integer('scored_at').notNull().default(now),
    scoredByPersonId: text('scored_by_person_id'),
  },
  (table) => [primaryKey({ columns: [table.fieldId, table.season] })],
);

export const maturityZones = sqliteTable(
  'maturity_zone',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    name: text('name').notNull(),
    geometry: text('geometry', { mode: 'json' }).$type<Polygon | MultiPolygon>().notNull(),
    relativeMaturityFrom: real('relative_maturity_from').notNull(),
    relativeMaturityTo: real('relative_maturity_to').notNull(),
    createdAt: integer('created_at').notNull().default(now),
    updatedAt: integer('updated_at').notNull().default(now),
  },
  (table) => [index('maturity_zone_dealership').on(table.dealershipId)],
);

/** A planning coefficient that a manager has set away from its default. Its history is in the audit trail. */
export const coefficientOverrides = sqliteTable(
  'coefficient_override',
  {
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    name: text('name').notNull(),
    value: real('value').notNull(),
    changedByPersonId: text('changed_by_person_id'),
    changedAt: integer('changed_at').notNull().default(now),
  },
  (table) => [primaryKey({ columns: [table.dealershipId, table.name] })],
);

/** Weather stations a manager added from a NOAA normals file. Temperatures °F as published. */
export const addedStations = sqliteTable(
  'added_station',
  {
    id: text('id').primaryKey(),
    dealershipId: text('dealership_id')
      .notNull()
      .references(() => dealerships.id),
    stationId: text('station_id').notNull(),
    name: text('name').notNull(),
    /** The climate side's own station shape. */
    normals: text('normals', { mode: 'json' }).$type<unknown>().notNull(),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [index('added_station_dealership').on(table.dealershipId)],
);

/** A daily weather file given for one field and year, as parsed. */
export const fieldWeather = sqliteTable(
  'field_weather',
  {
    fieldId: text('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'cascade' }),
    year: integer('year').notNull(),
    days: text('days', { mode: 'json' }).$type<{ date: string; tmaxC: number; tminC: number }[]>().notNull(),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [primaryKey({ columns: [table.fieldId, table.year] })],
);
