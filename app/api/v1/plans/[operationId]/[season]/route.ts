import { withViewer } from '@/features/accounts/route';
import { planOf } from '@/features/plans/queries';
import { jsonProblem } from '@/lib/http';

/** The plan of an operation as JSON, as the viewer may see it. */
export const GET = withViewer<{ params: Promise<{ operationId: string; season: string }> }>(
  async (viewer, _request, { params }) => {
    const { operationId, season } = await params;
    if (!/^20\d\d$/.test(season)) return jsonProblem(404, 'No such season.');
    return Response.json(await planOf(viewer, operationId, Number(season)), { headers: { 'Cache-Control': 'no-store' } });
  },
);
