import 'server-only';
import { simplify } from '@turf/turf';
import type { Viewer } from '@/features/accounts/model';
import { may } from '@/features/accounts/rights';
import type { ReadBoundaries } from '@/features/fields/readers/read-boundaries';
import { markChecked, markFailed, readUploadFiles, uploadOf } from '@/features/imports/machine';
import { bad, good, NotAllowedError, type Outcome } from '@/lib/errors';
import { runInWorker } from '@/lib/worker/run';
import { type MaturityZone, rangeIn } from './zones';

const LIMITS = { timeoutSeconds: 60, memoryMegabytes: 1000 };
const MOST_SHAPES = 200;

/** One shape of an uploaded file, with what is proposed for it. The outline is thinned for the map. */
export interface InspectedZone {
  index: number;
  name: string;
  outline: MaturityZone['geometry'];
  relativeMaturityFrom: number | null;
  relativeMaturityTo: number | null;
}

/** Reads the outlines of an uploaded zone file in a worker thread. Managers only. */
export async function readZoneFile(viewer: Viewer, uploadId: string): Promise<Outcome<ReadBoundaries>> {
  if (!may(viewer, 'dealership', 'change')) throw new NotAllowedError('Only a manager sets maturity zones.');
  const upload = await uploadOf(viewer, uploadId);
  if (upload.kind !== 'maturity-zones') return bad('This import holds no maturity zones.');
  const read = await runInWorker<ReadBoundaries>(
    'read-boundaries',
    { files: await readUploadFiles(viewer, uploadId), options: {} },
    LIMITS,
  );
  if (!read.ok) return read;
  if (read.value.unknownCrs)
    return bad('The shapefile does not say its coordinate system. Nothing was kept. Send it with its .prj file, or as GeoJSON.');
  if (read.value.features.length > MOST_SHAPES)
    return bad(
      `The file has ${read.value.features.length} shapes, more than ${MOST_SHAPES} zones. Nothing was kept. Send fewer.`,
    );
  return read;
}

/** What an uploaded zone file holds; keeps nothing. Managers only. */
export async function inspectZones(
  viewer: Viewer,
  uploadId: string,
): Promise<Outcome<{ format: string; shapes: InspectedZone[]; leftOut: number }>> {
  const read = await readZoneFile(viewer, uploadId);
  if (!read.ok) {
    await markFailed(
      viewer,
      uploadId,
      read.problems.map((problem) => problem.message),
    );
    return read;
  }
  const shapes = read.value.features.flatMap((feature, index): InspectedZone[] => {
    if (!feature.geometry) return [];
    const range = rangeIn([feature.name ?? '', ...Object.values(feature.properties).map(String)].join(' '));
    return [
      {
        index,
        name: feature.name ?? `Zone ${index + 1}`,
        outline: simplify(feature.geometry, { tolerance: 0.002, highQuality: false }),
        relativeMaturityFrom: range?.from ?? null,
        relativeMaturityTo: range?.to ?? null,
      },
    ];
  });
  if (shapes.length === 0) return bad('No shape of the file holds ground. Nothing was kept. Send outlines, not lines or points.');
  await markChecked(viewer, uploadId, { shapeCount: shapes.length }, null);
  return good({ format: read.value.format, shapes, leftOut: read.value.features.length - shapes.length });
}
