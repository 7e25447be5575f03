/** A small seeded generator (mulberry32), so that the demo is the same on every machine. */
export function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

/** Smooth noise in −1..1 over the plane: random values on a unit lattice, joined by smoothstep. */
export function smoothNoise(seed: number): (x: number, y: number) => number {
  const at = (i: number, j: number) => seededRandom(seed + Math.imul(i, 374_761) + Math.imul(j, 668_265))() * 2 - 1;
  const ease = (t: number) => t * t * (3 - 2 * t);
  return (x, y) => {
    const i = Math.floor(x);
    const j = Math.floor(y);
    const u = ease(x - i);
    const v = ease(y - j);
    return (at(i, j) * (1 - u) + at(i + 1, j) * u) * (1 - v) + (at(i, j + 1) * (1 - u) + at(i + 1, j + 1) * u) * v;
  };
}
