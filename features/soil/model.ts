import type { MultiPolygon, Polygon } from 'geojson';
import type { DrainageClass, FloodingFrequency } from '@/features/placement/engine/model';

/** One soil sample as a laboratory reported it; `null` is not measured. */
export interface SoilSample {
  id: string;
  operationId: string;
  /** `null` while it lies in no field of the operation. */
  fieldId: string | null;
  uploadId: string | null;
  sampleNumber: string | null;
  laboratory: string | null;
  sampledOn: string | null;
  sampledYearOnly: boolean;
  /** `null` coordinates: a field average. */
  latitude: number | null;
  longitude: number | null;
  depthFromInches: number | null;
  depthToInches: number | null;
  ph: number | null;
  saltPh: number | null;
  bufferPh: number | null;
  bufferMethod: string | null;
  organicMatterPercent: number | null;
  cationExchangeCapacity: number | null;
  phosphorusPpm: number | null;
  phosphorusMethod: string | null;
  potassiumPpm: number | null;
  calciumPpm: number | null;
  magnesiumPpm: number | null;
  carbonatePercent: number | null;
  /** dS/m, 1:1. */
  electricalConductivity: number | null;
  cystEggsPer100cc: number | null;
}

/** Part of a field covered by one soil survey map unit. */
export interface SoilMapUnit {
  id: string;
  fieldId: string;
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
  surfacePh: number | null;
  surfaceCarbonatePercent: number | null;
}
