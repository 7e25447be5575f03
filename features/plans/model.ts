/** The plan as screens, exports and the sheet read it, and the arithmetic of its rows and totals. Pure. */
import type { MultiPolygon, Polygon } from 'geojson';
import type { SupplyWord } from '@/features/line-up/model';
import type { Assessment } from '@/features/placement/engine/model';
import {
  exactUnits,
  isLargeSeed,
  poundsPerAcre,
  SEEDS_PER_UNIT,
  seedsPerFoot,
  USUAL_SEEDS_PER_POUND,
  wholeUnits,
} from './seed-math';
import type { PlanState } from './states';

export interface PlanVariety {
  id: string;
  code: string;
  relativeMaturity: number;
}

export interface PlanLot {
  id: string;
  lotNumber: string;
  seedsPerLb: number | null;
  germinationPercent: number | null;
  treatment: string | null;
  unitSizeSeeds: number;
  /** `null` for a grower: prices are the dealership's. */
  priceCentsPerUnit: number | null;
  /** On hand less what other plans hold; `null` for a grower. */
  unitsFree: number | null;
}

/** One line of the plan: a field or a part of one. `id` is `null` while nothing has been put on it. */
export interface PlanLine {
  id: string | null;
  fieldId: string;
  fieldName: string;
  farmName: string | null;
  /** '' for a whole field. */
  partName: string;
  geometry: Polygon | MultiPolygon;
  areaAcres: number;
  variety: PlanVariety | null;
  lot: PlanLot | null;
  rowWidthInches: number | null;
  populationSeedsPerAcre: number | null;
  locked: boolean;
  note: string | null;
  assessment: Assessment | null;
  runnerUp: { code: string; differenceBushels: number } | null;
  /** What stands in the way of a pick, or of trusting it; `null` when nothing does. */
  caution: string | null;
  plantedOn: string | null;
}

export interface LineFigures {
  seedsPerFoot: number | null;
  poundsPerAcre: number | null;
  /** The lot's own count is unknown: pounds are at the usual 2,800 seeds/lb. */
  poundsAreUsual: boolean;
  largeSeed: boolean;
  /** Exact; a lot is rounded up once over all its rows. */
  units: number | null;
  pounds: number | null;
  seedCostCents: number | null;
  expected: number | null;
  bushels: number | null;
}

/** Figures of one line. `null` wherever an input is missing. */
export function figuresOf(line: PlanLine): LineFigures {
  const rate = line.variety ? line.populationSeedsPerAcre : null;
  const seedsPerLb = line.lot?.seedsPerLb ?? null;
  const pounds = rate === null ? null : poundsPerAcre(rate, seedsPerLb ?? USUAL_SEEDS_PER_POUND);
  const units = rate === null ? null : exactUnits(line.areaAcres, rate, line.lot?.unitSizeSeeds ?? SEEDS_PER_UNIT);
  const expected = line.variety ? (line.assessment?.expected ?? null) : null;
  const price = line.lot?.priceCentsPerUnit ?? null;
  return {
    seedsPerFoot: rate === null || line.rowWidthInches === null ? null : seedsPerFoot(rate, line.rowWidthInches),
    poundsPerAcre: pounds,
    poundsAreUsual: rate !== null && seedsPerLb === null,
    largeSeed: rate !== null && isLargeSeed(seedsPerLb),
    units,
    pounds: pounds === null ? null : pounds * line.areaAcres,
    seedCostCents: units === null || price === null ? null : Math.round(units * price),
    expected,
    bushels: expected === null ? null : expected * line.areaAcres,
  };
}

export interface LotTotal {
  variety: PlanVariety;
  lot: PlanLot | null;
  acres: number;
  exactUnits: number;
  /** Whole units to load, rounded up once for the lot. */
  units: number;
}

export interface VarietyTotal {
  variety: PlanVariety;
  acres: number;
  shareOfAcres: number;
  units: number;
  lots: LotTotal[];
}

export interface PlanTotals {
  fields: number;
  acres: number;
  placedAcres: number;
  units: number;
  pounds: number;
  bushels: number;
  /** Over the acres that have an expected yield; `null` when none has. */
  expectedPerAcre: number | null;
  seedCostCents: number | null;
  relativeMaturityFrom: number | null;
  relativeMaturityTo: number | null;
  varieties: VarietyTotal[];
}

/** Totals by variety and lot, units rounded up once per lot. */
export function totalsOf(lines: readonly PlanLine[]): PlanTotals {
  const acres = sum(lines, (line) => line.areaAcres);
  const placed = lines.filter((line) => line.variety !== null);
  const lots = new Map<string, LotTotal>();
  for (const line of placed) {
    const variety = line.variety as PlanVariety;
    const key = `${variety.id} ${line.lot?.id ?? ''}`;
    const lot = lots.get(key) ?? { variety, lot: line.lot, acres: 0, exactUnits: 0, units: 0 };
    lot.acres += line.areaAcres;
    lot.exactUnits += figuresOf(line).units ?? 0;
    lot.units = wholeUnits(lot.exactUnits);
    lots.set(key, lot);
  }
  const varieties = new Map<string, VarietyTotal>();
  for (const lot of lots.values()) {
    const one = varieties.get(lot.variety.id) ?? { variety: lot.variety, acres: 0, shareOfAcres: 0, units: 0, lots: [] };
    one.acres += lot.acres;
    one.units += lot.units;
    one.shareOfAcres = acres > 0 ? one.acres / acres : 0;
    one.lots.push(lot);
    varieties.set(lot.variety.id, one);
  }
  const withYield = placed.filter((line) => figuresOf(line).expected !== null);
  const yieldAcres = sum(withYield, (line) => line.areaAcres);
  const bushels = sum(withYield, (line) => figuresOf(line).bushels ?? 0);
  const maturities = placed.map((line) => (line.variety as PlanVariety).relativeMaturity);
  const costs = [...lots.values()].map((lot) => (lot.lot?.priceCentsPerUnit ?? null) && lot.units * lot.lot!.priceCentsPerUnit!);
  return {
    fields: new Set(lines.map((line) => line.fieldId)).size,
    acres,
    placedAcres: sum(placed, (line) => line.areaAcres),
    units: sum([...lots.values()], (lot) => lot.units),
    pounds: sum(placed, (line) => figuresOf(line).pounds ?? 0),
    bushels,
    expectedPerAcre: yieldAcres > 0 ? bushels / yieldAcres : null,
    seedCostCents: costs.length > 0 && costs.every((cost) => cost !== null) ? sum(costs, (cost) => cost as number) : null,
    relativeMaturityFrom: maturities.length > 0 ? Math.min(...maturities) : null,
    relativeMaturityTo: maturities.length > 0 ? Math.max(...maturities) : null,
    varieties: [...varieties.values()].sort((a, b) => b.acres - a.acres),
  };
}

function sum<T>(items: readonly T[], of: (item: T) => number): number {
  return items.reduce((total, item) => total + of(item), 0);
}

export interface PlanEvent {
  id: string;
  at: number;
  personName: string | null;
  verb: string;
  word: string | null;
  fieldName: string | null;
  revision: number;
  /** What changed, in words. */
  words: string[];
}

/** A variety that may be put on a field, ranked first where the field has been scored. */
export interface Choice {
  varietyId: string;
  code: string;
  relativeMaturity: number;
  /** `null`: the field is not scored. */
  expected: number | null;
  /** Why it left the picks; `null` when it did not. */
  stopped: string | null;
}

/** What the dealership holds of a variety. Numbers only for the dealership's own people; a grower sees the word. */
export interface VarietySupply {
  varietyId: string;
  word: SupplyWord;
  unitsOnHand: number | null;
  /** Units that other plans hold (proposed, agreed, planted). */
  unitsHeldByOthers: number | null;
}

export interface PlanView {
  planId: string | null;
  operationId: string;
  operationName: string;
  dealershipName: string;
  season: number;
  /** What a bushel is reckoned at, cents. */
  soybeanPriceCentsPerBushel: number;
  state: PlanState;
  revision: number;
  signedName: string | null;
  signedAt: number | null;
  lines: PlanLine[];
  totals: PlanTotals;
  events: PlanEvent[];
  /** By field. */
  choices: Record<string, Choice[]>;
  /** By variety: its lots that may be planted. */
  lots: Record<string, PlanLot[]>;
  supply: VarietySupply[];
}

/** 'Slough, west part'. */
export function lineName(line: Pick<PlanLine, 'fieldName' | 'partName'>): string {
  return line.partName ? `${line.fieldName}, ${line.partName}` : line.fieldName;
}
