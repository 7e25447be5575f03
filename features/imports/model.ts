/** What an import is, whatever it brings. */
export const IMPORT_KINDS = ['boundaries', 'soil-tests', 'soil-survey', 'line-up', 'maturity-zones', 'climate-stations'] as const;
export type ImportKind = (typeof IMPORT_KINDS)[number];

/** Kinds that belong to the dealership as a whole and not to one operation. */
export const KINDS_OF_THE_DEALERSHIP: readonly ImportKind[] = ['line-up', 'maturity-zones', 'climate-stations'];

/** received → checked → kept; or failed, or discarded; kept → undone. */
export type ImportState = 'received' | 'checked' | 'kept' | 'failed' | 'discarded' | 'undone';

export interface UploadSummary {
  id: string;
  kind: ImportKind;
  operationId: string | null;
  season: number;
  state: ImportState;
  fileNames: string[];
  sizeBytes: number;
  problems: string[];
  outcome: string | null;
  personName: string | null;
  createdAt: number;
  keptAt: number | null;
}

/** Largest upload, bytes: checked while it streams in. */
export const LARGEST_UPLOAD_BYTES = 200_000_000;
/** Most files in one go. */
export const MOST_FILES = 40;

export const STATE_WORDS: Record<ImportState, string> = {
  received: 'received, not checked yet',
  checked: 'checked, nothing kept yet',
  kept: 'kept',
  failed: 'failed, nothing kept',
  discarded: 'put away, nothing kept',
  undone: 'taken back',
};
