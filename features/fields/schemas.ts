import { z } from 'zod';
import { CYST_SOURCES, DRAINAGE_CLASSES, TILLAGES, TOLERANCES } from '@/features/placement/engine/model';
import { isIsoDate } from '@/lib/dates';

/** An empty box is unknown. */
const emptyIsNull = (value: unknown) => (value === '' || value === undefined ? null : value);

function numberIn(low: number, high: number, unit: string) {
  const words = `Write a number from ${low.toLocaleString('en-US')} to ${high.toLocaleString('en-US')} ${unit}, or leave it empty.`;
  return z.preprocess(emptyIsNull, z.coerce.number(words).min(low, words).max(high, words).nullable());
}

const yesNo = z.preprocess(
  (value) => (value === 'yes' || value === true ? true : value === 'no' || value === false ? false : emptyIsNull(value)),
  z.boolean('Choose yes, no or unknown.').nullable(),
);

const date = z.preprocess(
  emptyIsNull,
  z.string().refine(isIsoDate, 'Write a date like 2027-05-08, or leave it empty.').nullable(),
);

/** Words with commas between; an empty box is unknown. */
const words = z.preprocess((value) => {
  const text = emptyIsNull(value);
  return typeof text === 'string'
    ? text
        .split(/[,;]/)
        .map((one) => one.trim())
        .filter(Boolean)
    : text;
}, z.array(z.string().max(60, 'Use shorter words.')).max(20).nullable());

const yields = z.preprocess((value) => {
  const text = emptyIsNull(value);
  return typeof text === 'string'
    ? text
        .split(/[,;\s]+/)
        .filter(Boolean)
        .map(Number)
    : text;
}, z
  .array(
    z
      .number('Write yields as numbers with commas between, like 58, 61.5.')
      .min(5, 'Yields lie between 5 and 130 bu/ac.')
      .max(130, 'Yields lie between 5 and 130 bu/ac.'),
  )
  .max(20)
  .nullable());

/** Facts of a field as a form sends them: every one may be empty, which is unknown. */
export const factsSchema = z.object({
  rowWidthInches: numberIn(5, 60, 'inches'),
  plantingDate: date,
  populationSeedsPerAcre: numberIn(40_000, 300_000, 'seeds/ac'),
  seedTreated: yesNo,
  tillage: z.preprocess(emptyIsNull, z.enum(TILLAGES, 'Choose from the list.').nullable()),
  irrigated: yesNo,
  drainage: z.preprocess(emptyIsNull, z.enum(DRAINAGE_CLASSES, 'Choose from the list.').nullable()),
  tiled: yesNo,
  lastCrop: z.preprocess(emptyIsNull, z.string().trim().toLowerCase().max(40, 'Use at most 40 characters.').nullable()),
  soybeanYearsOfLastFour: numberIn(0, 4, 'years'),
  yieldGoalBushelsPerAcre: numberIn(10, 130, 'bu/ac'),
  yieldHistoryBushelsPerAcre: yields,
  probeDepthInches: numberIn(0, 48, 'inches'),
  penetrometerPsi: numberIn(0, 1000, 'psi'),
  cystEggsPer100cc: numberIn(0, 200_000, 'eggs'),
  cystSourceLastGrown: z.preprocess(emptyIsNull, z.enum(CYST_SOURCES, 'Choose from the list.').nullable()),
  whiteMouldHistory: yesNo,
  suddenDeathHistory: yesNo,
  brownStemRotHistory: yesNo,
  frogeyeHistory: yesNo,
  ironChlorosisHistory: yesNo,
  crustingSoil: yesNo,
  weedProgramme: z.preprocess(emptyIsNull, z.array(z.enum(TOLERANCES)).nullable()),
  weedProgrammeActives: words,
  sensitiveNeighbours: words,
  mustBeOffBy: date,
  mustBeOffChargeBushelsPerAcre: numberIn(0, 30, 'bu/ac'),
});

export const FACT_NAMES = Object.keys(factsSchema.shape) as (keyof z.infer<typeof factsSchema>)[];

export const saveFactsSchema = z.object({ fieldId: z.string().min(1), season: z.coerce.number().int(), facts: factsSchema });

export const copyFactsSchema = z.object({
  fieldId: z.string().min(1),
  season: z.coerce.number().int(),
  toFieldIds: z.array(z.string()).min(1, 'Choose at least one field.'),
  names: z.array(z.enum(FACT_NAMES as [string, ...string[]])).min(1, 'Choose at least one fact.'),
});

export const renameFieldSchema = z.object({
  fieldId: z.string().min(1),
  name: z.string().trim().min(1, 'Write the name.').max(120, 'Use at most 120 characters.'),
  farm: z.string().trim().max(120, 'Use at most 120 characters.').nullable(),
});

export const fieldIdSchema = z.object({ fieldId: z.string().min(1) });

/** How one shape of an import is to be kept. */
export const keepShapeSchema = z.object({
  /** Position in the file. */
  index: z.number().int().min(0),
  name: z.string().trim().min(1, 'Every kept field needs a name.').max(120, 'Use at most 120 characters for a name.'),
  farm: z.string().trim().max(120).nullable(),
  /** The field it replaces; `null` for a new one. */
  replaces: z.string().nullable(),
});

export const inspectSchema = z.object({
  uploadId: z.string().min(1),
  crs: z.string().max(5000).optional(),
  nameColumn: z.string().max(200).optional(),
});

export const keepBoundariesSchema = inspectSchema.extend({
  shapes: z.array(keepShapeSchema).min(1, 'Choose at least one shape to keep.').max(50_000),
});
