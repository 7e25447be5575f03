/** A field as it would be with other facts: the screens' what-if, and the remedies that fix first and explain try. */
import type { FieldProfile, IsoDate } from './model';

/** Facts a person may turn over on the field page. */
export type WhatIf = Partial<Pick<FieldProfile, 'plantingDate' | 'rowWidthInches' | 'populationSeedsPerAcre'>>;

/** A new profile with some facts changed; the given one stays as it was. */
export function withFacts(field: FieldProfile, facts: WhatIf): FieldProfile {
  return { ...field, ...facts };
}

/** The field after lime: every part below `below` (the target itself when not given) brought to the target. */
export function withLime(field: FieldProfile, targetPh: number, below = targetPh): FieldProfile {
  if (!field.phShares) return field;
  return {
    ...field,
    phShares: field.phShares.map((one) => (one.value < below ? { value: Math.max(one.value, targetPh), share: one.share } : one)),
  };
}

/** The field with tile in it. */
export function withTile(field: FieldProfile): FieldProfile {
  return { ...field, tiled: true };
}

/** The field with its tight layer opened. */
export function withoutLayer(field: FieldProfile): FieldProfile {
  return { ...field, probeDepthInches: 12, penetrometerPsi: null };
}

const DAY_MILLISECONDS = 86_400_000;

/** An ISO date a number of days later (or earlier, when negative); fractions are rounded. */
export function shiftedDate(date: IsoDate, days: number): IsoDate {
  return new Date(Date.parse(`${date}T00:00:00Z`) + Math.round(days) * DAY_MILLISECONDS).toISOString().slice(0, 10);
}

/** Whole days from one ISO date to another; negative when the second comes first. */
export function daysBetween(from: IsoDate, to: IsoDate): number {
  return Math.round((Date.parse(`${to}T00:00:00Z`) - Date.parse(`${from}T00:00:00Z`)) / DAY_MILLISECONDS);
}
