/** Plain fields, varieties and seasons for tests of the engine; each test says only what matters to it. Invented. */
import type { ClimateForPlace } from '@/features/placement/climate/model';
import { climateForPlace } from '@/features/placement/climate/place';
import type {
  DrainageClass,
  FieldProfile,
  PlacementRules,
  SeasonContext,
  VarietyProfile,
} from '@/features/placement/engine/model';

const climates = new Map<string, ClimateForPlace>();

/** Climate normals at a place, the same object for the same place. */
export function climateAt(latitude: number, longitude: number): ClimateForPlace {
  const key = `${latitude} ${longitude}`;
  const known = climates.get(key);
  if (known) return known;
  const climate = climateForPlace({ latitude, longitude, elevationFt: null });
  climates.set(key, climate);
  return climate;
}

/** All of a field in one drainage class. */
export function drained(drainageClass: DrainageClass): FieldProfile['drainageShares'] {
  return [{ class: drainageClass, share: 1 }];
}

/** A whole field at one pH. */
export function allAtPh(ph: number): FieldProfile['phShares'] {
  return [{ value: ph, share: 1 }];
}

/** A field near Ames, Iowa, with everything known and nothing wrong; 80 ac, 30 in rows, goal 62 bu, planted 8 May. */
export function aField(changes: Partial<FieldProfile> = {}): FieldProfile {
  return {
    id: 'field-1',
    name: 'Mill Bottom',
    areaAcres: 80,
    latitude: 42,
    longitude: -93.6,
    elevationFt: 1000,
    state: 'IA',
    yieldGoalBushelsPerAcre: 62,
    yieldHistoryBushelsPerAcre: [],
    rowWidthInches: 30,
    plantingDate: '2027-05-08',
    populationSeedsPerAcre: 140000,
    seedTreated: true,
    tillage: 'conventional',
    irrigated: false,
    lastCrop: 'corn',
    soybeanYearsOfLastFour: 2,
    mustBeOffBy: null,
    mustBeOffChargeBushelsPerAcre: null,
    weedProgramme: [],
    weedProgrammeActives: [],
    sensitiveNeighbours: [],
    drainageShares: drained('well'),
    tiled: true,
    floodingFrequency: 'none',
    slopePercent: 1,
    hydrologicGroup: 'B',
    availableWaterInches: 10,
    probeDepthInches: 12,
    penetrometerPsi: null,
    phShares: allAtPh(6.4),
    phPointCount: 30,
    phErrorStandardDeviation: 0.15,
    bufferPh: null,
    bufferMethod: null,
    limeTonsPerAcre: null,
    organicMatterPercent: 4,
    cationExchangeCapacity: 20,
    carbonatePercent: 0,
    electricalConductivity: 0.1,
    cystEggsPer100cc: 0,
    cystSourceLastGrown: null,
    whiteMouldHistory: false,
    suddenDeathHistory: false,
    brownStemRotHistory: false,
    frogeyeHistory: false,
    ironChlorosisHistory: false,
    crustingSoil: false,
    ...changes,
  };
}

/** A field of which nothing is known but where it lies. */
export function anUnknownField(changes: Partial<FieldProfile> = {}): FieldProfile {
  const known = aField();
  const blank = Object.fromEntries(
    Object.entries(known).map(([key, value]) => [key, Array.isArray(value) ? null : typeof value === 'string' ? value : null]),
  ) as unknown as FieldProfile;
  return {
    ...blank,
    areaAcres: known.areaAcres,
    latitude: known.latitude,
    longitude: known.longitude,
    plantingDate: null,
    tillage: null,
    lastCrop: null,
    floodingFrequency: null,
    hydrologicGroup: null,
    yieldHistoryBushelsPerAcre: [],
    weedProgrammeActives: [],
    sensitiveNeighbours: [],
    phPointCount: 0,
    ...changes,
  };
}

/** A variety of RM 2.4 with middling everything: rated 6, medium height and bush, PI 88788, conventional. */
export function aVariety(changes: Partial<VarietyProfile> = {}): VarietyProfile {
  const code = changes.code ?? 'V 24';
  return {
    id: code,
    code,
    relativeMaturity: 2.4,
    height: 'medium',
    bushType: 'medium',
    standability: 6,
    emergence: 6,
    phytophthoraGenes: ['1k'],
    phytophthora: 6,
    suddenDeath: 6,
    brownStemRot: 6,
    whiteMould: 6,
    frogeye: 6,
    stemCanker: 6,
    charcoalRot: 6,
    ironChlorosis: 6,
    drought: 6,
    cystNematodeSource: 'PI 88788',
    tolerances: [],
    seedsPerLb: 2800,
    germinationPercent: 90,
    unitsOnHand: null,
    release: 'full',
    trialAdvantage: 0,
    trialAdvantageStandardError: 0,
    ...changes,
  };
}

/** Season 2027 on normals at a place (Ames unless told otherwise), current parameters. */
export function aSeason(changes: Partial<SeasonContext> & { latitude?: number; longitude?: number } = {}): SeasonContext {
  const { latitude = 42, longitude = -93.6, ...rest } = changes;
  return { year: 2027, climate: climateAt(latitude, longitude), parameters: 'current', ...rest };
}

/** No overrides, no zone, full and limited releases placed. */
export function someRules(changes: Partial<PlacementRules> = {}): PlacementRules {
  return { overrides: {}, zone: null, releasesPlaced: ['full', 'limited'], ...changes };
}

/** A line-up of `count` invented varieties, different in every trait, from RM 1.6 to 3.0; the same every time. */
export function aLineUp(count: number): VarietyProfile[] {
  const rating = (i: number, step: number) => 1 + ((i * step) % 9);
  return Array.from({ length: count }, (_, i) =>
    aVariety({
      code: `V ${i}`,
      relativeMaturity: Math.round((1.6 + ((i * 7) % 15) / 10) * 10) / 10,
      height: (['short', 'medium', 'tall'] as const)[i % 3]!,
      bushType: (['upright', 'medium', 'bushy'] as const)[(i >> 1) % 3]!,
      standability: rating(i, 5),
      emergence: rating(i, 2),
      phytophthora: rating(i, 7),
      suddenDeath: i % 11 === 0 ? null : rating(i, 4),
      whiteMould: rating(i, 3),
      ironChlorosis: rating(i, 8),
      phytophthoraGenes: [['1a'], ['1c', '3a'], ['1k'], []][i % 4]!,
      cystNematodeSource: (['PI 88788', 'Peking', 'none', null] as const)[i % 4]!,
    }),
  );
}
