/** Scales that trials and laboratories report on, and what they come to. Pure arithmetic, each from its publication. */

/**
 * Sudden death disease index: DI × DS / 9. `incidencePercent`: plants with symptoms; `severity` 1 (mild) to 9 (dead).
 * Source: Purdue Regional SDS Test.
 */
export function suddenDeathIndex(incidencePercent: number, severity: number): number {
  return (incidencePercent * severity) / 9;
}

/** White mould severity index, 0 to 100, from plants scored 0 (none) to 3 (dead). Source: Grau et al. 1982, Plant Disease 66:506. */
export function whiteMouldSeverityIndex(scores: readonly number[]): number {
  if (scores.length === 0) return 0;
  return (100 * scores.reduce((sum, score) => sum + score, 0)) / (3 * scores.length);
}

/** Bushels lost to white mould by dead plants, per cent: 0.25 to 0.50 bu/ac each. Source: University of Wisconsin. */
export function whiteMouldLossBushels(mortalityPercent: number): { low: number; high: number } {
  return { low: 0.25 * mortalityPercent, high: 0.5 * mortalityPercent };
}

/** Host class by female index, per cent of a susceptible check. Source: Schmitt & Shannon 1992 (from memory). */
export function cystHostClass(
  femaleIndex: number,
): 'resistant' | 'moderately resistant' | 'moderately susceptible' | 'susceptible' {
  if (femaleIndex < 10) return 'resistant';
  if (femaleIndex < 30) return 'moderately resistant';
  return femaleIndex < 60 ? 'moderately susceptible' : 'susceptible';
}

/**
 * Standability 1 to 9, 9 best, from a lodging score 1 (almost all erect) to 5 (all down): 11 − 2·score.
 * Scale: Mississippi Soybean Promotion Board; conversion from memory. Throws RangeError outside 1 to 5.
 */
export function standabilityFromLodging(score: number): number {
  if (!(score >= 1 && score <= 5)) throw new RangeError(`Lodging score ${score} is not between 1 and 5`);
  return 11 - 2 * score;
}
