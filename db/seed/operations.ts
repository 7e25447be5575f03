import type { FieldFacts } from '@/features/fields/model';
import { type DemoField, MILE_METERS } from './land';

/** The three invented operations, their farms, fields and how each field is farmed. */
export interface DemoOperation {
  key: 'teal' | 'berg' | 'lone';
  name: string;
  county: string;
  soilTested: boolean;
  surveyed: boolean;
  fields: { land: DemoField; facts: Partial<FieldFacts> }[];
}

export const MILE = MILE_METERS;

function land(
  name: string,
  farm: string,
  section: [number, number],
  part: [number, number, number, number],
  cut: DemoField['cut'] = 'none',
): DemoField {
  return { name, farm, section, part, cut };
}

const WIDE: Partial<FieldFacts> = {
  rowWidthInches: 30,
  lastCrop: 'corn',
  tillage: 'reduced',
  irrigated: false,
  seedTreated: true,
};
const NARROW: Partial<FieldFacts> = {
  rowWidthInches: 15,
  lastCrop: 'corn',
  tillage: 'no-till',
  irrigated: false,
  seedTreated: true,
};

export const DEMO_OPERATIONS: DemoOperation[] = [
  {
    key: 'teal',
    name: 'Teal Creek Farms',
    county: 'Franklin',
    soilTested: true,
    surveyed: true,
    fields: [
      {
        land: land('Home 80', 'Home farm', [0, 1], [0, 0.5, 0.25, 1], 'farmstead ne'),
        facts: {
          ...NARROW,
          plantingDate: '2027-05-04',
          drainage: 'somewhat poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 64,
          populationSeedsPerAcre: 140_000,
          probeDepthInches: 14,
          weedProgramme: ['glyphosate'],
          cystEggsPer100cc: 800,
        },
      },
      {
        land: land('Mill Bottom', 'Home farm', [0, 0], [0, 0.5, 0.5, 1], 'creek south'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-08',
          drainage: 'somewhat poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 64,
          populationSeedsPerAcre: 140_000,
          probeDepthInches: 6,
          weedProgramme: ['glyphosate', 'dicamba'],
          cystEggsPer100cc: 2600,
          cystSourceLastGrown: 'PI 88788',
          suddenDeathHistory: true,
        },
      },
      {
        land: land('Slough', 'Home farm', [0, 0], [0, 0, 0.5, 0.5], 'none'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-12',
          drainage: 'poorly',
          tiled: false,
          yieldGoalBushelsPerAcre: 58,
          weedProgramme: ['glyphosate'],
          ironChlorosisHistory: true,
        },
      },
      {
        land: land('Creek Bend', 'Home farm', [0, 0], [0.5, 0.5, 1, 1], 'creek south'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-08',
          drainage: 'moderately well',
          tiled: false,
          yieldGoalBushelsPerAcre: 61,
          weedProgramme: ['glyphosate', 'dicamba'],
        },
      },
      { land: land('East 40', 'Home farm', [0, 1], [0.75, 0.5, 1, 0.75], 'none'), facts: { ...WIDE, lastCrop: null } },
      {
        land: land('Depot', 'Depot farm', [1, 0], [0, 0, 0.5, 0.5], 'railroad se'),
        facts: {
          ...NARROW,
          plantingDate: '2027-05-02',
          drainage: 'somewhat poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 66,
          populationSeedsPerAcre: 140_000,
          weedProgramme: ['glyphosate'],
          whiteMouldHistory: true,
        },
      },
      {
        land: land('Depot North', 'Depot farm', [1, 0], [0, 0.5, 0.5, 1], 'creek south'),
        facts: {
          ...NARROW,
          plantingDate: '2027-05-03',
          drainage: 'somewhat poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 65,
          weedProgramme: ['glyphosate'],
        },
      },
      {
        land: land('School Quarter', 'Depot farm', [1, 1], [0.5, 0.5, 1, 1], 'farmstead sw'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-10',
          drainage: 'well',
          tiled: false,
          yieldGoalBushelsPerAcre: 60,
          weedProgramme: ['glyphosate', 'glufosinate'],
        },
      },
      {
        land: land('Twin Ponds', 'Depot farm', [1, 1], [0, 0.5, 0.5, 1], 'pond'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-11',
          drainage: 'poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 62,
          weedProgramme: ['glyphosate', 'glufosinate'],
          cystEggsPer100cc: 5200,
          cystSourceLastGrown: 'PI 88788',
        },
      },
      {
        land: land('Ridge', 'North farm', [0, 2], [0.5, 0, 1, 0.5], 'none'),
        facts: { ...WIDE, plantingDate: '2027-05-06', drainage: 'well', tiled: false, yieldGoalBushelsPerAcre: 56 },
      },
      {
        land: land('Ridge West', 'North farm', [0, 2], [0, 0, 0.5, 0.5], 'farmstead sw'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-06',
          drainage: 'well',
          tiled: false,
          yieldGoalBushelsPerAcre: 57,
          probeDepthInches: 8,
        },
      },
      {
        land: land('Wheat Ground', 'North farm', [1, 2], [0, 0, 0.25, 0.5], 'none'),
        facts: {
          ...NARROW,
          lastCrop: 'wheat',
          plantingDate: '2027-05-01',
          drainage: 'moderately well',
          tiled: true,
          yieldGoalBushelsPerAcre: 60,
          mustBeOffBy: '2027-09-22',
          mustBeOffChargeBushelsPerAcre: 4,
          weedProgramme: ['glyphosate'],
        },
      },
      {
        land: land('Long 60', 'North farm', [1, 2], [0.25, 0, 0.4375, 0.5], 'none'),
        facts: { ...NARROW, plantingDate: '2027-05-05', drainage: 'somewhat poorly', tiled: true, yieldGoalBushelsPerAcre: 63 },
      },
      {
        land: land('Pivot', 'North farm', [1, 2], [0.5, 0, 1, 0.5], 'none'),
        facts: {
          ...WIDE,
          irrigated: true,
          plantingDate: '2027-05-09',
          drainage: 'somewhat excessively',
          tiled: false,
          yieldGoalBushelsPerAcre: 70,
          weedProgramme: ['glyphosate'],
        },
      },
    ],
  },
  {
    key: 'berg',
    name: 'Bergan and Sons',
    county: 'Wright',
    soilTested: true,
    surveyed: false,
    fields: [
      {
        land: land('Church 80', 'Bergan', [-3, 1], [0, 0, 0.25, 0.5], 'none'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-07',
          drainage: 'poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 63,
          weedProgramme: ['glyphosate', '2,4-D'],
        },
      },
      {
        land: land('Church East', 'Bergan', [-3, 1], [0.25, 0, 0.5, 0.5], 'none'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-07',
          drainage: 'poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 62,
          weedProgramme: ['glyphosate', '2,4-D'],
        },
      },
      {
        land: land('Grandpa', 'Bergan', [-3, 1], [0.5, 0, 1, 0.5], 'farmstead ne'),
        facts: { ...WIDE, plantingDate: '2027-05-09', drainage: 'somewhat poorly', tiled: true, yieldGoalBushelsPerAcre: 64 },
      },
      {
        land: land('North Quarter', 'Bergan', [-3, 1], [0, 0.5, 0.5, 1], 'pond'),
        facts: {
          ...WIDE,
          plantingDate: '2027-05-12',
          drainage: 'very poorly',
          tiled: true,
          yieldGoalBushelsPerAcre: 60,
          ironChlorosisHistory: true,
        },
      },
      {
        land: land('Elevator', 'Bergan', [-2, 1], [0, 0, 0.5, 0.5], 'railroad se'),
        facts: { ...WIDE, plantingDate: '2027-05-05', drainage: 'somewhat poorly', tiled: true, yieldGoalBushelsPerAcre: 65 },
      },
      {
        land: land('Gravel', 'Town place', [-2, 2], [0, 0, 0.5, 0.25], 'none'),
        facts: { ...WIDE, plantingDate: '2027-05-10', drainage: 'excessively', tiled: false, yieldGoalBushelsPerAcre: 48 },
      },
      {
        land: land('Gravel South', 'Town place', [-2, 1], [0.5, 0.5, 1, 0.75], 'none'),
        facts: { ...WIDE, drainage: 'well', tiled: null, yieldGoalBushelsPerAcre: null },
      },
      {
        land: land('Town 40', 'Town place', [-2, 2], [0.5, 0.25, 0.75, 0.5], 'none'),
        facts: {
          ...NARROW,
          plantingDate: '2027-05-20',
          drainage: 'moderately well',
          tiled: false,
          yieldGoalBushelsPerAcre: 59,
          sensitiveNeighbours: ['grapes'],
        },
      },
      {
        land: land('Far Half', 'Town place', [-2, 2], [0, 0.5, 1, 1], 'none'),
        facts: { ...WIDE, plantingDate: '2027-05-06', drainage: 'somewhat poorly', tiled: true, yieldGoalBushelsPerAcre: 62 },
      },
    ],
  },
  {
    key: 'lone',
    name: 'Lonetree Acres',
    county: 'Hancock',
    soilTested: false,
    surveyed: false,
    fields: [
      { land: land('Lone Tree', 'Ruan', [2, 4], [0, 0, 0.5, 0.5], 'none'), facts: { rowWidthInches: 30 } },
      { land: land('Hog Lot', 'Ruan', [2, 4], [0.5, 0, 0.75, 0.25], 'farmstead ne'), facts: {} },
      { land: land('Schoolhouse', 'Ruan', [2, 4], [0, 0.5, 0.5, 1], 'none'), facts: { rowWidthInches: 30, lastCrop: 'corn' } },
      { land: land('West 80', 'Ruan', [1, 4], [0.75, 0, 1, 0.5], 'none'), facts: {} },
      { land: land('Rented Quarter', 'Rented', [3, 4], [0, 0, 0.5, 0.5], 'railroad se'), facts: {} },
      { land: land('Rented 40', 'Rented', [3, 4], [0.5, 0, 0.75, 0.25], 'none'), facts: {} },
    ],
  },
];
