import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { runHilum } from '../../scripts/commands/run';

const folder = mkdtempSync(join(tmpdir(), 'hilum-soil-'));
function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

describe('hilum soil', () => {
  test('prints every sample in one shape, null where the laboratory measured nothing', async () => {
    const path = file(
      'lab.csv',
      'Sample ID,Latitude,Longitude,pH,SMP Buffer pH,OM %,CEC\n7,42.01,-93.5,6.1,6.7,3.2,18\n8,42.02,-93.5,6.4,n/a,3.0,\n',
    );
    const result = await runHilum(['soil', path]);
    expect(result.exitCode, result.stderr).toBe(0);
    const answer = JSON.parse(result.stdout);
    expect(Object.keys(answer)).toEqual(['format', 'laboratory', 'samples', 'notes', 'problems']);
    expect(Object.keys(answer.samples[0])).toEqual([
      'id',
      'depthInches',
      'ph',
      'saltPh',
      'bufferPh',
      'bufferMethod',
      'organicMatterPercent',
      'cec',
      'phosphorusPpm',
      'potassiumPpm',
      'longitude',
      'latitude',
    ]);
    expect(answer.samples[0]).toMatchObject({
      id: '7',
      ph: 6.1,
      bufferPh: 6.7,
      bufferMethod: 'SMP',
      cec: 18,
      longitude: -93.5,
      latitude: 42.01,
      saltPh: null,
    });
    expect(answer.samples[1]).toMatchObject({ id: '8', ph: 6.4, bufferPh: null, cec: null });
  });

  test('joins results without places to points without results by sample number', async () => {
    const results = file('results.csv', 'Sample ID,pH,OM\n1,6.0,3\n2,6.5,3\n');
    const points = file('points.csv', 'Sample ID,Latitude,Longitude\n1,42.01,-93.5\n2,42.02,-93.5\n');
    const { samples } = JSON.parse((await runHilum(['soil', results, points])).stdout);
    expect(samples.map((one: { id: string; ph: number; latitude: number }) => [one.id, one.ph, one.latitude])).toEqual([
      ['1', 6, 42.01],
      ['2', 6.5, 42.02],
    ]);
  });

  test.each([
    ['a file that holds no soil tests', [file('words.bin', 'hello')]],
    ['an empty file', [file('empty.csv', '')]],
  ])('%s ends with exit code 2, words on stderr and an empty list', async (_, paths) => {
    const result = await runHilum(['soil', ...paths]);
    expect(result.exitCode).toBe(2);
    expect(result.stderr.length).toBeGreaterThan(10);
    expect(JSON.parse(result.stdout).samples).toEqual([]);
  });

  test('no file, or one that is not there, is refused', async () => {
    expect((await runHilum(['soil'])).exitCode).toBe(2);
    expect((await runHilum(['soil', join(folder, 'nowhere.csv')])).stderr).toContain('no such file');
  });
});
