'use client';

import 'maplibre-gl/dist/maplibre-gl.css';
import clsx from 'clsx';
import type { Feature, FeatureCollection, MultiPolygon, Polygon } from 'geojson';
import * as maplibre from 'maplibre-gl';
import { type ReactNode, useEffect, useRef, useState } from 'react';
import { stateAndCountyLines } from './boundaries';
import { boundsOf } from './bounds';
import { MAP_COLORS, paperStyle, type TileLayer } from './style';

export interface MapPolygon {
  id: string;
  geometry: Polygon | MultiPolygon;
  fill?: string;
  fillOpacity?: number;
  stroke?: string;
  strokeWidth?: number;
  label?: string;
  sublabel?: string;
}

export interface MapPoint {
  id: string;
  longitude: number;
  latitude: number;
  label?: string;
  color?: string;
}

export interface MapRaster {
  url: string;
  /** West, south, east, north. */
  bounds: [number, number, number, number];
}

export interface MapViewProps {
  ariaLabel: string;
  polygons: MapPolygon[];
  points?: MapPoint[];
  raster?: MapRaster | null;
  selectedId?: string | null;
  onSelect?: (id: string) => void;
  /** The view is fitted to the polygons (or to `fitTo`) when this changes. */
  fitKey?: string;
  fitTo?: (Polygon | MultiPolygon)[];
  tiles?: TileLayer | null;
  className?: string;
  children?: ReactNode;
}

maplibre.setWorkerUrl('/map/maplibre-gl-worker.mjs');

const EMPTY: FeatureCollection = { type: 'FeatureCollection', features: [] };

function polygonFeatures(polygons: MapPolygon[], selectedId: string | null | undefined): FeatureCollection {
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

function pointFeatures(points: MapPoint[]): FeatureCollection {
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

function addLayers(map: maplibre.Map): void {
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
      'circle-radius': 4,
      'circle-color': ['get', 'color'],
      'circle-stroke-color': MAP_COLORS.ink,
      'circle-stroke-width': 1,
    },
  });
  void stateAndCountyLines().then((lines) => {
    (map.getSource('counties') as maplibre.GeoJSONSource | undefined)?.setData(lines.counties);
    (map.getSource('states') as maplibre.GeoJSONSource | undefined)?.setData(lines.states);
  });
}

/** Labels are page elements over the map, so that they take the page's fonts and can be read by any program. */
function label(one: { label?: string; sublabel?: string }): HTMLElement {
  const element = document.createElement('div');
  element.className =
    'pointer-events-none text-center leading-tight text-[13px] text-ink [text-shadow:0_0_3px_#fbf8f0,0_0_3px_#fbf8f0,0_0_6px_#fbf8f0]';
  element.style.fontFamily = 'var(--font-sans)';
  const name = document.createElement('div');
  name.className = 'font-bold';
  name.style.fontFamily = 'var(--font-display)';
  name.textContent = one.label ?? '';
  element.append(name);
  if (one.sublabel) {
    const under = document.createElement('div');
    under.className = 'text-[12px] whitespace-nowrap';
    under.textContent = one.sublabel;
    element.append(under);
  }
  return element;
}

/**
 * The one map of the product. The table beside it is the way in for the keyboard and for screen readers; the map says what it
 * shows and takes clicks. Without WebGL it says so and the page goes on.
 */
export function MapView(props: MapViewProps) {
  const {
    ariaLabel,
    polygons,
    points = [],
    raster = null,
    selectedId,
    onSelect,
    fitKey = '',
    fitTo,
    tiles = null,
    className,
    children,
  } = props;
  const frame = useRef<HTMLDivElement>(null);
  const mapRef = useRef<maplibre.Map | null>(null);
  const markers = useRef<maplibre.Marker[]>([]);
  const select = useRef(onSelect);
  select.current = onSelect;
  const [ready, setReady] = useState(false);
  const [failed, setFailed] = useState(false);

  useEffect(() => {
    if (!frame.current) return;
    let map: maplibre.Map;
    try {
      map = new maplibre.Map({
        container: frame.current,
        style: paperStyle(tiles),
        attributionControl: tiles ? { compact: true } : false,
        dragRotate: false,
        pitchWithRotate: false,
        touchPitch: false,
        center: [-93.5, 42],
        zoom: 5,
        fadeDuration: 0,
      });
    } catch {
      setFailed(true);
      return;
    }
    mapRef.current = map;
    map.touchZoomRotate.disableRotation();
    map.addControl(new maplibre.NavigationControl({ showCompass: false }), 'bottom-right');
    map.addControl(new maplibre.ScaleControl({ unit: 'imperial' }), 'bottom-left');
    map.on('load', () => {
      addLayers(map);
      setReady(true);
    });
    map.on('click', 'polygon-fill', (event) => {
      const id = event.features?.[0]?.properties.id;
      if (typeof id === 'string') select.current?.(id);
    });
    map.on('mousemove', 'polygon-fill', () => {
      map.getCanvas().style.cursor = select.current ? 'pointer' : '';
    });
    map.on('mouseleave', 'polygon-fill', () => {
      map.getCanvas().style.cursor = '';
    });
    const observer = new ResizeObserver(() => map.resize());
    observer.observe(frame.current);
    return () => {
      observer.disconnect();
      map.remove();
      mapRef.current = null;
      setReady(false);
    };
  }, [tiles]);

  useEffect(() => {
    const map = mapRef.current;
    if (!map || !ready) return;
    (map.getSource('polygons') as maplibre.GeoJSONSource).setData(polygonFeatures(polygons, selectedId));
    (map.getSource('points') as maplibre.GeoJSONSource).setData(pointFeatures(points));
    for (const marker of markers.current) marker.remove();
    const crowded = polygons.filter((one) => one.label).map((one) => ({ element: label(one), bounds: boundsOf([one.geometry]) }));
    /** A label wider than its field would lie over the neighbour's: its second line goes first, then all of it. */
    const thin = () => {
      for (const { element, bounds } of crowded) {
        const width = map.project([bounds[2], bounds[1]]).x - map.project([bounds[0], bounds[1]]).x;
        element.style.visibility = width < 34 ? 'hidden' : '';
        if (element.children[1]) (element.children[1] as HTMLElement).style.display = width < 92 ? 'none' : '';
      }
    };
    thin();
    map.on('zoom', thin);
    markers.current = [
      ...crowded.map(({ element, bounds: [west, south, east, north] }) =>
        new maplibre.Marker({ element }).setLngLat([(west + east) / 2, (south + north) / 2]).addTo(map),
      ),
      ...points
        .filter((one) => one.label)
        .map((one) =>
          new maplibre.Marker({ element: label(one), offset: [0, -12] }).setLngLat([one.longitude, one.latitude]).addTo(map),
        ),
    ];
  }, [ready, polygons, points, selectedId]);

  useEffect(() => {
    const map = mapRef.current;
    if (!map || !ready) return;
    if (map.getLayer('raster')) map.removeLayer('raster');
    if (map.getSource('raster')) map.removeSource('raster');
    if (!raster) return;
    const [west, south, east, north] = raster.bounds;
    map.addSource('raster', {
      type: 'image',
      url: raster.url,
      coordinates: [
        [west, north],
        [east, north],
        [east, south],
        [west, south],
      ],
    });
    map.addLayer(
      {
        id: 'raster',
        type: 'raster',
        source: 'raster',
        paint: { 'raster-opacity': 1, 'raster-fade-duration': 0, 'raster-resampling': 'linear' },
      },
      'polygon-line',
    );
  }, [ready, raster]);

  // biome-ignore lint/correctness/useExhaustiveDependencies: the view moves when the key says so, not whenever colours change.
  useEffect(() => {
    const map = mapRef.current;
    const shapes = fitTo ?? polygons.map((one) => one.geometry);
    if (!map || !ready || shapes.length === 0) return;
    const [west, south, east, north] = boundsOf(shapes);
    if (Number.isFinite(west)) map.fitBounds([west, south, east, north], { padding: 48, animate: false, maxZoom: 16.5 });
  }, [ready, fitKey]);

  return (
    <section aria-label={ariaLabel} className={clsx('relative overflow-hidden bg-hull-deep', className)}>
      {failed ? (
        <p className="p-6 text-mute">
          This browser cannot draw the map (WebGL is off). Everything on it stands in the table too.
        </p>
      ) : (
        <div className="absolute inset-0">
          <div ref={frame} className="size-full" />
        </div>
      )}
      {children}
    </section>
  );
}
