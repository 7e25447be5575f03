/** Cells of a column as numbers in the units that are kept, with their ranges, and a tally of what there is to say. Pure. */
import { type NumberCell, numberCell } from './cells';
import type { MatchedColumn, SampleOptions } from './columns';
import { type Meaning, type Measure, RANGES } from './meanings';
import type { RawTable } from './table';

/** Reported in ppm, lb/ac or meq/100 g. */
export const NUTRIENTS = new Set<Meaning>(['phosphorusPpm', 'potassiumPpm', 'calciumPpm', 'magnesiumPpm']);
/** ppm of one meq/100 g: ten times the atomic weight over the charge (K 39.10, Ca 40.08/2, Mg 24.305/2). */
const PPM_PER_MEQ: Partial<Record<Meaning, number>> = { potassiumPpm: 390.98, calciumPpm: 200.39, magnesiumPpm: 121.525 };
/** 2,000,000 lb of soil in a furrow slice of an acre (6⅔ in): common practice. */
const PPM_PER_LB_AC = 0.5;

/** Notes, and counts of what was met often. */
export class Tally {
  private counts = new Map<string, number>();
  private said = new Set<string>();
  count(words: string): void {
    // Examples differ from row to row; the first stands for all.
    const key = [...this.counts.keys()].find((one) => one.split('(“')[0] === words.split('(“')[0]) ?? words;
    this.counts.set(key, (this.counts.get(key) ?? 0) + 1);
  }
  note(words: string): void {
    this.said.add(words);
  }
  notes(name: string): string[] {
    return [
      ...this.said,
      ...[...this.counts].map(([words, count]) => `${words[0]?.toUpperCase()}${words.slice(1)}: ${count}.`),
    ].map((words) => `${name}: ${words}`);
  }
}

/** What a column's numbers are multiplied by to be in the unit that is kept; said in the tally. */
export function conversionOf(table: RawTable, column: MatchedColumn, options: SampleOptions, tally: Tally): number {
  const { meaning, unit, header, index } = column;
  if (!meaning) return 1;
  if (NUTRIENTS.has(meaning)) {
    const used = unit ?? options.nutrientUnit ?? 'ppm';
    if (used === 'lb/ac') {
      tally.note(`“${header}” is in lb/ac and was halved to ppm (2,000,000 lb of soil an acre).`);
      return PPM_PER_LB_AC;
    }
    if (used === 'meq/100g' && PPM_PER_MEQ[meaning]) {
      tally.note(`“${header}” is in meq/100 g and was turned into ppm (× ${PPM_PER_MEQ[meaning]}).`);
      return PPM_PER_MEQ[meaning] as number;
    }
    if (used === 'ppb') return 0.001;
    return 1;
  }
  if (meaning === 'organicMatterPercent' && unit === 'g/kg') {
    tally.note(`“${header}” is in g/kg and was divided by 10 to percent.`);
    return 0.1;
  }
  if (meaning === 'electricalConductivity' && unit === 'uS/cm') return 0.001;
  if (meaning === 'cystEggsPer100cc' && unit === '/250cc') {
    tally.note(`“${header}” is per 250 cc and was divided by 2.5.`);
    return 0.4;
  }
  if (meaning === 'bufferPh') {
    const values = table.rows.flatMap((row) => {
      const cell = numberCell(row.cells[index] ?? '');
      return cell.kind === 'number' && cell.value > 0 ? [cell.value] : [];
    });
    const isIndex = /index|\blti\b|\bbi\b/i.test(header) ? values.some((one) => one > 14) : true;
    if (isIndex && values.length > 0 && values.every((one) => one >= 40 && one <= 85)) {
      tally.note(`“${header}” is an index of ten times the buffer pH and was divided by 10.`);
      return 0.1;
    }
  }
  return 1;
}

/** The value of one cell, `null` where not measured; what cannot be is added to `wrong`. */
export function measured(
  cell: NumberCell,
  column: MatchedColumn,
  measure: Measure,
  factor: number,
  wrong: string[],
  tally: Tally,
): number | null {
  if (cell.kind === 'empty') return null;
  if (cell.kind === 'rating') {
    tally.count(`cells of “${column.header}” left empty because they hold a word, not a number (“${cell.text}”)`);
    return null;
  }
  const range = RANGES[measure];
  if (cell.kind === 'wrong') {
    wrong.push(`${range.name} “${cell.text}” is not a number.`);
    return null;
  }
  if (cell.value === 0 && (measure === 'ph' || measure === 'saltPh' || measure === 'bufferPh')) {
    tally.count(`cells of “${column.header}” that are 0, read as not measured`);
    return null;
  }
  const value = Math.round(cell.value * factor * 10_000) / 10_000;
  if (value < range.low || value > range.high) {
    const shifted = [value / 10, value / 100].find((one) => one >= range.low && one <= range.high);
    const hint = shifted !== undefined && range.high < 20 ? ` Perhaps a decimal point is missing (${shifted}).` : '';
    wrong.push(`${range.name} ${cell.value} cannot be; ${range.low} to ${range.high.toLocaleString('en-US')} is allowed.${hint}`);
    return null;
  }
  if (cell.limit === 'below') tally.count(`cells of “${column.header}” below the laboratory’s limit, read as the limit`);
  if (cell.limit === 'above') tally.count(`cells of “${column.header}” above the laboratory’s limit, read as the limit`);
  return value;
}
