/** Seeded shocks: the same name gives the same 2,000 draws on every machine, whatever else is being ranked. */

export const DRAWS = 2000;

/** 32-bit FNV-1a hash of a text. */
export function hashOf(text: string): number {
  let hash = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) {
    hash ^= text.charCodeAt(i);
    hash = Math.imul(hash, 0x01000193);
  }
  return hash >>> 0;
}

/** Small seeded generator of uniforms in [0, 1): mulberry32 (T. Ettinger, public domain). */
export function uniforms(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** Standard normal quantile by Acklam's rational approximation (relative error under 1.2e-9). */
export function normalQuantile(p: number): number {
  const a = [-39.69683028665376, 220.9460984245205, -275.9285104469687, 138.357751867269, -30.66479806614716, 2.506628277459239];
  const b = [-54.47609879822406, 161.5858368580409, -155.6989798598866, 66.80131188771972, -13.28068155288572];
  const c = [
    -0.007784894002430293, -0.3223964580411365, -2.400758277161838, -2.549732539343734, 4.374664141464968, 2.938163982698783,
  ];
  const d = [0.007784695709041462, 0.3224671290700398, 2.445134137142996, 3.754408661907416];
  const polynomial = (coefficients: number[], x: number) => coefficients.reduce((sum, value) => sum * x + value, 0);
  if (p < 0.02425) {
    const q = Math.sqrt(-2 * Math.log(p));
    return polynomial(c, q) / (polynomial(d, q) * q + 1);
  }
  if (p > 1 - 0.02425) return -normalQuantile(1 - p);
  const q = p - 0.5;
  const r = q * q;
  return (polynomial(a, r) * q) / (polynomial(b, r) * r + 1);
}

let quantiles: Float64Array | null = null;
const shocksByName = new Map<string, Float64Array>();
/** Vectors kept ready (16 kB each); beyond this the cache starts anew, which changes speed and nothing else. */
const MOST_VECTORS = 600;

/**
 * `DRAWS` standard normal shocks belonging to a name: the normal quantiles of (i + ½)/n in an order shuffled by the name's
 * hash. Every vector has the same exact spread, so hold does not wobble with the luck of the draw.
 */
export function shocksOf(name: string): Float64Array {
  const known = shocksByName.get(name);
  if (known) return known;
  quantiles ??= Float64Array.from({ length: DRAWS }, (_, i) => normalQuantile((i + 0.5) / DRAWS));
  const shocks = quantiles.slice();
  const next = uniforms(hashOf(name));
  for (let i = DRAWS - 1; i > 0; i--) {
    const j = Math.floor(next() * (i + 1));
    const swap = shocks[i]!;
    shocks[i] = shocks[j]!;
    shocks[j] = swap;
  }
  if (shocksByName.size >= MOST_VECTORS) shocksByName.clear();
  shocksByName.set(name, shocks);
  return shocks;
}
