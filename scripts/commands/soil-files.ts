import type { ProfiledSample } from '@/features/placement/profile';
import { fieldOfPoint } from '@/features/soil/field-of-sample';
import { type ReadSoilTests, readSoilTests } from '@/features/soil/readers/read-soil-tests';
import type { ReadProblem, ReadSample } from '@/features/soil/readers/samples';
import { type BoundaryField, filesWithParts } from './boundary-files';
import { refuse } from './command';

/** Soil samples by field name, and what there is to say about the rest. */
export interface FieldSamples {
  byField: Map<string, ProfiledSample[]>;
  notes: string[];
}

export const NO_SAMPLES: FieldSamples = { byField: new Map(), notes: [] };

const PROBLEMS_SHOWN = 20;

/** `row 7: …` where a problem has a row and does not say it itself. */
export function problemLine({ row, message }: ReadProblem): string {
  return row === undefined || /\brow \d/i.test(message) ? message : `row ${row}: ${message}`;
}

/** Soil test files, read and joined as the screens do. */
export async function readSoilFiles(paths: readonly string[]): Promise<ReadSoilTests> {
  return readSoilTests((await Promise.all(paths.map(filesWithParts))).flat());
}

function profiled(sample: ReadSample): ProfiledSample {
  return {
    sampledOn: sample.sampledOn,
    latitude: sample.latitude,
    longitude: sample.longitude,
    depthFromInches: sample.depthInches?.[0] ?? null,
    ph: sample.ph,
    bufferPh: sample.bufferPh,
    bufferMethod: sample.bufferMethod,
    organicMatterPercent: sample.organicMatterPercent,
    cationExchangeCapacity: sample.cec,
    carbonatePercent: sample.carbonatePercent,
    electricalConductivity: sample.electricalConductivity,
    cystEggsPer100cc: sample.cystEggsPer100cc,
  };
}

/**
 * Reads soil tests and gives each to the field that holds it (30 ft of tolerance), or, without coordinates, to the field it
 * names. Refuses files that hold no samples and rows that cannot be, naming them; notes samples in no field.
 */
export async function samplesByField(path: string, fields: readonly BoundaryField[]): Promise<FieldSamples> {
  const read = await readSoilFiles([path]);
  const ofRows = read.problems.filter((problem) => problem.row !== undefined);
  if (read.samples.length === 0 || ofRows.length > 0) {
    const wrong = ofRows.length > 0 ? ofRows : read.problems;
    const rest = wrong.length - PROBLEMS_SHOWN;
    refuse(
      ...wrong.slice(0, PROBLEMS_SHOWN).map((problem) => `${path}: ${problemLine(problem)}`),
      ...(wrong.length === 0 ? [`${path} holds no samples.`] : []),
      ...(rest > 0 ? [`${rest} more rows are wrong.`] : []),
    );
  }
  const byField = new Map<string, ProfiledSample[]>();
  const strangers: number[] = [];
  for (const sample of read.samples) {
    const named = sample.fieldName?.toLowerCase();
    const field =
      sample.latitude !== null && sample.longitude !== null
        ? fieldOfPoint(fields, sample.longitude, sample.latitude)
        : fields.find((one) => one.name.toLowerCase() === named);
    if (field) byField.set(field.name, [...(byField.get(field.name) ?? []), profiled(sample)]);
    else strangers.push(sample.row);
  }
  const notes = [...read.notes, ...read.problems.map(problemLine)];
  if (read.samples.every((sample) => sample.ph === null)) notes.push(`${path}: no sample has a water pH, so pH stays unknown.`);
  if (strangers.length > 0) {
    const rows = `row ${strangers.slice(0, 10).join(', ')}${strangers.length > 10 ? ', …' : ''}`;
    notes.push(`${path}: ${strangers.length} of ${read.samples.length} samples lie in no field (${rows}).`);
  }
  return { byField, notes };
}
