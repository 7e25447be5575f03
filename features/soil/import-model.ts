import type { PlacedHow } from './locate';
import type { MatchedColumn } from './readers/columns';
import type { ReadProblem, ReadSample } from './readers/samples';

/** What the person chose about a file of soil tests. */
export interface SoilChoices {
  /** Header → meaning; '' leaves the column out. */
  columns?: Record<string, string>;
  bufferMethod?: string;
  phosphorusMethod?: string;
  nutrientUnit?: 'ppm' | 'lb/ac';
  /** For a file that does not say when. ISO date. */
  sampledOn?: string;
  /** Field for samples without a point whose field name is not met: name key → field id. */
  fieldNames?: Record<string, string>;
}

/** One sample as the check page shows it. */
export interface InspectedSample extends ReadSample {
  fieldId: string | null;
  how: PlacedHow;
  nearest: { name: string; feet: number } | null;
  repeats: 'kept' | 'file' | null;
}

export interface SoilInspection {
  format: string;
  laboratory: string | null;
  columns: (MatchedColumn & { table: string })[];
  /** True when the columns were matched as this dealership did before for the same headers. */
  remembered: boolean;
  asks: { bufferMethod: boolean; phosphorusMethod: boolean; nutrientUnit: boolean; sampledOn: boolean };
  notes: string[];
  problems: ReadProblem[];
  counts: { all: number; inFields: number; edge: number; byName: number; stray: number; unplaced: number; repeated: number };
  /** Field names of samples without a point that are no field here: key, name as written, and how many. */
  unmetNames: { key: string; name: string; count: number }[];
  /** At most 3,000, for the map and the table; the file is read again when kept. */
  samples: InspectedSample[];
  choices: SoilChoices;
}

/** Samples on the check page. */
export const MOST_SHOWN = 3000;
