import type { GeoJSONSource, StyleSpecification } from 'maplibre-gl';

/** Colours of the map, the same as the tokens of app/globals.css (MapLibre cannot read CSS variables). */
export const MAP_COLORS = {
  ground: '#e8e0cc',
  ink: '#221d17',
  paper: '#fbf8f0',
  county: '#cdc1a6',
  state: '#a99a78',
  field: '#efe8d6',
  bloom: '#5b3a86',
} as const;

export interface TileLayer {
  url: string;
  credit: string;
}

/** A map that needs nothing from elsewhere: paper ground, county and state lines; a raster layer only if one is configured. */
export function paperStyle(tiles: TileLayer | null): StyleSpecification {
  return {
    version: 8,
    sources: tiles ? { tiles: { type: 'raster', tiles: [tiles.url], tileSize: 256, attribution: tiles.credit } } : {},
    layers: [
      { id: 'ground', type: 'background', paint: { 'background-color': MAP_COLORS.ground } },
      ...(tiles ? [{ id: 'tiles', type: 'raster' as const, source: 'tiles' }] : []),
    ],
  };
}

export type Source = GeoJSONSource;
