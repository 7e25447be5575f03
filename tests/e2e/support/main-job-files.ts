import type { Polygon } from 'geojson';
import { UTM_15_PRJ, zippedShapefile } from '../../support/shapefiles';

/** Half a mile a side at 41° N, sized so that the quarter section measures 159.85 acres on the ellipsoid. */
const SOUTH = 41.0;
const WEST = -93.5;
const HEIGHT_DEGREES = 0.0072448;
const WIDTH_DEGREES = 0.009556875;

function box(west: number, south: number, width = WIDTH_DEGREES, height = HEIGHT_DEGREES): Polygon {
  return {
    type: 'Polygon',
    coordinates: [
      [
        [west, south],
        [west + width, south],
        [west + width, south + height],
        [west, south + height],
        [west, south],
      ],
    ],
  };
}

export const aFieldSquare = { name: 'Home Quarter', geometry: box(WEST, SOUTH) };

/** Three fields as a farm's own program exports them: two good ones and one whose outline crosses itself. */
export function threeFieldsInUtm(): Buffer {
  const east = WEST + WIDTH_DEGREES * 1.1;
  const crossing: Polygon = {
    type: 'Polygon',
    coordinates: [
      [
        [WEST, SOUTH + 0.01],
        [WEST + 0.004, SOUTH + 0.013],
        [WEST + 0.004, SOUTH + 0.01],
        [WEST, SOUTH + 0.013],
        [WEST, SOUTH + 0.01],
      ],
    ],
  };
  return zippedShapefile(
    [
      { geometry: aFieldSquare.geometry, attributes: { FIELD: 'Home Quarter', FARM: 'Creekside' } },
      { geometry: box(east, SOUTH, WIDTH_DEGREES / 2), attributes: { FIELD: 'East 80', FARM: 'Creekside' } },
      { geometry: crossing, attributes: { FIELD: 'Bow Tie', FARM: 'Creekside' } },
    ],
    UTM_15_PRJ,
  );
}

/** A laboratory's sheet: title rows above the header, its own column names, one test in no field, and "n/a" for one it did not make. */
export function soilCsv(): Buffer {
  const rows = [
    'Prairie Soil Laboratory',
    'Report 4711, 22 October 2026',
    '',
    'Sample ID,Latitude,Longitude,Water pH,Buffer pH (Sikora),OM %,CEC,P Mehlich-3 ppm,K ppm',
  ];
  let number = 1;
  for (let i = 0; i < 5; i += 1) {
    for (let j = 0; j < 5; j += 1) {
      const longitude = WEST + WIDTH_DEGREES * (0.1 + 0.2 * i);
      const latitude = SOUTH + HEIGHT_DEGREES * (0.1 + 0.2 * j);
      const ph = 5.6 + 0.25 * i + 0.1 * j;
      rows.push(
        `${number},${latitude.toFixed(6)},${longitude.toFixed(6)},${ph.toFixed(1)},${ph < 6.4 ? (6.3 + 0.08 * i).toFixed(1) : 'n/a'},3.${i},2${j},2${i},16${j}`,
      );
      number += 1;
    }
  }
  rows.push(`${number},41.2,-93.2,6.6,n/a,3.1,20,22,150`);
  return Buffer.from(`${rows.join('\r\n')}\r\n`);
}
