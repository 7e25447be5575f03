import { execFileSync } from 'node:child_process';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { isoDateOfDay } from '@/lib/dates';
import { runHilum } from '../../scripts/commands/run';

const folder = mkdtempSync(join(tmpdir(), 'hilum-cli-'));
function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}
const run = (line: string[]) => runHilum(line);
const ames = ['season-line', '--lat', '41.992', '--lon', '-93.622', '--rm', '2.5', '--planted', '2027-05-05'];
const meuse = ['surface', 'tests/published/data/meuse.csv', '--x', 'x', '--y', 'y', '--value', 'zinc', '--log', '--planar'];

describe('hilum at the command line', () => {
  test('as a process: JSON on stdout, exit code 0', () => {
    const out = execFileSync('node', ['--import', 'tsx', 'scripts/hilum.ts', ...ames], { encoding: 'utf8' });
    expect(JSON.parse(out).r7).toMatch(/^2027-09-/);
  });

  test('lists its commands, and explains each with --help', async () => {
    expect((await run(['--help'])).stdout).toContain('season-line');
    const help = await run(['surface', '--help']);
    expect(help).toMatchObject({ exitCode: 0, stderr: '' });
    expect(help.stdout).toContain('--psill');
  });

  test.each([[[]], [['seasonline']], [['constructor']]])('%j is refused with the list of commands', async (line) => {
    const result = await run(line);
    expect(result.exitCode).toBe(2);
    expect(result.stdout).toBe('');
    expect(result.stderr).toContain('season-line');
  });
});

describe('hilum season-line', () => {
  test('prints stages, freeze and stations', async () => {
    const { exitCode, stdout, stderr } = await run(ames);
    expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
    const line = JSON.parse(stdout);
    expect(Object.keys(line)).toEqual(['ve', 'r1', 'r3', 'r5', 'r6', 'r7', 'r8', 'freeze', 'stations']);
    expect(Object.keys(line.freeze)).toEqual(['medianDate', 'chanceBeforeR7', 'expectedLossFraction']);
    expect(line.freeze.medianDate).toBe('2027-10-19');
  });

  test('published parameters give Ames, row 2, its published R7 within two days', async () => {
    const line = JSON.parse((await run([...ames, '--parameters', 'published'])).stdout);
    expect(['2027-09-03', '2027-09-04', '2027-09-05', '2027-09-06', '2027-09-07']).toContain(line.r7);
  });

  test('a field 2,000 ft higher ripens later', async () => {
    const low = JSON.parse((await run([...ames, '--elevation-ft', '930'])).stdout);
    const high = JSON.parse((await run([...ames, '--elevation-ft=2930'])).stdout);
    expect(high.r7 > low.r7).toBe(true);
  });

  test('runs on the weather of a year', async () => {
    const days = Array.from({ length: 365 }, (_, i) => `${isoDateOfDay(2027, i + 1)},${i > 290 ? 5 : 28},${i > 290 ? -6 : 16}`);
    const weather = file('weather.csv', `date,tmaxC,tminC\n${days.join('\n')}\n`);
    const result = await run([...ames, '--weather', weather]);
    expect(result.exitCode).toBe(0);
    expect(JSON.parse(result.stdout).freeze.medianDate).toBe('2027-10-19');
    expect(result.stderr).toContain('First day at or below 28 °F');
  });

  test.each([
    [
      'a latitude that is no number',
      ['season-line', '--lat', 'north', '--lon', '-93', '--rm', '2', '--planted', '2027-05-01'],
      '--lat',
    ],
    [
      'a missing minus sign',
      ['season-line', '--lat', '41', '--lon', '93', '--rm', '2', '--planted', '2027-05-01'],
      'west are negative',
    ],
    ['a maturity that is none', [...ames, '--rm', 'early'], '--rm'],
    ['a date that is none', [...ames, '--planted', '2027-02-30'], 'YYYY-MM-DD'],
    ['planting in winter', [...ames, '--planted', '2027-01-05'], 'March to August'],
    ['unknown parameters', [...ames, '--parameters', 'modern'], 'published, current'],
    ['an unknown option', [...ames, '--maturity', '2'], '--parameters'],
    ['a weather file that is not there', [...ames, '--weather', 'nowhere.csv'], 'no such file'],
    [
      'weather of another year',
      [
        ...ames,
        '--weather',
        file(
          'old.csv',
          `date,tmaxC,tminC\n${Array.from({ length: 40 }, (_, i) => `${isoDateOfDay(2020, i + 100)},20,10`).join('\n')}`,
        ),
      ],
      '2020',
    ],
    ['weather with a bad row', [...ames, '--weather', file('bad.csv', 'date,tmaxC,tminC\n2027-05-01,20,x')], 'Row 2'],
    ['no planting date', ames.slice(0, 7), '--planted'],
  ])('%s is refused with exit code 2 and words', async (_, line, words) => {
    const result = await run(line as string[]);
    expect(result.exitCode).toBe(2);
    expect(result.stdout).toBe('');
    expect(result.stderr).toContain(words);
  });
});

describe('hilum surface', () => {
  test('kriges the Meuse data with the given variogram as gstat does', async () => {
    const result = await run([
      ...meuse,
      '--model',
      'spherical',
      '--nugget',
      '0.05',
      '--psill',
      '0.59',
      '--range',
      '897',
      '--at',
      '178605,329714;181390,333260',
    ]);
    const answer = JSON.parse(result.stdout);
    expect(answer.method).toBe('kriging');
    expect(answer.leaveOneOutRmse).toBeCloseTo(0.39175, 5);
    expect(answer.at[0].mean).toBeCloseTo(6.427546, 5);
    expect(answer.at[0].variance).toBeCloseTo(0.4034129, 6);
    expect(answer.at[1]).toMatchObject({ x: 181390, y: 333260, variance: 0 });
  });

  test('fits the model it is asked for', async () => {
    const { variogram } = JSON.parse((await run([...meuse, '--model', 'spherical'])).stdout);
    expect(variogram.model).toBe('spherical');
    expect(Math.abs(variogram.range / 897 - 1)).toBeLessThan(0.02);
  });

  test('weights by inverse distance when asked', async () => {
    const answer = JSON.parse((await run([...meuse, '--method', 'idw', '--at', '178605,329714'])).stdout);
    expect(answer).toMatchObject({ method: 'idw', variogram: null });
    expect(answer.at[0].mean).toBeCloseTo(6.065715, 5);
    expect(answer.at[0].variance).toBeNull();
  });

  test('takes degrees unless told otherwise, west negative in --at too', async () => {
    const lines = Array.from(
      { length: 9 },
      (_, i) => `${-93.5 + (i % 3) * 0.001},${41 + Math.floor(i / 3) * 0.001},${6 + i * 0.1}`,
    );
    const points = file('degrees.csv', `lon,lat,ph\n${lines.join('\n')}`);
    const result = await run(['surface', points, '--x', 'lon', '--y', 'lat', '--value', 'ph', '--at', '-93.499,41.001']);
    expect(JSON.parse(result.stdout).at[0].mean).toBeCloseTo(6.4, 9);
  });

  test.each([
    ['a column that is not there', ['surface', meuse[1]!, '--x', 'lon', '--y', 'y', '--value', 'zinc'], 'x, y, zinc'],
    ['metres taken for degrees', ['surface', meuse[1]!, '--x', 'x', '--y', 'y', '--value', 'zinc'], '--planar'],
    ['half a variogram', [...meuse, '--model', 'spherical', '--nugget', '0.1'], '--psill'],
    ['an unknown model', [...meuse, '--model', 'gaussian'], 'spherical, exponential'],
    ['a place that is none', [...meuse, '--at', '1,2,3'], '--at'],
    ['a blank value', ['surface', file('blank.csv', 'x,y,v\n0,0,1\n1,1,'), '--x', 'x', '--y', 'y', '--value', 'v'], 'Row 3'],
    [
      'the logarithm of zero',
      ['surface', file('zero.csv', 'x,y,v\n0,0,1\n1,1,0'), '--x', 'x', '--y', 'y', '--value', 'v', '--log'],
      'Row 3',
    ],
    ['a file with a header alone', ['surface', file('none.csv', 'x,y,v\n'), '--x', 'x', '--y', 'y', '--value', 'v'], 'no points'],
    [
      'kriging of equal values',
      ['surface', file('flat.csv', 'x,y,v\n0,0,1\n1,1,1\n1,0,1'), '--x', 'x', '--y', 'y', '--value', 'v', '--method', 'kriging'],
      'cannot be kriged',
    ],
    ['no file', ['surface', '--x', 'x'], 'Name one CSV'],
  ])('%s is refused with exit code 2 and words', async (_, line, words) => {
    const result = await run(line as string[]);
    expect(result.exitCode).toBe(2);
    expect(result.stderr).toContain(words);
  });
});
