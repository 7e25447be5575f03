import { geojson } from './geojson';
import { kml } from './kml';
import type { BoundaryReader } from './reader';
import { shapefile } from './shapefile';

/** The boundary formats, asked in this order. */
export const BOUNDARY_READERS: readonly BoundaryReader[] = [kml, geojson, shapefile];
