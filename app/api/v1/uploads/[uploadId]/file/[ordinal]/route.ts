import { Readable } from 'node:stream';
import { withViewer } from '@/features/accounts/route';
import { originalOf } from '@/features/imports/machine';

/** An original file of an import, as it was sent. */
export const GET = withViewer<{ params: Promise<{ uploadId: string; ordinal: string }> }>(
  async (viewer, _request, { params }) => {
    const { uploadId, ordinal } = await params;
    const { name, sizeBytes, parts } = await originalOf(viewer, uploadId, Number(ordinal) || 0);
    return new Response(Readable.toWeb(Readable.from(parts)) as unknown as BodyInit, {
      headers: {
        'Content-Type': 'application/octet-stream',
        'Content-Length': String(sizeBytes),
        'Content-Disposition': `attachment; filename*=UTF-8''${encodeURIComponent(name)}`,
        'Cache-Control': 'no-store',
      },
    });
  },
);
