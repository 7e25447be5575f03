import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { COEFFICIENT_NAMES, COEFFICIENTS } from '@/features/placement/engine/coefficients';
import { FACTORS } from '@/features/placement/engine/factors/index';

const manual = readFileSync('features/placement/ENGINE.md', 'utf8');

describe('the engine’s manual says what the engine does', () => {
  test.each(COEFFICIENT_NAMES)('%s stands in its table with value, range and reason', (name) => {
    const { value, low, high, unit, does, reason, changeable } = COEFFICIENTS[name];
    expect(manual).toContain(
      `| ${name} | ${value} | ${low} to ${high} | ${unit} | ${changeable ? 'yes' : 'no'} | ${does} | ${reason} |`,
    );
  });

  test('its table holds nothing that the engine does not', () => {
    const rows = manual.split('\n').filter((line) => /^\| \w+ \| [-\d.]+ \|/.test(line));
    expect(rows).toHaveLength(COEFFICIENT_NAMES.length);
  });

  test.each(FACTORS.map((factor) => factor.label))('%s has its chapter', (label) => {
    expect(manual).toContain(`\n### ${label}\n`);
  });

  test('the chapters stand in ledger order', () => {
    const chapters = [...manual.matchAll(/^### (.+)$/gm)].map((match) => match[1]);
    expect(chapters).toEqual(FACTORS.map((factor) => factor.label));
  });
});
