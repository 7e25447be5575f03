import 'server-only';
import { eq } from 'drizzle-orm';
import { dealerships } from '@/db/schema';
import { good, type Outcome } from '@/lib/errors';
import { change } from '../gate';
import type { Viewer } from '../model';
import { dealershipSchema } from '../schemas';

/** The season being planned and the soybean price used for dollars. */
export async function changeDealership(viewer: Viewer, input: unknown): Promise<Outcome<null>> {
  return change(viewer, {
    right: ['dealership', 'change'],
    schema: dealershipSchema,
    input,
    run: async (transaction, form) => {
      await transaction
        .update(dealerships)
        .set({
          name: form.name,
          currentSeason: form.currentSeason,
          soybeanPriceCentsPerBushel: Math.round(form.soybeanPriceDollarsPerBushel * 100),
        })
        .where(eq(dealerships.id, viewer.dealershipId));
      return {
        ...good(null),
        audit: {
          verb: 'dealership.changed',
          thing: 'dealership',
          thingId: viewer.dealershipId,
          summary: `Set the season to ${form.currentSeason} and soybeans to $${form.soybeanPriceDollarsPerBushel.toFixed(2)} a bushel.`,
        },
      };
    },
  });
}
