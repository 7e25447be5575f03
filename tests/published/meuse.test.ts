import { readFileSync } from 'node:fs';
import { parse } from 'csv-parse/sync';
import { describe, expect, test } from 'vitest';
import { fitSurface, type SurfacePoint } from '@/features/soil/surface';
import { fitVariogram, sampleVariogram } from '@/features/soil/surface/variogram';

/**
 * Meuse data set (Burrough & McDonnell 1998; R packages sp and gstat), natural logarithm of zinc. Reference: gstat 2.1
 * (Pebesma 2004, Computers & Geosciences 30:683-691), all points, spherical, nugget 0.05, partial sill 0.59, range 897 m.
 */
const rows = parse(readFileSync('tests/published/data/meuse.csv'), { columns: true }) as Record<string, string>[];
const points: SurfacePoint[] = rows.map((row) => ({ x: Number(row.x), y: Number(row.y), value: Math.log(Number(row.zinc)) }));
const given = { model: 'spherical', nugget: 0.05, partialSill: 0.59, range: 897 } as const;

const AT = [
  [178605, 329714, 6.427546, 0.4034129, 6.065715],
  [179000, 330000, 5.695036, 0.1850902, 5.663809],
  [180000, 331000, 5.055115, 0.1601766, 5.243873],
  [181000, 332500, 5.267987, 0.1720314, 5.548259],
  [181390, 333260, 5.638355, 0, 5.638355],
] as const;

describe('surfaces of the Meuse data set against gstat', () => {
  const kriged = fitSurface(points, { method: 'kriging', variogram: given })!;
  const weighted = fitSurface(points, { method: 'idw' })!;

  test('the whole data set is read', () => {
    expect(points.length).toBe(155);
    expect(kriged.pointCount).toBe(155);
    expect(AT.length).toBe(5);
  });

  test.each(AT)('at %s, %s: mean, variance and inverse distance squared to 5 digits', (x, y, mean, variance, idw) => {
    const estimate = kriged.at(x, y);
    expect(Math.abs(estimate.mean - mean)).toBeLessThan(5e-6);
    expect(Math.abs(estimate.variance! - variance)).toBeLessThan(5e-7);
    expect(Math.abs(weighted.at(x, y).mean - idw)).toBeLessThan(5e-6);
    expect(kriged.many(Float64Array.of(x), Float64Array.of(y))[0]).toBeCloseTo(mean, 5);
  });

  test('leave-one-out: 0.39175 kriged, 0.51383 by inverse distance squared', () => {
    expect(kriged.leaveOneOutRmse).toBeCloseTo(0.39175, 5);
    expect(weighted.leaveOneOutRmse).toBeCloseTo(0.51383, 5);
  });

  test('the fitted spherical variogram is gstat’s within 2 %: nugget 0.0507, partial sill 0.5906, range 897', () => {
    const fitted = fitVariogram(
      sampleVariogram({
        x: Float64Array.from(points, (p) => p.x),
        y: Float64Array.from(points, (p) => p.y),
        value: Float64Array.from(points, (p) => p.value),
      }),
      ['spherical'],
    )!;
    expect(Math.abs(fitted.nugget / 0.0507 - 1)).toBeLessThan(0.02);
    expect(Math.abs(fitted.partialSill / 0.5906 - 1)).toBeLessThan(0.02);
    expect(Math.abs(fitted.range / 897 - 1)).toBeLessThan(0.02);
  });

  test('left alone, the rule chooses kriging', () => {
    const chosen = fitSurface(points)!;
    expect(chosen.method).toBe('kriging');
    expect(chosen.leaveOneOutRmse!).toBeLessThan(0.4);
    expect(chosen.leaveOneOutRmseOfMean!).toBeGreaterThan(0.7);
  });
});
