import { bbox } from '@turf/turf';
import { intersection } from 'polyclip-ts';
import { areaAcres } from './acres';
import type { Boundary } from './model';

type Box = [number, number, number, number];

export interface Comparable {
  name: string | null;
  geometry: Boundary | null;
  areaAcres: number;
  problems: string[];
}

function touches(one: Box, other: Box): boolean {
  return one[0] < other[2] && other[0] < one[2] && one[1] < other[3] && other[1] < one[3];
}

/** Acres that two boundaries share; 0 when they do not meet or cannot be compared. */
export function sharedAcres(one: Boundary, other: Boundary): number {
  try {
    const shared = intersection(one.coordinates as never, other.coordinates as never) as number[][][][];
    return shared.length > 0 ? areaAcres({ type: 'MultiPolygon', coordinates: shared }) : 0;
  } catch {
    return 0;
  }
}

/** Pairs (i < j) whose boxes meet, by a sweep from west to east. */
function meetingPairs(boxes: (Box | null)[]): [number, number][] {
  const order = boxes.map((_, index) => index).filter((index) => boxes[index]);
  order.sort((one, other) => (boxes[one] as Box)[0] - (boxes[other] as Box)[0]);
  const pairs: [number, number][] = [];
  let active: number[] = [];
  for (const index of order) {
    const box = boxes[index] as Box;
    active = active.filter((other) => (boxes[other] as Box)[2] > box[0]);
    for (const other of active)
      if (touches(box, boxes[other] as Box)) pairs.push([Math.min(index, other), Math.max(index, other)]);
    active.push(index);
  }
  return pairs;
}

const boxOf = (geometry: Boundary | null): Box | null => (geometry ? (bbox(geometry) as Box) : null);

/** More than this share of the smaller field in common is an overlap worth a word; nearly all is a duplicate. */
const OVERLAP_SHARE = 0.01;
const DUPLICATE_SHARE = 0.98;

/** Adds a problem to shapes of one file that repeat or overlap an earlier one. */
export function compareAll(features: Comparable[]): void {
  for (const [earlier, later] of meetingPairs(features.map((one) => boxOf(one.geometry)))) {
    const one = features[earlier] as Comparable;
    const other = features[later] as Comparable;
    const acres = sharedAcres(one.geometry as Boundary, other.geometry as Boundary);
    const share = acres / Math.min(one.areaAcres, other.areaAcres);
    const called = one.name ? `"${one.name}" (shape ${earlier + 1})` : `shape ${earlier + 1}`;
    if (acres / Math.max(one.areaAcres, other.areaAcres) > DUPLICATE_SHARE) other.problems.push(`The same outline as ${called}.`);
    else if (share > OVERLAP_SHARE && acres > 0.1) other.problems.push(`Overlaps ${called} by ${acres.toFixed(1)} ac.`);
  }
}

export interface Overlap {
  fieldId: string;
  fieldName: string;
  acres: number;
  same: boolean;
}

/** Fields already kept that a new boundary overlaps, largest share first. */
export function overlapsWith(
  geometry: Boundary,
  acres: number,
  fields: { id: string; name: string; boundary: Boundary; areaAcres: number }[],
): Overlap[] {
  const box = boxOf(geometry) as Box;
  return fields
    .filter((field) => touches(box, boxOf(field.boundary) as Box))
    .map((field) => {
      const shared = sharedAcres(geometry, field.boundary);
      return {
        fieldId: field.id,
        fieldName: field.name,
        acres: shared,
        same: shared / Math.max(acres, field.areaAcres) > DUPLICATE_SHARE,
        share: shared / Math.min(acres, field.areaAcres),
      };
    })
    .filter((one) => one.share > OVERLAP_SHARE && one.acres > 0.1)
    .sort((one, other) => other.acres - one.acres)
    .map(({ share, ...one }) => one);
}
