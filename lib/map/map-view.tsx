'use client';

import 'maplibre-gl/dist/maplibre-gl.css';
import './map.css';
import clsx from 'clsx';
import type { MultiPolygon, Polygon } from 'geojson';
import * as maplibre from 'maplibre-gl';
import { type ReactNode, useEffect, useRef, useState } from 'react';
import { boundsOf } from './bounds';
import { startDrawing } from './draw';
import { addLabels } from './labels';
import { addLayers, pointFeatures, polygonFeatures } from './layers';
import { paperStyle, type TileLayer } from './style';

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
  /** Free ground around what is fitted, pixels. */
  fitPadding?: number | { top: number; right: number; bottom: number; left: number };
  /** While given, clicks draw an outline instead of selecting; it is handed over when closed. */
  onDrawn?: (outline: Polygon) => void;
  tiles?: TileLayer | null;
  className?: string;
  children?: ReactNode;
}

const NO_POINTS: MapPoint[] = [];

maplibre.setWorkerUrl('/map/maplibre-gl-worker.mjs');

/**
 * The one map of the product. The table beside it is the way in for the keyboard and for screen readers; the map says what it
 * shows and takes clicks. Without WebGL it says so and the page goes on.
 */
export function MapView(props: MapViewProps) {
  const {
    ariaLabel,
    polygons,
    points = NO_POINTS,
    raster = null,
    selectedId,
    onSelect,
    fitKey = '',
    fitTo,
    fitPadding = 48,
    onDrawn,
    tiles = null,
    className,
    children,
  } = props;
  const frame = useRef<HTMLDivElement>(null);
  const mapRef = useRef<maplibre.Map | null>(null);
  const select = useRef(onSelect);
  select.current = onDrawn ? undefined : onSelect;
  const drawn = useRef(onDrawn);
  drawn.current = onDrawn;
  const drawing = onDrawn !== undefined;
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
    let wasHidden = frame.current.clientWidth === 0;
    const observer = new ResizeObserver(([entry]) => {
      map.resize();
      // A map in a tab that was not shown had no size to fit its fields into.
      const hidden = entry?.contentRect.width === 0;
      if (wasHidden && !hidden) fitNow.current();
      wasHidden = hidden;
    });
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
  }, [ready, polygons, points, selectedId]);

  useEffect(() => {
    const map = mapRef.current;
    return map && ready ? addLabels(map, polygons, points) : undefined;
  }, [ready, polygons, points]);

  useEffect(() => {
    const map = mapRef.current;
    return map && ready && drawing ? startDrawing(map, (outline) => drawn.current?.(outline)) : undefined;
  }, [ready, drawing]);

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

  const fitNow = useRef<() => void>(() => undefined);
  fitNow.current = () => {
    const map = mapRef.current;
    const shapes = fitTo ?? polygons.map((one) => one.geometry);
    if (!map || !ready || shapes.length === 0) return;
    const [west, south, east, north] = boundsOf(shapes);
    if (!Number.isFinite(west)) return;
    const narrow = map.getContainer().clientWidth < 480;
    const padding = narrow && typeof fitPadding === 'number' ? Math.min(fitPadding, 20) : fitPadding;
    map.fitBounds([west, south, east, north], { padding, animate: false, maxZoom: 16.5 });
  };
  // biome-ignore lint/correctness/useExhaustiveDependencies: the view moves when the key says so, not whenever colours change.
  useEffect(() => fitNow.current(), [ready, fitKey]);

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
