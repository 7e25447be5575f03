import { copyFileSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll } from 'vitest';

/** Gives each test file its own copy of the prepared database, before anything opens it. */
const prepared = process.env.HILUM_PREPARED_DATABASE;
if (!prepared) throw new Error('The prepared database is missing: run the tests through vitest.config.ts.');
const folder = mkdtempSync(join(tmpdir(), 'hilum-test-'));
copyFileSync(prepared, join(folder, 'hilum.db'));
process.env.DATABASE_URL = `file:${join(folder, 'hilum.db')}`;

afterAll(() => rmSync(folder, { recursive: true, force: true }));
