/**
 * Improves a plan of whole fields by seeded annealing: fields move to another variety or change places, always within
 * every limit. Integer programs of many full bins are where branch and bound is slow to find good plans and this is quick;
 * how good the result is, is proven elsewhere, by a bound. Same input and seed, same answer, unless time cuts it short.
 */
import type { PlanProblem } from './problem';
import type { Pair } from './program';

/** Moves tried for each field: more finds little. */
const MOVES_PER_FIELD = 60_000;
/** Moves tried between two looks at the clock. */
const BATCH = 20_000;

/** Variety of each field, −1 for an empty one, or `null` when the start breaks a limit. */
export function improve(
  problem: PlanProblem,
  pairs: readonly Pair[],
  start: Int32Array,
  options: { seconds: number; seed?: number; now?: () => number; onProgress?: () => void },
): { assignment: Int32Array; objective: number } | null {
  const fieldCount = problem.fields.length;
  const varietyCount = problem.varieties.length;
  const acres = Float64Array.from(problem.fields, (field) => field.acres);
  const units = Float64Array.from(problem.fields, (field) => field.acres * field.unitsPerAcre);
  const totalAcres = acres.reduce((total, one) => total + one, 0);
  const unitsCap = Float64Array.from(problem.varieties, (variety) => variety.units ?? Number.POSITIVE_INFINITY);
  const acresCap = problem.maxShare < 1 ? problem.maxShare * totalAcres : Number.POSITIVE_INFINITY;
  const fewest = problem.minAcresPerVariety;
  const most = problem.maxVarieties ?? varietyCount;
  const groupsOf: number[][] = problem.varieties.map((variety) =>
    problem.groups.flatMap((group, g) => (group.varieties.includes(variety.id) ? [g] : [])),
  );
  const groupCap = problem.groups.map((group) => group.maxAcres);

  // Worth of each field in each variety; NaN where it may not stand.
  const worth = new Float64Array(fieldCount * varietyCount).fill(Number.NaN);
  const choices: number[][] = problem.fields.map(() => []);
  for (const pair of pairs) {
    worth[pair.field * varietyCount + pair.variety] = pair.perAcre * (acres[pair.field] as number);
    choices[pair.field]?.push(pair.variety);
  }
  const locked = new Set(problem.locks.map((lock) => problem.fields.findIndex((field) => field.id === lock.field)));
  const movable = problem.fields.flatMap((_field, f) => (locked.has(f) || (choices[f] as number[]).length === 0 ? [] : [f]));
  const worthOf = (field: number, variety: number): number =>
    variety < 0 ? 0 : (worth[field * varietyCount + variety] as number);

  const assignment = Int32Array.from(start);
  const unitsUsed = new Float64Array(varietyCount);
  const acresUsed = new Float64Array(varietyCount);
  const groupUsed = new Float64Array(problem.groups.length);
  let opened = 0;
  let objective = 0;
  const put = (field: number, variety: number, sign: 1 | -1) => {
    if (variety < 0) return;
    const before = acresUsed[variety] as number;
    unitsUsed[variety] = (unitsUsed[variety] as number) + sign * (units[field] as number);
    acresUsed[variety] = sign < 0 && before - (acres[field] as number) < 1e-6 ? 0 : before + sign * (acres[field] as number);
    if (before === 0) opened++;
    else if (acresUsed[variety] === 0) opened--;
    for (const g of groupsOf[variety] as number[]) groupUsed[g] = (groupUsed[g] as number) + sign * (acres[field] as number);
    objective += sign * worthOf(field, variety);
  };
  const keeps = (variety: number): boolean => {
    if (variety < 0) return true;
    const own = acresUsed[variety] as number;
    if ((unitsUsed[variety] as number) > (unitsCap[variety] as number) + 1e-9 || own > acresCap + 1e-9) return false;
    if (own > 0 && own < fewest - 1e-9) return false;
    return (groupsOf[variety] as number[]).every((g) => (groupUsed[g] as number) <= (groupCap[g] as number) + 1e-9);
  };
  assignment.forEach((variety, field) => {
    put(field, variety, 1);
  });
  if (!Number.isFinite(objective) || opened > most || !problem.varieties.every((_variety, v) => keeps(v))) return null;
  if (movable.length === 0) return { assignment, objective };

  let seed = options.seed ?? 20270508;
  const random = () => {
    seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0;
    return seed / 4294967296;
  };
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)] as T;
  const now = options.now ?? (() => performance.now());
  const begun = now();
  let moves = 0;
  const typical = objective / Math.max(1, fieldCount);
  let best = Int32Array.from(assignment);
  let bestObjective = objective;

  const choosy = fewest > 0 || most < varietyCount;
  const tryMove = (moves: readonly [field: number, to: number][], heat: number): void => {
    const before = objective;
    const from = moves.map(([field]) => assignment[field] as number);
    moves.forEach(([field], i) => {
      put(field, from[i] as number, -1);
    });
    for (const [field, to] of moves) put(field, to, 1);
    const fits = opened <= most && moves.every(([, to], i) => keeps(to) && keeps(from[i] as number));
    const gain = objective - before;
    if (fits && (gain >= 0 || random() < Math.exp(gain / heat))) {
      for (const [field, to] of moves) assignment[field] = to;
      if (objective > bestObjective + 1e-9) {
        bestObjective = objective;
        best = Int32Array.from(assignment);
      }
      return;
    }
    for (const [field, to] of moves) put(field, to, -1);
    moves.forEach(([field], i) => {
      put(field, from[i] as number, 1);
    });
    // Sums are put back exactly as they were, not as rounding left them.
    objective = before;
  };

  /** Everything in one variety goes to another that is not opened yet, as far as its seed reaches; the rest waits empty. */
  const exchange = (heat: number): void => {
    const from = assignment[pick(movable)] as number;
    const to = Math.floor(random() * varietyCount);
    if (from < 0 || acresUsed[to] !== 0 || from === to) return;
    const moves: [number, number][] = [];
    let room = unitsCap[to] as number;
    for (const field of movable) {
      if (assignment[field] !== from) continue;
      const fits = !Number.isNaN(worthOf(field, to)) && (units[field] as number) <= room;
      if (fits) room -= units[field] as number;
      moves.push([field, fits ? to : -1]);
    }
    tryMove(moves, heat);
  };

  for (;;) {
    // By moves, so that a machine's load does not change the answer; by the clock only when there are more than time allows.
    const portion = Math.max(moves / (MOVES_PER_FIELD * fieldCount), (now() - begun) / 1000 / options.seconds);
    if (portion >= 1) break;
    moves += BATCH;
    const heat = typical * 0.02 * 0.0005 ** portion;
    for (let i = 0; i < BATCH; i++) {
      if (choosy && random() < 0.002) {
        exchange(heat * 4);
        continue;
      }
      const field = pick(movable);
      const mine = assignment[field] as number;
      if (random() < 0.4) {
        const to = random() < 0.02 ? -1 : pick(choices[field] as number[]);
        if (to !== mine) tryMove([[field, to]], heat);
        continue;
      }
      const other = pick(movable);
      const theirs = assignment[other] as number;
      if (other === field || theirs === mine) continue;
      const swaps = (theirs < 0 || !Number.isNaN(worthOf(field, theirs))) && (mine < 0 || !Number.isNaN(worthOf(other, mine)));
      if (!swaps) continue;
      if (random() < 0.5)
        tryMove(
          [
            [field, theirs],
            [other, mine],
          ],
          heat,
        );
      else {
        // One takes the other's place, and the other goes where there is room.
        const third = pick(choices[other] as number[]);
        if (third !== theirs && theirs >= 0)
          tryMove(
            [
              [field, theirs],
              [other, third],
            ],
            heat,
          );
      }
    }
    options.onProgress?.();
  }
  return { assignment: best, objective: bestObjective };
}

/** Rounds a relaxed plan to whole fields, surest fields first, within supply and caps; leaves empty what finds no room. */
export function roundPlan(
  problem: PlanProblem,
  pairs: readonly Pair[],
  shares: ArrayLike<number>,
  open: ReadonlySet<number>,
): Int32Array {
  const assignment = new Int32Array(problem.fields.length).fill(-1);
  const totalAcres = problem.fields.reduce((total, field) => total + field.acres, 0);
  const unitsLeft = problem.varieties.map((variety) => variety.units ?? Number.POSITIVE_INFINITY);
  const acresLeft = problem.varieties.map(() =>
    problem.maxShare < 1 ? problem.maxShare * totalAcres : Number.POSITIVE_INFINITY,
  );
  const groupLeft = problem.groups.map((group) => group.maxAcres);
  const groupsOf = problem.varieties.map((variety) =>
    problem.groups.flatMap((group, g) => (group.varieties.includes(variety.id) ? [g] : [])),
  );
  const wishes = pairs
    .map((pair, i) => ({ pair, share: shares[i] as number }))
    .filter(({ pair }) => open.has(pair.variety))
    .sort((a, b) => b.share - a.share || b.pair.perAcre - a.pair.perAcre);
  for (const { pair } of wishes) {
    const field = problem.fields[pair.field] as PlanProblem['fields'][number];
    if (assignment[pair.field] !== -1 || pair.perAcre <= 0) continue;
    const units = field.acres * field.unitsPerAcre;
    if (units > (unitsLeft[pair.variety] as number) || field.acres > (acresLeft[pair.variety] as number)) continue;
    const groups = groupsOf[pair.variety] as number[];
    if (groups.some((g) => field.acres > (groupLeft[g] as number))) continue;
    assignment[pair.field] = pair.variety;
    unitsLeft[pair.variety] = (unitsLeft[pair.variety] as number) - units;
    acresLeft[pair.variety] = (acresLeft[pair.variety] as number) - field.acres;
    for (const g of groups) groupLeft[g] = (groupLeft[g] as number) - field.acres;
  }
  // A variety opened for fewer acres than are worth it is closed again.
  const acresIn = new Float64Array(problem.varieties.length);
  assignment.forEach((variety, f) => {
    if (variety >= 0) acresIn[variety] = (acresIn[variety] as number) + (problem.fields[f]?.acres as number);
  });
  return assignment.map((variety) => (variety >= 0 && (acresIn[variety] as number) < problem.minAcresPerVariety ? -1 : variety));
}
