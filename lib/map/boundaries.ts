import { mesh } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';

let loaded: Promise<{ states: GeoJSON.MultiLineString; counties: GeoJSON.MultiLineString }> | null = null;

/** State and county lines of the us-atlas package (US Census Bureau), from our own server, once a page. */
export function stateAndCountyLines() {
  loaded ??= (async () => {
    const counties = (await (await fetch('/map/counties-10m.json')).json()) as Topology<{
      states: GeometryCollection;
      counties: GeometryCollection;
    }>;
    return {
      states: mesh(counties, counties.objects.states),
      counties: mesh(counties, counties.objects.counties, (one, other) => one !== other),
    };
  })();
  return loaded;
}
