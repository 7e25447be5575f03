import { withViewer } from '@/features/accounts/route';
import { fieldOf } from '@/features/fields/queries';
import { scoreOf } from '@/features/placement/queries';
import { good } from '@/lib/errors';
import { jsonOutcome } from '@/lib/http';

/** The stored ranking of a field, ledgers and all, and whether it is stale; `score` is null for a field never scored. */
export const GET = withViewer<{ params: Promise<{ fieldId: string }> }>(async (viewer, _request, { params }) => {
  const { fieldId } = await params;
  const [field, score] = await Promise.all([fieldOf(viewer, fieldId), scoreOf(viewer, fieldId, viewer.season)]);
  return jsonOutcome(
    good({
      field: { id: field.id, name: field.name, farmName: field.farmName, areaAcres: field.areaAcres },
      season: viewer.season,
      score,
    }),
  );
});
