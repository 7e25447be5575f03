/** One named number of the engine, with its range and why it is what it is. */
export interface Coefficient {
  value: number;
  /** Range a manager may set it to, and beyond which it is refused. */
  low: number;
  high: number;
  unit: string;
  /** What it does, in words. */
  does: string;
  /** Where it comes from, or why this value was chosen when no source gives one. */
  reason: string;
  /** May a manager change it on the rules page? */
  changeable: boolean;
}
