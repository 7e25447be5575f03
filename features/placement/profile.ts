/** What the engine is told of a field: its facts, its soil tests laid out as a surface, and its soil survey, put together. */
import type { MultiPolygon, Polygon } from 'geojson';
import type { FieldFacts } from '@/features/fields/model';
import { limeRecommendation, targetPhOf } from '@/features/soil/lime';
import type { SoilMapUnit, SoilSample } from '@/features/soil/model';
import { type FieldSurface, type GeographicPoint, surfaceOfField, valueShares } from '@/features/soil/surface';
import { DRAINAGE_CLASSES, type FieldProfile, FLOODING_FREQUENCIES, type FloodingFrequency } from './engine/model';

/** The field itself: what `features/fields` keeps of it. */
export interface ProfiledField {
  id: string;
  name: string;
  areaAcres: number;
  latitude: number;
  longitude: number;
  elevationFt: number | null;
  state: string | null;
  geometry: Polygon | MultiPolygon;
}

/** What a profile needs of a soil sample. */
export type ProfiledSample = Pick<
  SoilSample,
  | 'sampledOn'
  | 'latitude'
  | 'longitude'
  | 'depthFromInches'
  | 'ph'
  | 'bufferPh'
  | 'bufferMethod'
  | 'organicMatterPercent'
  | 'cationExchangeCapacity'
  | 'carbonatePercent'
  | 'electricalConductivity'
  | 'cystEggsPer100cc'
>;

/** What a profile needs of a map unit. */
export type ProfiledMapUnit = Pick<
  SoilMapUnit,
  'share' | 'drainage' | 'hydrologicGroup' | 'slopePercent' | 'availableWaterInches' | 'flooding' | 'surfaceCarbonatePercent'
>;

export interface ProfileInput {
  field: ProfiledField;
  facts: FieldFacts;
  soilSamples: readonly ProfiledSample[];
  mapUnits: readonly ProfiledMapUnit[];
}

/** Soil tests are taken every two to four years; older ones are history. */
const YEARS_OF_TESTS = 4;
/** Samples that start this deep are subsoil. */
const SUBSOIL_INCHES = 6;
/** Chlorosis comes from the alkaline part alone, so its carbonate and salts are what count. */
const ALKALINE_PH = 7.3;
/** A survey that knows less of the field than this says nothing about the whole. */
const ENOUGH_OF_FIELD = 0.5;
/** Flooding that reaches a fifth of the field is the field's. */
const FLOODED_SHARE = 0.2;

function average(values: readonly (number | null)[]): number | null {
  const known = values.filter((value): value is number => value !== null);
  return known.length === 0 ? null : known.reduce((sum, value) => sum + value, 0) / known.length;
}

/** Topsoil samples of the newest test and the four years up to it; samples without a date count as new. */
export function currentSamples<Sample extends Pick<SoilSample, 'sampledOn' | 'depthFromInches'>>(
  samples: readonly Sample[],
): Sample[] {
  const topsoil = samples.filter((sample) => (sample.depthFromInches ?? 0) < SUBSOIL_INCHES);
  const years = topsoil.flatMap((sample) => (sample.sampledOn === null ? [] : [Number(sample.sampledOn.slice(0, 4))]));
  const newest = Math.max(...years, 0);
  return topsoil.filter((sample) => sample.sampledOn === null || Number(sample.sampledOn.slice(0, 4)) > newest - YEARS_OF_TESTS);
}

/** The points of one soil property over a field: those samples that have it and a place. */
export function pointsOf<Sample extends Pick<SoilSample, 'longitude' | 'latitude'>>(
  samples: readonly Sample[],
  value: (sample: Sample) => number | null,
): GeographicPoint[] {
  return samples.flatMap((sample) => {
    const measured = value(sample);
    if (measured === null || sample.longitude === null || sample.latitude === null) return [];
    return [{ longitude: sample.longitude, latitude: sample.latitude, value: measured }];
  });
}

/** The water-pH surface of a field from its current samples, ready to draw; `null` without a located test. */
export function phSurface(
  geometry: Polygon | MultiPolygon,
  samples: readonly Pick<SoilSample, 'sampledOn' | 'depthFromInches' | 'longitude' | 'latitude' | 'ph'>[],
): FieldSurface | null {
  const points = pointsOf(currentSamples(samples), (sample) => sample.ph);
  return points.length === 0 ? null : surfaceOfField(points, geometry);
}

function phOf(
  { field }: ProfileInput,
  samples: readonly ProfiledSample[],
): Pick<FieldProfile, 'phShares' | 'phPointCount' | 'phErrorStandardDeviation'> {
  const points = pointsOf(samples, (sample) => sample.ph);
  const surface = points.length === 0 ? null : surfaceOfField(points, field.geometry);
  if (surface)
    return {
      phShares: valueShares(surface, 0.1),
      phPointCount: points.length,
      phErrorStandardDeviation: surface.leaveOneOutRmse,
    };
  // Averages over the field without a place: one value for all of it.
  const averages = samples.filter((sample) => sample.ph !== null);
  const mean = average(averages.map((sample) => sample.ph));
  if (mean === null) return { phShares: null, phPointCount: 0, phErrorStandardDeviation: null };
  return {
    phShares: [{ value: Math.round(mean * 10) / 10, share: 1 }],
    phPointCount: averages.length,
    phErrorStandardDeviation: null,
  };
}

/** Lime for the sour samples, averaged; `null` when nothing is sour or tested. */
function limeOf({ field }: ProfileInput, samples: readonly ProfiledSample[]): FieldProfile['limeTonsPerAcre'] {
  const recommendations = samples.flatMap((sample) => {
    if (sample.ph === null || sample.ph >= targetPhOf(field.state, sample.organicMatterPercent).ph) return [];
    return [
      limeRecommendation({
        state: field.state,
        ph: sample.ph,
        targetPh: null,
        bufferPh: sample.bufferPh,
        bufferMethod: sample.bufferMethod,
        organicMatterPercent: sample.organicMatterPercent,
      }),
    ];
  });
  const worked = recommendations.filter((one) => one.tonsPerAcre !== null);
  const telling = worked[0] ?? recommendations[0];
  if (!telling) return null;
  if (worked.length === 0) return { tons: null, method: telling.note, source: telling.source };
  // The index in a method's name is one sample's; the average is of the method.
  const method = (telling.method ?? telling.note).split(', lime test index')[0] as string;
  return { tons: average(worked.map((one) => one.tonsPerAcre)), method, source: telling.source };
}

/** Mean over map units weighted by share, when they know it for half of the field or more. */
function surveyMean(units: readonly ProfiledMapUnit[], value: (unit: ProfiledMapUnit) => number | null): number | null {
  let sum = 0;
  let known = 0;
  for (const unit of units) {
    const one = value(unit);
    if (one === null) continue;
    sum += one * unit.share;
    known += unit.share;
  }
  return known >= ENOUGH_OF_FIELD ? sum / known : null;
}

/** Shares of the known part by a word, largest first; empty when less than half of the field is known. */
function surveyShares<Word extends string>(
  units: readonly ProfiledMapUnit[],
  word: (unit: ProfiledMapUnit) => Word | null,
): { word: Word; share: number }[] {
  const shares = new Map<Word, number>();
  let known = 0;
  for (const unit of units) {
    const one = word(unit);
    if (one === null) continue;
    shares.set(one, (shares.get(one) ?? 0) + unit.share);
    known += unit.share;
  }
  if (known < ENOUGH_OF_FIELD) return [];
  return [...shares]
    .map(([one, share]) => ({ word: one, share: share / known }))
    .sort((a, b) => b.share - a.share || (a.word < b.word ? -1 : 1));
}

/** The survey's classes where there is a survey, else the one the grower states. */
function drainageOf({ facts, mapUnits }: ProfileInput): FieldProfile['drainageShares'] {
  const surveyed = surveyShares(mapUnits, (unit) => unit.drainage);
  if (surveyed.length > 0) {
    return surveyed
      .map(({ word, share }) => ({ class: word, share }))
      .sort((a, b) => DRAINAGE_CLASSES.indexOf(a.class) - DRAINAGE_CLASSES.indexOf(b.class));
  }
  return facts.drainage === null ? null : [{ class: facts.drainage, share: 1 }];
}

/** The most frequent flooding that, with all worse, reaches a fifth of the field. */
function floodingOf(units: readonly ProfiledMapUnit[]): FloodingFrequency | null {
  const shares = surveyShares(units, (unit) => unit.flooding);
  if (shares.length === 0) return null;
  let reached = 0;
  for (const frequency of [...FLOODING_FREQUENCIES].reverse()) {
    reached += shares.find((one) => one.word === frequency)?.share ?? 0;
    if (reached >= FLOODED_SHARE) return frequency;
  }
  return 'none';
}

/**
 * Puts a field's profile together. Pure: the same inputs give the same profile. Tests of the last four years count; pH is
 * averaged as pH over its surface; what nobody knows stays `null`.
 */
export function fieldProfile(input: ProfileInput): FieldProfile {
  const { field, facts, mapUnits } = input;
  const samples = currentSamples(input.soilSamples);
  const alkaline = samples.filter((sample) => sample.ph !== null && sample.ph > ALKALINE_PH);
  const ofAlkaline = (value: (sample: ProfiledSample) => number | null) =>
    average(alkaline.map(value)) ?? average(samples.map(value));
  const bufferMethods = new Set(samples.flatMap((sample) => (sample.bufferPh === null ? [] : [sample.bufferMethod])));
  return {
    id: field.id,
    name: field.name,
    areaAcres: field.areaAcres,
    latitude: field.latitude,
    longitude: field.longitude,
    elevationFt: field.elevationFt,
    state: field.state,

    yieldGoalBushelsPerAcre: facts.yieldGoalBushelsPerAcre,
    yieldHistoryBushelsPerAcre: facts.yieldHistoryBushelsPerAcre ?? [],

    rowWidthInches: facts.rowWidthInches,
    plantingDate: facts.plantingDate,
    populationSeedsPerAcre: facts.populationSeedsPerAcre,
    seedTreated: facts.seedTreated,
    tillage: facts.tillage,
    irrigated: facts.irrigated,
    lastCrop: facts.lastCrop === null ? null : facts.lastCrop.trim().toLowerCase(),
    soybeanYearsOfLastFour: facts.soybeanYearsOfLastFour,
    mustBeOffBy: facts.mustBeOffBy,
    mustBeOffChargeBushelsPerAcre: facts.mustBeOffChargeBushelsPerAcre,
    weedProgramme: facts.weedProgramme,
    weedProgrammeActives: facts.weedProgrammeActives ?? [],
    sensitiveNeighbours: facts.sensitiveNeighbours ?? [],

    drainageShares: drainageOf(input),
    tiled: facts.tiled,
    floodingFrequency: floodingOf(mapUnits),
    slopePercent: surveyMean(mapUnits, (unit) => unit.slopePercent),
    hydrologicGroup: surveyShares(mapUnits, (unit) => unit.hydrologicGroup)[0]?.word ?? null,
    availableWaterInches: surveyMean(mapUnits, (unit) => unit.availableWaterInches),
    probeDepthInches: facts.probeDepthInches,
    penetrometerPsi: facts.penetrometerPsi,

    ...phOf(input, samples),
    bufferPh: average(samples.map((sample) => sample.bufferPh)),
    bufferMethod: bufferMethods.size === 1 ? ([...bufferMethods][0] as string | null) : null,
    limeTonsPerAcre: limeOf(input, samples),
    organicMatterPercent: average(samples.map((sample) => sample.organicMatterPercent)),
    cationExchangeCapacity: average(samples.map((sample) => sample.cationExchangeCapacity)),
    carbonatePercent:
      ofAlkaline((sample) => sample.carbonatePercent) ?? surveyMean(mapUnits, (unit) => unit.surfaceCarbonatePercent),
    electricalConductivity: ofAlkaline((sample) => sample.electricalConductivity),
    cystEggsPer100cc: facts.cystEggsPer100cc ?? average(samples.map((sample) => sample.cystEggsPer100cc)),
    cystSourceLastGrown: facts.cystSourceLastGrown,

    whiteMouldHistory: facts.whiteMouldHistory,
    suddenDeathHistory: facts.suddenDeathHistory,
    brownStemRotHistory: facts.brownStemRotHistory,
    frogeyeHistory: facts.frogeyeHistory,
    ironChlorosisHistory: facts.ironChlorosisHistory,
    crustingSoil: facts.crustingSoil,
  };
}
