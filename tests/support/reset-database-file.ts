import { mkdir, rm } from 'node:fs/promises';
import { dirname } from 'node:path';

/** Removes the test database named by DATABASE_URL. Refuses any file outside build/, so that no real data can be lost. */
export async function resetDatabaseFile(): Promise<void> {
  const file = (process.env.DATABASE_URL ?? '').replace(/^file:/, '');
  if (!file.startsWith('build/')) throw new Error(`Only a database under build/ may be reset, not "${file}".`);
  await mkdir(dirname(file), { recursive: true });
  for (const ending of ['', '-wal', '-shm']) await rm(file + ending, { force: true });
}
