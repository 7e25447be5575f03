import { describe, expect, test } from 'vitest';
import { boundsOf, labelPointOf } from '@/lib/map/bounds';
import { pointFeatures, polygonFeatures } from '@/lib/map/layers';
import { PH_SCALE, phClass } from '@/lib/map/ph-scale';
import { MAP_COLORS, paperStyle } from '@/lib/map/style';

const square = {
  type: 'Polygon' as const,
  coordinates: [
    [
      [-93, 42],
      [-92, 42],
      [-92, 43],
      [-93, 42],
    ],
  ],
};

describe('the pH key', () => {
  test('every pH has one class, and the classes meet without gap or overlap', () => {
    for (let at = 1; at < PH_SCALE.length; at += 1) expect(PH_SCALE[at]?.from).toBe(PH_SCALE[at - 1]?.to);
    expect(phClass(4.9).label).toBe('<5.5');
    expect(phClass(5.5).label).toBe('5.5–6.0');
    expect(phClass(6.4).words).toBe('sweet spot');
    expect(phClass(7.4).label).toBe('>7.4');
    expect(new Set(PH_SCALE.map((one) => one.color)).size).toBe(PH_SCALE.length);
  });
});

describe('what the map is given', () => {
  test('the map needs nothing from elsewhere unless a tile layer is configured', () => {
    expect(JSON.stringify(paperStyle(null))).not.toMatch(/https?:/);
    expect(paperStyle(null)).not.toHaveProperty('glyphs');
    const tiles = paperStyle({ url: 'https://tiles.example/{z}/{x}/{y}.png', credit: 'Example' });
    expect(tiles.layers.map((layer) => layer.id)).toEqual(['ground', 'tiles']);
  });

  test('the selected field has a heavy ink line and the others keep theirs', () => {
    const [one, other] = polygonFeatures(
      [
        { id: 'a', geometry: square },
        { id: 'b', geometry: square, stroke: '#123456' },
      ],
      'a',
    ).features;
    expect(one?.properties).toMatchObject({ stroke: MAP_COLORS.ink, strokeWidth: 3 });
    expect(other?.properties).toMatchObject({ stroke: '#123456' });
  });

  test('points are longitude first, and bounds hold all parts of all shapes', () => {
    expect(pointFeatures([{ id: 'p', longitude: -93.5, latitude: 42.5 }]).features[0]?.geometry).toEqual({
      type: 'Point',
      coordinates: [-93.5, 42.5],
    });
    expect(
      boundsOf([
        square,
        {
          type: 'MultiPolygon',
          coordinates: [
            [
              [
                [-95, 41],
                [-94, 41],
                [-94, 41.5],
                [-95, 41],
              ],
            ],
          ],
        },
      ]),
    ).toEqual([-95, 41, -92, 43]);
    expect(boundsOf([]).every(Number.isFinite)).toBe(false);
  });

  test('a label stands in the middle of the ground, in the larger part of two', () => {
    const box = (west: number, side: number) => [
      [
        [west, 42],
        [west + side, 42],
        [west + side, 42 + side],
        [west, 42 + side],
        [west, 42],
      ],
    ];
    const [longitude, latitude] = labelPointOf({ type: 'MultiPolygon', coordinates: [box(-95, 0.01), box(-93, 0.02)] });
    expect(longitude).toBeCloseTo(-92.99, 9);
    expect(latitude).toBeCloseTo(42.01, 9);
    const [inTriangle] = labelPointOf(square);
    expect(inTriangle).toBeCloseTo(-92 - 1 / 3, 9);
  });
});
