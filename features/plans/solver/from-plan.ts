/** The plan and a person's wishes as a planning problem, and a solution back in the plan's words. Pure. */
import { z } from 'zod';
import { lineName, type PlanLine, type PlanView } from '../model';
import { SEEDS_PER_UNIT, suggestedSeedsPerAcre } from '../seed-math';
import type { PlanProblem, PlanSolution } from './problem';

export const wishesSchema = z.object({
  /** Most of the acres in one variety, percent. */
  maxSharePercent: z.coerce
    .number({ error: 'Most in one variety is a percentage.' })
    .min(5, 'Most in one variety is from 5 to 100 %.')
    .max(100, 'Most in one variety is from 5 to 100 %.')
    .default(50),
  minAcresPerVariety: z.coerce
    .number({ error: 'Fewest acres is a number.' })
    .min(0, 'Fewest acres must not be below zero.')
    .default(0),
  maxVarieties: z.coerce.number().int('Most varieties is a whole number.').min(1, 'Most varieties is at least 1.').nullish(),
  /** What the combine takes a day: spreads maturities. */
  harvestAcresPerDay: z.coerce.number().positive('Acres a day must be above zero.').nullish(),
  /** Fields whose variety stays. */
  keepFieldIds: z.array(z.string()).default([]),
});
export type Wishes = z.infer<typeof wishesSchema>;

/** One tenth of RM is about a day (common practice, no source), so half a maturity group ripens within about five. */
const DAYS_PER_HALF_GROUP = 5;

export interface PlanProblemOf {
  problem: PlanProblem;
  /** Names used in the problem → the plan's own ids. */
  fieldIdOf: Map<string, string>;
  varietyIdOf: Map<string, string>;
  /** Dollars of the plan as it stands, by the same reckoning. */
  present: number;
}

/** Whole fields that are scored, with what each variety would earn there: bushels × price − seed, dollars an acre. */
export function problemFromPlan(view: PlanView, wishes: Wishes): PlanProblemOf {
  const whole = view.lines.filter((line) => line.partName === '');
  const names = new Map<string, PlanLine>();
  for (const line of whole) {
    const name = names.has(lineName(line)) ? `${lineName(line)} (${line.farmName ?? line.fieldId})` : lineName(line);
    names.set(names.has(name) ? `${name} ${line.fieldId}` : name, line);
  }
  const codes = new Map<string, { id: string; relativeMaturity: number }>();
  for (const choices of Object.values(view.choices)) {
    for (const choice of choices) {
      if (choice.expected !== null) codes.set(choice.code, { id: choice.varietyId, relativeMaturity: choice.relativeMaturity });
    }
  }
  const rateOf = (line: PlanLine): number =>
    line.populationSeedsPerAcre ??
    suggestedSeedsPerAcre({ rowWidthInches: line.rowWidthInches, plantingDate: null, germinationPercent: null });
  const unitsPerAcre = (line: PlanLine): number => rateOf(line) / SEEDS_PER_UNIT;
  const seedPrice = (varietyId: string): number => {
    const priced = (view.lots[varietyId] ?? []).filter((lot) => lot.priceCentsPerUnit !== null);
    return priced.length === 0 ? 0 : (priced[0]?.priceCentsPerUnit as number) / 100;
  };
  const value: PlanProblem['value'] = [];
  let present = 0;
  for (const [name, line] of names) {
    for (const choice of view.choices[line.fieldId] ?? []) {
      if (choice.expected === null) continue;
      const gross = (choice.expected * view.soybeanPriceCentsPerBushel) / 100;
      const perAcre = gross - unitsPerAcre(line) * seedPrice(choice.varietyId);
      value.push({ field: name, variety: choice.code, perAcre });
      if (choice.varietyId === line.variety?.id) present += perAcre * line.areaAcres;
    }
  }
  const keep = new Set(wishes.keepFieldIds);
  const scored = new Set(value.map((one) => one.field));
  const fields = [...names].filter(([name]) => scored.has(name));
  const groups = new Map<string, string[]>();
  for (const [code, variety] of codes) {
    const from = (Math.floor(variety.relativeMaturity * 2) / 2).toFixed(1);
    groups.set(from, [...(groups.get(from) ?? []), code]);
  }
  return {
    problem: {
      fields: fields.map(([id, line]) => ({ id, acres: line.areaAcres, unitsPerAcre: unitsPerAcre(line) })),
      varieties: [...codes].map(([id, variety]) => {
        const supply = view.supply.find((one) => one.varietyId === variety.id);
        const known = supply?.unitsOnHand ?? null;
        return { id, units: known === null ? null : Math.max(0, known - (supply?.unitsHeldByOthers ?? 0)) };
      }),
      value,
      stops: [],
      maxShare: wishes.maxSharePercent / 100,
      minAcresPerVariety: wishes.minAcresPerVariety,
      maxVarieties: wishes.maxVarieties ?? null,
      splitMinFraction: 1,
      locks: fields
        .filter(
          ([name, line]) =>
            (line.locked || keep.has(line.fieldId)) &&
            value.some((one) => one.field === name && one.variety === line.variety?.code),
        )
        .map(([field, line]) => ({ field, variety: line.variety?.code as string })),
      groups: wishes.harvestAcresPerDay
        ? [...groups].map(([from, varieties]) => ({
            name: `harvest of RM ${from}–${(Number(from) + 0.4).toFixed(1)}`,
            varieties,
            maxAcres: (wishes.harvestAcresPerDay as number) * DAYS_PER_HALF_GROUP,
          }))
        : [],
    },
    fieldIdOf: new Map(fields.map(([name, line]) => [name, line.fieldId])),
    varietyIdOf: new Map([...codes].map(([code, variety]) => [code, variety.id])),
    present,
  };
}

/** A solution as the screen shows it. */
export interface Proposal {
  status: PlanSolution['status'];
  gainDollars: number;
  gap: number;
  seconds: number;
  rows: { fieldId: string; fieldName: string; varietyId: string; code: string; before: string | null }[];
  leftEmpty: string[];
  binding: string[];
  shadow: { code: string; dollarsPerUnit: number }[];
  relaxation: string[];
}

/** The solver's answer over the plan it was asked for. */
export function proposalOf(view: PlanView, asked: PlanProblemOf, solution: PlanSolution): Proposal {
  const lineOf = new Map(view.lines.filter((line) => line.partName === '').map((line) => [line.fieldId, line]));
  const rows = solution.rows.map((row) => {
    const fieldId = asked.fieldIdOf.get(row.field) as string;
    return {
      fieldId,
      fieldName: row.field,
      varietyId: asked.varietyIdOf.get(row.variety) as string,
      code: row.variety,
      before: lineOf.get(fieldId)?.variety?.code ?? null,
    };
  });
  const placed = new Set(rows.map((row) => row.fieldId));
  return {
    status: solution.status,
    gainDollars: solution.objective - asked.present,
    gap: solution.gap,
    seconds: solution.seconds,
    rows,
    leftEmpty: view.lines.filter((line) => line.partName === '' && !placed.has(line.fieldId)).map((line) => line.fieldName),
    binding: solution.binding,
    shadow: Object.entries(solution.shadow)
      .map(([code, dollarsPerUnit]) => ({ code, dollarsPerUnit }))
      .sort((a, b) => b.dollarsPerUnit - a.dollarsPerUnit),
    relaxation: solution.relaxation,
  };
}
