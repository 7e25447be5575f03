import 'server-only';
import { and, asc, eq, inArray } from 'drizzle-orm';
import { database } from '@/db/client';
import { addedStations, coefficientOverrides, fieldScores, maturityZones } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import type { Field, FieldFacts } from '@/features/fields/model';
import { fieldOf } from '@/features/fields/queries';
import type { SoilMapUnit, SoilSample } from '@/features/soil/model';
import type { FieldSurface } from '@/features/soil/surface';
import { NotAllowedError } from '@/lib/errors';
import type { Station } from './climate/normals';
import type { Ranking, VarietyProfile } from './engine/model';
import { ENGINE_VERSION } from './engine/version';
import {
  type EngineInputs,
  engineInputs,
  type FieldInputs,
  gatherFieldInputs,
  gatherInputs,
  hashOfInputs,
  hashOfShared,
  supplyForRanking,
} from './inputs';
import { phSurface } from './profile';
import { usableOverrides } from './rules';
import type { MaturityZone } from './zones';

export interface StoredScore {
  ranking: Ranking;
  scoredAt: number;
  engineVersion: string;
  /** Something it was computed from has changed since. */
  stale: boolean;
}

export interface ScoredField {
  field: Field;
  facts: FieldFacts;
  soilSampleCount: number;
  hasSurvey: boolean;
  score: StoredScore | null;
}

function stored(row: typeof fieldScores.$inferSelect, hash: string): StoredScore {
  return {
    ranking: row.ranking,
    scoredAt: row.scoredAt,
    engineVersion: row.engineVersion,
    stale: row.inputsHash !== hash || row.engineVersion !== ENGINE_VERSION,
  };
}

/** Fields of an operation with their stored scores, each known to be fresh or stale. */
export async function scoredFieldsOf(viewer: Viewer, operationId: string, season: number): Promise<ScoredField[]> {
  const { shared, fields } = await gatherInputs(viewer, operationId, season);
  const rows = await scoreRows(
    fields.map((one) => one.field.id),
    season,
  );
  const sharedHash = hashOfShared(shared);
  return fields.map((inputs) => {
    const row = rows.get(inputs.field.id);
    return {
      field: inputs.field,
      facts: inputs.facts,
      soilSampleCount: inputs.samples.length,
      hasSurvey: inputs.mapUnits.length > 0,
      score: row ? stored(row, hashOfInputs(inputs, sharedHash)) : null,
    };
  });
}

/** Stored scores of an operation's fields by field id; fields never scored are missing. */
export async function scoresOf(viewer: Viewer, operationId: string, season: number): Promise<Map<string, StoredScore>> {
  const fields = await scoredFieldsOf(viewer, operationId, season);
  return new Map(fields.flatMap(({ field, score }) => (score ? [[field.id, score] as const] : [])));
}

async function scoreRows(fieldIds: string[], season: number): Promise<Map<string, typeof fieldScores.$inferSelect>> {
  if (fieldIds.length === 0) return new Map();
  const rows = await database()
    .select()
    .from(fieldScores)
    .where(and(inArray(fieldScores.fieldId, fieldIds), eq(fieldScores.season, season)));
  return new Map(rows.map((row) => [row.fieldId, row]));
}

/** The stored score of one field in the viewer's scope; `null` when it was never scored. */
export async function scoreOf(viewer: Viewer, fieldId: string, season: number): Promise<StoredScore | null> {
  await fieldOf(viewer, fieldId);
  const { shared, inputs } = await gatherFieldInputs(viewer, fieldId, season);
  const row = (await scoreRows([fieldId], season)).get(fieldId);
  return row ? stored(row, hashOfInputs(inputs, hashOfShared(shared))) : null;
}

export interface FieldPlacement {
  inputs: FieldInputs;
  engine: EngineInputs;
  /** The line-up as this viewer's browser may have it: never a count of units. */
  varieties: VarietyProfile[];
  score: StoredScore | null;
  surface: FieldSurface | null;
  samples: SoilSample[];
  mapUnits: SoilMapUnit[];
}

/** Everything the field page shows of one field in the viewer's scope. Throws NotFoundError otherwise. */
export async function placementOf(viewer: Viewer, fieldId: string, season: number): Promise<FieldPlacement> {
  const { shared, inputs } = await gatherFieldInputs(viewer, fieldId, season);
  const row = (await scoreRows([fieldId], season)).get(fieldId);
  return {
    inputs,
    engine: engineInputs(inputs, shared),
    // Scoring reads supply only as sold out or not, so the browser of a rep needs no more than that either.
    varieties: shared.varieties.map(supplyForRanking),
    score: row ? stored(row, hashOfInputs(inputs, hashOfShared(shared))) : null,
    surface: phSurface(inputs.field.boundary, inputs.samples),
    samples: inputs.samples,
    mapUnits: inputs.mapUnits,
  };
}

function requireManager(viewer: Viewer): void {
  if (!may(viewer, 'dealership', 'change')) throw new NotAllowedError('Only a manager sees and sets this.');
}

/** Maturity zones of the viewer's dealership, by name. Managers only. */
export async function zonesOf(viewer: Viewer): Promise<MaturityZone[]> {
  requireManager(viewer);
  const rows = await database()
    .select()
    .from(maturityZones)
    .where(eq(maturityZones.dealershipId, viewer.dealershipId))
    .orderBy(asc(maturityZones.relativeMaturityFrom), asc(maturityZones.name));
  return rows.map(({ id, name, geometry, relativeMaturityFrom, relativeMaturityTo }) => ({
    id,
    name,
    geometry,
    relativeMaturityFrom,
    relativeMaturityTo,
  }));
}

/** The dealership's own values of planning coefficients, by name; a name that is missing stands at its usual value. Managers only. */
export async function rulesOf(viewer: Viewer): Promise<Record<string, number>> {
  requireManager(viewer);
  const rows = await database()
    .select()
    .from(coefficientOverrides)
    .where(eq(coefficientOverrides.dealershipId, viewer.dealershipId));
  return usableOverrides(rows);
}

export interface AddedStation {
  id: string;
  station: Station;
  createdAt: number;
}

/** Climate stations that the dealership added, by name. Managers only. */
export async function stationsOf(viewer: Viewer): Promise<AddedStation[]> {
  requireManager(viewer);
  const rows = await database()
    .select()
    .from(addedStations)
    .where(eq(addedStations.dealershipId, viewer.dealershipId))
    .orderBy(asc(addedStations.name));
  return rows.map((row) => ({ id: row.id, station: row.normals as Station, createdAt: row.createdAt }));
}
