import type { Feature, FeatureCollection } from 'geojson';
import type * as maplibre from 'maplibre-gl';
import { stateAndCountyLines } from './boundaries';
import type { MapPoint, MapPolygon } from './map-view';
import { MAP_COLORS } from './style';

const EMPTY: FeatureCollection = { type: 'FeatureCollection', features: [] };

/** Polygons as the map's source takes them; the selected one has a heavy ink line. */
export function polygonFeatures(polygons: MapPolygon[], selectedId: string | null | undefined): FeatureCollection {
  return {
    type: 'FeatureCollection',
    features: polygons.map(
      (one): Feature => ({
        type: 'Feature',
        geometry: one.geometry,
        properties: {
          id: one.id,
          fill: one.fill ?? MAP_COLORS.field,
          fillOpacity: one.fillOpacity ?? 1,
          stroke: one.id === selectedId ? MAP_COLORS.ink : (one.stroke ?? '#8b7f68'),
          strokeWidth: one.id === selectedId ? 3 : (one.strokeWidth ?? 1.2),
        },
      }),
    ),
  };
}

/** Points as the map's source takes them. */
export function pointFeatures(points: MapPoint[]): FeatureCollection {
  return {
    type: 'FeatureCollection',
    features: points.map(
      (one): Feature => ({
        type: 'Feature',
        geometry: { type: 'Point', coordinates: [one.longitude, one.latitude] },
        properties: { id: one.id, color: one.color ?? MAP_COLORS.ink },
      }),
    ),
  };
}

/** Adds the sources and layers of every map, empty; state and county lines come when they are loaded. */
export function addLayers(map: maplibre.Map): void {
  map.addSource('counties', { type: 'geojson', data: EMPTY });
  map.addSource('states', { type: 'geojson', data: EMPTY });
  map.addLayer({ id: 'counties', type: 'line', source: 'counties', paint: { 'line-color': MAP_COLORS.county, 'line-width': 1 } });
  map.addLayer({ id: 'states', type: 'line', source: 'states', paint: { 'line-color': MAP_COLORS.state, 'line-width': 1.6 } });
  map.addSource('polygons', { type: 'geojson', data: EMPTY });
  map.addLayer({
    id: 'polygon-fill',
    type: 'fill',
    source: 'polygons',
    paint: { 'fill-color': ['get', 'fill'], 'fill-opacity': ['get', 'fillOpacity'] },
  });
  map.addLayer({
    id: 'polygon-line',
    type: 'line',
    source: 'polygons',
    paint: { 'line-color': ['get', 'stroke'], 'line-width': ['get', 'strokeWidth'] },
  });
  map.addSource('points', { type: 'geojson', data: EMPTY });
  map.addLayer({
    id: 'points',
    type: 'circle',
    source: 'points',
    paint: {
      'circle-radius': 3.5,
      'circle-color': ['get', 'color'],
      'circle-stroke-color': MAP_COLORS.paper,
      'circle-stroke-width': 1,
    },
  });
  void stateAndCountyLines()
    .then((lines) => {
      (map.getSource('counties') as maplibre.GeoJSONSource | undefined)?.setData(lines.counties);
      (map.getSource('states') as maplibre.GeoJSONSource | undefined)?.setData(lines.states);
    })
    // Lines are for orientation only: without them the map still shows what it is for.
    .catch(() => undefined);
}
