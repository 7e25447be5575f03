/**
 * Lime: how much, by the state's own method where the buffer test is named, and how much of the grower's own material that is.
 * A method is never stretched to a state or a buffer it was not made for: then the rate is `null`, with words.
 */

/** Buffer tests by name. Sikora readings may be used with SMP calibrations (Pagani & Mallarino 2009); Mehlich's may not. */
export const BUFFER_METHODS = ['SMP', 'Sikora', 'Mehlich', 'Adams-Evans', 'Woodruff'] as const;
export type BufferMethod = (typeof BUFFER_METHODS)[number];

export interface LimeInput {
  /** Two-letter postal code; `null` when unknown. */
  state: string | null;
  /** Water pH. */
  ph: number;
  /** `null`: the state's own target. */
  targetPh: number | null;
  bufferPh: number | null;
  bufferMethod: string | null;
  organicMatterPercent?: number | null;
}

export interface LimeRecommendation {
  /** Tons an acre of the material the method speaks of; 0 when none is needed, `null` when no method applies. */
  tonsPerAcre: number | null;
  method: string | null;
  source: string;
  /** A sentence: what the tons are of, or why there are none. */
  note: string;
}

interface Target {
  ph: number;
  source: string;
}

/** Target water pH for soybeans on mineral soil by state. */
const TARGETS: Record<string, Target> = {
  MI: { ph: 6.5, source: 'Michigan State University Extension (Staton 2012): optimum 6.3-6.5' },
  OH: { ph: 6.5, source: 'Tri-State E-2567 (1995), subsoil below pH 6.0 (from memory)' },
  IN: { ph: 6.5, source: 'Tri-State E-2567 (1995), subsoil below pH 6.0 (from memory)' },
  IA: { ph: 6.5, source: 'Iowa State University PM 1688 (from memory)' },
  IL: { ph: 6.5, source: 'Illinois Agronomy Handbook: 6.0-6.5 (from memory)' },
  WI: { ph: 6.3, source: 'University of Wisconsin A2809 (from memory)' },
  MN: { ph: 6.5, source: 'University of Minnesota, eastern and southern area (from memory)' },
  NC: { ph: 6.0, source: 'NCDA&CS, mineral soil (from memory)' },
};
const COMMON_TARGET: Target = { ph: 6.5, source: 'common practice: the sweet spot is 6.3-6.5' };
/** Muck and peat: over 20 % organic matter. */
const ORGANIC_SOIL_PERCENT = 20;
const ORGANIC_TARGETS: Record<string, Target> = {
  WI: { ph: 5.6, source: 'University of Wisconsin A2809, organic soil (from memory)' },
  MI: { ph: 5.3, source: 'Tri-State E-2567 (1995), organic soil (from memory)' },
  OH: { ph: 5.3, source: 'Tri-State E-2567 (1995), organic soil (from memory)' },
  IN: { ph: 5.3, source: 'Tri-State E-2567 (1995), organic soil (from memory)' },
};

function isOrganicSoil(organicMatterPercent: number | null | undefined): boolean {
  return (organicMatterPercent ?? 0) >= ORGANIC_SOIL_PERCENT;
}

/** The pH that a state limes soybeans to, with its source; common practice where no state figure is carried. */
export function targetPhOf(state: string | null, organicMatterPercent?: number | null): Target {
  const key = state ?? '';
  return (isOrganicSoil(organicMatterPercent) ? ORGANIC_TARGETS[key] : undefined) ?? TARGETS[key] ?? COMMON_TARGET;
}

const TRI_STATE = 'Tri-State Fertilizer Recommendations E-2567 (1995; from memory, the 2020 bulletin changed the constants)';
/** Tons = a − b·LTI at three targets; LTI = 10 × SMP buffer pH. */
const TRI_STATE_LINES = [
  { target: 6.0, intercept: 49.3, slope: 0.71 },
  { target: 6.5, intercept: 60.4, slope: 0.87 },
  { target: 6.8, intercept: 71.4, slope: 1.03 },
] as const;
/** Michigan State University Extension: none above lime index 70, and the index is not used above pH 6.8. */
const NO_LIME_INDEX = 70;
const NO_LIME_PH = 6.8;

/**
 * Tri-State 1995, mineral soil: tons an acre of lime with neutralising value 90, 8 in deep. Targets 6.0, 6.5 and 6.8 as
 * printed, straight lines between; outside them the nearest.
 */
export function triStateTons(limeTestIndex: number, targetPh: number): number {
  const tons = TRI_STATE_LINES.map((line) => Math.max(0, line.intercept - line.slope * limeTestIndex));
  const [low, middle, high] = tons as [number, number, number];
  if (targetPh <= 6.0) return low;
  if (targetPh >= 6.8) return high;
  if (targetPh <= 6.5) return low + ((middle - low) * (targetPh - 6.0)) / 0.5;
  return middle + ((high - middle) * (targetPh - 6.5)) / 0.3;
}

/** Tri-State 1995, organic soil: tons an acre from the water pH. */
export function triStateOrganicTons(ph: number): number {
  return Math.max(0, 32.9 - 5.48 * ph);
}

/** NCDA&CS: exchangeable acidity, meq/100 cm³, from the Mehlich buffer pH. */
export function northCarolinaAcidity(bufferPh: number): number {
  return Math.max(0, (6.6 - bufferPh) * 4);
}

/** NCDA&CS: tons an acre from acidity and pH; under 0.3 none is recommended. No residual credit for lime put on before. */
export function northCarolinaTons(acidity: number, ph: number, targetPh: number): number {
  if (ph >= targetPh || ph >= 6.6) return 0;
  const tons = (acidity * (targetPh - ph)) / (6.6 - ph);
  return tons < 0.3 ? 0 : tons;
}

/**
 * Lime for a field or a part of it. Ohio, Indiana and Michigan by Tri-State (SMP or Sikora buffer), North Carolina by its own
 * (Mehlich buffer). Elsewhere, or without a named buffer, `tonsPerAcre` is `null` and the note says what to do.
 */
export function limeRecommendation(input: LimeInput): LimeRecommendation {
  const { state, ph, bufferPh } = input;
  const target =
    input.targetPh === null ? targetPhOf(state, input.organicMatterPercent) : { ph: input.targetPh, source: 'as asked' };
  const none = (note: string, method: string | null = null): LimeRecommendation => ({
    tonsPerAcre: null,
    method,
    source: target.source,
    note,
  });
  if (!Number.isFinite(ph)) return none('pH is not known, so no lime is worked out.');
  if (ph >= target.ph) {
    return {
      tonsPerAcre: 0,
      method: null,
      source: target.source,
      note: `pH ${ph.toFixed(1)} is at or above the target of ${target.ph.toFixed(1)}: no lime.`,
    };
  }
  if (state === 'OH' || state === 'IN' || state === 'MI') return byTriState(input, state, target, none);
  if (state === 'NC') return byNorthCarolina(input, target, none);
  if (bufferPh === null)
    return none('The buffer pH is not tested, so no rate is worked out. Ask the laboratory for a lime requirement.');
  const where = state === null ? 'a field whose state is unknown' : state;
  return none(
    `Hilum carries no lime equation for ${where}. Use the rate on the laboratory's report, to pH ${target.ph.toFixed(1)}.`,
  );
}

type None = (note: string, method?: string | null) => LimeRecommendation;

function byTriState(input: LimeInput, state: string, target: Target, none: None): LimeRecommendation {
  const { ph, bufferPh, bufferMethod } = input;
  if (isOrganicSoil(input.organicMatterPercent)) {
    return {
      tonsPerAcre: triStateOrganicTons(ph),
      method: 'Tri-State, organic soil',
      source: TRI_STATE,
      note: 'Tons of lime with a neutralising value of 90, on soil over 20 % organic matter.',
    };
  }
  if (bufferPh === null)
    return none('The buffer pH is not tested, so no rate is worked out. Ask for an SMP or Sikora buffer.', 'Tri-State');
  if (bufferMethod === null)
    return none('The buffer test is not named, so no rate is worked out. Say whether it is SMP or Sikora.', 'Tri-State');
  if (bufferMethod !== 'SMP' && bufferMethod !== 'Sikora') {
    return none(`${state} limes by the SMP or Sikora buffer; a ${bufferMethod} reading needs another calibration.`, 'Tri-State');
  }
  const limeTestIndex = 10 * bufferPh;
  const nothing = limeTestIndex > NO_LIME_INDEX || ph > NO_LIME_PH;
  return {
    tonsPerAcre: nothing ? 0 : triStateTons(limeTestIndex, target.ph),
    method: `Tri-State, lime test index ${limeTestIndex.toFixed(0)}`,
    source: TRI_STATE,
    note: nothing
      ? `Lime test index ${limeTestIndex.toFixed(0)}: none is recommended above 70.`
      : `Tons of lime with a neutralising value of 90, worked 8 in deep, to pH ${target.ph.toFixed(1)}.`,
  };
}

function byNorthCarolina(input: LimeInput, target: Target, none: None): LimeRecommendation {
  const method = 'North Carolina, Mehlich buffer acidity';
  if (input.bufferPh === null)
    return none('The buffer pH is not tested, so no rate is worked out. Ask for a Mehlich buffer.', method);
  if (input.bufferMethod !== 'Mehlich') {
    return none(
      `North Carolina limes by the Mehlich buffer; ${input.bufferMethod ?? 'an unnamed buffer'} needs another calibration.`,
      method,
    );
  }
  return {
    tonsPerAcre: northCarolinaTons(northCarolinaAcidity(input.bufferPh), input.ph, target.ph),
    method,
    source: 'NCDA&CS Agronomic Division, lime recommendation from exchangeable acidity',
    note: 'Tons of agricultural lime, without credit for lime put on before. Under 0.3 ton none is recommended.',
  };
}
