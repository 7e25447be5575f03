import { may } from '@/features/accounts/rights';
import { currentViewer } from '@/features/accounts/viewer';
import { EXPORT_FORMATS } from '@/features/plans/exports/formats';
import { writeExport } from '@/features/plans/exports/write';
import { planOf } from '@/features/plans/queries';
import { NotAllowedError, NotFoundError } from '@/lib/errors';

interface Context {
  params: Promise<{ operationId: string; season: string }>;
}

/** The plan as a file: `?format=` one of the known forms. */
export async function GET(request: Request, { params }: Context): Promise<Response> {
  const viewer = await currentViewer();
  if (!viewer) return problem(401, 'Sign in first.');
  const { operationId, season } = await params;
  const asked = new URL(request.url).searchParams.get('format') ?? 'pdf';
  const format = EXPORT_FORMATS.find((one) => one.id === asked);
  if (!format) return problem(400, `Unknown format. Known: ${EXPORT_FORMATS.map((one) => one.id).join(', ')}.`);
  if (!/^20\d\d$/.test(season)) return problem(404, 'No such season.');
  if (!may(viewer, 'plan', 'export')) return problem(403, 'Your account may not export plans.');
  try {
    const view = await planOf(viewer, operationId, Number(season));
    if (!view.lines.some((line) => line.variety))
      return problem(409, 'Nothing is on this plan yet, so there is nothing to export.');
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
  } catch (error) {
    if (error instanceof NotFoundError) return problem(404, error.message);
    if (error instanceof NotAllowedError) return problem(403, error.message);
    throw error;
  }
}

function problem(status: number, message: string): Response {
  return Response.json({ problems: [{ message }] }, { status });
}
