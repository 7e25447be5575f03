import 'server-only';
import { and, asc, eq, getTableColumns, isNull } from 'drizzle-orm';
import { database } from '@/db/client';
import { fields, soilMapUnits, soilSamples } from '@/db/schema';
import type { Viewer } from '@/features/accounts/model';
import { operationIdInScope } from '@/features/accounts/scope';
import { type SoilYear, soilHistory } from './history';
import type { SoilMapUnit, SoilSample } from './model';

const { createdAt: _sampleMade, ...SAMPLE_COLUMNS } = getTableColumns(soilSamples);
const { createdAt: _unitMade, uploadId: _unitUpload, ...MAP_UNIT_COLUMNS } = getTableColumns(soilMapUnits);

/** Samples that lie in a field of the viewer's scope, oldest first. */
export async function samplesOfField(viewer: Viewer, fieldId: string): Promise<SoilSample[]> {
  return database()
    .select(SAMPLE_COLUMNS)
    .from(soilSamples)
    .where(and(eq(soilSamples.fieldId, fieldId), operationIdInScope(viewer, soilSamples.operationId)))
    .orderBy(asc(soilSamples.sampledOn), asc(soilSamples.sampleNumber));
}

/** Every sample of an operation in the viewer's scope, those in no field too. */
export async function samplesOfOperation(viewer: Viewer, operationId: string): Promise<SoilSample[]> {
  return database()
    .select(SAMPLE_COLUMNS)
    .from(soilSamples)
    .where(and(eq(soilSamples.operationId, operationId), operationIdInScope(viewer, soilSamples.operationId)))
    .orderBy(asc(soilSamples.sampledOn), asc(soilSamples.sampleNumber));
}

/** Soil survey map units of one field, largest first. */
export async function mapUnitsOfField(viewer: Viewer, fieldId: string): Promise<SoilMapUnit[]> {
  const rows = await database()
    .select(MAP_UNIT_COLUMNS)
    .from(soilMapUnits)
    .innerJoin(fields, eq(fields.id, soilMapUnits.fieldId))
    .where(and(eq(soilMapUnits.fieldId, fieldId), operationIdInScope(viewer, fields.operationId)));
  return rows.sort((one, other) => other.share - one.share);
}

/** Soil survey map units of every field of an operation, largest first within a field. */
export async function mapUnitsOfOperation(viewer: Viewer, operationId: string): Promise<SoilMapUnit[]> {
  const rows = await database()
    .select(MAP_UNIT_COLUMNS)
    .from(soilMapUnits)
    .innerJoin(fields, eq(fields.id, soilMapUnits.fieldId))
    .where(and(eq(fields.operationId, operationId), isNull(fields.archivedAt), operationIdInScope(viewer, fields.operationId)));
  return rows.sort((one, other) => other.share - one.share);
}

/** A field's soil tests year by year, newest first: mean and range of pH, OM, CEC, P, K, buffer, carbonate, EC and cyst eggs. */
export async function soilSummaryOf(viewer: Viewer, fieldId: string): Promise<{ latest: SoilYear | null; years: SoilYear[] }> {
  const years = soilHistory(await samplesOfField(viewer, fieldId));
  return { latest: years[0] ?? null, years };
}
