import { describe, expect, test } from 'vitest';
import { areaAcres } from '@/features/fields/acres';

/**
 * Acres against GeographicLib's own command: `Planimeter -p 12` of geographiclib-tools 2.1 (Debian), WGS84, on the same corners; square
 * metres ÷ 4046.8564224. Tolerance 0.001 ac.
 */
const CASES: { what: string; corners: [number, number][]; acres: number }[] = [
  {
    what: 'a quarter section at 41° N',
    corners: [
      [-93.5, 41.0],
      [-93.490443125, 41.0],
      [-93.490443125, 41.0072448],
      [-93.5, 41.0072448],
    ],
    acres: 159.84995005243107,
  },
  {
    what: 'ten acres at 30° N',
    corners: [
      [-90.2, 30.0],
      [-90.198, 30.0],
      [-90.198, 30.0019],
      [-90.2, 30.0019],
    ],
    acres: 10.043210301465624,
  },
  {
    what: 'a crooked field at 47° N',
    corners: [
      [-97.1, 47.0],
      [-97.085, 47.001],
      [-97.083, 47.009],
      [-97.092, 47.012],
      [-97.101, 47.007],
    ],
    acres: 332.16717200774787,
  },
  {
    what: 'a long strip at 44° N',
    corners: [
      [-95.0, 44.0],
      [-94.95, 44.0],
      [-94.95, 44.0005],
      [-95.0, 44.0005],
    ],
    acres: 55.054168783153905,
  },
];

describe('acres on the ellipsoid', () => {
  test.each(CASES)('$what measures $acres ac, as Planimeter says', ({ corners, acres }) => {
    const ring = [...corners, corners[0] as [number, number]];
    expect(Math.abs(areaAcres({ type: 'Polygon', coordinates: [ring] }) - acres)).toBeLessThan(0.001);
    expect(Math.abs(areaAcres({ type: 'Polygon', coordinates: [[...ring].reverse()] }) - acres)).toBeLessThan(0.001);
  });

  test('a hole is taken off and parts are added', () => {
    const [outer, inner] = [CASES[2], CASES[1]] as [(typeof CASES)[number], (typeof CASES)[number]];
    const ring = (one: (typeof CASES)[number]) => [...one.corners, one.corners[0] as [number, number]];
    expect(areaAcres({ type: 'MultiPolygon', coordinates: [[ring(outer)], [ring(inner)]] })).toBeCloseTo(
      outer.acres + inner.acres,
      3,
    );
    const hole = [
      [-97.095, 47.003],
      [-97.09, 47.003],
      [-97.09, 47.005],
      [-97.095, 47.005],
      [-97.095, 47.003],
    ];
    const whole = areaAcres({ type: 'Polygon', coordinates: [ring(outer)] });
    expect(areaAcres({ type: 'Polygon', coordinates: [ring(outer), hole] })).toBeCloseTo(
      whole - areaAcres({ type: 'Polygon', coordinates: [hole] }),
      6,
    );
  });

  test('none of the checks was dropped', () => {
    expect(CASES).toHaveLength(4);
  });
});
