import type { MultiPolygon, Polygon } from 'geojson';

export interface GridSurface {
  columns: number;
  rows: number;
  /** West, south, east, north. */
  bounds: [number, number, number, number];
  /** Row by row from the north-west corner; `null` outside the field. */
  values: (number | null)[];
}

/** Pixels a grid cell becomes, so that class edges are lines and not steps. */
const SCALE = 6;
const LARGEST_SIDE = 1600;

/**
 * Draws a grid as an image for the map: values joined bilinearly, each pixel in the colour of its class, cut to the boundary.
 * Runs in the browser. Answers a data address; an empty text where the browser has no canvas.
 */
export function surfaceImage(surface: GridSurface, boundary: Polygon | MultiPolygon, colorOf: (value: number) => string): string {
  const { columns, rows } = surface;
  const scale = Math.max(1, Math.min(SCALE, Math.floor(LARGEST_SIDE / Math.max(columns, rows))));
  const canvas = document.createElement('canvas');
  canvas.width = columns * scale;
  canvas.height = rows * scale;
  const context = canvas.getContext('2d');
  if (!context) return '';
  const filled = filledOut(surface);
  const image = context.createImageData(canvas.width, canvas.height);
  const channels = new Map<string, [number, number, number]>();
  for (let y = 0; y < canvas.height; y += 1) {
    for (let x = 0; x < canvas.width; x += 1) {
      const color = colorOf(bilinear(filled, columns, rows, (x + 0.5) / scale - 0.5, (y + 0.5) / scale - 0.5));
      const rgb = channels.get(color) ?? channelsOf(color);
      channels.set(color, rgb);
      const at = (y * canvas.width + x) * 4;
      image.data[at] = rgb[0];
      image.data[at + 1] = rgb[1];
      image.data[at + 2] = rgb[2];
      image.data[at + 3] = 255;
    }
  }
  context.putImageData(image, 0, 0);
  context.globalCompositeOperation = 'destination-in';
  context.fill(pathOf(boundary, surface.bounds, canvas.width, canvas.height), 'evenodd');
  return canvas.toDataURL('image/png');
}

/** Cells outside the field take their nearest neighbour's value, so that the edge is not pulled to nothing. */
function filledOut({ columns, rows, values }: GridSurface): Float32Array {
  const result = new Float32Array(columns * rows).fill(Number.NaN);
  let waiting: number[] = [];
  values.forEach((value, index) => {
    if (value === null) return;
    result[index] = value;
    waiting.push(index);
  });
  while (waiting.length > 0) {
    const next: number[] = [];
    for (const index of waiting) {
      const column = index % columns;
      for (const neighbour of [
        column > 0 ? index - 1 : -1,
        column < columns - 1 ? index + 1 : -1,
        index - columns,
        index + columns,
      ]) {
        if (neighbour < 0 || neighbour >= result.length || !Number.isNaN(result[neighbour])) continue;
        result[neighbour] = result[index] as number;
        next.push(neighbour);
      }
    }
    waiting = next;
  }
  return result;
}

function bilinear(values: Float32Array, columns: number, rows: number, x: number, y: number): number {
  const column = Math.min(columns - 1, Math.max(0, x));
  const row = Math.min(rows - 1, Math.max(0, y));
  const left = Math.floor(column);
  const top = Math.floor(row);
  const right = Math.min(columns - 1, left + 1);
  const bottom = Math.min(rows - 1, top + 1);
  const u = column - left;
  const v = row - top;
  const at = (c: number, r: number) => values[r * columns + c] as number;
  return (at(left, top) * (1 - u) + at(right, top) * u) * (1 - v) + (at(left, bottom) * (1 - u) + at(right, bottom) * u) * v;
}

function channelsOf(color: string): [number, number, number] {
  return [1, 3, 5].map((at) => Number.parseInt(color.slice(at, at + 2), 16)) as [number, number, number];
}

function pathOf(
  boundary: Polygon | MultiPolygon,
  [west, south, east, north]: GridSurface['bounds'],
  width: number,
  height: number,
): Path2D {
  const path = new Path2D();
  for (const rings of boundary.type === 'Polygon' ? [boundary.coordinates] : boundary.coordinates) {
    for (const ring of rings) {
      ring.forEach(([longitude, latitude], index) => {
        const x = (((longitude as number) - west) / (east - west)) * width;
        const y = ((north - (latitude as number)) / (north - south)) * height;
        if (index === 0) path.moveTo(x, y);
        else path.lineTo(x, y);
      });
      path.closePath();
    }
  }
  return path;
}
