import { sql } from 'drizzle-orm';
import { index, integer, primaryKey, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import type { MultiPolygon, Polygon } from 'geojson';
import type { DrainageClass, Tillage, Tolerance } from '@/features/placement/engine/model';
import { farms, operations } from './growers';
import { uploads } from './imports';

const now = sql`(unixepoch() * 1000)`;

export const fields = sqliteTable(
  'field',
  {
    id: text('id').primaryKey(),
    operationId: text('operation_id')
      .notNull()
      .references(() => operations.id),
    farmId: text('farm_id').references(() => farms.id),
    name: text('name').notNull(),
    /** GeoJSON geometry, WGS84, RFC 7946 winding. */
    boundary: text('boundary', { mode: 'json' }).$type<Polygon | MultiPolygon>().notNull(),
    /** On the ellipsoid. */
    areaAcres: real('area_acres').notNull(),
    latitude: real('latitude').notNull(),
    longitude: real('longitude').notNull(),
    state: text('state'),
    elevationFt: real('elevation_ft'),
    uploadId: text('upload_id').references(() => uploads.id),
    createdAt: integer('created_at').notNull().default(now),
    updatedAt: integer('updated_at').notNull().default(now),
    archivedAt: integer('archived_at'),
  },
  (table) => [index('field_operation').on(table.operationId), index('field_upload').on(table.uploadId)],
);

/** How a field is farmed in one season. Every fact may be unknown, which is `null`, never a default. */
export const fieldFacts = sqliteTable(
  'field_facts',
  {
    fieldId: text('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'cascade' }),
    season: integer('season').notNull(),
    rowWidthInches: real('row_width_inches'),
    plantingDate: text('planting_date'),
    populationSeedsPerAcre: integer('population_seeds_per_acre'),
    seedTreated: integer('seed_treated', { mode: 'boolean' }),
    tillage: text('tillage').$type<Tillage>(),
    irrigated: integer('irrigated', { mode: 'boolean' }),
    /** As the grower states it; a soil survey, where there is one, gives shares instead. */
    drainage: text('drainage').$type<DrainageClass>(),
    tiled: integer('tiled', { mode: 'boolean' }),
    lastCrop: text('last_crop'),
    soybeanYearsOfLastFour: integer('soybean_years_of_last_four'),
    yieldGoalBushelsPerAcre: real('yield_goal_bushels_per_acre'),
    yieldHistoryBushelsPerAcre: text('yield_history_bushels_per_acre', { mode: 'json' }).$type<number[]>(),
    probeDepthInches: real('probe_depth_inches'),
    penetrometerPsi: real('penetrometer_psi'),
    cystEggsPer100cc: real('cyst_eggs_per_100cc'),
    cystSourceLastGrown: text('cyst_source_last_grown'),
    whiteMouldHistory: integer('white_mould_history', { mode: 'boolean' }),
    suddenDeathHistory: integer('sudden_death_history', { mode: 'boolean' }),
    brownStemRotHistory: integer('brown_stem_rot_history', { mode: 'boolean' }),
    frogeyeHistory: integer('frogeye_history', { mode: 'boolean' }),
    ironChlorosisHistory: integer('iron_chlorosis_history', { mode: 'boolean' }),
    crustingSoil: integer('crusting_soil', { mode: 'boolean' }),
    weedProgramme: text('weed_programme', { mode: 'json' }).$type<Tolerance[]>(),
    weedProgrammeActives: text('weed_programme_actives', { mode: 'json' }).$type<string[]>(),
    sensitiveNeighbours: text('sensitive_neighbours', { mode: 'json' }).$type<string[]>(),
    mustBeOffBy: text('must_be_off_by'),
    mustBeOffChargeBushelsPerAcre: real('must_be_off_charge_bushels_per_acre'),
    updatedAt: integer('updated_at').notNull().default(now),
  },
  (table) => [primaryKey({ columns: [table.fieldId, table.season] })],
);
