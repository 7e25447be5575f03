import { existsSync, readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { createClient } from '@libsql/client';
import { describe, expect, test } from 'vitest';
import { backUpDatabase } from '@/db/backup';
import { database } from '@/db/client';
import { dealerships } from '@/db/schema';
import { createId } from '@/lib/ids';
import { aDealership } from '../support/viewers';

const folder = join(dirname((process.env.DATABASE_URL as string).slice('file:'.length)), 'backups');

async function dealershipsIn(file: string): Promise<number> {
  const copy = createClient({ url: `file:${file}` });
  const { rows } = await copy.execute('select count(*) from dealership');
  copy.close();
  return Number(rows[0]?.[0]);
}

describe('a backup', () => {
  test('made while rows are being written is whole, named by its time, and lies beside the database', async () => {
    await aDealership('Backed up');
    let stop = false;
    const writer = (async () => {
      while (!stop) await database().insert(dealerships).values({ id: createId(), name: 'busy', currentSeason: 2027 });
    })();
    const { file, sizeBytes } = await backUpDatabase(new Date('2027-03-09T14:15:02Z'));
    stop = true;
    await writer;
    expect(file).toBe(join(folder, 'hilum-2027-03-09-141502.db'));
    expect(sizeBytes).toBeGreaterThan(10_000);
    expect(await dealershipsIn(file)).toBeGreaterThanOrEqual(1);
  });

  test('is never written over another, and leaves nothing half-done', async () => {
    const moment = new Date('2027-03-09T14:15:03Z');
    const { file } = await backUpDatabase(moment);
    const before = await dealershipsIn(file);
    await aDealership();
    await expect(backUpDatabase(moment)).rejects.toThrow('exists already');
    expect(await dealershipsIn(file)).toBe(before);
    expect(readdirSync(folder).filter((name) => !name.endsWith('.db'))).toEqual([]);
    expect(existsSync(`${file}.unfinished`)).toBe(false);
  });
});
