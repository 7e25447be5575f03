import { z } from 'zod';

/**
 * The planning problem as numbers: which variety on which field, within supply and wishes, for the most money.
 * Acres, units and dollars; ids are any text.
 */
const id = z.string().min(1, 'An id is empty.');
const amount = z.number().min(0, 'must not be below zero').finite();

export const problemSchema = z.object({
  fields: z
    .array(z.object({ id, acres: z.number().positive('acres must be above zero').finite(), unitsPerAcre: amount }))
    .max(5000),
  /** `units` missing or null: not counted, so supply does not limit it. */
  varieties: z.array(z.object({ id, units: amount.nullish() })).max(500),
  /** Dollars an acre. A pair that is not listed is not open to the plan. */
  value: z.array(z.object({ field: id, variety: id, perAcre: z.number().finite() })),
  stops: z.array(z.object({ field: id, variety: id })).default([]),
  /** Most of all the fields' acres in one variety. */
  maxShare: z.number().gt(0, 'maxShare must be above 0').max(1, 'maxShare must be at most 1').default(1),
  /** Fewest acres worth opening a variety for. */
  minAcresPerVariety: amount.default(0),
  maxVarieties: z.number().int().min(0).nullish(),
  /** 1: no field is split. 0.25: a part is at least a quarter. A field is split at most once. */
  splitMinFraction: z.number().gt(0, 'splitMinFraction must be above 0').max(1, 'splitMinFraction must be at most 1').default(1),
  /** Rows that must stand: the whole field in this variety. */
  locks: z.array(z.object({ field: id, variety: id })).default([]),
  /** Caps on acres over a set of varieties, such as what one combine takes in a week. */
  groups: z.array(z.object({ name: z.string(), varieties: z.array(id), maxAcres: amount })).default([]),
});

export type PlanProblem = z.infer<typeof problemSchema>;

export interface PlanSolution {
  /** `optimal`: within the gap asked for. `feasible`: the best found in the time. `infeasible`: wishes clash. */
  status: 'optimal' | 'feasible' | 'infeasible';
  /** Dollars. */
  objective: number;
  /** (bound − objective) ÷ objective, proven. */
  gap: number;
  seconds: number;
  rows: { field: string; variety: string; acres: number; units: number }[];
  /** What holds the plan back, in words: "units of OP 24K". */
  binding: string[];
  /** What one more unit of a variety that is used up would be worth, dollars. */
  shadow: Record<string, number>;
  /** When infeasible: the smallest giving way that would let the wishes stand together. */
  relaxation: string[];
}

/** Ids that point nowhere, doubled rows: what a schema cannot see. Empty when all is well. */
export function problemsOf(problem: PlanProblem): string[] {
  const found: string[] = [];
  const fields = new Set(problem.fields.map((field) => field.id));
  const varieties = new Set(problem.varieties.map((variety) => variety.id));
  if (fields.size < problem.fields.length) found.push('Two fields have the same id.');
  if (varieties.size < problem.varieties.length) found.push('Two varieties have the same id.');
  const seen = new Set<string>();
  for (const [list, pairs] of [
    ['value', problem.value],
    ['stops', problem.stops],
    ['locks', problem.locks],
  ] as const) {
    for (const { field, variety } of pairs) {
      if (!fields.has(field)) found.push(`${list}: there is no field "${field}".`);
      if (!varieties.has(variety)) found.push(`${list}: there is no variety "${variety}".`);
      if (list === 'value') {
        const key = JSON.stringify([field, variety]);
        if (seen.has(key)) found.push(`value: "${field}" and "${variety}" are listed twice.`);
        seen.add(key);
      }
    }
  }
  for (const group of problem.groups) {
    for (const one of group.varieties) if (!varieties.has(one)) found.push(`groups: there is no variety "${one}".`);
  }
  return found.slice(0, 20);
}
