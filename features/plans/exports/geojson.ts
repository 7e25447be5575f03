/** The plan as GeoJSON (RFC 7946, WGS84): one feature a field or part, only those with a variety. Pure. */
import { CAUTIONS } from '@/lib/ui/cautions';
import { figuresOf, type PlanView } from '../model';

/** Attribute names of at most ten characters, the same in GeoJSON and in the shapefile. */
export interface PlanAttributes {
  FIELD: string;
  PART: string;
  FARM: string;
  VARIETY: string;
  RM: number;
  LOT: string;
  ACRES: number;
  ROW_IN: number | null;
  SEEDS_AC: number | null;
  SEEDS_FT: number | null;
  LB_AC: number | null;
  UNITS: number | null;
}

function rounded(value: number | null, digits: number): number | null {
  return value === null ? null : Number(value.toFixed(digits));
}

/** Features of the plan with their attributes. */
export function planFeatures(view: PlanView) {
  return view.lines
    .filter((line) => line.variety !== null)
    .map((line) => {
      const figures = figuresOf(line);
      const properties: PlanAttributes = {
        FIELD: line.fieldName,
        PART: line.partName,
        FARM: line.farmName ?? '',
        VARIETY: line.variety?.code ?? '',
        RM: line.variety?.relativeMaturity ?? 0,
        LOT: line.lot?.lotNumber ?? '',
        ACRES: rounded(line.areaAcres, 2) as number,
        ROW_IN: line.rowWidthInches,
        SEEDS_AC: line.populationSeedsPerAcre,
        SEEDS_FT: rounded(figures.seedsPerFoot, 2),
        LB_AC: rounded(figures.poundsPerAcre, 1),
        UNITS: rounded(figures.units, 2),
      };
      return { type: 'Feature' as const, geometry: line.geometry, properties };
    });
}

/** The file, with the cautions as a member of the collection. */
export function planGeojson(view: PlanView): string {
  const cautions = [CAUTIONS.yield, CAUTIONS.treatedSeed, CAUTIONS.herbicide];
  const name = `${view.operationName} ${view.season} plan`;
  return JSON.stringify({ type: 'FeatureCollection', name, cautions, features: planFeatures(view) });
}
