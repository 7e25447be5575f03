import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { runHilum } from '@/scripts/commands/run';

const folder = mkdtempSync(join(tmpdir(), 'hilum-solve-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function file(content: unknown): string {
  const path = join(folder, `${Math.abs(JSON.stringify(content).length)}-${Math.random().toString(36).slice(2)}.json`);
  writeFileSync(path, typeof content === 'string' ? content : JSON.stringify(content));
  return path;
}

const PROBLEM = {
  fields: [
    { id: 'A', acres: 80, unitsPerAcre: 1 },
    { id: 'B', acres: 40, unitsPerAcre: 1 },
  ],
  varieties: [
    { id: 'X', units: 90 },
    { id: 'Y', units: 200 },
  ],
  value: [
    { field: 'A', variety: 'X', perAcre: 600 },
    { field: 'A', variety: 'Y', perAcre: 580 },
    { field: 'B', variety: 'X', perAcre: 590 },
    { field: 'B', variety: 'Y', perAcre: 560 },
  ],
};

describe('hilum solve', () => {
  test('answers with status, dollars, rows, what binds and what one more unit is worth', async () => {
    const result = await runHilum(['solve', file(PROBLEM)]);
    expect(result.exitCode).toBe(0);
    const answer = JSON.parse(result.stdout);
    // 80 ac of X and 40 ac of Y: 48,000 + 22,400; X on B instead: 46,400 + 23,600.
    expect(answer).toMatchObject({ status: 'optimal', objective: 70_400, gap: 0, binding: ['units of X'], relaxation: [] });
    expect(answer.rows).toEqual([
      { field: 'A', variety: 'X', acres: 80, units: 80 },
      { field: 'B', variety: 'Y', acres: 40, units: 40 },
    ]);
    expect(answer.shadow.X).toBeGreaterThan(0);
  });

  test('bad input ends with 2 and words on stderr, nothing on stdout', async () => {
    for (const [given, words] of [
      [['solve'], 'Name one problem file'],
      [['solve', join(folder, 'none.json')], 'there is no such file'],
      [['solve', file('{"fields":')], 'is not JSON'],
      [['solve', file({ ...PROBLEM, maxShare: 2 })], 'maxShare must be at most 1'],
      [['solve', file({ ...PROBLEM, fields: [{ id: 'A', acres: -1, unitsPerAcre: 1 }] })], 'acres must be above zero'],
      [['solve', file({ ...PROBLEM, stops: [{ field: 'C', variety: 'X' }] })], 'there is no field "C"'],
      [['solve', file(PROBLEM), '--quick'], 'Known options: --seconds'],
    ] as const) {
      const result = await runHilum([...given]);
      expect(result.exitCode, words).toBe(2);
      expect(result.stdout).toBe('');
      expect(result.stderr).toContain(words);
    }
  });
});
