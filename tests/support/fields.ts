import type { Polygon } from 'geojson';
import { database } from '@/db/client';
import { fieldFacts, fields, seedLots, soilSamples, varieties } from '@/db/schema';
import { areaAcres } from '@/features/fields/acres';
import { createId } from '@/lib/ids';

/** Builders of fields, soil tests and varieties in the database. Everything made here is invented. */

/** A square of about 40 acres in Hancock County, Iowa, shifted east by `step` squares. */
export function aSquare(step = 0, sideDegrees = 0.004): Polygon {
  const west = -93.7 + step * sideDegrees * 1.5;
  const south = 43.08;
  return {
    type: 'Polygon',
    coordinates: [
      [
        [west, south],
        [west + sideDegrees, south],
        [west + sideDegrees, south + sideDegrees],
        [west, south + sideDegrees],
        [west, south],
      ],
    ],
  };
}

/** South-west corner of a square. */
function cornerOf(square: Polygon): [number, number] {
  const ring = square.coordinates[0] as number[][];
  return ring[0] as [number, number];
}

/** A field of an operation with a few known facts. */
export async function aStoredField(
  operationId: string,
  options: { name?: string; step?: number; uploadId?: string } = {},
): Promise<{ id: string; name: string }> {
  const id = createId();
  const name = options.name ?? `Field ${id.slice(0, 5)}`;
  const boundary = aSquare(options.step ?? 0);
  const [longitude, latitude] = cornerOf(boundary);
  await database()
    .insert(fields)
    .values({
      id,
      operationId,
      name,
      boundary,
      areaAcres: areaAcres(boundary),
      latitude: latitude + 0.002,
      longitude: longitude + 0.002,
      state: 'IA',
      uploadId: options.uploadId,
    });
  await database().insert(fieldFacts).values({
    fieldId: id,
    season: 2027,
    rowWidthInches: 30,
    drainage: 'poorly',
    tiled: true,
    yieldGoalBushelsPerAcre: 60,
    plantingDate: '2027-05-08',
  });
  return { id, name };
}

/** Four soil tests in a field made by aStoredField at the same step. */
export async function someSoilTests(operationId: string, fieldId: string, step = 0): Promise<void> {
  const [west, south] = cornerOf(aSquare(step));
  await database()
    .insert(soilSamples)
    .values(
      [5.8, 6.2, 6.6, 7.5].map((ph, index) => ({
        id: createId(),
        operationId,
        fieldId,
        ph,
        sampleNumber: String(index + 1),
        sampledOn: '2026-10-20',
        longitude: west + 0.001 * (1 + (index % 2)),
        latitude: south + 0.001 * (1 + Math.floor(index / 2)),
      })),
    );
}

/** A variety of a dealership's 2027 line-up with one lot. */
export async function aStoredVariety(
  dealershipId: string,
  options: { code?: string; published?: boolean; relativeMaturity?: number; unitsOnHand?: number } = {},
): Promise<{ id: string; code: string; lotId: string }> {
  const id = createId();
  const lotId = createId();
  const code = options.code ?? `CR ${id.slice(0, 4)}`;
  await database()
    .insert(varieties)
    .values({
      id,
      dealershipId,
      season: 2027,
      code,
      relativeMaturity: options.relativeMaturity ?? 2.1,
      phytophthoraGenes: ['1k'],
      tolerances: ['glyphosate'],
      published: options.published ?? true,
      standability: 6,
      phytophthora: 6,
    });
  await database()
    .insert(seedLots)
    .values({
      id: lotId,
      varietyId: id,
      lotNumber: 'A1',
      unitsOnHand: options.unitsOnHand ?? 321,
      priceCentsPerUnit: 6543,
      seedsPerLb: 2800,
    });
  return { id, code, lotId };
}
