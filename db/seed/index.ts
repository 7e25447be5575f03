import { pointOnFeature } from '@turf/turf';
import { count } from 'drizzle-orm';
import { database, type Transaction } from '@/db/client';
import * as table from '@/db/schema';
import { hashPassword } from '@/features/accounts/passwords';
import { areaAcres } from '@/features/fields/acres';
import { createId, sha256 } from '@/lib/ids';
import { DEMO_ACCOUNTS, DEMO_DEALERSHIP } from './accounts';
import { boundaryOf } from './land';
import { DEMO_OPERATIONS, type DemoOperation } from './operations';
import { seedPlans } from './plans';
import { mapUnitsOf, samplesOf } from './soil';
import { DEMO_VARIETIES } from './varieties';

const { season } = DEMO_DEALERSHIP;

/** Is there anything in this database that a seed could be laid over? */
export async function databaseIsEmpty(): Promise<boolean> {
  const [row] = await database().select({ dealerships: count() }).from(table.dealerships);
  return row?.dealerships === 0;
}

/** Writes the demo scenario into an empty database, in one transaction; then scores its fields and makes its plans. */
export async function seedDemo(): Promise<void> {
  if (!(await databaseIsEmpty())) throw new Error('The demo is only ever seeded into an empty database.');
  const passwordHashes = new Map<string, string>();
  for (const account of DEMO_ACCOUNTS) passwordHashes.set(account.key, await hashPassword(account.password));
  await database().transaction(async (transaction) => {
    const dealershipId = createId();
    await transaction.insert(table.dealerships).values({ id: dealershipId, name: DEMO_DEALERSHIP.name, currentSeason: season });
    const operationIds = new Map<string, string>();
    for (const operation of DEMO_OPERATIONS)
      operationIds.set(operation.key, await seedOperation(transaction, dealershipId, operation));
    const personIds = new Map<string, string>();
    for (const account of DEMO_ACCOUNTS) {
      const personId = createId();
      personIds.set(account.key, personId);
      await transaction.insert(table.people).values({
        id: personId,
        dealershipId,
        email: account.email,
        name: account.name,
        role: account.role,
        passwordHash: passwordHashes.get(account.key) as string,
      });
      for (const key of account.operations) {
        await transaction.insert(table.operationPeople).values({ operationId: operationIds.get(key) as string, personId });
      }
    }
    await seedLineUp(transaction, dealershipId);
    await seedBrokenUpload(transaction, dealershipId, operationIds.get('lone') as string, personIds.get('grower3') as string);
  });
  await seedPlans();
}

async function seedOperation(transaction: Transaction, dealershipId: string, operation: DemoOperation): Promise<string> {
  const operationId = createId();
  await transaction
    .insert(table.operations)
    .values({ id: operationId, dealershipId, name: operation.name, state: 'IA', county: operation.county });
  const farmIds = new Map<string, string>();
  for (const name of new Set(operation.fields.map((one) => one.land.farm))) {
    const id = createId();
    farmIds.set(name, id);
    await transaction.insert(table.farms).values({ id, operationId, name });
  }
  for (const { land, facts } of operation.fields) {
    const fieldId = createId();
    const boundary = boundaryOf(land);
    const [longitude, latitude] = pointOnFeature(boundary).geometry.coordinates as [number, number];
    const acres = areaAcres(boundary);
    await transaction.insert(table.fields).values({
      id: fieldId,
      operationId,
      farmId: farmIds.get(land.farm) ?? null,
      name: land.name,
      boundary,
      areaAcres: acres,
      latitude,
      longitude,
      state: 'IA',
      elevationFt: 1180,
    });
    if (Object.keys(facts).length > 0) await transaction.insert(table.fieldFacts).values({ fieldId, season, ...facts });
    if (operation.soilTested && land.name !== 'East 40') await seedSoilTests(transaction, operationId, fieldId, samplesOf(land));
    if (!operation.surveyed) continue;
    for (const unit of mapUnitsOf(land)) {
      await transaction.insert(table.soilMapUnits).values({
        id: createId(),
        fieldId,
        mapUnitKey: `demo-${unit.symbol}`,
        ...unit,
        share: unit.areaAcres / acres,
        flooding: 'none',
      });
    }
  }
  return operationId;
}

async function seedSoilTests(
  transaction: Transaction,
  operationId: string,
  fieldId: string,
  samples: ReturnType<typeof samplesOf>,
): Promise<void> {
  if (samples.length === 0) return;
  await transaction.insert(table.soilSamples).values(
    samples.map((sample) => ({
      id: createId(),
      operationId,
      fieldId,
      laboratory: 'Demo laboratory',
      sampledOn: '2026-10-22',
      depthFromInches: 0,
      depthToInches: 7,
      bufferMethod: sample.bufferPh === null ? null : 'Sikora',
      phosphorusMethod: 'Mehlich-3',
      ...sample,
    })),
  );
}

async function seedLineUp(transaction: Transaction, dealershipId: string): Promise<void> {
  for (const { traits, published, lots } of DEMO_VARIETIES) {
    const varietyId = createId();
    await transaction.insert(table.varieties).values({ id: varietyId, dealershipId, season, ...traits, published });
    await transaction.insert(table.seedLots).values(lots.map((lot) => ({ id: createId(), varietyId, ...lot })));
  }
}

/** The operation that is just starting tried a file that was not one. */
async function seedBrokenUpload(
  transaction: Transaction,
  dealershipId: string,
  operationId: string,
  personId: string,
): Promise<void> {
  const uploadId = createId();
  const fileId = createId();
  const bytes = Buffer.from('boundaries of all our fields, saved as text by mistake\r\n');
  const words =
    '"our fields.zip" is not a zip archive. Nothing was kept. Export the boundaries again as a zipped shapefile and choose that file.';
  await transaction.insert(table.uploads).values({
    id: uploadId,
    dealershipId,
    operationId,
    personId,
    kind: 'boundaries',
    season,
    state: 'failed',
    problems: [words],
  });
  await transaction
    .insert(table.uploadFiles)
    .values({ id: fileId, uploadId, ordinal: 0, name: 'our fields.zip', sizeBytes: bytes.byteLength, sha256: sha256(bytes) });
  await transaction.insert(table.uploadChunks).values({ fileId, ordinal: 0, compressed: false, bytes });
}
