import { existsSync, mkdirSync, renameSync, rmSync, statSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { createClient } from '@libsql/client';
import { environment } from '@/lib/env';
import { databaseClient } from './client';

export interface Backup {
  file: string;
  sizeBytes: number;
}

/** `hilum-2027-03-09-141502.db`, in UTC so that names sort by age. */
function nameAt(moment: Date): string {
  const [day, time] = moment.toISOString().split('T') as [string, string];
  return `hilum-${day}-${time.slice(0, 8).replaceAll(':', '')}.db`;
}

/**
 * Copies the database file whole while it is in use, into `backups/` beside it, and checks the copy. The copy is written under
 * another name and takes its own when it is sound, so that a backup that was cut off is never mistaken for one.
 * Throws an error with words when the database is no file, when a backup of that second exists, or when the copy is damaged.
 */
export async function backUpDatabase(moment: Date): Promise<Backup> {
  const url = environment().DATABASE_URL;
  if (!url.startsWith('file:'))
    throw new Error(`The database is on a server (${url.split('?')[0]}). Back it up there; this copies a file.`);
  const source = url.slice('file:'.length).split('?')[0] as string;
  if (!existsSync(source)) throw new Error(`There is no database at ${source}, so there is nothing to copy.`);
  const folder = join(dirname(source), 'backups');
  mkdirSync(folder, { recursive: true });
  const file = join(folder, nameAt(moment));
  if (existsSync(file)) throw new Error(`${file} exists already. Nothing was written over it. Try again in a second.`);
  const unfinished = `${file}.unfinished`;
  rmSync(unfinished, { force: true });
  try {
    await databaseClient().execute({ sql: 'VACUUM INTO ?', args: [unfinished] });
    const word = await soundnessOf(unfinished);
    if (word !== 'ok') throw new Error(`The copy is damaged (${word}). It was thrown away; the database was not touched.`);
    renameSync(unfinished, file);
  } finally {
    for (const ending of ['', '-wal', '-shm', '-journal']) rmSync(unfinished + ending, { force: true });
  }
  return { file, sizeBytes: statSync(file).size };
}

async function soundnessOf(file: string): Promise<string> {
  const copy = createClient({ url: `file:${file}` });
  try {
    const { rows } = await copy.execute('PRAGMA integrity_check');
    return String(rows[0]?.[0]);
  } finally {
    copy.close();
  }
}
