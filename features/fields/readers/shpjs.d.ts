/** The two functions of shpjs that are used here; the package ships no types. */
declare module 'shpjs' {
  import type { Geometry } from 'geojson';

  export function parseShp(shp: DataView, projection?: string): (Geometry | null)[];
  export function parseDbf(dbf: DataView, encoding?: string): Record<string, unknown>[];
}
