import { CYST_SOURCES, DRAINAGE_CLASSES, TILLAGES } from '@/features/placement/engine/model';
import type { FieldFacts } from './model';

/** How each fact is asked: one list that the form walks. To add a fact: a column, a line in the schema, and a line here. */
export interface FactField {
  name: keyof FieldFacts;
  label: string;
  hint?: string;
  unit?: string;
  kind: 'number' | 'date' | 'yesno' | 'choice' | 'words' | 'tolerances';
  choices?: readonly string[];
  step?: string;
}

export interface FactGroup {
  title: string;
  fields: readonly FactField[];
}

export const FACT_GROUPS: readonly FactGroup[] = [
  {
    title: 'How it is planted',
    fields: [
      { name: 'plantingDate', label: 'Planting date', kind: 'date' },
      { name: 'rowWidthInches', label: 'Row width', unit: 'in', kind: 'number', step: '0.5' },
      { name: 'populationSeedsPerAcre', label: 'Seeds dropped', unit: 'seeds/ac', kind: 'number', step: '1000' },
      { name: 'seedTreated', label: 'Treated seed', kind: 'yesno' },
      { name: 'tillage', label: 'Tillage', kind: 'choice', choices: TILLAGES },
      { name: 'lastCrop', label: 'Last crop', hint: 'corn, soybean, wheat…', kind: 'words' },
      { name: 'soybeanYearsOfLastFour', label: 'Soybean years of the last four', kind: 'number', step: '1' },
    ],
  },
  {
    title: 'What it yields',
    fields: [
      {
        name: 'yieldGoalBushelsPerAcre',
        label: 'Yield goal',
        hint: 'What the field carries when nothing goes wrong.',
        unit: 'bu/ac',
        kind: 'number',
        step: '0.1',
      },
      {
        name: 'yieldHistoryBushelsPerAcre',
        label: 'Past soybean yields',
        hint: 'With commas between: 58, 61.5, 49',
        unit: 'bu/ac',
        kind: 'words',
      },
      { name: 'mustBeOffBy', label: 'Must be off by', hint: 'When wheat or a cover crop follows.', kind: 'date' },
      {
        name: 'mustBeOffChargeBushelsPerAcre',
        label: 'What missing that date costs',
        hint: 'Left empty, 3 bu/ac is used.',
        unit: 'bu/ac',
        kind: 'number',
        step: '0.1',
      },
    ],
  },
  {
    title: 'Water and ground',
    fields: [
      {
        name: 'drainage',
        label: 'Natural drainage',
        hint: 'The soil’s own class, before any tile. A soil survey, where there is one, is used instead.',
        kind: 'choice',
        choices: DRAINAGE_CLASSES,
      },
      { name: 'tiled', label: 'Tiled', kind: 'yesno' },
      { name: 'irrigated', label: 'Irrigated', kind: 'yesno' },
      {
        name: 'probeDepthInches',
        label: 'A hand-pushed probe goes down',
        hint: '12 in or more: no layer to speak of.',
        unit: 'in',
        kind: 'number',
        step: '1',
      },
      { name: 'penetrometerPsi', label: 'Highest penetrometer reading, top 15 in', unit: 'psi', kind: 'number', step: '10' },
      { name: 'crustingSoil', label: 'Soil that crusts', kind: 'yesno' },
    ],
  },
  {
    title: 'What has troubled soybeans here',
    fields: [
      { name: 'cystEggsPer100cc', label: 'Cyst nematode eggs', unit: 'per 100 cc', kind: 'number', step: '1' },
      { name: 'cystSourceLastGrown', label: 'Resistance source grown last', kind: 'choice', choices: CYST_SOURCES },
      { name: 'whiteMouldHistory', label: 'White mould seen', kind: 'yesno' },
      { name: 'suddenDeathHistory', label: 'Sudden death syndrome seen', kind: 'yesno' },
      { name: 'brownStemRotHistory', label: 'Brown stem rot seen', kind: 'yesno' },
      { name: 'frogeyeHistory', label: 'Frogeye leaf spot seen', kind: 'yesno' },
      { name: 'ironChlorosisHistory', label: 'Iron chlorosis (yellow beans) seen', kind: 'yesno' },
    ],
  },
  {
    title: 'Weed programme',
    fields: [
      { name: 'weedProgramme', label: 'Tolerances the programme needs', kind: 'tolerances' },
      {
        name: 'weedProgrammeActives',
        label: 'Herbicides in it',
        hint: 'Common names with commas between: S-metolachlor, fomesafen, clethodim',
        kind: 'words',
      },
      { name: 'sensitiveNeighbours', label: 'Sensitive crops next door', hint: 'Grapes, tomatoes, an orchard…', kind: 'words' },
    ],
  },
];

export const ALL_FACT_FIELDS: readonly FactField[] = FACT_GROUPS.flatMap((group) => group.fields);

/** A fact as its input shows it; unknown is empty. */
export function factText(value: FieldFacts[keyof FieldFacts]): string {
  if (value === null) return '';
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return Array.isArray(value) ? value.join(', ') : String(value);
}
