import { execFileSync, spawnSync } from 'node:child_process';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import ExcelJS from 'exceljs';
import { XMLParser, XMLValidator } from 'fast-xml-parser';
import { describe, expect, test } from 'vitest';
import { EXPORT_FORMATS } from '@/features/plans/exports/formats';
import { writeExport } from '@/features/plans/exports/write';
import type { PlanView } from '@/features/plans/model';
import { aBoundary, aLine, aPlanView } from '../support/plan-view';

const OUTPUT = join('build', 'exports');
mkdirSync(OUTPUT, { recursive: true });
const NAMES = ['Home 80', 'Mill Bottom', 'Slough, west', 'East 40', 'Depot', 'Creek Bend', 'Church', 'North 60', 'Long quarter'];

function aBigPlan(): PlanView {
  return aPlanView(
    NAMES.map((fieldName, index) =>
      aLine({
        fieldName,
        farmName: index < 5 ? 'Home farm' : 'Mill farm',
        areaAcres: 20 + index * 13.7,
        code: index % 3 === 0 ? 'CR 26' : 'CR 24',
        geometry: aBoundary(-93.5 + index * 0.02, 42.5, 0.004 + 0.002 * index),
        note: index === 2 ? 'Plant last, wet corner.' : null,
        ...(index === 3 ? { variety: null, lot: null, assessment: null, caution: 'needs soil tests' } : {}),
      }),
    ),
  );
}

function has(program: string): boolean {
  return spawnSync('which', [program]).status === 0;
}

async function written(format: Parameters<typeof writeExport>[0], ending: string, dealershipSide = true): Promise<string> {
  const bytes = await writeExport(format, aBigPlan(), { dealershipSide, madeOn: '2027-03-04' });
  const file = join(OUTPUT, `plan.${ending}`);
  writeFileSync(file, bytes);
  return file;
}

describe('the PDF', () => {
  test.skipIf(!has('pdftotext'))('reads as text: every field, rate, lot and unit, and the cautions on every page', async () => {
    const file = await written('pdf', 'pdf');
    const pages = execFileSync('pdftotext', ['-layout', file, '-'], { encoding: 'utf8' }).split('\f').filter(Boolean);
    expect(pages.length).toBeGreaterThanOrEqual(3);
    for (const page of pages) {
      const flat = page.replace(/\s+/g, ' ');
      expect(flat).toContain('not a promise of yield');
      expect(flat).toContain('not for food, feed or oil');
    }
    const all = pages.join(' ').replace(/\s+/g, ' ');
    for (const name of NAMES) expect(all).toContain(name);
    for (const words of ['140,000', 'CR 24-71', '15 in', '4.02', '58.2 bu/ac expected', 'Plant last, wet corner.', 'Soil pH']) {
      expect(all).toContain(words);
    }
    expect(all).toContain('agreed by Ada Holt');
    expect(all).not.toMatch(/\$|price/i);
  });

  test.skipIf(!has('pdftotext'))('for the cab has what the crew needs in large type, and neither yield nor price', async () => {
    const text = execFileSync('pdftotext', ['-layout', await written('cab', 'cab.pdf'), '-'], { encoding: 'utf8' });
    const flat = text.replace(/\s+/g, ' ');
    for (const words of ['Home 80', '140,000', 'CR 24-71', '4.02', 'Bags to carry', 'not for food, feed or oil']) {
      expect(flat).toContain(words);
    }
    expect(flat).not.toMatch(/expected|\$|58\.2/);
  });

  test.skipIf(!has('pdffonts'))('carries its own fonts in their right weights', async () => {
    const fonts = execFileSync('pdffonts', [await written('pdf', 'pdf')], { encoding: 'utf8' });
    expect(fonts).toMatch(/PublicSans-Regular/);
    expect(fonts).toMatch(/PublicSans-Bold/);
    expect(fonts).toMatch(/BricolageGrotesque/);
    expect(fonts).not.toMatch(/Thin|Helvetica/);
  });
});

describe('the shapefile and the GeoJSON', () => {
  test.skipIf(!has('ogrinfo'))(
    'open in GDAL: polygons in WGS84 with their attributes, none longer than ten characters',
    async () => {
      const file = await written('shp', 'shp.zip');
      const info = execFileSync('ogrinfo', ['-al', '-so', `/vsizip/${file}`], { encoding: 'utf8' });
      expect(info).toContain('Geometry: Polygon');
      expect(info).toContain('Feature Count: 8');
      expect(info).toMatch(/WGS 84|WGS_1984/);
      expect(info).toMatch(/SEEDS_AC: Integer/);
      expect(info).toMatch(/UNITS: Real \(12\.2\)/);
      const names = [...info.matchAll(/^(\w+): (?:String|Integer|Real)/gm)].map((match) => match[1] as string);
      expect(names).toHaveLength(12);
      expect(names.every((name) => name.length <= 10)).toBe(true);
      const geojson = JSON.parse(
        execFileSync('ogr2ogr', ['-f', 'GeoJSON', '/vsistdout/', `/vsizip/${file}`], { encoding: 'utf8' }),
      ) as { features: { properties: Record<string, unknown>; geometry: { coordinates: number[][][] } }[] };
      const own = JSON.parse(readFileSync(await written('geojson', 'geojson'), 'utf8')) as typeof geojson;
      expect(geojson.features.map((feature) => feature.properties)).toEqual(
        own.features.map((feature) => ({ ...feature.properties, PART: null })),
      );
      const corners = (feature: (typeof geojson.features)[number]) =>
        feature.geometry.coordinates[0]?.map((point) => point.map((one) => one.toFixed(9)).join(' ')).sort();
      expect(geojson.features.map(corners)).toEqual(own.features.map(corners));
    },
  );

  test.skipIf(!has('ogrinfo'))('a hole stays a hole, whichever way its ring was drawn', async () => {
    const { planShapefile } = await import('@/features/plans/exports/shapefile');
    const outer = aBoundary(-93.5, 42.5, 0.01, 0.01).coordinates[0] as number[][];
    const hole = aBoundary(-93.498, 42.502, 0.002, 0.002).coordinates[0] as number[][];
    for (const [name, rings] of [
      ['hole-a', [outer, hole]],
      ['hole-b', [[...outer].reverse(), [...hole].reverse()]],
    ] as const) {
      const file = join(OUTPUT, `${name}.zip`);
      writeFileSync(
        file,
        planShapefile(
          aPlanView([aLine({ geometry: { type: 'Polygon', coordinates: [...rings] as number[][][] } })]),
          '2027-03-04',
        ),
      );
      const read = JSON.parse(execFileSync('ogr2ogr', ['-f', 'GeoJSON', '/vsistdout/', `/vsizip/${file}`], { encoding: 'utf8' }));
      expect(read.features[0].geometry.type).toBe('Polygon');
      expect(read.features[0].geometry.coordinates).toHaveLength(2);
    }
  });
});

describe('the workbook', () => {
  test('has real numbers, formulas that sum the column, and no price for a grower', async () => {
    const workbook = new ExcelJS.Workbook();
    await workbook.xlsx.readFile(await written('xlsx', 'xlsx'));
    const sheet = workbook.getWorksheet('Plan') as ExcelJS.Worksheet;
    const heads = (sheet.getRow(2).values as string[]).slice(1);
    expect(heads).toContain('Seed, $');
    const acres = heads.indexOf('Acres') + 1;
    expect(sheet.getRow(3).getCell(acres).value).toBe(20);
    expect(sheet.getRow(12).getCell(acres).value).toMatchObject({ formula: 'SUM(C3:C11)', result: expect.closeTo(673.2, 6) });
    const lots = workbook.getWorksheet('Seed to load') as ExcelJS.Worksheet;
    expect(lots.getRow(2).getCell(5).value).toMatchObject({ formula: 'ROUNDUP(D2,0)' });

    const grower = new ExcelJS.Workbook();
    await grower.xlsx.readFile(await written('xlsx', 'grower.xlsx', false));
    expect(grower.getWorksheet('Plan')?.getRow(2).values).not.toContain('Seed, $');
  });
});

describe('the task file', () => {
  test('is well-formed version 4 with one planned task a field, its boundary, product and rate', async () => {
    const { taskDataXml } = await import('@/features/plans/exports/isoxml');
    const xml = taskDataXml(aBigPlan(), '1');
    expect(XMLValidator.validate(xml)).toBe(true);
    const parsed = new XMLParser({ ignoreAttributes: false, attributeNamePrefix: '' }).parse(xml).ISO11783_TaskData;
    expect(parsed).toMatchObject({ VersionMajor: '4', DataTransferOrigin: '1' });
    expect(parsed.PFD).toHaveLength(8);
    expect(parsed.TSK).toHaveLength(8);
    expect(parsed.PDT.map((product: { B: string }) => product.B)).toEqual(['CR 26', 'CR 24']);
    for (const [i, task] of parsed.TSK.entries()) {
      expect(task).toMatchObject({ A: `TSK${i + 1}`, E: `PFD${i + 1}`, G: '1', H: '1' });
      // 140,000 seeds/ac ÷ 4,046.856 m²/ac = 34.595 seeds/m².
      expect(task.TZN.PDV).toMatchObject({ A: '000B', B: '34595', E: 'VPN1' });
    }
    const ring = parsed.PFD[0].PLN.LSG.PNT as { A: string; C: string; D: string }[];
    expect(ring).toHaveLength(7);
    expect(ring[0]).toMatchObject({ A: '2', C: '42.500000000', D: '-93.500000000' });
    expect(parsed.PFD[0].D).toBe(String(Math.round(20 * 4046.8564224)));
  });

  test.skipIf(!has('unzip'))('lies in TASKDATA/TASKDATA.XML of a sound archive', async () => {
    const file = await written('isoxml', 'taskdata.zip');
    expect(execFileSync('unzip', ['-t', file], { encoding: 'utf8' })).toContain('No errors detected');
    expect(execFileSync('unzip', ['-p', file, 'TASKDATA/TASKDATA.XML'], { encoding: 'utf8' })).toContain('ISO11783_TaskData');
  });
});

describe('the calendar', () => {
  test('has the stages of each field as whole days, in lines of at most 75 octets', async () => {
    const text = readFileSync(await written('ics', 'ics'), 'utf8');
    const lines = text.split('\r\n');
    expect(lines.at(-1)).toBe('');
    expect(lines.every((line) => Buffer.byteLength(line) <= 75)).toBe(true);
    expect(text.match(/BEGIN:VEVENT/g)).toHaveLength(8 * 4);
    expect(text).toContain('DTSTART;VALUE=DATE:20270628');
    const unfolded = text.replace(/\r\n /g, '');
    expect(unfolded).toContain('SUMMARY:Slough\\, west: R1\\, first bloom (CR 24)');
    expect(new Set(unfolded.match(/^UID:.*$/gm)).size).toBe(32);
  });
});

test('every form is written, and the same plan makes the same bytes', async () => {
  for (const format of EXPORT_FORMATS) {
    const options = { dealershipSide: true, madeOn: '2027-03-04' };
    const one = await writeExport(format.id, aBigPlan(), options);
    expect(one.length, format.id).toBeGreaterThan(200);
    if (['csv', 'shp', 'geojson', 'isoxml', 'ics'].includes(format.id)) {
      expect(Buffer.compare(one, await writeExport(format.id, aBigPlan(), options)), format.id).toBe(0);
    }
  }
});
