/** Makes the empty database that the main job's browser test starts from: one dealership with one manager. */
import { resetDatabaseFile } from './reset-database-file';

await resetDatabaseFile();
const { migrateDatabase } = await import('@/db/migrate');
await migrateDatabase();
const { createManager } = await import('@/features/accounts/create-manager');
const outcome = await createManager({
  dealershipName: 'North Fork Seed',
  name: 'Dana Holt',
  email: 'manager@northfork.example',
  password: 'plenty-of-rain-2027',
});
if (!outcome.ok) throw new Error(outcome.problems.map((problem) => problem.message).join(' '));
