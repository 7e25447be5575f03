import type { MultiPolygon, Polygon } from 'geojson';
import type { SoilMapUnit } from '../model';

/** A map unit's part of a field, as the survey describes it, before it is kept. */
export type SurveyUnit = Omit<SoilMapUnit, 'id' | 'fieldId'>;

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
