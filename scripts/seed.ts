/** Seeds the demo scenario into an empty database, and says what it did. Never touches data that exists. */
import { eq } from 'drizzle-orm';
import { database, prepareDatabase } from '@/db/client';
import { dealerships } from '@/db/schema';
import { databaseIsEmpty, seedDemo } from '@/db/seed';
import { DEMO_DEALERSHIP, demoAccountLines } from '@/db/seed/accounts';
import { environment } from '@/lib/env';

await prepareDatabase();
if (environment().HILUM_DEMO && (await databaseIsEmpty())) {
  await seedDemo();
  console.log(`Seeded the demo dealership, ${DEMO_DEALERSHIP.name}.`);
}
const demo = await database().select({ id: dealerships.id }).from(dealerships).where(eq(dealerships.name, DEMO_DEALERSHIP.name));
console.log(`\nHilum: ${environment().address}`);
if (demo.length > 0) console.log(`Demo accounts (invented):\n${demoAccountLines().join('\n')}\n`);
else console.log('Sign in with your account, or make one with: npm run create-manager\n');
