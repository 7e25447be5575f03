import type { OperationProgress } from './model';
import { stepsOf } from './steps';

/** Heads of the growers' table by which it can be sorted, with what each compares. */
export const SORTS = {
  name: { label: 'Operation', numeric: false },
  acres: { label: 'Acres', numeric: true },
  fields: { label: 'Fields', numeric: true },
  soil: { label: 'With soil tests', numeric: true },
  steps: { label: 'How far', numeric: false },
  activity: { label: 'Last change', numeric: false },
} as const;
export type SortKey = keyof typeof SORTS;

function measureOf(one: OperationProgress, key: Exclude<SortKey, 'name'>, season: number): number {
  if (key === 'acres') return one.areaAcres;
  if (key === 'fields') return one.fieldCount;
  if (key === 'soil') return one.fieldsWithSoilTests;
  if (key === 'steps') return stepsOf(one, season).filter((step) => step.done).length;
  return one.lastActivityAt ?? 0;
}

/** Reads `acres` or `-acres` (largest first) from an address; by name when it is neither. */
export function sortOf(asked: string | undefined): { key: SortKey; descending: boolean } {
  const key = (asked ?? '').replace(/^-/, '');
  return key in SORTS ? { key: key as SortKey, descending: asked?.startsWith('-') ?? false } : { key: 'name', descending: false };
}

/** The same operations in the order asked for; equal ones by name. */
export function sorted(
  list: OperationProgress[],
  { key, descending }: { key: SortKey; descending: boolean },
  season: number,
): OperationProgress[] {
  const sign = descending ? -1 : 1;
  return [...list].sort((a, b) => {
    const byName = a.name.localeCompare(b.name, 'en');
    if (key === 'name') return sign * byName;
    return sign * (measureOf(a, key, season) - measureOf(b, key, season)) || byName;
  });
}
