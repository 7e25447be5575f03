import { sql } from 'drizzle-orm';
import { index, integer, real, sqliteTable, text } from 'drizzle-orm/sqlite-core';
import type { MultiPolygon, Polygon } from 'geojson';
import type { DrainageClass, FloodingFrequency } from '@/features/placement/engine/model';
import { fields } from './fields';
import { operations } from './growers';
import { uploads } from './imports';

const now = sql`(unixepoch() * 1000)`;

/** One soil sample as a laboratory reported it. `fieldId` is `null` while it lies in no field of the operation. */
export const soilSamples = sqliteTable(
  'soil_sample',
  {
    id: text('id').primaryKey(),
    operationId: text('operation_id')
      .notNull()
      .references(() => operations.id),
    fieldId: text('field_id').references(() => fields.id),
    uploadId: text('upload_id').references(() => uploads.id),
    sampleNumber: text('sample_number'),
    laboratory: text('laboratory'),
    /** ISO date, or a year alone as YYYY-01-01 with `sampledYearOnly`. */
    sampledOn: text('sampled_on'),
    sampledYearOnly: integer('sampled_year_only', { mode: 'boolean' }).notNull().default(false),
    /** `null` coordinates: a field average matched by name. */
    latitude: real('latitude'),
    longitude: real('longitude'),
    depthFromInches: real('depth_from_inches'),
    depthToInches: real('depth_to_inches'),
    ph: real('ph'),
    saltPh: real('salt_ph'),
    bufferPh: real('buffer_ph'),
    bufferMethod: text('buffer_method'),
    organicMatterPercent: real('organic_matter_percent'),
    cationExchangeCapacity: real('cation_exchange_capacity'),
    phosphorusPpm: real('phosphorus_ppm'),
    phosphorusMethod: text('phosphorus_method'),
    potassiumPpm: real('potassium_ppm'),
    calciumPpm: real('calcium_ppm'),
    magnesiumPpm: real('magnesium_ppm'),
    carbonatePercent: real('carbonate_percent'),
    electricalConductivity: real('electrical_conductivity_ds_per_m'),
    cystEggsPer100cc: real('cyst_eggs_per_100cc'),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [
    index('soil_sample_operation').on(table.operationId),
    index('soil_sample_field').on(table.fieldId),
    index('soil_sample_upload').on(table.uploadId),
  ],
);

/** Part of a field covered by one soil survey map unit. */
export const soilMapUnits = sqliteTable(
  'soil_map_unit',
  {
    id: text('id').primaryKey(),
    fieldId: text('field_id')
      .notNull()
      .references(() => fields.id, { onDelete: 'cascade' }),
    uploadId: text('upload_id').references(() => uploads.id),
    mapUnitKey: text('map_unit_key').notNull(),
    symbol: text('symbol').notNull(),
    name: text('name').notNull(),
    geometry: text('geometry', { mode: 'json' }).$type<Polygon | MultiPolygon>().notNull(),
    areaAcres: real('area_acres').notNull(),
    /** Share of the field, 0..1. */
    share: real('share').notNull(),
    drainage: text('drainage').$type<DrainageClass>(),
    hydrologicGroup: text('hydrologic_group'),
    slopePercent: real('slope_percent'),
    availableWaterInches: real('available_water_inches'),
    flooding: text('flooding').$type<FloodingFrequency>(),
    surfacePh: real('surface_ph'),
    surfaceCarbonatePercent: real('surface_carbonate_percent'),
    createdAt: integer('created_at').notNull().default(now),
  },
  (table) => [index('soil_map_unit_field').on(table.fieldId)],
);
