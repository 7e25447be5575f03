import { z } from 'zod';
import { BUSH_TYPES, CYST_SOURCES, HEIGHTS, RELEASES, TOLERANCES } from '@/features/placement/engine/model';
import { parseCell, parseRelativeMaturity } from './cells';
import { COLUMNS } from './columns';

const emptyIsNull = (value: unknown) => (value === '' || value === undefined ? null : value);

const rating = z.preprocess(
  emptyIsNull,
  z.coerce
    .number('Write a number from 1 to 9; 9 is best.')
    .min(1, 'Ratings run from 1 to 9; 9 is best.')
    .max(9, 'Ratings run from 1 to 9; 9 is best.')
    .nullable(),
);

const maturity = z.union([z.number(), z.string()]).transform((value, context) => {
  const parsed = parseRelativeMaturity(String(value));
  if (parsed === null) context.addIssue({ code: 'custom', message: 'Write a maturity like 2.4 (early groups like 00.7).' });
  return parsed ?? z.NEVER;
});

const genesColumn = COLUMNS.find((column) => column.key === 'phytophthoraGenes');

const genes = z.union([z.array(z.string()), z.string()]).transform((value, context) => {
  const outcome = parseCell(genesColumn as (typeof COLUMNS)[number], Array.isArray(value) ? value.join(';') : value);
  if (outcome.ok) return outcome.value as string[];
  context.addIssue({ code: 'custom', message: outcome.problems[0]?.message ?? 'Write genes like 1k;3a.' });
  return z.NEVER;
});

export const varietySchema = z.object({
  code: z.string().trim().min(1, 'Write the code.').max(40, 'Use at most 40 characters.'),
  relativeMaturity: maturity,
  height: z.preprocess(emptyIsNull, z.enum(HEIGHTS).nullable()),
  bushType: z.preprocess(emptyIsNull, z.enum(BUSH_TYPES).nullable()),
  standability: rating,
  emergence: rating,
  phytophthoraGenes: genes,
  phytophthora: rating,
  suddenDeath: rating,
  brownStemRot: rating,
  whiteMould: rating,
  frogeye: rating,
  stemCanker: rating,
  charcoalRot: rating,
  ironChlorosis: rating,
  drought: rating,
  cystNematodeSource: z.preprocess(emptyIsNull, z.enum(CYST_SOURCES).nullable()),
  tolerances: z.array(z.enum(TOLERANCES)),
  release: z.enum(RELEASES),
  published: z.boolean(),
  note: z.preprocess(emptyIsNull, z.string().trim().max(1000, 'Use at most 1,000 characters.').nullable()),
});

export type VarietyForm = z.input<typeof varietySchema>;

export const updateVarietySchema = varietySchema.extend({
  varietyId: z.string().min(1),
  /** The revision the form was filled from. */
  revision: z.coerce.number().int(),
});

const optionalNumber = (low: number, high: number, words: string) =>
  z.preprocess(emptyIsNull, z.coerce.number(words).min(low, words).max(high, words).nullable());

export const lotSchema = z.object({
  lotId: z.string().min(1).optional(),
  /** The moment of change the form was filled from. */
  updatedAt: z.number().optional(),
  varietyId: z.string().min(1),
  lotNumber: z.string().trim().min(1, 'Write the lot number from the tag.').max(60, 'Use at most 60 characters.'),
  seedsPerLb: optionalNumber(1200, 6000, 'Seeds per pound lie between 1,200 and 6,000.'),
  germinationPercent: optionalNumber(30, 100, 'Germination lies between 30 and 100 %.'),
  treatment: z.preprocess(emptyIsNull, z.string().trim().max(200, 'Use at most 200 characters.').nullable()),
  unitSizeSeeds: z.coerce
    .number('Write the seeds in a unit.')
    .int()
    .min(1000, 'At least 1,000 seeds.')
    .max(1_000_000, 'At most 1,000,000 seeds.'),
  unitsOnHand: z.coerce
    .number('Write the units on hand.')
    .min(0, 'Units cannot be negative.')
    .max(1_000_000, 'At most 1,000,000 units.'),
  priceDollarsPerUnit: optionalNumber(0, 1000, 'A price lies between $0 and $1,000 a unit.'),
});

export const varietyIdSchema = z.object({ varietyId: z.string().min(1) });
export const publishSchema = varietyIdSchema.extend({ published: z.boolean() });
export const lotIdSchema = z.object({ lotId: z.string().min(1) });
