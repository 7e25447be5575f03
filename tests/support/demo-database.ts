/** Makes the demo database that the browser tests of single pages look at. */
import { resetDatabaseFile } from './reset-database-file';

await resetDatabaseFile();
const { migrateDatabase } = await import('@/db/migrate');
await migrateDatabase();
const { seedDemo } = await import('@/db/seed');
await seedDemo();
