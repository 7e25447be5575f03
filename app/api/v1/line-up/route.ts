import { may } from '@/features/accounts/rights';
import { withViewer } from '@/features/accounts/route';
import { type ExportRow, lineUpCsv, lineUpXlsx } from '@/features/line-up/export';
import { lineUp, lotsOfLineUp } from '@/features/line-up/queries';

/** The line-up of the season being planned: JSON, or a file with ?format=csv or ?format=xlsx. */
export const GET = withViewer(async (viewer, request) => {
  const format = new URL(request.url).searchParams.get('format');
  const [varieties, lots] = await Promise.all([lineUp(viewer, viewer.season), lotsOfLineUp(viewer, viewer.season)]);
  if (format !== 'csv' && format !== 'xlsx')
    return Response.json({ season: viewer.season, varieties }, { headers: { 'Cache-Control': 'no-store' } });
  const rows = varieties.flatMap((variety): ExportRow[] => {
    const own = lots.filter((lot) => lot.varietyId === variety.id);
    return own.length > 0 ? own.map((lot) => ({ variety, lot })) : [{ variety, lot: null }];
  });
  const seesSupply = may(viewer, 'supply', 'read');
  const body = format === 'csv' ? lineUpCsv(rows, seesSupply) : new Uint8Array(await lineUpXlsx(rows, seesSupply));
  return new Response(body, {
    headers: {
      'Content-Type':
        format === 'csv' ? 'text/csv; charset=utf-8' : 'application/vnd.openxmlformats-officedocument.spreadsheetml.sheet',
      'Content-Disposition': `attachment; filename="line-up-${viewer.season}.${format}"`,
      'Cache-Control': 'no-store',
    },
  });
});
