import type { MultiPolygon, Polygon } from 'geojson';
import type { CystSource, DrainageClass, Tillage, Tolerance } from '@/features/placement/engine/model';

/** A field's boundary is a polygon or several, WGS84. */
export type Boundary = Polygon | MultiPolygon;

export interface Field {
  id: string;
  operationId: string;
  farmId: string | null;
  farmName: string | null;
  name: string;
  boundary: Boundary;
  /** On the ellipsoid. */
  areaAcres: number;
  /** Of a point inside the field. */
  latitude: number;
  longitude: number;
  state: string | null;
  elevationFt: number | null;
}

/** How a field is farmed in a season. `null` is unknown, and stays unknown. */
export interface FieldFacts {
  rowWidthInches: number | null;
  plantingDate: string | null;
  populationSeedsPerAcre: number | null;
  seedTreated: boolean | null;
  tillage: Tillage | null;
  irrigated: boolean | null;
  drainage: DrainageClass | null;
  tiled: boolean | null;
  lastCrop: string | null;
  soybeanYearsOfLastFour: number | null;
  yieldGoalBushelsPerAcre: number | null;
  yieldHistoryBushelsPerAcre: number[] | null;
  probeDepthInches: number | null;
  penetrometerPsi: number | null;
  cystEggsPer100cc: number | null;
  cystSourceLastGrown: CystSource | null;
  whiteMouldHistory: boolean | null;
  suddenDeathHistory: boolean | null;
  brownStemRotHistory: boolean | null;
  frogeyeHistory: boolean | null;
  ironChlorosisHistory: boolean | null;
  crustingSoil: boolean | null;
  weedProgramme: Tolerance[] | null;
  weedProgrammeActives: string[] | null;
  sensitiveNeighbours: string[] | null;
  mustBeOffBy: string | null;
  mustBeOffChargeBushelsPerAcre: number | null;
}

/** All facts unknown: where a new field starts. */
export const UNKNOWN_FACTS: FieldFacts = {
  rowWidthInches: null,
  plantingDate: null,
  populationSeedsPerAcre: null,
  seedTreated: null,
  tillage: null,
  irrigated: null,
  drainage: null,
  tiled: null,
  lastCrop: null,
  soybeanYearsOfLastFour: null,
  yieldGoalBushelsPerAcre: null,
  yieldHistoryBushelsPerAcre: null,
  probeDepthInches: null,
  penetrometerPsi: null,
  cystEggsPer100cc: null,
  cystSourceLastGrown: null,
  whiteMouldHistory: null,
  suddenDeathHistory: null,
  brownStemRotHistory: null,
  frogeyeHistory: null,
  ironChlorosisHistory: null,
  crustingSoil: null,
  weedProgramme: null,
  weedProgrammeActives: null,
  sensitiveNeighbours: null,
  mustBeOffBy: null,
  mustBeOffChargeBushelsPerAcre: null,
};
