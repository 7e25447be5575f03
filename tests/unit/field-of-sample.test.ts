import type { Polygon } from 'geojson';
import { describe, expect, test } from 'vitest';
import { distanceToFieldFt, fieldOfPoint } from '@/features/soil/field-of-sample';

const square = (west: number, south: number, side = 0.004): Polygon => ({
  type: 'Polygon',
  coordinates: [
    [
      [west, south],
      [west + side, south],
      [west + side, south + side],
      [west, south + side],
      [west, south],
    ],
  ],
});
const holed: Polygon = {
  type: 'Polygon',
  coordinates: [...square(-93, 42).coordinates, ...square(-92.999, 42.001, 0.002).coordinates],
};

describe('the field of a soil point', () => {
  const fields = [
    { name: 'west', geometry: square(-93, 42) },
    { name: 'east', geometry: square(-92.9959, 42) },
  ];

  test('is the one that holds it', () => {
    expect(fieldOfPoint(fields, -92.998, 42.002)?.name).toBe('west');
    expect(fieldOfPoint(fields, -92.993, 42.002)?.name).toBe('east');
  });

  test('is the nearest within 30 ft of an edge, and none beyond', () => {
    // One foot is about 2.74 millionths of a degree of latitude.
    expect(fieldOfPoint(fields, -92.998, 42 - 25 * 2.74e-6)?.name).toBe('west');
    expect(fieldOfPoint(fields, -92.998, 42 - 40 * 2.74e-6)).toBeNull();
    expect(fieldOfPoint(fields, -92.99592, 42.002)?.name).toBe('east');
  });

  test('does not count a hole as inside', () => {
    expect(distanceToFieldFt(holed, -92.998, 42.002)).toBeGreaterThan(200);
    expect(distanceToFieldFt(holed, -92.9995, 42.002)).toBe(0);
  });
});
