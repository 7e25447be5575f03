import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import { type Client, createClient } from '@libsql/client';
import { drizzle, type LibSQLDatabase } from 'drizzle-orm/libsql';
import { environment } from '@/lib/env';
import { oneWriterAtATime } from './one-writer';
import * as schema from './schema';

export type Database = LibSQLDatabase<typeof schema>;
/** Inside `database().transaction(async (tx) => …)`. */
export type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0];

interface Opened {
  client: Client;
  database: Database;
}

// Next reloads modules in development; one connection is kept across reloads.
const holder = globalThis as unknown as { hilumDatabase?: Opened };

function open(): Opened {
  const { DATABASE_URL: url, DATABASE_AUTH_TOKEN: authToken } = environment();
  if (url.startsWith('file:')) mkdirSync(dirname(url.slice('file:'.length)) || '.', { recursive: true });
  const opened = createClient({ url, authToken, timeout: 10_000 });
  // A libSQL server queues its writers itself.
  const client = url.startsWith('file:') ? oneWriterAtATime(opened) : opened;
  return { client, database: drizzle(client, { schema }) };
}

/** The database, opened at first use. */
export function database(): Database {
  holder.hilumDatabase ??= open();
  return holder.hilumDatabase.database;
}

/** The bare libSQL client, for pragmas, backup and migrations. */
export function databaseClient(): Client {
  holder.hilumDatabase ??= open();
  return holder.hilumDatabase.client;
}

/** WAL so that readers do not wait for the writer. Called once when a process starts or migrates. */
export async function prepareDatabase(): Promise<void> {
  if (!environment().DATABASE_URL.startsWith('file:')) return;
  await databaseClient().execute('PRAGMA journal_mode = WAL');
  await databaseClient().execute('PRAGMA foreign_keys = ON');
}
