/** One measured figure of `npm run bench`: never a test, because a busy machine must not fail one. */
export interface Figure {
  what: string;
  measured: number;
  unit: string;
  /** What it should stay under; `null` when it is there to compare with. */
  goal: number | null;
  note?: string;
}

/** Middle of `runs` timings of a piece of work, milliseconds, after `warmUp` runs that do not count. */
export function medianMilliseconds(work: () => void, runs: number, warmUp = 0): number {
  for (let i = 0; i < warmUp; i++) work();
  const times = Array.from({ length: runs }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  }).sort((a, b) => a - b);
  return times[Math.floor(runs / 2)] as number;
}

/** Even numbers of 0…1 that are the same in every run (Park & Miller's generator). */
export function seeded(seed = 1): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}
