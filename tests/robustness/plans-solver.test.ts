import { describe, expect, test } from 'vitest';
import { type PlanProblem, problemSchema, problemsOf } from '@/features/plans/solver/problem';
import { solvePlan } from '@/features/plans/solver/solve';
import { aProblem, seededRandom } from '../support/plan-problem';

/** Every assignment of whole fields tried; the best one's dollars. The slow truth that the solver is held to. */
function bruteForce(problem: PlanProblem): number | null {
  const { fields, varieties } = problem;
  const worth = new Map(problem.value.map((one) => [`${one.field} ${one.variety}`, one.perAcre]));
  for (const stop of problem.stops) worth.delete(`${stop.field} ${stop.variety}`);
  const totalAcres = fields.reduce((total, field) => total + field.acres, 0);
  let best: number | null = null;
  const acres = varieties.map(() => 0);
  const units = varieties.map(() => 0);
  const visit = (f: number, dollars: number): void => {
    const field = fields[f];
    if (!field) {
      const opened = acres.filter((one) => one > 0);
      const fine =
        opened.length <= (problem.maxVarieties ?? varieties.length) &&
        opened.every((one) => one >= problem.minAcresPerVariety - 1e-9 && one <= problem.maxShare * totalAcres + 1e-9);
      if (fine && (best === null || dollars > best)) best = dollars;
      return;
    }
    const lock = problem.locks.find((one) => one.field === field.id);
    if (!lock) visit(f + 1, dollars);
    varieties.forEach((variety, v) => {
      const perAcre = worth.get(`${field.id} ${variety.id}`);
      if (perAcre === undefined || (lock && lock.variety !== variety.id)) return;
      const need = field.acres * field.unitsPerAcre;
      if ((units[v] as number) + need > (variety.units ?? Number.POSITIVE_INFINITY) + 1e-9) return;
      acres[v] = (acres[v] as number) + field.acres;
      units[v] = (units[v] as number) + need;
      visit(f + 1, dollars + perAcre * field.acres);
      acres[v] = (acres[v] as number) - field.acres;
      units[v] = (units[v] as number) - need;
      if ((acres[v] as number) < 1e-9) acres[v] = 0;
    });
  };
  visit(0, 0);
  return best;
}

/** Breaks of any rule by a solution; empty when it keeps them all. */
function breaks(problem: PlanProblem, rows: { field: string; variety: string; acres: number; units: number }[]): string[] {
  const found: string[] = [];
  const total = problem.fields.reduce((sum, field) => sum + field.acres, 0);
  for (const field of problem.fields) {
    const own = rows.filter((row) => row.field === field.id);
    const planted = own.reduce((sum, row) => sum + row.acres, 0);
    if (planted > field.acres + 1e-4) found.push(`${field.id} planted beyond its acres`);
    if (own.length > 2) found.push(`${field.id} split twice`);
    for (const row of own) {
      if (row.acres < problem.splitMinFraction * field.acres - 1e-4) found.push(`${field.id} has too small a part`);
      if (Math.abs(row.units - row.acres * field.unitsPerAcre) > 1e-6) found.push(`${field.id} units`);
      if (problem.stops.some((stop) => stop.field === row.field && stop.variety === row.variety)) found.push('stop');
    }
  }
  const opened = new Set(rows.map((row) => row.variety));
  if (opened.size > (problem.maxVarieties ?? Number.POSITIVE_INFINITY)) found.push('too many varieties');
  for (const variety of problem.varieties) {
    const own = rows.filter((row) => row.variety === variety.id);
    const acres = own.reduce((sum, row) => sum + row.acres, 0);
    const units = own.reduce((sum, row) => sum + row.units, 0);
    if (units > (variety.units ?? Number.POSITIVE_INFINITY) + 1e-4) found.push(`${variety.id} beyond supply`);
    if (acres > problem.maxShare * total + 1e-4) found.push(`${variety.id} beyond its share`);
    if (own.length > 0 && acres < problem.minAcresPerVariety - 1e-4) found.push(`${variety.id} too few acres`);
  }
  return found;
}

describe('the solver against every plan tried', () => {
  test('300 random small problems: the same dollars as brute force, within every limit', async () => {
    const random = seededRandom(11);
    const wrong: string[] = [];
    for (let seed = 1; seed <= 300; seed++) {
      const problem = aProblem(seed, 2 + Math.floor(random() * 4), 2 + Math.floor(random() * 3), {
        tight: 0.5 + random() * 2,
        maxShare: random() < 0.5 ? 1 : 0.4 + random() * 0.5,
        minAcresPerVariety: random() < 0.5 ? 0 : Math.round(random() * 150),
        ...(random() < 0.5 ? { maxVarieties: 1 + Math.floor(random() * 3) } : {}),
      });
      for (const value of problem.value) if (random() < 0.1) value.perAcre = -20 - random() * 50;
      problem.stops = problem.value.filter(() => random() < 0.15).map(({ field, variety }) => ({ field, variety }));
      const expected = bruteForce(problem);
      const solution = await solvePlan(problem);
      if (expected === null || Math.abs(solution.objective - expected) > 0.01 || solution.status !== 'optimal') {
        wrong.push(`${seed}: ${solution.status} ${solution.objective} instead of ${expected}`);
      }
      wrong.push(...breaks(problem, solution.rows).map((one) => `${seed}: ${one}`));
    }
    expect(wrong).toEqual([]);
  }, 120_000);

  test('a split field never earns less than a whole one and keeps its smallest part', async () => {
    for (let seed = 1; seed <= 40; seed++) {
      const whole = aProblem(seed, 5, 4, { tight: 0.9 });
      const parts = { ...whole, splitMinFraction: 0.25 };
      const [one, two] = [await solvePlan(whole), await solvePlan(parts)];
      expect(two.objective).toBeGreaterThanOrEqual(one.objective - 0.01);
      expect(breaks(parts, two.rows)).toEqual([]);
    }
  }, 60_000);
});

describe('what a plan is told beside its rows', () => {
  const base = {
    fields: [
      { id: 'A', acres: 100, unitsPerAcre: 1 },
      { id: 'B', acres: 100, unitsPerAcre: 1 },
    ],
    varieties: [
      { id: 'good', units: 100 },
      { id: 'plain', units: null },
    ],
    value: ['A', 'B'].flatMap((field) => [
      { field, variety: 'good', perAcre: 510 },
      { field, variety: 'plain', perAcre: 500 },
    ]),
  };

  test('supply that is used up is binding, and one more unit is worth its advantage', async () => {
    const solution = await solvePlan(problemSchema.parse(base));
    expect(solution.objective).toBeCloseTo(101_000, 3);
    expect(solution.binding).toEqual(['units of good']);
    expect(solution.shadow.good).toBeCloseTo(10, 6);
  });

  test('a count of varieties that is used up is binding', async () => {
    const solution = await solvePlan(problemSchema.parse({ ...base, maxVarieties: 1 }));
    expect(solution.objective).toBeCloseTo(100_000, 3);
    expect(solution.binding).toEqual(['number of varieties']);
  });

  test('wishes that clash are named with the smallest giving way', async () => {
    const solution = await solvePlan(problemSchema.parse({ ...base, maxShare: 0.4, locks: [{ field: 'A', variety: 'good' }] }));
    expect(solution.status).toBe('infeasible');
    expect(solution.relaxation).toEqual(['most acres in good: give way by 20 ac']);
  });

  test('a field may stay empty when every variety loses money on it', async () => {
    const solution = await solvePlan(problemSchema.parse({ ...base, value: [{ field: 'A', variety: 'plain', perAcre: -5 }] }));
    expect(solution).toMatchObject({ status: 'optimal', objective: 0, rows: [] });
  });

  test('ids that point nowhere are named', () => {
    const problem = problemSchema.parse({ ...base, stops: [{ field: 'Z', variety: 'good' }] });
    expect(problemsOf(problem)).toEqual(['stops: there is no field "Z".']);
  });
});

describe('a big problem', () => {
  test('200 fields and 40 varieties: inside every limit, inside its stated gap, under 15 seconds', async () => {
    const problem = aProblem(7, 200, 40, { tight: 1.6, maxShare: 0.3, minAcresPerVariety: 80, maxVarieties: 25 });
    const solution = await solvePlan(problem);
    expect(breaks(problem, solution.rows)).toEqual([]);
    expect(solution.seconds).toBeLessThan(15);
    expect(solution.gap).toBeLessThan(0.02);
    const dollars = solution.rows.reduce(
      (total, row) =>
        total +
        row.acres * (problem.value.find((one) => one.field === row.field && one.variety === row.variety)?.perAcre as number),
      0,
    );
    expect(solution.objective).toBeCloseTo(dollars, 1);
  }, 60_000);
});
