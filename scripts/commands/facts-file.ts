/** The facts of fields from a CSV: one row a field, every column but the first optional, an empty cell unknown. */
import { type FieldFacts, UNKNOWN_FACTS } from '@/features/fields/model';
import { CYST_SOURCES, DRAINAGE_CLASSES, TILLAGES, TOLERANCES } from '@/features/placement/engine/model';
import { isIsoDate } from '@/lib/dates';
import { readCsv, refuse } from './command';

type Reader = (text: string) => { value: unknown } | { fault: string };

const number =
  (low: number, high: number, unit: string): Reader =>
  (text) => {
    const value = Number(text);
    return Number.isFinite(value) && value >= low && value <= high
      ? { value }
      : { fault: `"${text}" is not a number from ${low} to ${high} ${unit}` };
  };

const yesNo: Reader = (text) => {
  const word = text.toLowerCase();
  if (['yes', 'y', 'true'].includes(word)) return { value: true };
  if (['no', 'n', 'false'].includes(word)) return { value: false };
  return { fault: `"${text}" is not known. Known: yes, no` };
};

const word =
  (words: readonly string[]): Reader =>
  (text) => {
    const found = words.find((one) => one.toLowerCase() === text.toLowerCase());
    return found ? { value: found } : { fault: `"${text}" is not known. Known: ${words.join(', ')}` };
  };

const date: Reader = (text) => (isIsoDate(text) ? { value: text } : { fault: `"${text}" is not a date written YYYY-MM-DD` });
const words: Reader = (text) => ({ value: parts(text) });
const freeWord: Reader = (text) => ({ value: text.toLowerCase() });

function parts(text: string): string[] {
  return text
    .split(';')
    .map((one) => one.trim())
    .filter((one) => one !== '');
}

/** `none` asks for nothing; otherwise a `;` list of tolerances. */
const programme: Reader = (text) => {
  const given = parts(text);
  if (given.length === 1 && given[0]?.toLowerCase() === 'none') return { value: [] };
  const read = given.map((one) => TOLERANCES.find((known) => known.toLowerCase() === one.toLowerCase()) ?? { unknown: one });
  const unknown = read.find((one) => typeof one === 'object');
  return unknown ? { fault: `"${unknown.unknown}" is not known. Known: none, ${TOLERANCES.join(', ')}` } : { value: read };
};

const yields: Reader = (text) => {
  const values = parts(text).map(Number);
  return values.every((one) => one > 0 && one <= 200)
    ? { value: values }
    : { fault: `"${text}" is not a ; list of yields in bu/ac` };
};

/** Column → fact and reader. `field` comes first and is the key. */
const COLUMNS: Record<string, { fact: keyof FieldFacts; read: Reader }> = {
  rowWidthInches: { fact: 'rowWidthInches', read: number(4, 60, 'inches') },
  drainage: { fact: 'drainage', read: word(DRAINAGE_CLASSES) },
  tiled: { fact: 'tiled', read: yesNo },
  irrigated: { fact: 'irrigated', read: yesNo },
  lastCrop: { fact: 'lastCrop', read: freeWord },
  plantingDate: { fact: 'plantingDate', read: date },
  yieldGoal: { fact: 'yieldGoalBushelsPerAcre', read: number(1, 200, 'bu/ac') },
  yieldHistory: { fact: 'yieldHistoryBushelsPerAcre', read: yields },
  probeDepthInches: { fact: 'probeDepthInches', read: number(0, 72, 'inches') },
  penetrometerPsi: { fact: 'penetrometerPsi', read: number(0, 2000, 'psi') },
  eggsPer100cc: { fact: 'cystEggsPer100cc', read: number(0, 1_000_000, 'eggs') },
  cystSourceLastGrown: { fact: 'cystSourceLastGrown', read: word(CYST_SOURCES) },
  whiteMouldHistory: { fact: 'whiteMouldHistory', read: yesNo },
  suddenDeathHistory: { fact: 'suddenDeathHistory', read: yesNo },
  brownStemRotHistory: { fact: 'brownStemRotHistory', read: yesNo },
  frogeyeHistory: { fact: 'frogeyeHistory', read: yesNo },
  ironChlorosisHistory: { fact: 'ironChlorosisHistory', read: yesNo },
  weedProgramme: { fact: 'weedProgramme', read: programme },
  weedProgrammeActives: { fact: 'weedProgrammeActives', read: words },
  sensitiveNeighbours: { fact: 'sensitiveNeighbours', read: words },
  mustBeOffBy: { fact: 'mustBeOffBy', read: date },
  mustBeOffCharge: { fact: 'mustBeOffChargeBushelsPerAcre', read: number(0, 100, 'bu/ac') },
  population: { fact: 'populationSeedsPerAcre', read: number(20_000, 400_000, 'seeds/ac') },
  seedTreated: { fact: 'seedTreated', read: yesNo },
  tillage: { fact: 'tillage', read: word(TILLAGES) },
  soybeanYearsOfLastFour: { fact: 'soybeanYearsOfLastFour', read: number(0, 4, 'years') },
  crustingSoil: { fact: 'crustingSoil', read: yesNo },
};

export const FACT_COLUMNS = ['field', ...Object.keys(COLUMNS)];

/** Facts by field name in lower case, with the name as written. Refuses, naming every bad row, on anything it does not know. */
export function readFacts(text: string, file: string): Map<string, { name: string; facts: FieldFacts }> {
  const { header, rows } = readCsv(text, file);
  if (header[0] !== 'field') refuse(`The first column of ${file} must be field, not "${header[0] ?? ''}".`);
  const problems = header
    .filter((column) => !FACT_COLUMNS.includes(column))
    .map((column) => `Column "${column}" of ${file} is not known. Known: ${FACT_COLUMNS.join(', ')}.`);
  const byField = new Map<string, { name: string; facts: FieldFacts }>();
  for (const { row, cells } of rows) {
    const name = (cells.field ?? '').trim();
    const complain = (message: string) => problems.push(`${file} row ${row}${name ? ` (${name})` : ''}: ${message}.`);
    if (name === '') {
      complain('the field has no name');
      continue;
    }
    if (byField.has(name.toLowerCase())) complain('this field stands twice');
    const facts: Record<string, unknown> = { ...UNKNOWN_FACTS };
    for (const [column, { fact, read }] of Object.entries(COLUMNS)) {
      const cell = (cells[column] ?? '').trim();
      if (cell === '') continue;
      const answer = read(cell);
      if ('fault' in answer) complain(`${column} ${answer.fault}`);
      else facts[fact] = answer.value;
    }
    byField.set(name.toLowerCase(), { name, facts: facts as unknown as FieldFacts });
  }
  if (problems.length > 0) refuse(...problems);
  return byField;
}
