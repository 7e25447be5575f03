import { migrateDatabase } from '@/db/migrate';

await migrateDatabase();
console.log('The database has the newest shape.');
