/** `npm run bench`: what the heart takes, against what it should take. One core; figures are medians. */
import { cpus } from 'node:os';
import type { Figure } from '../tests/bench/figure';
import { placementFigures } from '../tests/bench/placement';
import { surfaceFigures } from '../tests/bench/surfaces';

function line({ what, measured, unit, goal, note }: Figure): string {
  if (unit === '') return what;
  const digits = measured < 1 ? 3 : measured < 100 ? 2 : 0;
  const against =
    goal === null ? '' : `goal ${goal} ${unit}, ${(measured / goal).toFixed(2)} of it${measured > goal ? '  OVER' : ''}`;
  return [what.padEnd(82), `${measured.toFixed(digits)} ${unit}`.padStart(12), against, note ?? ''].join('  ').trimEnd();
}

console.log(`Node ${process.versions.node}, ${cpus()[0]?.model ?? 'unknown processor'}\n`);
for (const figures of [placementFigures, surfaceFigures]) {
  for (const figure of figures()) console.log(line(figure));
  console.log('');
}
