import { may } from '@/features/accounts/rights';
import { withViewer } from '@/features/accounts/route';
import { EXPORT_FORMATS } from '@/features/plans/exports/formats';
import { writeExport } from '@/features/plans/exports/write';
import { planOf } from '@/features/plans/queries';
import { jsonProblem } from '@/lib/http';

interface Context {
  params: Promise<{ operationId: string; season: string }>;
}

/** The plan as a file: `?format=` one of the known forms. */
export const GET = withViewer<Context>(async (viewer, request, { params }) => {
  const { operationId, season } = await params;
  const asked = new URL(request.url).searchParams.get('format') ?? 'pdf';
  const format = EXPORT_FORMATS.find((one) => one.id === asked);
  if (!format) return jsonProblem(400, `Unknown format. Known: ${EXPORT_FORMATS.map((one) => one.id).join(', ')}.`);
  if (!/^20\d\d$/.test(season)) return jsonProblem(404, 'No such season.');
  if (!may(viewer, 'plan', 'export')) return jsonProblem(403, 'Your account may not export plans.');
  const view = await planOf(viewer, operationId, Number(season));
  if (!view.lines.some((line) => line.variety))
    return jsonProblem(409, 'Nothing is on this plan yet, so there is nothing to export.');
  const bytes = await writeExport(format.id, view, {
    dealershipSide: may(viewer, 'supply', 'read'),
    madeOn: new Date().toISOString().slice(0, 10),
  });
  const name = `${view.operationName} ${view.season} plan`
    .replace(/[^\w .-]+/g, '')
    .replace(/\s+/g, '-')
    .toLowerCase();
  return new Response(new Uint8Array(bytes), {
    headers: {
      'Content-Type': format.contentType,
      'Content-Disposition': `attachment; filename="${name}.${format.ending}"`,
      'Cache-Control': 'private, no-store',
    },
  });
});
