import * as maplibre from 'maplibre-gl';
import { boundsOf, labelPointOf } from './bounds';
import type { MapPoint, MapPolygon } from './map-view';

/** Labels are page elements over the map, so that they take the page's fonts and can be read by any program. */
function labelElement(one: { label?: string; sublabel?: string }): HTMLElement {
  const element = document.createElement('div');
  element.className = 'hilum-map-label';
  const name = document.createElement('div');
  name.className = 'hilum-map-label-name';
  name.textContent = one.label ?? '';
  element.append(name);
  if (one.sublabel) {
    const under = document.createElement('div');
    under.textContent = one.sublabel;
    element.append(under);
  }
  return element;
}

interface Placed {
  element: HTMLElement;
  bounds: [number, number, number, number];
  at: [number, number];
}

/** Narrowest field that is named at all, pixels; narrower ones are named in the table. */
const NARROWEST = 30;

/**
 * Fits labels to what can be read at this zoom: a name folds into its field's width, the second line goes when it does not
 * fit, and of two labels that lie over each other the larger field's stays.
 */
function fitLabels(map: maplibre.Map, labels: Placed[]): void {
  const taken: { left: number; right: number; top: number; bottom: number }[] = [];
  for (const { element, bounds, at } of labels) {
    const [west, south, east, north] = bounds;
    const from = map.project([west, north]);
    const to = map.project([east, south]);
    const width = to.x - from.x;
    const height = to.y - from.y;
    const under = element.children[1] as HTMLElement | undefined;
    element.style.visibility = '';
    element.style.maxWidth = `${Math.max(46, width - 6)}px`;
    if (under) {
      under.style.display = '';
      if (under.scrollWidth > width - 4 || element.offsetHeight > height) under.style.display = 'none';
    }
    const { x, y } = map.project(at);
    // A single long word sticks out of its box: what counts is what is drawn.
    const drawnWidth = Math.max(element.offsetWidth, element.scrollWidth);
    const box = {
      left: x - drawnWidth / 2,
      right: x + drawnWidth / 2,
      top: y - element.offsetHeight / 2,
      bottom: y + element.offsetHeight / 2,
    };
    const meets = taken.some(
      (one) => one.left < box.right && one.right > box.left && one.top < box.bottom && one.bottom > box.top,
    );
    if (width < NARROWEST || meets) element.style.visibility = 'hidden';
    else taken.push(box);
  }
}

/** Puts the labels of polygons and points on the map; answers what takes them off again. */
export function addLabels(map: maplibre.Map, polygons: MapPolygon[], points: MapPoint[]): () => void {
  const labels = polygons
    .filter((one) => one.label)
    .map((one): Placed => ({ element: labelElement(one), bounds: boundsOf([one.geometry]), at: labelPointOf(one.geometry) }))
    .sort((one, other) => size(other) - size(one));
  const markers = [
    ...labels.map(({ element, at }) => new maplibre.Marker({ element }).setLngLat(at).addTo(map)),
    ...points
      .filter((one) => one.label)
      .map((one) =>
        new maplibre.Marker({ element: labelElement(one), offset: [0, -12] }).setLngLat([one.longitude, one.latitude]).addTo(map),
      ),
  ];
  const refit = () => fitLabels(map, labels);
  refit();
  map.on('zoom', refit);
  map.on('resize', refit);
  void document.fonts.ready.then(refit);
  return () => {
    map.off('zoom', refit);
    map.off('resize', refit);
    for (const marker of markers) marker.remove();
  };
}

function size({ bounds: [west, south, east, north] }: Placed): number {
  return (east - west) * (north - south);
}
