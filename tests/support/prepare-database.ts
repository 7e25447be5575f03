import { existsSync, mkdirSync, rmSync } from 'node:fs';
import { join } from 'node:path';

/** Makes one empty, migrated database file for this run; every test file works on its own copy. */
export default async function prepare(): Promise<void> {
  const folder = join(process.cwd(), 'build', 'test-databases');
  mkdirSync(folder, { recursive: true });
  const file = join(folder, `prepared-${process.pid}.db`);
  for (const ending of ['', '-wal', '-shm']) if (existsSync(file + ending)) rmSync(file + ending);
  process.env.HILUM_PREPARED_DATABASE = file;
  const { createClient } = await import('@libsql/client');
  const { drizzle } = await import('drizzle-orm/libsql');
  const { migrate } = await import('drizzle-orm/libsql/migrator');
  const client = createClient({ url: `file:${file}` });
  await migrate(drizzle(client), { migrationsFolder: 'db/migrations' });
  client.close();
}
