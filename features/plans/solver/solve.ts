import type { Highs } from 'highs';
import { loadHighs, type RunResult, run } from './highs';
import { improve, roundPlan } from './improve';
import type { PlanProblem, PlanSolution } from './problem';
import { openPairs, type Pair, type Program, programOf } from './program';

export interface SolveOptions {
  /** Stop when the proven gap is this small. */
  gap?: number;
  seconds?: number;
  /** Called now and then with seconds gone and seconds allowed. */
  onProgress?: (seconds: number, allowed: number) => void;
}

/** Up to this many pairs the whole program is solved at once, to the last dollar. */
const WHOLE_PAIRS = 900;
/** Varieties kept for each field in the core of a big program. */
const CORE_PICKS = 5;

/**
 * Solves a planning problem. A small one whole, to proven optimality. A big one by its core: the linear relaxation gives a
 * bound on any plan and the worth of every limit; the pairs that lose least against it make a program small enough to
 * solve, and the gap stated is always against a bound on the whole problem.
 */
export async function solvePlan(problem: PlanProblem, options: SolveOptions = {}): Promise<PlanSolution> {
  const started = performance.now();
  const allowed = options.seconds ?? 11;
  const gone = () => (performance.now() - started) / 1000;
  const left = () => allowed - gone();
  const onProgress = () => options.onProgress?.(gone(), allowed);
  const highs = await loadHighs();
  const pairs = openPairs(problem);
  const homeless = problem.locks.filter((lock) => !pairs.some((pair) => problem.fields[pair.field]?.id === lock.field));
  if (homeless.length > 0) {
    const words = homeless.map((lock) => `${lock.field} is locked to ${lock.variety}, which has no value there`);
    return infeasible(words, gone());
  }
  const whole = programOf(problem, pairs);
  if (pairs.length === 0) return { ...EMPTY, seconds: gone() };

  const small = pairs.length <= WHOLE_PAIRS;
  const gap = options.gap ?? (small ? 0 : 0.001);
  let best: { program: Program; result: RunResult } | null = null;
  let bound = Number.POSITIVE_INFINITY;
  const take = (program: Program, result: RunResult) => {
    if (result.values && (!best || result.objective > best.result.objective)) best = { program, result };
  };
  const wide = () => {
    const now = best as { program: Program; result: RunResult } | null;
    return now === null || gapOf(bound, now.result.objective) > gap;
  };

  if (!small) {
    const relaxed = run(highs, whole, { seconds: left(), gap: 0, relaxed: true, onProgress });
    if (relaxed.infeasible) return infeasible(smallestRelaxation(highs, problem, pairs), gone());
    bound = relaxed.bound;
    onProgress();
    const core = (portion: number) => {
      const program = programOf(problem, corePairs(whole, relaxed, CORE_PICKS, best));
      const known = best as { program: Program; result: RunResult } | null;
      const start = known ? { start: translate(known.program, known.result, program) } : {};
      take(program, run(highs, program, { seconds: left() * portion, gap, onProgress, ...start }));
      onProgress();
    };
    // Annealing knows only whole fields; where fields may be split the exact program is tried first.
    if (problem.splitMinFraction < 1) core(0.45);
    if (wide() && left() > 1) {
      const plan = annealed(highs, problem, whole, relaxed, left() * 0.7, onProgress);
      if (plan) take(whole, plan);
    }
    if (wide() && left() > 1) core(0.8);
  }
  if (wide() && left() > 0.5) {
    const known = best as { program: Program; result: RunResult } | null;
    const start = known ? translate(known.program, known.result, whole) : undefined;
    const result = run(highs, whole, { seconds: left(), gap, onProgress, ...(start ? { start } : {}) });
    if (result.infeasible) return infeasible(smallestRelaxation(highs, problem, pairs), gone());
    take(whole, result);
    bound = Math.min(bound, result.bound);
  }
  const found = best as { program: Program; result: RunResult } | null;
  if (!found) return infeasible(['No plan that keeps every wish was found in the time. Loosen one, or allow more time.'], gone());
  const proven = Math.max(0, gapOf(bound, found.result.objective));
  const { binding, shadow } = limitsOf(highs, problem, found.program, found.result);
  return {
    status: proven <= Math.max(gap, 1e-6) ? 'optimal' : 'feasible',
    objective: found.result.objective,
    gap: proven,
    seconds: gone(),
    rows: rowsOf(problem, found.program, found.result),
    binding,
    shadow,
    relaxation: [],
  };
}

const EMPTY: PlanSolution = {
  status: 'optimal',
  objective: 0,
  gap: 0,
  seconds: 0,
  rows: [],
  binding: [],
  shadow: {},
  relaxation: [],
};

function infeasible(relaxation: string[], seconds: number): PlanSolution {
  return { ...EMPTY, status: 'infeasible', seconds, relaxation };
}

function gapOf(bound: number, objective: number): number {
  if (!Number.isFinite(bound)) return Number.POSITIVE_INFINITY;
  return Math.max(0, bound - objective) / Math.max(Math.abs(objective), 1e-9);
}

/** Which varieties to open: relaxed plans, each closing the varieties that the one before wanted least, until the count is kept. */
function dive(highs: Highs, problem: PlanProblem, whole: Program, relaxed: RunResult, seconds: number) {
  const most = problem.maxVarieties ?? problem.varieties.length;
  const open = new Set(problem.varieties.map((_variety, v) => v));
  let shares = whole.shareColumn.map((column) => relaxed.values?.[column] ?? 0);
  if (whole.openColumn.length === 0) return { shares, open };
  const loose = programOf(problem, whole.pairs, false, false);
  const until = performance.now() + seconds * 1000;
  for (;;) {
    const closed = problem.varieties.flatMap((_variety, v) => (open.has(v) ? [] : [loose.openColumn[v] as number]));
    const result = run(highs, loose, { seconds, gap: 0, relaxed: true, fixed: new Map(closed.map((column) => [column, 0])) });
    if (!result.values) break;
    const wanted = (v: number) => result.values?.[loose.openColumn[v] as number] ?? 0;
    shares = loose.shareColumn.map((column) => result.values?.[column] ?? 0);
    if (open.size <= most) break;
    const hurry = performance.now() > until;
    const drop = hurry ? open.size - most : Math.ceil((open.size - most) / 4);
    for (const v of [...open].sort((a, b) => wanted(a) - wanted(b)).slice(0, drop)) open.delete(v);
  }
  return { shares, open };
}

/** A good plan of whole fields, from the relaxed one; `null` when none is found that keeps every limit. */
function annealed(
  highs: Highs,
  problem: PlanProblem,
  whole: Program,
  relaxed: RunResult,
  seconds: number,
  onProgress: () => void,
): RunResult | null {
  const { shares, open } = dive(highs, problem, whole, relaxed, seconds / 3);
  onProgress();
  const found = improve(problem, whole.pairs, roundPlan(problem, whole.pairs, shares, open), { seconds, onProgress });
  if (!found) return null;
  const values = new Float64Array(whole.columns.length);
  whole.pairs.forEach((pair, i) => {
    if (found.assignment[pair.field] !== pair.variety) return;
    values[whole.shareColumn[i] as number] = 1;
    if (problem.splitMinFraction < 1) values[whole.pairs.length + i] = 1;
    const open = whole.openColumn[pair.variety];
    if (open !== undefined) values[open] = 1;
  });
  return {
    values,
    objective: found.objective,
    bound: Number.POSITIVE_INFINITY,
    infeasible: false,
    rowActivity: Float64Array.from(whole.rows, (row) =>
      row.columns.reduce((total, column, i) => total + (row.coefficients[i] as number) * (values[column] as number), 0),
    ),
    rowDual: new Float64Array(),
    columnDual: new Float64Array(),
  };
}

/** For each field the pairs that lose least against the relaxation, and whatever the best plan so far uses. */
function corePairs(
  whole: Program,
  relaxed: RunResult,
  picks: number,
  best: { program: Program; result: RunResult } | null,
): Pair[] {
  const used = new Set<Pair>();
  if (best) {
    best.program.pairs.forEach((pair, i) => {
      if ((best.result.values?.[best.program.shareColumn[i] as number] ?? 0) > 1e-6) used.add(pair);
    });
  }
  const byField = new Map<number, { pair: Pair; loss: number }[]>();
  whole.pairs.forEach((pair, i) => {
    const column = whole.shareColumn[i] as number;
    // A pair in the relaxed plan loses nothing; for the others the reduced cost says what they would lose.
    const loss = (relaxed.values?.[column] ?? 0) > 1e-9 ? -1 : Math.abs(relaxed.columnDual[column] ?? 0);
    byField.set(pair.field, [...(byField.get(pair.field) ?? []), { pair, loss }]);
  });
  return [...byField.values()].flatMap((own) =>
    own
      .sort((a, b) => a.loss - b.loss)
      .filter((one, rank) => rank < picks || used.has(one.pair))
      .map((one) => one.pair),
  );
}

/** Values of one program as values of another over the same problem. */
function translate(from: Program, result: RunResult, to: Program): Float64Array {
  const shares = new Map<Pair, number>();
  from.pairs.forEach((pair, i) => {
    shares.set(pair, result.values?.[from.shareColumn[i] as number] ?? 0);
  });
  const values = new Float64Array(to.columns.length);
  const split = to.columns[to.shareColumn[0] as number]?.integer === false;
  to.pairs.forEach((pair, i) => {
    const share = shares.get(pair) ?? 0;
    values[to.shareColumn[i] as number] = share;
    if (share > 1e-6) {
      if (split) values[to.pairs.length + i] = 1;
      const open = to.openColumn[pair.variety];
      if (open !== undefined) values[open] = 1;
    }
  });
  return values;
}

function rowsOf(problem: PlanProblem, program: Program, result: RunResult): PlanSolution['rows'] {
  return program.pairs
    .flatMap((pair, i) => {
      const share = result.values?.[program.shareColumn[i] as number] ?? 0;
      if (share < 1e-6) return [];
      const field = problem.fields[pair.field] as PlanProblem['fields'][number];
      const acres = (share > 1 - 1e-6 ? 1 : share) * field.acres;
      const variety = problem.varieties[pair.variety]?.id as string;
      return [{ at: pair.field, row: { field: field.id, variety, acres, units: acres * field.unitsPerAcre } }];
    })
    .sort((a, b) => a.at - b.at || b.row.acres - a.row.acres)
    .map(({ row }) => row);
}

/**
 * What holds the plan back, and what one more unit of what is used up would be worth. The worths are duals of the linear
 * program with the same varieties opened: the rate at the margin, with fields taken as divisible.
 */
function limitsOf(highs: Highs, problem: PlanProblem, program: Program, result: RunResult) {
  const fixed = new Map<number, number>();
  const opened = new Set<number>();
  for (const column of program.openColumn) {
    const value = Math.round(result.values?.[column] ?? 0);
    fixed.set(column, value);
    if (value === 1) opened.add(column);
  }
  const relaxed = run(highs, program, { seconds: 10, gap: 0, relaxed: true, fixed });
  const shadow: Record<string, number> = {};
  const binding = new Set<string>();
  program.rows.forEach((row, index) => {
    if (!row.limit) return;
    const dual = Math.abs(relaxed.rowDual[index] ?? 0);
    const upper = row.upper;
    const activity = result.rowActivity[index] ?? 0;
    const smallest = Math.min(...row.coefficients.map(Math.abs).filter((size) => size > 0));
    const idle = program.openColumn.length > 0 && row.columns.some((column) => fixed.get(column) === 0);
    // Full: no further whole piece of it could be taken.
    const full = upper !== Number.POSITIVE_INFINITY && upper - activity < Math.min(smallest, 1);
    if (row.limit === 'number of varieties') {
      if (full) binding.add(row.limit);
      return;
    }
    if (idle) return;
    if (dual > 1e-6) binding.add(row.limit);
    if (row.supplyOf !== null && dual > 1e-6) shadow[problem.varieties[row.supplyOf]?.id as string] = dual;
  });
  return { binding: [...binding], shadow };
}

/** Which wishes must give way and by how little, when they cannot all stand. */
function smallestRelaxation(highs: Highs, problem: PlanProblem, pairs: Pair[]): string[] {
  const elastic = programOf(problem, pairs, true);
  const result = run(highs, elastic, { seconds: 5, gap: 0 });
  if (!result.values) return ['The wishes clash, and no giving way of the limits lets them stand together.'];
  return elastic.slack
    .filter((one) => (result.values?.[one.column] ?? 0) > 1e-6)
    .map((one) => `${one.words}: give way by ${Number((result.values?.[one.column] ?? 0).toFixed(2))} ${one.unit}`);
}
