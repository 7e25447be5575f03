import 'server-only';
import { simplify } from '@turf/turf';
import type { Viewer } from '@/features/accounts/model';
import { markChecked, markFailed, uploadOf } from '@/features/imports/machine';
import { bad, good, type Outcome } from '@/lib/errors';
import { overlapsWith } from './compare';
import type { BoundaryInspection } from './import-model';
import type { Boundary } from './model';
import { fieldsOf } from './queries';
import { readUpload } from './read-upload';
import { inspectSchema } from './schemas';

/** About 20 m: enough to recognise a field on the check map. */
const PREVIEW_TOLERANCE_DEGREES = 0.00002;
const MOST_SHOWN = 3000;

/** Reads a stored upload and says what each shape is, without keeping any; remembers the answer for a later visit. */
export async function inspectBoundaries(viewer: Viewer, input: unknown): Promise<Outcome<BoundaryInspection>> {
  const parsed = inspectSchema.safeParse(input);
  if (!parsed.success) return bad(parsed.error.issues.map((problem) => ({ message: problem.message })));
  const upload = await uploadOf(viewer, parsed.data.uploadId);
  if (!upload.operationId || upload.kind !== 'boundaries') return bad('This import holds no boundaries.');
  if (upload.state === 'kept' || upload.state === 'undone' || upload.state === 'discarded')
    return bad(`This import is ${upload.state} already. Choose the file again to bring it in once more.`);
  const read = await readUpload(viewer, parsed.data);
  if (!read.ok) {
    await markFailed(
      viewer,
      upload.id,
      read.problems.map((problem) => problem.message),
    );
    return read;
  }
  const known = await fieldsOf(viewer, upload.operationId);
  const { features, format, columns, nameColumn, notes, unknownCrs } = read.value;
  const inspection: BoundaryInspection = {
    format,
    columns,
    nameColumn,
    unknownCrs: parsed.data.crs ? null : unknownCrs,
    notes:
      features.length > MOST_SHOWN
        ? [...notes, `The map shows outlines of the first ${MOST_SHOWN.toLocaleString('en-US')} shapes.`]
        : notes,
    shapes: features.map((feature, index) => ({
      index,
      name: feature.name,
      farm: feature.farm,
      areaAcres: feature.areaAcres,
      outline: feature.geometry && (index < MOST_SHOWN ? thinned(feature.geometry) : { type: 'Polygon', coordinates: [] }),
      problems: feature.problems,
      overlaps: feature.geometry ? overlapsWith(feature.geometry, feature.areaAcres, known) : [],
    })),
  };
  await markChecked(viewer, upload.id, inspection, { crs: parsed.data.crs, nameColumn: parsed.data.nameColumn });
  return good(inspection);
}

function thinned(geometry: Boundary): Boundary {
  try {
    return simplify(geometry, { tolerance: PREVIEW_TOLERANCE_DEGREES, highQuality: false });
  } catch {
    return geometry;
  }
}
