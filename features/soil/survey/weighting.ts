/** From horizons to one figure a map unit: by depth within a component, by percent of the map unit over components. Pure. */

export interface Horizon {
  /** cm */
  topCm: number;
  bottomCm: number;
  value: number | null;
}

/** The topsoil that a soil test speaks of, cm. */
export const SURFACE_CM = 30;

/**
 * Mean of a property from `fromCm` to `toCm`, each horizon weighted by the thickness it has there; horizons without a value
 * are left out. `null` when none has one. Horizons 0–20 cm pH 6.0 and 20–50 cm pH 7.0 give (20 × 6.0 + 10 × 7.0)/30 = 6.33.
 */
export function depthWeighted(horizons: readonly Horizon[], fromCm: number, toCm: number): number | null {
  let sum = 0;
  let thickness = 0;
  for (const { topCm, bottomCm, value } of horizons) {
    const inside = Math.min(bottomCm, toCm) - Math.max(topCm, fromCm);
    if (value === null || !(inside > 0)) continue;
    sum += value * inside;
    thickness += inside;
  }
  return thickness > 0 ? sum / thickness : null;
}

/** Mean over components by their percent of the map unit; components without a value are left out. `null` when none has one. */
export function componentWeighted(components: readonly { percent: number; value: number | null }[]): number | null {
  let sum = 0;
  let percent = 0;
  for (const component of components) {
    if (component.value === null || !(component.percent > 0)) continue;
    sum += component.value * component.percent;
    percent += component.percent;
  }
  return percent > 0 ? sum / percent : null;
}
