/** The planning problem as a mixed-integer program: columns, rows, and the way back from a solution. Pure. */
import type { PlanProblem } from './problem';

export interface Column {
  cost: number;
  lower: number;
  upper: number;
  integer: boolean;
}

export interface Row {
  columns: number[];
  coefficients: number[];
  lower: number;
  upper: number;
  /** What this row keeps, in words, when it is a limit that a person set or that supply sets. */
  limit: string | null;
  /** The variety whose supply it is, for its worth at the margin. */
  supplyOf: number | null;
}

export interface Pair {
  /** Index of the field and of the variety in the problem's lists. */
  field: number;
  variety: number;
  perAcre: number;
}

export interface Program {
  maximise: boolean;
  columns: Column[];
  rows: Row[];
  pairs: Pair[];
  /** Column of each pair's share of its field. */
  shareColumn: number[];
  /** Column that opens each variety; empty when varieties need no opening. */
  openColumn: number[];
  /** Columns by which limits give way, with their words; only in an elastic program. */
  slack: { column: number; words: string; scale: number; unit: string }[];
}

/** Pairs open to the plan: with a value and without a stop. A locked field keeps only its variety. */
export function openPairs(problem: PlanProblem): Pair[] {
  const fieldIndex = new Map(problem.fields.map((field, index) => [field.id, index]));
  const varietyIndex = new Map(problem.varieties.map((variety, index) => [variety.id, index]));
  const stopped = new Set(problem.stops.map((stop) => JSON.stringify([stop.field, stop.variety])));
  const locked = new Map(problem.locks.map((lock) => [lock.field, lock.variety]));
  return problem.value
    .filter(({ field, variety }) =>
      locked.has(field) ? locked.get(field) === variety : !stopped.has(JSON.stringify([field, variety])),
    )
    .map((value) => ({
      field: fieldIndex.get(value.field) as number,
      variety: varietyIndex.get(value.variety) as number,
      perAcre: value.perAcre,
    }));
}

/**
 * x(pair): share of the field in the variety, 0..1 (0 or 1 when nothing is split); y(pair): is it there at all;
 * o(variety): is it opened. Maximise Σ acres × value × x. Supply and share rows carry o, which keeps the relaxation tight.
 * `linked: false` leaves out the rows that tie each pair to its opening one by one, for quick relaxations.
 * `elastic`: limits give way at a cost in proportion, and the smallest giving way is looked for instead.
 */
export function programOf(problem: PlanProblem, pairs: readonly Pair[], elastic = false, linked = true): Program {
  const split = problem.splitMinFraction < 1;
  const count = problem.maxVarieties ?? problem.varieties.length;
  const opens = problem.minAcresPerVariety > 0 || count < problem.varieties.length;
  const totalAcres = problem.fields.reduce((total, field) => total + field.acres, 0);
  const program: Program = {
    maximise: !elastic,
    columns: [],
    rows: [],
    pairs: [...pairs],
    shareColumn: [],
    openColumn: [],
    slack: [],
  };
  const column = (cost: number, upper = 1, integer = false): number =>
    program.columns.push({ cost: elastic ? 0 : cost, lower: 0, upper, integer }) - 1;
  const row = (
    entries: [column: number, coefficient: number][],
    lower: number,
    upper: number,
    limit: { words: string; scale: number; unit: string; supplyOf?: number } | null = null,
  ): void => {
    const all = [...entries];
    if (elastic && limit) {
      const give =
        program.columns.push({
          cost: 1 / Math.max(limit.scale, 1e-6),
          lower: 0,
          upper: Number.POSITIVE_INFINITY,
          integer: false,
        }) - 1;
      all.push([give, upper === Number.POSITIVE_INFINITY ? 1 : -1]);
      program.slack.push({ column: give, ...limit });
    }
    program.rows.push({
      columns: all.map(([index]) => index),
      coefficients: all.map(([, coefficient]) => coefficient),
      lower,
      upper,
      limit: limit?.words ?? null,
      supplyOf: limit?.supplyOf ?? null,
    });
  };
  const acres = (pair: Pair): number => problem.fields[pair.field]?.acres as number;
  const perAcreUnits = (pair: Pair): number => problem.fields[pair.field]?.unitsPerAcre as number;

  program.shareColumn = pairs.map((pair) => column(acres(pair) * pair.perAcre, 1, !split));
  const thereColumn = split ? pairs.map(() => column(0, 1, true)) : program.shareColumn;
  const byField: number[][] = problem.fields.map(() => []);
  const byVariety: number[][] = problem.varieties.map(() => []);
  pairs.forEach((pair, i) => {
    byField[pair.field]?.push(i);
    byVariety[pair.variety]?.push(i);
  });
  const share = (i: number): number => program.shareColumn[i] as number;
  const there = (i: number): number => thereColumn[i] as number;
  const pairOf = (i: number): Pair => pairs[i] as Pair;
  if (opens)
    program.openColumn = problem.varieties.map((_variety, v) => column(0, (byVariety[v] as number[]).length > 0 ? 1 : 0, true));

  pairs.forEach((pair, i) => {
    if (split) {
      row(
        [
          [share(i), 1],
          [there(i), -1],
        ],
        Number.NEGATIVE_INFINITY,
        0,
      );
      row(
        [
          [share(i), 1],
          [there(i), -problem.splitMinFraction],
        ],
        0,
        Number.POSITIVE_INFINITY,
      );
    }
    if (opens && linked)
      row(
        [
          [there(i), 1],
          [program.openColumn[pair.variety] as number, -1],
        ],
        Number.NEGATIVE_INFINITY,
        0,
      );
  });
  const locked = new Set(problem.locks.map((lock) => lock.field));
  problem.fields.forEach((field, f) => {
    const own = byField[f] as number[];
    if (own.length > 0)
      row(
        own.map((i) => [share(i), 1]),
        locked.has(field.id) ? 1 : 0,
        1,
      );
    if (own.length > 2 && split)
      row(
        own.map((i) => [there(i), 1]),
        0,
        2,
      );
  });
  problem.varieties.forEach((variety, v) => {
    const own = byVariety[v] as number[];
    if (own.length === 0) return;
    const opening = program.openColumn[v];
    const capped = (entries: [number, number][], limit: number, words: string, unit: string, supplyOf?: number) => {
      const about = { words, scale: limit, unit, ...(supplyOf === undefined ? {} : { supplyOf }) };
      if (opening === undefined || elastic) row(entries, Number.NEGATIVE_INFINITY, limit, about);
      else row([...entries, [opening, -limit]], Number.NEGATIVE_INFINITY, 0, about);
    };
    if (variety.units !== null && variety.units !== undefined) {
      const units = own.map((i): [number, number] => [share(i), acres(pairOf(i)) * perAcreUnits(pairOf(i))]);
      capped(units, variety.units, `units of ${variety.id}`, 'units', v);
    }
    const inAcres = own.map((i): [number, number] => [share(i), acres(pairOf(i))]);
    if (problem.maxShare < 1) capped(inAcres, problem.maxShare * totalAcres, `most acres in ${variety.id}`, 'ac');
    if (opening !== undefined && problem.minAcresPerVariety > 0) {
      row([...inAcres, [opening, -problem.minAcresPerVariety]], 0, Number.POSITIVE_INFINITY, {
        words: `fewest acres of ${variety.id}`,
        scale: problem.minAcresPerVariety,
        unit: 'ac',
      });
    }
  });
  for (const group of problem.groups) {
    const names = new Set(group.varieties);
    const own = pairs.flatMap((pair, i) => (names.has(problem.varieties[pair.variety]?.id as string) ? [i] : []));
    if (own.length === 0) continue;
    row(
      own.map((i) => [share(i), acres(pairOf(i))]),
      Number.NEGATIVE_INFINITY,
      group.maxAcres,
      {
        words: group.name,
        scale: group.maxAcres,
        unit: 'ac',
      },
    );
  }
  if (opens && count < problem.varieties.length) {
    row(
      program.openColumn.map((index) => [index, 1]),
      Number.NEGATIVE_INFINITY,
      count,
      {
        words: 'number of varieties',
        scale: Math.max(count, 1),
        unit: 'varieties',
      },
    );
  }
  return program;
}
