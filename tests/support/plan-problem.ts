import { type PlanProblem, problemSchema } from '@/features/plans/solver/problem';

/** A linear congruential generator: the same seed, the same problems. */
export function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 4294967296;
  };
}

/** An invented planning problem of any size; `tight` is units on hand over units needed. */
export function aProblem(
  seed: number,
  fieldCount: number,
  varietyCount: number,
  options: Partial<PlanProblem> & { tight?: number } = {},
): PlanProblem {
  const random = seededRandom(seed);
  const { tight = 1.3, ...rest } = options;
  const fields = Array.from({ length: fieldCount }, (_, i) => ({
    id: `field ${i + 1}`,
    acres: Math.round((15 + random() * 140) * 10) / 10,
    unitsPerAcre: 0.9 + random() * 0.25,
  }));
  const need = fields.reduce((total, field) => total + field.acres * field.unitsPerAcre, 0);
  const varieties = Array.from({ length: varietyCount }, (_, i) => ({
    id: `V${i + 1}`,
    units: Math.round(((need * tight) / varietyCount) * (0.3 + random() * 1.4)),
  }));
  const worth = varieties.map(() => random() * 30);
  return problemSchema.parse({
    fields,
    varieties,
    value: fields.flatMap((field) =>
      varieties.map((variety, v) => ({
        field: field.id,
        variety: variety.id,
        perAcre: Math.round((480 + (worth[v] as number) + random() * 60) * 100) / 100,
      })),
    ),
    ...rest,
  });
}
