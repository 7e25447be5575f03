import { formatCell } from './cells';
import type { Column, LotColumns } from './columns';
import { COLUMNS } from './columns';
import type { LineUpVariety, SeedLot, VarietyTraits } from './model';
import type { HeaderMatch, LineUpRow, ReadLineUp, RefusedRow, RowTraits } from './read-line-up';

export interface TraitChange {
  label: string;
  from: string;
  to: string;
}

/** One lot that a file adds to a variety, or changes. */
export interface PlannedLot {
  lotNumber: string;
  /** The lot as it stands; `null` for a new one. */
  before: SeedLot | null;
  /** What the file says of it; unsaid keys are left as they are. */
  said: {
    seedsPerLb?: number;
    germinationPercent?: number;
    treatment?: string;
    unitSizeSeeds?: number;
    unitsOnHand?: number;
    priceCentsPerUnit?: number;
  };
}

/** One variety of a file against the line-up as it stands. */
export interface PlannedVariety {
  row: number;
  code: string;
  kind: 'new' | 'changed' | 'same';
  /** What would change, old to new; for a new one only its lots. */
  changes: TraitChange[];
}

/** The same with what keeping it needs. */
export interface VarietyPlan extends PlannedVariety {
  before: LineUpVariety | null;
  traits: VarietyTraits;
  traitsChange: boolean;
  lots: PlannedLot[];
}

/** What a line-up file would do, before anything is kept. */
export interface LineUpInspection {
  headers: string[];
  /** A few cells of each column, for telling them apart. */
  samples: string[][];
  match: HeaderMatch;
  planned: PlannedVariety[];
  refused: RefusedRow[];
}

/** A lot number that a file left out, where the variety has no lot yet. */
export const UNNUMBERED_LOT = 'main';

/** The traits an import would leave a variety with: what the file says, and what was there otherwise. `null` without a maturity. */
export function mergedTraits(row: LineUpRow, before: VarietyTraits | null): VarietyTraits | null {
  const given = (key: Column['key']) => !before || row.given.includes(key);
  const traits = Object.fromEntries(
    COLUMNS.filter((column) => !column.ofLot).map(({ key }) => {
      const trait = key as keyof VarietyTraits;
      return [trait, given(key) ? row.traits[trait as keyof RowTraits] : before?.[trait]];
    }),
  ) as unknown as RowTraits;
  const { relativeMaturity } = traits;
  return relativeMaturity === null ? null : { ...traits, relativeMaturity, code: before?.code ?? traits.code };
}

/** Old and new side by side, only where they differ. */
export function traitChanges(before: VarietyTraits, after: VarietyTraits): TraitChange[] {
  return COLUMNS.filter((column) => !column.ofLot && column.key !== 'code').flatMap((column) => {
    const from = formatCell(column, before[column.key as keyof VarietyTraits]);
    const to = formatCell(column, after[column.key as keyof VarietyTraits]);
    return from === to ? [] : [{ label: column.label, from: from || emptyWord(column), to: to || emptyWord(column) }];
  });
}

function emptyWord(column: Column): string {
  return column.key === 'tolerances' ? 'conventional' : 'unknown';
}

function saidOf(lot: LotColumns): PlannedLot['said'] {
  const said: PlannedLot['said'] = {};
  if (lot.seedsPerLb !== null) said.seedsPerLb = lot.seedsPerLb;
  if (lot.germination !== null) said.germinationPercent = lot.germination;
  if (lot.treatment !== null) said.treatment = lot.treatment;
  if (lot.unitSizeSeeds !== null) said.unitSizeSeeds = Math.round(lot.unitSizeSeeds);
  if (lot.unitsOnHand !== null) said.unitsOnHand = lot.unitsOnHand;
  if (lot.priceDollarsPerUnit !== null) said.priceCentsPerUnit = Math.round(lot.priceDollarsPerUnit * 100);
  return said;
}

const LOT_LABELS: Record<keyof PlannedLot['said'], string> = {
  seedsPerLb: 'seeds/lb',
  germinationPercent: 'germination %',
  treatment: 'treatment',
  unitSizeSeeds: 'seeds in a unit',
  unitsOnHand: 'units',
  priceCentsPerUnit: 'cents a unit',
};

/** What a file would do to a lot, in words; empty when it says nothing new. */
export function lotChanges({ lotNumber, before, said }: PlannedLot): TraitChange[] {
  const keys = Object.keys(LOT_LABELS) as (keyof PlannedLot['said'])[];
  const saying = keys.filter((key) => said[key] !== undefined);
  if (!before) {
    const words = saying.map((key) => `${said[key]} ${LOT_LABELS[key]}`).join(', ');
    return [{ label: `Lot ${lotNumber}`, from: 'none', to: words || 'named' }];
  }
  return saying
    .filter((key) => said[key] !== before[key])
    .map((key) => ({
      label: `Lot ${lotNumber}, ${LOT_LABELS[key]}`,
      from: String(before[key] ?? 'unknown'),
      to: String(said[key]),
    }));
}

/** The lots a row speaks of. Words when it leaves open which of several lots it means. */
function plannedLots(row: LineUpRow, known: SeedLot[]): PlannedLot[] | string {
  const planned: PlannedLot[] = [];
  for (const lot of row.lots) {
    const said = saidOf(lot);
    const number = lot.lotNumber;
    if (number === null && known.length > 1)
      return `${row.traits.code} has ${known.length} lots (${known.map((one) => one.lotNumber).join(', ')}). Say which one in a column for the seed lot.`;
    const before = number === null ? known[0] : known.find((one) => one.lotNumber.toLowerCase() === number.toLowerCase());
    planned.push({ lotNumber: before?.lotNumber ?? number ?? UNNUMBERED_LOT, before: before ?? null, said });
  }
  return planned;
}

/** What a file would do to the line-up as it stands: by code, whatever its case. Pure, so that checking and keeping agree. */
export function planLineUp(
  read: ReadLineUp,
  varieties: LineUpVariety[],
  lots: SeedLot[],
): { plans: VarietyPlan[]; refused: RefusedRow[] } {
  const known = new Map(varieties.map((variety) => [variety.code.toLowerCase(), variety]));
  const plans: VarietyPlan[] = [];
  const refused = [...read.refused];
  for (const row of read.rows) {
    const { code } = row.traits;
    const before = known.get(code.toLowerCase()) ?? null;
    const traits = mergedTraits(row, before);
    const planned = plannedLots(row, before ? lots.filter((lot) => lot.varietyId === before.id) : []);
    if (!traits) refused.push({ row: row.row, code, problems: ['It is new, and its relative maturity is missing.'] });
    else if (typeof planned === 'string') refused.push({ row: row.row, code, problems: [planned] });
    else plans.push(planOf(row, before, traits, planned));
  }
  return { plans, refused: refused.sort((a, b) => a.row - b.row) };
}

function planOf(row: LineUpRow, before: LineUpVariety | null, traits: VarietyTraits, lots: PlannedLot[]): VarietyPlan {
  const ofTraits = before ? traitChanges(before, traits) : [];
  const changes = [...ofTraits, ...lots.flatMap(lotChanges)];
  return {
    row: row.row,
    code: traits.code,
    kind: before ? (changes.length > 0 ? 'changed' : 'same') : 'new',
    changes,
    before,
    traits,
    traitsChange: ofTraits.length > 0,
    lots: lots.filter((lot) => lotChanges(lot).length > 0),
  };
}
