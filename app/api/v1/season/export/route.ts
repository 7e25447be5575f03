import { withViewer } from '@/features/accounts/route';
import { seasonCsv } from '@/features/plans/exports/season-csv';
import { seasonOf } from '@/features/plans/queries';

/** The season's book as CSV, for reps and managers. */
export const GET = withViewer(async (viewer) => {
  const book = await seasonOf(viewer, viewer.season);
  return new Response(seasonCsv(book), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': `attachment; filename="season-${book.season}.csv"`,
      'Cache-Control': 'private, no-store',
    },
  });
});
