import type { MultiPolygon, Polygon } from 'geojson';
import type { DrainageClass, FloodingFrequency } from '@/features/placement/engine/model';

/** A map unit's part of a field, as the survey describes it. `null` is not said. */
export interface SurveyUnit {
  mapUnitKey: string;
  symbol: string;
  name: string;
  geometry: Polygon | MultiPolygon;
  areaAcres: number;
  /** Share of the field, 0..1. */
  share: number;
  drainage: DrainageClass | null;
  hydrologicGroup: string | null;
  slopePercent: number | null;
  /** Plant-available water 0–100 cm, inches. */
  availableWaterInches: number | null;
  flooding: FloodingFrequency | null;
  /** 0–30 cm. */
  surfacePh: number | null;
  surfaceCarbonatePercent: number | null;
}

export interface SurveyedField {
  id: string;
  name: string;
  areaAcres: number;
  /** Largest first; empty where the survey does not reach. */
  mapUnits: SurveyUnit[];
  /** Share of the field the survey covers, 0..1. */
  coveredShare: number;
}

export interface SurveyInspection {
  /** 'IA081' */
  areas: string[];
  fields: SurveyedField[];
  notes: string[];
  problems: string[];
}

export interface SurveyTarget {
  id: string;
  name: string;
  geometry: Polygon | MultiPolygon;
}
