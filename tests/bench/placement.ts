import type { Polygon } from 'geojson';
import { packRanking } from '@/db/packed-ranking';
import { UNKNOWN_FACTS } from '@/features/fields/model';
import { climateForPlace } from '@/features/placement/climate/place';
import { seasonLine } from '@/features/placement/climate/season-line';
import type { FieldProfile, PlacementRules, SeasonContext, VarietyProfile } from '@/features/placement/engine/model';
import { plainVariety, rank } from '@/features/placement/engine/rank';
import { withFacts } from '@/features/placement/engine/what-if';
import { fieldProfile, type ProfiledSample } from '@/features/placement/profile';
import { type Figure, medianMilliseconds, seeded } from './figure';

const RULES: PlacementRules = { overrides: {}, zone: null, releasesPlaced: ['full', 'limited'] };
const FIELDS = 6000;

function lineUp(): VarietyProfile[] {
  const random = seeded(11);
  const rating = () => 3 + Math.floor(random() * 7);
  return Array.from({ length: 60 }, (_, i) => ({
    ...plainVariety(1.6 + (i % 24) / 10),
    id: `variety-${i}`,
    code: `V${i}`,
    height: (['short', 'medium', 'tall'] as const)[i % 3] ?? null,
    bushType: (['upright', 'medium', 'bushy'] as const)[(i * 7) % 3] ?? null,
    standability: rating(),
    phytophthora: rating(),
    suddenDeath: rating(),
    whiteMould: rating(),
    ironChlorosis: rating(),
  }));
}

function squareAt(latitude: number, longitude: number): Polygon {
  const [east, north] = [0.0048, 0.0036];
  const ring = [
    [0, 0],
    [east, 0],
    [east, north],
    [0, north],
    [0, 0],
  ].map(([x, y]) => [longitude + (x as number), latitude + (y as number)]);
  return { type: 'Polygon', coordinates: [ring] };
}

/** A quarter-quarter section somewhere in the Corn Belt, with 40 soil points. */
function profileAt(index: number): FieldProfile {
  const random = seeded(index + 1);
  const latitude = 39 + random() * 6;
  const longitude = -98 + random() * 14;
  const soilSamples = Array.from({ length: 40 }, (): ProfiledSample => {
    const x = random();
    return {
      sampledOn: '2026-10-01',
      latitude: latitude + random() * 0.0036,
      longitude: longitude + x * 0.0048,
      depthFromInches: 0,
      ph: 5.6 + 1.6 * x + 0.4 * random(),
      bufferPh: 6.6,
      bufferMethod: 'SMP',
      organicMatterPercent: 3,
      cationExchangeCapacity: 18,
      carbonatePercent: null,
      electricalConductivity: null,
      cystEggsPer100cc: null,
    };
  });
  return fieldProfile({
    field: {
      id: `field-${index}`,
      name: `Field ${index}`,
      areaAcres: 40,
      latitude,
      longitude,
      elevationFt: null,
      state: 'IA',
      geometry: squareAt(latitude, longitude),
    },
    facts: {
      ...UNKNOWN_FACTS,
      rowWidthInches: 30,
      drainage: 'somewhat poorly',
      tiled: index % 2 === 0,
      plantingDate: '2027-05-08',
    },
    soilSamples,
    mapUnits: [],
  });
}

function seasonOf({ latitude, longitude }: FieldProfile): SeasonContext {
  return { year: 2027, climate: climateForPlace({ latitude, longitude, elevationFt: null }), parameters: 'current' };
}

export function placementFigures(): Figure[] {
  const varieties = lineUp();
  const startOfAll = performance.now();
  rank(profileAt(0), varieties, seasonOf(profileAt(0)), RULES);
  const firstOfAll = performance.now() - startOfAll;

  const field = profileAt(1);
  const season = seasonOf(field);
  let next = 2;
  const cold = medianMilliseconds(
    () => {
      const one = profileAt(next++);
      rank(one, varieties, seasonOf(one), RULES);
    },
    30,
    10,
  );
  const warm = medianMilliseconds(() => void rank(profileAt(1), varieties, season, RULES), 30, 10);
  const surface = medianMilliseconds(() => void profileAt(1), 30, 5);
  let day = 0;
  const whatIf = medianMilliseconds(
    () => {
      day = (day + 1) % 20;
      const changed = withFacts(field, {
        plantingDate: `2027-05-${String(day + 8).padStart(2, '0')}`,
        rowWidthInches: 15 + (day % 4) * 5,
      });
      rank(changed, varieties, season, RULES);
    },
    60,
    20,
  );
  let maturity = 0;
  const line = medianMilliseconds(
    () => {
      for (let i = 0; i < 100; i++) {
        maturity = (maturity + 0.01) % 3;
        seasonLine({
          climate: season.climate,
          relativeMaturity: 1 + maturity,
          plantingDate: '2027-05-08',
          parameters: 'current',
        });
      }
    },
    20,
    5,
  );

  const memoryBefore = process.memoryUsage().heapUsed;
  let bytes = 0;
  let peak = 0;
  const start = performance.now();
  for (let i = 0; i < FIELDS; i++) {
    const one = profileAt(i);
    bytes += JSON.stringify(packRanking(rank(one, varieties, seasonOf(one), RULES))).length;
    if (i % 100 === 0) peak = Math.max(peak, process.memoryUsage().heapUsed);
  }
  const stored = (performance.now() - start) / 1000;
  const megabytes = (value: number) => value / 1_048_576;
  return [
    { what: '60 varieties, one field, first of the process', measured: firstOfAll, unit: 'ms', goal: null },
    { what: '60 varieties, one field with its surface, cold season', measured: cold, unit: 'ms', goal: 20 },
    { what: '60 varieties, one field with its surface, known season', measured: warm, unit: 'ms', goal: 5 },
    { what: '  of that the profile and its pH surface (40 points)', measured: surface, unit: 'ms', goal: null },
    { what: 'what-if of 60 varieties', measured: whatIf, unit: 'ms', goal: 50 },
    { what: 'one season line, climate known', measured: line / 100, unit: 'ms', goal: 0.3 },
    {
      what: `${FIELDS.toLocaleString('en-US')} fields × 60 varieties, profiled, ranked and written out`,
      measured: stored,
      unit: 's',
      goal: 15,
      note: `${Math.round(megabytes(bytes))} MB of JSON`,
    },
    { what: '  heap while at it, most above the start', measured: megabytes(peak - memoryBefore), unit: 'MB', goal: 200 },
  ];
}
