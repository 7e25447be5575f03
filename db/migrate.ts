import { migrate } from 'drizzle-orm/libsql/migrator';
import { database, prepareDatabase } from './client';

/** Brings the database to the newest shape. Safe to run again and again. */
export async function migrateDatabase(migrationsFolder = 'db/migrations'): Promise<void> {
  await prepareDatabase();
  await migrate(database(), { migrationsFolder });
}
