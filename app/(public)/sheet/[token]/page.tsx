import type { Metadata } from 'next';
import { SheetBlocks } from '@/features/plans/components/sheet-blocks';
import { outlineOf } from '@/features/plans/exports/outline';
import { sheetOf } from '@/features/plans/sheet';
import { formatDate } from '@/lib/dates';
import { CAUTIONS } from '@/lib/ui/cautions';

export const metadata: Metadata = {
  title: 'Planting sheet',
  robots: { index: false, follow: false },
  referrer: 'no-referrer',
};
export const dynamic = 'force-dynamic';

/** The planting sheet as the crew reads it on a phone: no account, no other page, readable before any script has loaded. */
export default async function SheetPage({ params }: { params: Promise<{ token: string }> }) {
  const { token } = await params;
  const sheet = await sheetOf(token);
  if (!sheet) {
    return (
      <main id="main" className="mx-auto max-w-xl p-5">
        <h1 className="text-3xl">This link opens nothing</h1>
        <p className="mt-3 text-lg">It was revoked or has run out. Ask the farm or the seed dealership for a new one.</p>
      </main>
    );
  }
  return (
    <main id="main" className="mx-auto max-w-xl p-4 text-lg">
      <h1 className="text-3xl">{sheet.season} planting sheet</h1>
      <p className="mt-1 text-mute">
        {sheet.operationName}. {sheet.blocks.length} {sheet.blocks.length === 1 ? 'field' : 'fields'}. Good until{' '}
        {formatDate(new Date(sheet.expiresAt).toISOString().slice(0, 10))}.
      </p>
      <p className="mt-3 border-l-4 border-straw bg-straw-light px-3 py-2 text-base">{CAUTIONS.treatedSeed}</p>
      {sheet.blocks.length === 0 ? (
        <p className="mt-6">The plan is being changed and does not stand at the moment. Look again later.</p>
      ) : (
        <SheetBlocks
          token={token}
          blocks={sheet.blocks.map((block) => ({ ...block, outline: outlineOf(block.geometry, 320, 200, 8) }))}
        />
      )}
    </main>
  );
}
