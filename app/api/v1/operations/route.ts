import { withViewer } from '@/features/accounts/route';
import { operationsFor } from '@/features/growers/queries';
import { good } from '@/lib/errors';
import { jsonOutcome } from '@/lib/http';

/** The operations the signed-in person may see, with how far each one is. */
export const GET = withViewer(async (viewer) => jsonOutcome(good(await operationsFor(viewer))));
