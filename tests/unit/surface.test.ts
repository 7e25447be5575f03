import fc from 'fast-check';
import type { Polygon } from 'geojson';
import { describe, expect, test } from 'vitest';
import { fitSurface, projectPoints, type SurfacePoint, surfaceOfField, valueShares } from '@/features/soil/surface';
import { gridOverField, MAXIMUM_CELLS } from '@/features/soil/surface/field-grid';
import { sampleVariogram } from '@/features/soil/surface/variogram';

/** A square field of about `meters` a side at 41° N, with an optional square hole in its middle third. */
function squareField(meters: number, hole = false): Polygon {
  const east = meters / 84_000 / 2;
  const north = meters / 111_000 / 2;
  const ring = (scale: number) => [
    [-93.5 - east * scale, 41 - north * scale],
    [-93.5 + east * scale, 41 - north * scale],
    [-93.5 + east * scale, 41 + north * scale],
    [-93.5 - east * scale, 41 + north * scale],
    [-93.5 - east * scale, 41 - north * scale],
  ];
  return { type: 'Polygon', coordinates: hole ? [ring(1), ring(1 / 3)] : [ring(1)] };
}

/** Points with a pattern: pH rising eastward with a wave, on a jittered lattice. */
function patterned(count: number, metersApart = 50): SurfacePoint[] {
  const side = Math.ceil(Math.sqrt(count));
  return Array.from({ length: count }, (_, i) => {
    const x = (i % side) * metersApart + ((i * 7919) % 13);
    const y = Math.floor(i / side) * metersApart + ((i * 104729) % 11);
    return { x, y, value: 6 + x / 2000 + 0.4 * Math.sin(x / 150) * Math.cos(y / 180) };
  });
}

const point = fc.record({
  x: fc.double({ min: -500, max: 500, noNaN: true }),
  y: fc.double({ min: -500, max: 500, noNaN: true }),
  value: fc.double({ min: 4, max: 9, noNaN: true }),
});

describe('the rule that chooses a surface', () => {
  test('under 4 points it is the mean, then inverse distance, and kriging from 20 points with a pattern', () => {
    expect(fitSurface(patterned(3))!.method).toBe('mean');
    expect(fitSurface(patterned(4))!.method).toBe('idw');
    expect(fitSurface(patterned(19))!.method).toBe('idw');
    expect(fitSurface(patterned(64))!.method).toBe('kriging');
  });

  test('without a pattern kriging must not beat the mean by luck of its own fit', () => {
    const noise = patterned(40).map((one, i) => ({ ...one, value: i % 2 === 0 ? 5.5 : 7.5 }));
    const fitted = fitSurface(noise)!;
    expect(fitted.method === 'idw' || fitted.leaveOneOutRmse! < fitted.leaveOneOutRmseOfMean!).toBe(true);
  });

  test('no point, or none with a number, gives no surface', () => {
    expect(fitSurface([])).toBeNull();
    expect(fitSurface([{ x: 0, y: 0, value: Number.NaN }])).toBeNull();
  });

  test('the mean of 5, 6 and 7 is 6, with the error of leaving one out', () => {
    const fitted = fitSurface([5, 6, 7].map((value, i) => ({ x: i * 100, y: 0, value })))!;
    expect(fitted.at(50, 50)).toEqual({ mean: 6, variance: null });
    expect(fitted.leaveOneOutRmse).toBeCloseTo(Math.sqrt((1.5 ** 2 + 0 + 1.5 ** 2) / 3), 9);
  });
});

describe('every surface', () => {
  test('of constant data is constant', () => {
    fc.assert(
      fc.property(
        fc.array(point, { minLength: 1, maxLength: 40 }),
        fc.double({ min: 4, max: 9, noNaN: true }),
        (points, value) => {
          const fitted = fitSurface(points.map((one) => ({ ...one, value })))!;
          expect(fitted.at(12, 34).mean).toBe(value);
        },
      ),
      { numRuns: 50 },
    );
  });

  test('is a number everywhere, whatever the points: coincident, in a line, or a hair apart', () => {
    fc.assert(
      fc.property(
        fc.array(point, { minLength: 1, maxLength: 45 }),
        fc.boolean(),
        fc.boolean(),
        fc.constantFrom(undefined, 'kriging' as const, 'idw' as const),
        (points, inLine, doubled, method) => {
          const given = points.map((one) => (inLine ? { ...one, y: 0 } : one));
          if (doubled) given.push(...given.map((one) => ({ ...one, x: one.x + 0.02, value: one.value + 0.3 })));
          const fitted = fitSurface(given, { method })!;
          const xs = Float64Array.of(0, 100, -700, given[0]!.x);
          const ys = Float64Array.of(0, 3, 900, given[0]!.y);
          for (const value of fitted.many(xs, ys)) expect(Number.isFinite(value)).toBe(true);
          expect(Number.isFinite(fitted.at(1, 1).mean)).toBe(true);
        },
      ),
      { numRuns: 150 },
    );
  });

  test('honours its data points, kriged or by inverse distance', () => {
    const points = patterned(60);
    for (const method of ['kriging', 'idw'] as const) {
      const fitted = fitSurface(points, { method })!;
      for (const one of points.slice(0, 20)) expect(fitted.at(one.x, one.y).mean).toBeCloseTo(one.value, 9);
    }
  });

  test('does not depend on the order of its points', () => {
    const points = patterned(50);
    const forward = fitSurface(points)!;
    const backward = fitSurface([...points].reverse())!;
    expect(backward.at(123, 77).mean).toBe(forward.at(123, 77).mean);
    expect(backward.leaveOneOutRmse).toBe(forward.leaveOneOutRmse);
  });

  test('takes two samples of one spot as their average', () => {
    const points = [...patterned(30), { ...patterned(30)[0]!, value: 9 }];
    const fitted = fitSurface(points)!;
    expect(fitted.pointCount).toBe(30);
    expect(fitted.at(points[0]!.x, points[0]!.y).mean).toBeCloseTo((points[0]!.value + 9) / 2, 9);
  });

  test('leaves one out as if that point were really left out', () => {
    const points = patterned(25);
    const variogram = { model: 'exponential', nugget: 0.01, partialSill: 0.1, range: 90 } as const;
    const whole = fitSurface(points, { method: 'kriging', variogram })!;
    const errors = points.map((one, i) => {
      const rest = fitSurface(
        points.filter((_, j) => j !== i),
        { method: 'kriging', variogram },
      )!;
      return rest.at(one.x, one.y).mean - one.value;
    });
    expect(whole.leaveOneOutRmse).toBeCloseTo(Math.sqrt(errors.reduce((sum, e) => sum + e * e, 0) / 25), 9);
  });

  test('thins 5,000 points to what its cells can show, in well under a second', () => {
    const fitted = fitSurface(patterned(5000, 5))!;
    expect(fitted.pointCount).toBeLessThanOrEqual(800);
    expect(fitted.leaveOneOutRmse!).toBeLessThan(0.1);
  });
});

describe('inverse distance over a whole grid', () => {
  test.each([3, 20, 155, 500])('of %s points agrees with the sum over all points to a thousandth of a pH unit', (count) => {
    const list = patterned(count, 40);
    const fitted = fitSurface([...list, { x: 210, y: 390, value: 6.6 }], { method: 'idw' })!;
    for (const [columns, rows] of [
      [90, 40],
      [37, 61],
      [5, 7],
    ] as const) {
      const grid = { columns, rows, cellMeters: 20, left: 0, top: 800 };
      const cells = Int32Array.from({ length: columns * rows }, (_, i) => i);
      fitted.over(grid, cells).forEach((value, cell) => {
        const x = ((cell % columns) + 0.5) * 20;
        const y = 800 - (Math.floor(cell / columns) + 0.5) * 20;
        expect(Math.abs(value - fitted.at(x, y).mean)).toBeLessThan(1e-3);
      });
    }
    // The cell centre that a point lies on has that point's value.
    expect(fitted.over({ columns: 60, rows: 60, cellMeters: 20, left: 0, top: 800 }, Int32Array.of(20 * 60 + 10))[0]).toBe(6.6);
  });

  test('kriging from its table agrees with kriging place by place to a millionth', () => {
    for (const model of ['spherical', 'exponential'] as const) {
      const variogram = { model, nugget: 0.02, partialSill: 0.1, range: 120 };
      const fitted = fitSurface(patterned(60), { method: 'kriging', variogram })!;
      const xs = Float64Array.from({ length: 2000 }, (_, i) => i * 0.225 + 0.37);
      const ys = Float64Array.from({ length: 2000 }, (_, i) => 400 - i * 0.17);
      fitted.many(xs, ys).forEach((value, k) => {
        expect(value).toBeCloseTo(fitted.at(xs[k]!, ys[k]!).mean, 5);
      });
    }
  });
});

describe('a surface over a field', () => {
  const points = (spread: number) =>
    patterned(36).map(({ x, y, value }) => ({
      longitude: -93.5 + ((x - 150) / 84_000) * spread,
      latitude: 41 + ((y - 150) / 111_000) * spread,
      value,
    }));

  test('covers the field and not its hole', () => {
    const whole = surfaceOfField(points(1), squareField(600))!;
    const holed = surfaceOfField(points(1), squareField(600, true))!;
    const cells = (surface: typeof whole) => surface.values.filter((value) => value !== null).length;
    expect(whole.cellMeters).toBe(20);
    expect(Math.abs(cells(whole) / (600 / 20) ** 2 - 1)).toBeLessThan(0.08);
    expect(Math.abs(cells(holed) / cells(whole) - 8 / 9)).toBeLessThan(0.02);
    expect(holed.values[Math.floor(holed.rows / 2) * holed.columns + Math.floor(holed.columns / 2)]).toBeNull();
  });

  test('never has more than 40,000 cells, and a quarter acre has enough to tell shares', () => {
    const large = gridOverField(squareField(20_000))!;
    expect(large.columns * large.rows).toBeLessThanOrEqual(MAXIMUM_CELLS);
    expect(large.columns * large.rows).toBeGreaterThan(MAXIMUM_CELLS * 0.9);
    expect(gridOverField(squareField(32))!.inside.length).toBeGreaterThanOrEqual(90);
  });

  test('of a sliver keeps a cell, and of a boundary without extent is none', () => {
    const sliver: Polygon = {
      type: 'Polygon',
      coordinates: [
        [
          [-93.5, 41],
          [-93.49, 41.000001],
          [-93.49, 41.000002],
          [-93.5, 41],
        ],
      ],
    };
    expect(surfaceOfField(points(1), sliver)!.values.some((value) => value !== null)).toBe(true);
    const flat: Polygon = {
      type: 'Polygon',
      coordinates: [
        [
          [-93.5, 41],
          [-93.49, 41],
          [-93.5, 41],
        ],
      ],
    };
    expect(surfaceOfField(points(1), flat)).toBeNull();
  });

  test('gives shares that ascend by tenths, sum to 1 and average to its mean', () => {
    const surface = surfaceOfField(points(1), squareField(600))!;
    const shares = valueShares(surface);
    expect(shares.reduce((sum, one) => sum + one.share, 0)).toBeCloseTo(1, 9);
    for (const one of shares) expect(Math.round(one.value * 10) / 10).toBe(one.value);
    expect([...shares].sort((a, b) => a.value - b.value)).toEqual(shares);
    expect(shares.reduce((sum, one) => sum + one.share * one.value, 0)).toBeCloseTo(surface.mean, 1);
  });

  test('projects degrees to metres as the ellipsoid does: 111,049 m a degree north at 41° (NGA table, from memory)', () => {
    const { project } = projectPoints([{ longitude: -93.5, latitude: 41, value: 1 }]);
    expect(project(-93.5, 42).y).toBeGreaterThan(111_030);
    expect(project(-93.5, 42).y).toBeLessThan(111_070);
    expect(project(-92.5, 41).x).toBeGreaterThan(84_130);
    expect(project(-92.5, 41).x).toBeLessThan(84_160);
  });

  test('has no variogram when all points lie at one spot', () => {
    expect(sampleVariogram({ x: new Float64Array(5), y: new Float64Array(5), value: Float64Array.of(1, 2, 3, 4, 5) })).toEqual(
      [],
    );
  });
});
