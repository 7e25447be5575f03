/** Soil reaction classes: what a pH is called. */

const CLASSES: { from: number; name: string }[] = [
  { from: 9.1, name: 'very strongly alkaline' },
  { from: 8.5, name: 'strongly alkaline' },
  { from: 7.9, name: 'moderately alkaline' },
  { from: 7.4, name: 'slightly alkaline' },
  { from: 6.6, name: 'neutral' },
  { from: 6.1, name: 'slightly acid' },
  { from: 5.6, name: 'moderately acid' },
  { from: 5.1, name: 'strongly acid' },
  { from: 4.5, name: 'very strongly acid' },
  { from: 3.5, name: 'extremely acid' },
  { from: -Infinity, name: 'ultra acid' },
];

/**
 * The class of a water pH, which is rounded to a tenth first as the classes are printed.
 * Source: USDA Soil Survey Manual, reaction classes, as in the SSSA Glossary of Soil Science Terms (the two most acid from
 * memory). Throws RangeError outside 0…14.
 */
export function reactionClass(ph: number): string {
  if (!(ph >= 0 && ph <= 14)) throw new RangeError(`No such pH: ${ph}`);
  const rounded = Math.round(ph * 10 + 1e-9) / 10;
  return (CLASSES.find((one) => rounded >= one.from) as (typeof CLASSES)[number]).name;
}
