import 'server-only';
import { and, eq, inArray } from 'drizzle-orm';
import { database } from '@/db/client';
import { addedStations, coefficientOverrides, fieldWeather, maturityZones } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { type Field, type FieldFacts, UNKNOWN_FACTS } from '@/features/fields/model';
import { factsOf, factsOfOperation, fieldOf, fieldsOf } from '@/features/fields/queries';
import { profilesForPlacement } from '@/features/line-up/queries';
import type { SoilMapUnit, SoilSample } from '@/features/soil/model';
import { mapUnitsOfField, mapUnitsOfOperation, samplesOfField, samplesOfOperation } from '@/features/soil/queries';
import { groupBy } from '@/lib/group';
import { sha256 } from '@/lib/ids';
import { climateFromDailyFile } from './climate/daily-file';
import type { ClimateForPlace } from './climate/model';
import type { Station } from './climate/normals';
import { climateForPlace } from './climate/place';
import type { FieldProfile, PlacementRules, SeasonContext, VarietyProfile } from './engine/model';
import { ENGINE_VERSION } from './engine/version';
import { fieldProfile } from './profile';
import { usableOverrides } from './rules';
import { zoneAt } from './zones';

/** Everything kept of one field that bears on its ranking, as it stands in the database. */
export interface FieldInputs {
  field: Field;
  facts: FieldFacts;
  samples: SoilSample[];
  mapUnits: SoilMapUnit[];
  weather: { year: number; days: { date: string; tmaxC: number; tminC: number }[] } | null;
}

/** What all fields of a dealership share in a season. */
export interface SharedInputs {
  season: number;
  varieties: VarietyProfile[];
  zones: (typeof maturityZones.$inferSelect)[];
  overrides: Record<string, number>;
  stations: Station[];
}

/** The engine's own arguments for one field. */
export interface EngineInputs {
  profile: FieldProfile;
  season: SeasonContext;
  rules: PlacementRules;
}

/** Line-up, zones, coefficients and stations of the viewer's dealership. */
export async function sharedInputs(viewer: Viewer, season: number): Promise<SharedInputs> {
  const [varieties, zones, overrides, stations] = await Promise.all([
    profilesForPlacement(viewer, season),
    database().select().from(maturityZones).where(eq(maturityZones.dealershipId, viewer.dealershipId)),
    database().select().from(coefficientOverrides).where(eq(coefficientOverrides.dealershipId, viewer.dealershipId)),
    database().select().from(addedStations).where(eq(addedStations.dealershipId, viewer.dealershipId)),
  ]);
  return {
    season,
    varieties,
    zones: zones.sort((one, other) => (one.id < other.id ? -1 : 1)),
    overrides: usableOverrides(overrides),
    stations: stations.map((one) => one.normals as Station).sort((one, other) => (one.id < other.id ? -1 : 1)),
  };
}

/** Inputs of every field of an operation in the viewer's scope. */
export async function gatherInputs(
  viewer: Viewer,
  operationId: string,
  season: number,
): Promise<{ shared: SharedInputs; fields: FieldInputs[] }> {
  const [shared, fields, facts, samples, mapUnits] = await Promise.all([
    sharedInputs(viewer, season),
    fieldsOf(viewer, operationId),
    factsOfOperation(viewer, operationId, season),
    samplesOfOperation(viewer, operationId),
    mapUnitsOfOperation(viewer, operationId),
  ]);
  const weather = await weatherOf(
    fields.map((field) => field.id),
    season,
  );
  const samplesByField = groupBy(samples, (sample) => sample.fieldId);
  const unitsByField = groupBy(mapUnits, (unit) => unit.fieldId);
  return {
    shared,
    fields: fields.map((field) => ({
      field,
      facts: facts.get(field.id) ?? UNKNOWN_FACTS,
      samples: samplesByField.get(field.id) ?? [],
      mapUnits: unitsByField.get(field.id) ?? [],
      weather: weather.get(field.id) ?? null,
    })),
  };
}

/** Inputs of one field in the viewer's scope. Throws NotFoundError otherwise. */
export async function gatherFieldInputs(
  viewer: Viewer,
  fieldId: string,
  season: number,
): Promise<{ shared: SharedInputs; inputs: FieldInputs }> {
  const [field, facts] = await Promise.all([fieldOf(viewer, fieldId), factsOf(viewer, fieldId, season)]);
  const [shared, samples, mapUnits, weather] = await Promise.all([
    sharedInputs(viewer, season),
    samplesOfField(viewer, fieldId),
    mapUnitsOfField(viewer, fieldId),
    weatherOf([fieldId], season),
  ]);
  return { shared, inputs: { field, facts, samples, mapUnits, weather: weather.get(fieldId) ?? null } };
}

async function weatherOf(fieldIds: string[], season: number): Promise<Map<string, NonNullable<FieldInputs['weather']>>> {
  if (fieldIds.length === 0) return new Map();
  const rows = await database()
    .select()
    .from(fieldWeather)
    .where(and(inArray(fieldWeather.fieldId, fieldIds), eq(fieldWeather.year, season)));
  return new Map(rows.map((row) => [row.fieldId, { year: row.year, days: row.days }]));
}

function zoneOf(field: Field, shared: SharedInputs): PlacementRules['zone'] {
  const zone = zoneAt(shared.zones, field.longitude, field.latitude);
  return zone
    ? { name: zone.name, relativeMaturityFrom: zone.relativeMaturityFrom, relativeMaturityTo: zone.relativeMaturityTo }
    : null;
}

function climateOf(inputs: FieldInputs, shared: SharedInputs): ClimateForPlace {
  const { latitude, longitude, elevationFt } = inputs.field;
  const normals = climateForPlace({ latitude, longitude, elevationFt, extraStations: shared.stations });
  if (!inputs.weather) return normals;
  const text = ['date,tmaxC,tminC', ...inputs.weather.days.map((day) => `${day.date},${day.tmaxC},${day.tminC}`)].join('\n');
  const outcome = climateFromDailyFile(text, normals);
  return outcome.ok ? outcome.value.climate : normals;
}

/** Lays out the surface, the climate and the rules of one field: what the engine is handed. */
export function engineInputs(inputs: FieldInputs, shared: SharedInputs): EngineInputs {
  const { field, facts, samples, mapUnits } = inputs;
  return {
    profile: fieldProfile({ field: { ...field, geometry: field.boundary }, facts, soilSamples: samples, mapUnits }),
    season: { year: shared.season, climate: climateOf(inputs, shared), parameters: 'current' },
    rules: { overrides: shared.overrides, zone: zoneOf(field, shared), releasesPlaced: ['full', 'limited'] },
  };
}

/** Supply as it bears on a ranking: sold out stops a variety, any other count does not. */
export function supplyForRanking(variety: VarietyProfile): VarietyProfile {
  return { ...variety, unitsOnHand: variety.unitsOnHand !== null && variety.unitsOnHand <= 0 ? 0 : null };
}

/** Text that two equal values always share: keys in order, at every depth. */
export function canonicalJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (value !== null && typeof value === 'object') {
    return `{${Object.entries(value)
      .filter(([, one]) => one !== undefined)
      .sort(([one], [other]) => (one < other ? -1 : 1))
      .map(([key, one]) => `${JSON.stringify(key)}:${canonicalJson(one)}`)
      .join(',')}}`;
  }
  return JSON.stringify(value) ?? 'null';
}

/** Hash of what all fields share; part of every field's hash. */
export function hashOfShared(shared: SharedInputs): string {
  return sha256(canonicalJson({ ...shared, varieties: shared.varieties.map(supplyForRanking), engineVersion: ENGINE_VERSION }));
}

/** Hash of everything a field's ranking is computed from: another hash today means that the stored score is stale. */
export function hashOfInputs(inputs: FieldInputs, hashOfSharedInputs: string): string {
  const { name, farmName, farmId, ...field } = inputs.field;
  return sha256(canonicalJson({ ...inputs, field, shared: hashOfSharedInputs }));
}
