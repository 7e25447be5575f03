import { eq, sql } from 'drizzle-orm';
import { expect, test } from 'vitest';
import { database } from '@/db/client';
import { dealerships } from '@/db/schema';

async function aDealershipOf(id: string) {
  await database().insert(dealerships).values({ id, name: 'Counting', currentSeason: 0 });
}

test('forty writers of one process at the same moment all get their turn, and none is lost', async () => {
  await aDealershipOf('count');
  const started = Date.now();
  await Promise.all(
    Array.from({ length: 40 }, (_, index) =>
      index % 2 === 0
        ? database().transaction(async (transaction) => {
            const [row] = await transaction.select().from(dealerships).where(eq(dealerships.id, 'count'));
            await new Promise((resolve) => setTimeout(resolve, 2));
            await transaction
              .update(dealerships)
              .set({ currentSeason: (row?.currentSeason ?? 0) + 1 })
              .where(eq(dealerships.id, 'count'));
          })
        : database()
            .update(dealerships)
            .set({ currentSeason: sql`${dealerships.currentSeason} + 1` })
            .where(eq(dealerships.id, 'count')),
    ),
  );
  const [row] = await database().select().from(dealerships).where(eq(dealerships.id, 'count'));
  expect(row?.currentSeason).toBe(40);
  expect(Date.now() - started).toBeLessThan(5000);
});

test('a writer that fails gives its turn on', async () => {
  await aDealershipOf('fails');
  await expect(
    database().transaction(async (transaction) => {
      await transaction.update(dealerships).set({ currentSeason: 7 }).where(eq(dealerships.id, 'fails'));
      throw new Error('changed my mind');
    }),
  ).rejects.toThrow('changed my mind');
  await database().update(dealerships).set({ name: 'After' }).where(eq(dealerships.id, 'fails'));
  const [row] = await database().select().from(dealerships).where(eq(dealerships.id, 'fails'));
  expect(row).toMatchObject({ name: 'After', currentSeason: 0 });
});

test('reading goes on while a writer has its turn', async () => {
  await aDealershipOf('reads');
  await database().transaction(async (transaction) => {
    await transaction.update(dealerships).set({ currentSeason: 9 }).where(eq(dealerships.id, 'reads'));
    const [row] = await database().select().from(dealerships).where(eq(dealerships.id, 'reads'));
    expect(row?.currentSeason).toBe(0);
  });
});
