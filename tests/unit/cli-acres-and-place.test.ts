import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { runHilum } from '../../scripts/commands/run';

const folder = mkdtempSync(join(tmpdir(), 'hilum-place-'));
function file(name: string, text: string): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

/** A square of 0.005° by 0.004° as a GeoJSON feature. */
function aField(name: string | null, west: number, south: number) {
  const ring = [
    [west, south],
    [west + 0.005, south],
    [west + 0.005, south + 0.004],
    [west, south + 0.004],
    [west, south],
  ];
  return { type: 'Feature', properties: name === null ? {} : { name }, geometry: { type: 'Polygon', coordinates: [ring] } };
}
const collection = (...features: unknown[]) => JSON.stringify({ type: 'FeatureCollection', features });
const boundaries = file('fields.geojson', collection(aField('North', -93.6, 41.99), aField('South', -93.6, 41.98)));

const lineUp = file(
  'line-up.csv',
  `code,relativeMaturity,height,bushType,standability,emergence,phytophthoraGenes,phytophthora,suddenDeath,brownStemRot,whiteMould,frogeye,ironChlorosis,cystNematodeSource,tolerances,seedsPerLb,germination,unitsOnHand,release
A24,2.4,medium,bushy,7,7,1k,6,6,5,5,5,6,PI 88788,glyphosate;dicamba,2800,92,100,full
B27,2.7,short,upright,8,8,1c;3a,7,7,6,6,5,5,Peking,glyphosate;glufosinate,2700,90,50,full
C25,2.5,tall,medium,6,6,,5,5,5,5,5,5,none,,2600,90,0,full
D26,2.6,,,,,,,,,,,,,glyphosate,,,,test
E28,2.8,,,,,,,,,,,,,glyphosate,,,,limited
F00,,,,,,,,,,,,,,glyphosate,,,,full
`,
);
const factsHeader =
  'field,rowWidthInches,drainage,tiled,irrigated,lastCrop,plantingDate,yieldGoal,probeDepthInches,eggsPer100cc,whiteMouldHistory,weedProgramme,mustBeOffBy';
const facts = file('facts.csv', `${factsHeader}\nNorth,30,somewhat poorly,yes,no,corn,2027-05-08,62,10,2000,no,glyphosate,\n`);

/** 25 points over North with pH from 5.4 to 7.4, and one in neither field. */
function soilCsv(header = 'Sample ID,Latitude,Longitude,Water pH,SMP Buffer pH,OM %,CEC') {
  const rows = Array.from(
    { length: 25 },
    (_, i) =>
      `${i + 1},${41.9904 + Math.floor(i / 5) * 0.0008},${-93.5996 + (i % 5) * 0.001},${(5.4 + (i % 5) * 0.5).toFixed(1)},6.6,3.1,18`,
  );
  return `${header}\n${rows.join('\n')}\n26,41.9,-93.7,6.0,6.8,3,18\n`;
}
const soil = file('soil.csv', soilCsv());

interface Pick {
  code: string;
  expected: number;
  low: number;
  high: number;
  ledger: { factor: string; bushels: number; reason: string; source: string }[];
}
interface Placed {
  engineVersion: string;
  fields: {
    name: string;
    acres: number;
    potential: number;
    picks: Pick[];
    stopped: { code: string; reason: string }[];
    fixFirst: { factor: string }[];
  }[];
}
const place = ['place', '--boundaries', boundaries, '--line-up', lineUp];
async function placed(...more: string[]): Promise<Placed> {
  const result = await runHilum([...place, ...more]);
  expect(result.exitCode, result.stderr).toBe(0);
  return JSON.parse(result.stdout);
}

describe('hilum acres', () => {
  test('half a mile square at 41° N is 160 acres on the ellipsoid', async () => {
    // 804.672 m a side, by the ellipsoid's metres per degree at 41° N (84,137 east and 111,049 north).
    const [east, north] = [804.672 / 84_137.4, 804.672 / 111_048.6];
    const ring = [
      [-93, 41],
      [-93 + east, 41],
      [-93 + east, 41 + north],
      [-93, 41 + north],
      [-93, 41],
    ];
    const quarter = file('quarter.geojson', JSON.stringify({ type: 'Polygon', coordinates: [ring] }));
    const { features } = JSON.parse((await runHilum(['acres', quarter])).stdout);
    expect(Math.abs(features[0].acres - 160)).toBeLessThan(0.05);
  });

  test('prints each field with its name, acres and problems', async () => {
    const result = await runHilum(['acres', boundaries]);
    expect(result).toMatchObject({ exitCode: 0, stderr: '' });
    const { features, problems } = JSON.parse(result.stdout);
    expect(features.map((one: { name: string }) => one.name)).toEqual(['North', 'South']);
    expect(Object.keys(features[0])).toEqual(['name', 'acres', 'problems']);
    expect(features[0].acres).toBeCloseTo(45.49, 1);
    expect(problems).toEqual([]);
  });

  test.each([
    ['something that is no boundary', file('notes.txt', 'hello'), 'notes.txt'],
    ['an empty file', file('empty.geojson', ''), 'empty'],
    ['a broken GeoJSON', file('broken.geojson', '{"type":"Feature",'), ''],
  ])('%s ends with exit code 2, words on stderr and an empty list', async (_, path, words) => {
    const result = await runHilum(['acres', path]);
    expect(result.exitCode).toBe(2);
    expect(result.stderr.length).toBeGreaterThan(10);
    expect(result.stderr).toContain(words);
    expect(JSON.parse(result.stdout).features).toEqual([]);
  });

  test('no file at all is refused', async () => {
    expect(await runHilum(['acres'])).toMatchObject({ exitCode: 2, stdout: '' });
  });
});

describe('hilum place', () => {
  test('prints picks best first, and ledgers that sum to what is expected within 0.05 bu', async () => {
    const { engineVersion, fields } = await placed('--facts', facts, '--soil', soil);
    expect(engineVersion).toMatch(/^\d+\.\d+/);
    expect(fields.map((one) => one.name)).toEqual(['North', 'South']);
    for (const field of fields) {
      expect(field.picks.length).toBeGreaterThan(0);
      const expected = field.picks.map((pick) => pick.expected);
      expect([...expected].sort((a, b) => b - a)).toEqual(expected);
      for (const pick of field.picks) {
        expect(Math.abs(field.potential + pick.ledger.reduce((sum, line) => sum + line.bushels, 0) - pick.expected)).toBeLessThan(
          0.05,
        );
        expect(pick.low).toBeLessThanOrEqual(pick.expected);
        expect(pick.high).toBeGreaterThanOrEqual(pick.expected);
        for (const line of pick.ledger) {
          expect(line.reason.length).toBeGreaterThan(3);
          expect(line.source.length).toBeGreaterThan(3);
        }
      }
    }
  });

  test('keeps sold out, test and conventional varieties off the picks, with reasons', async () => {
    const { fields } = await placed('--facts', facts);
    const north = fields[0]!;
    const stopped = Object.fromEntries(north.stopped.map(({ code, reason }) => [code, reason]));
    expect(Object.keys(stopped).sort()).toEqual(['C25', 'D26', 'F00']);
    expect(stopped.F00).toContain('maturity');
    expect(north.picks.map((pick) => pick.code).sort()).toEqual(['A24', 'B27', 'E28']);
  });

  test('soil tests change the field they lie in and no other; lost points are named', async () => {
    const without = await placed('--facts', facts);
    const result = await runHilum([...place, '--facts', facts, '--soil', soil]);
    const withSoil: Placed = JSON.parse(result.stdout);
    const reason = (answer: Placed, index: number) =>
      answer.fields[index]!.picks[0]!.ledger.find((line) => line.factor === 'soil-ph')?.reason;
    expect(reason(without, 0)).toContain('not tested');
    expect(reason(withSoil, 0)).toContain('pH');
    expect(reason(withSoil, 0)).not.toContain('not tested');
    expect(reason(withSoil, 1)).toContain('not tested');
    expect(result.stderr).toContain('1 of 26 samples lie in no field (row 27)');
    expect(withSoil.fields[0]!.fixFirst.length).toBeGreaterThan(0);
  });

  test('title lines above a laboratory’s header are passed over', async () => {
    const titled = file('titled.csv', `Valley Soil Laboratory\n"Report 12, spring"\n\n${soilCsv()}`);
    const result = await runHilum([...place, '--facts', facts, '--soil', titled]);
    expect(result.exitCode, result.stderr).toBe(0);
    expect(result.stderr).toContain('1 of 26 samples lie in no field (row 30)');
  });

  test('soil tests without pH leave it unknown, and that is said', async () => {
    const potash = file('noph.csv', 'id,lat,lon,K\n1,41.992,-93.598,150\n');
    const result = await runHilum([...place, '--facts', facts, '--soil', potash]);
    expect(result.exitCode, result.stderr).toBe(0);
    expect(result.stderr).toContain('no sample has a water pH');
  });

  test('a field far from any climate station is said to be', async () => {
    const far = file('far.geojson', collection(aField('Far', -120.5, 51)));
    const result = await runHilum(['place', '--boundaries', far, '--line-up', lineUp]);
    expect(result.stderr).toContain('nearest climate station');
  });

  test('the same input gives the same bytes, and the order of the line-up does not matter', async () => {
    const first = (await runHilum([...place, '--facts', facts])).stdout;
    expect((await runHilum([...place, '--facts', facts])).stdout).toBe(first);
    const [header, ...rows] = (await import('node:fs')).readFileSync(lineUp, 'utf8').trim().split('\n');
    const turned = file('turned.csv', [header, ...rows.reverse()].join('\n'));
    const other = JSON.parse(
      (await runHilum(['place', '--boundaries', boundaries, '--line-up', turned, '--facts', facts])).stdout,
    );
    expect(other.fields[0].picks).toEqual(JSON.parse(first).fields[0].picks);
  });

  test('--top keeps that many picks, and a column may hold nothing but codes and maturities', async () => {
    expect((await placed('--top', '1')).fields[0]!.picks.length).toBe(1);
    const bare = file('bare.csv', 'code,relativeMaturity\nX,2.5\n');
    const result = await runHilum(['place', '--boundaries', boundaries, '--line-up', bare, '--season', '2028']);
    expect(JSON.parse(result.stdout).fields[1].picks[0].code).toBe('X');
  });

  test('facts of a field that is not there are not silently dropped', async () => {
    const stray = file('stray.csv', `${factsHeader}\nWest forty,30,well,no,no,corn,2027-05-08,60,,,,none,\n`);
    const result = await runHilum([...place, '--facts', stray]);
    expect(result.exitCode).toBe(0);
    expect(result.stderr).toContain('West forty');
    expect(result.stderr).toContain('North, South');
  });

  const badFact = (cells: string) => file(`bad-${cells.replace(/\W/g, '')}.csv`, `${factsHeader}\nNorth,${cells}\n`);
  test.each([
    ['an unknown drainage class', ['--facts', badFact('30,soggy,,,,,,,,,,')], 'somewhat poorly'],
    ['a yes that is maybe', ['--facts', badFact('30,well,maybe,,,,,,,,,')], 'yes, no'],
    ['an unknown tolerance', ['--facts', badFact('30,well,,,,,,,,,paraquat,')], 'isoxaflutole'],
    ['a row width in feet and inches', ['--facts', badFact('2 ft,,,,,,,,,,,')], 'inches'],
    ['a date that is none', ['--facts', badFact(',,,,,May 8,,,,,,')], 'YYYY-MM-DD'],
    ['a planting date of another season', ['--facts', facts, '--season', '2030'], '2027-05-08'],
    ['an unknown column', ['--facts', file('column.csv', 'field,soilColour\nNorth,black\n')], 'rowWidthInches'],
    ['a first column that is not field', ['--facts', file('first.csv', 'name,tiled\nNorth,yes\n')], 'must be field'],
    ['a field that stands twice', ['--facts', file('twice.csv', 'field,tiled\nNorth,yes\nnorth,no\n')], 'twice'],
    ['a pH of 65', ['--soil', file('ph65.csv', 'id,lat,lon,ph\n1,41.992,-93.598,65\n')], 'ow 2'],
    ['a stray quote', ['--soil', file('quote.csv', 'id,lat,lon,ph\n1,"41.992,-93.598,6\n')], 'quot'],
    ['half a pick', ['--top', '1.5'], 'whole number'],
    ['a stray word', ['fields.zip'], '--boundaries'],
  ])('%s is refused with exit code 2 and the known words', async (_, more, words) => {
    const result = await runHilum([...place, ...(more as string[])]);
    expect(result.exitCode).toBe(2);
    expect(result.stdout).toBe('');
    expect(result.stderr).toContain(words);
  });

  test.each([
    ['height', 'code,relativeMaturity,height\nA,2.4,dwarf\n', 'short, medium, tall'],
    ['bushType', 'code,relativeMaturity,bushType\nA,2.4,viny\n', 'upright, medium, bushy'],
    ['release', 'code,relativeMaturity,release\nA,2.4,soon\n', 'full, limited, test'],
    ['cystNematodeSource', 'code,relativeMaturity,cystNematodeSource\nA,2.4,PI 1\n', 'PI 88788'],
    ['standability', 'code,relativeMaturity,standability\nA,2.4,10\n', '9'],
    ['no variety', 'code,relativeMaturity\n', 'no variety'],
  ])('a line-up with a bad %s is refused with the known words', async (name, text, words) => {
    const result = await runHilum(['place', '--boundaries', boundaries, '--line-up', file(`line-up-${name}.csv`, text)]);
    expect(result.exitCode).toBe(2);
    expect(result.stderr).toContain(words);
  });
});
