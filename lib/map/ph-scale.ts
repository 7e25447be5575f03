export interface PhClass {
  from: number;
  to: number;
  color: string;
  label: string;
  words: string;
}

/** pH on maps and tables: warm below the sweet spot, green in it, violet above; safe for colour-blind readers. */
export const PH_SCALE: readonly PhClass[] = [
  { from: Number.NEGATIVE_INFINITY, to: 5.5, color: '#c9622f', label: '<5.5', words: 'very acid' },
  { from: 5.5, to: 6.0, color: '#dc9147', label: '5.5–6.0', words: 'acid' },
  { from: 6.0, to: 6.3, color: '#d9b968', label: '6.0–6.3', words: 'a little low' },
  { from: 6.3, to: 6.5, color: '#4c8256', label: '6.3–6.5', words: 'sweet spot' },
  { from: 6.5, to: 7.0, color: '#93b795', label: '6.5–7.0', words: 'good' },
  { from: 7.0, to: 7.4, color: '#b8a6d9', label: '7.0–7.4', words: 'a little high' },
  { from: 7.4, to: Number.POSITIVE_INFINITY, color: '#8464b5', label: '>7.4', words: 'alkaline' },
];

/** The class of a pH. */
export function phClass(ph: number): PhClass {
  return PH_SCALE.find((one) => ph >= one.from && ph < one.to) ?? (PH_SCALE.at(-1) as PhClass);
}
