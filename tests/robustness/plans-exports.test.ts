import { execFileSync, spawnSync } from 'node:child_process';
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
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

  test.skipIf(!has('pdffonts'))('carries its own fonts in their right weights', async () => {
    const fonts = execFileSync('pdffonts', [await written('pdf', 'pdf')], { encoding: 'utf8' });
    expect(fonts).toMatch(/PublicSans-Regular/);
    expect(fonts).toMatch(/PublicSans-Bold/);
    expect(fonts).toMatch(/BricolageGrotesque/);
    expect(fonts).not.toMatch(/Thin|Helvetica/);
  });
});
