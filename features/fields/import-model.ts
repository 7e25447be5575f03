import type { Overlap } from './compare';
import type { Boundary } from './model';

/** One shape of an import as the check page shows it. The outline is thinned for the map; the file is read again when kept. */
export interface InspectedShape {
  index: number;
  name: string | null;
  farm: string | null;
  areaAcres: number;
  outline: Boundary | null;
  problems: string[];
  /** Fields already kept that it overlaps. */
  overlaps: Overlap[];
}

export interface BoundaryInspection {
  format: string;
  shapes: InspectedShape[];
  columns: { name: string; samples: string[] }[];
  nameColumn: string | null;
  notes: string[];
  unknownCrs: { guess: string | null; example: [number, number] } | null;
}

/** Can this shape be kept at all? */
export function isKeepable(shape: InspectedShape): boolean {
  return shape.outline !== null;
}

/** What is proposed for a shape before the person decides: skip what repeats a kept field or another shape, keep the rest. */
export function proposalFor(shape: InspectedShape): 'keep' | 'skip' {
  if (!isKeepable(shape)) return 'skip';
  const repeats =
    shape.overlaps.some((one) => one.same) || shape.problems.some((problem) => problem.startsWith('The same outline'));
  const tiny = shape.problems.some((problem) => problem.startsWith('Only '));
  const elsewhere = shape.problems.some((problem) => problem.startsWith('It lies outside'));
  return repeats || tiny || elsewhere ? 'skip' : 'keep';
}
