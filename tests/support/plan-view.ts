import type { Polygon } from 'geojson';
import { figuresOf, type PlanLine, type PlanView, totalsOf } from '@/features/plans/model';
import { anAssessment } from './plan-world';

/** A rectangle near 42.5° N, 93.5° W with a bite out of its corner, `east` and `north` in degrees. */
export function aBoundary(west = -93.5, south = 42.5, east = 0.008, north = 0.006): Polygon {
  return {
    type: 'Polygon',
    coordinates: [
      [
        [west, south],
        [west + east, south],
        [west + east, south + north / 2],
        [west + east * 0.7, south + north / 2],
        [west + east * 0.7, south + north],
        [west, south + north],
        [west, south],
      ],
    ],
  };
}

/** One line of an invented plan. */
export function aLine(overrides: Partial<PlanLine> & { code?: string } = {}): PlanLine {
  const { code = 'CR 24', ...rest } = overrides;
  const fieldName = rest.fieldName ?? 'Home 80';
  return {
    id: `row ${fieldName}`,
    fieldId: `field ${fieldName}`,
    fieldName,
    farmName: 'Home farm',
    partName: '',
    geometry: aBoundary(),
    areaAcres: 79.6,
    variety: { id: code, code, relativeMaturity: 2.4 },
    lot: {
      id: `${code}-lot`,
      lotNumber: `${code}-71`,
      seedsPerLb: 2700,
      germinationPercent: 92,
      treatment: 'fungicide',
      unitSizeSeeds: 140_000,
      priceCentsPerUnit: 6200,
      unitsFree: 500,
    },
    rowWidthInches: 15,
    populationSeedsPerAcre: 140_000,
    locked: false,
    note: null,
    assessment: anAssessment({ id: code, code }, 58.2),
    runnerUp: { code: 'CR 22', differenceBushels: -0.6 },
    caution: null,
    plantedOn: null,
    ...rest,
  };
}

/** A plan of the given lines. */
export function aPlanView(lines: PlanLine[] = [aLine()]): PlanView {
  return {
    planId: 'plan',
    operationId: 'operation',
    operationName: 'Teal Creek Farms',
    dealershipName: 'Cedar Ridge Seed',
    season: 2027,
    soybeanPriceCentsPerBushel: 1050,
    state: 'agreed',
    revision: 7,
    signedName: 'Ada Holt',
    signedAt: Date.UTC(2027, 2, 3),
    lines,
    totals: totalsOf(lines),
    events: [],
    choices: {},
    lots: {},
    supply: [],
  };
}

export { figuresOf };
