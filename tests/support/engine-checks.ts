import { expect } from 'vitest';

/** One number from outside the project against one that the engine computes. */
export interface PublishedCheck {
  /** What is compared, as an agronomist would say it. */
  name: string;
  source: string;
  /** The number as printed, or the range it is printed as. */
  published: number | readonly [from: number, to: number];
  computed: () => number;
  /** How far apart they may be: half a unit of the last printed figure, or what the source itself allows. */
  tolerance: number;
}

/** Compare, and say which number missed. */
export function expectPublished({ name, published, computed, tolerance }: PublishedCheck): void {
  const value = computed();
  const [from, to] = typeof published === 'number' ? [published, published] : published;
  expect(value, `${name}: computed ${value}, published ${published}`).toBeGreaterThanOrEqual(from - tolerance - 1e-12);
  expect(value, `${name}: computed ${value}, published ${published}`).toBeLessThanOrEqual(to + tolerance + 1e-12);
}
