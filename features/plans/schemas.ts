import { z } from 'zod';

/** What comes in from forms, the plan's API and the crew's phone, with the words that are shown when it is wrong. */

const id = z.string({ error: 'Choose one from the list.' }).min(1, 'Choose one from the list.').max(64);
const word = z.string().trim().max(2000, 'Keep it under 2,000 characters.');

export const planKeySchema = z.object({
  operationId: id,
  season: z.coerce.number().int().min(2000, 'A season is a year.').max(2100, 'A season is a year.'),
});

/** The revision the writer read; a newer one that touched the same row is told, not overwritten. */
const revision = z.coerce.number().int().min(0);

export const populationSchema = z.coerce
  .number({ error: 'Seeds per acre is a number.' })
  .int('Seeds per acre is a whole number.')
  .min(40_000, 'Seeds per acre must be 40,000 to 300,000.')
  .max(300_000, 'Seeds per acre must be 40,000 to 300,000.');

export const rowWidthSchema = z.coerce
  .number({ error: 'Row width is a number of inches.' })
  .min(4, 'Row width must be 4 to 60 in.')
  .max(60, 'Row width must be 4 to 60 in.');

export const setRowSchema = planKeySchema.extend({
  fieldId: id,
  partName: z.string().max(60).default(''),
  revision,
  /** Only what is named is changed. */
  set: z
    .object({
      varietyId: id.nullable(),
      seedLotId: id.nullable(),
      populationSeedsPerAcre: populationSchema.nullable(),
      rowWidthInches: rowWidthSchema.nullable(),
      locked: z.boolean(),
      note: word.nullable(),
    })
    .partial()
    .refine((set) => Object.keys(set).length > 0, 'Nothing to change.'),
});
export type SetRow = z.infer<typeof setRowSchema>;

export const removeRowSchema = planKeySchema.extend({ fieldId: id, partName: z.string().max(60).default(''), revision });

export const proposeSchema = planKeySchema.extend({ revision, word: word.default('') });
export const withdrawSchema = planKeySchema.extend({ word: word.default('') });
export const reopenSchema = planKeySchema.extend({
  word: word.min(3, 'Say in a few words why the agreed plan has to change.'),
});
export const agreeSchema = planKeySchema.extend({
  revision,
  signedName: z.string().trim().min(3, 'Type your full name to agree.').max(120, 'Keep the name under 120 characters.'),
});
export const askChangeSchema = planKeySchema.extend({
  word: word.min(3, 'Say in a few words what should change.'),
  fieldId: z.string().max(64).optional(),
});
export const commentSchema = planKeySchema.extend({
  word: word.min(1, 'Write something first.'),
  fieldId: z.string().max(64).optional(),
});

export const proposalRowsSchema = planKeySchema.extend({
  revision,
  rows: z
    .array(z.object({ fieldId: id, varietyId: id }))
    .min(1, 'Nothing to put on the plan.')
    .max(5000),
});

export const makeLinkSchema = planKeySchema.extend({
  days: z.coerce
    .number({ error: 'Days is a number.' })
    .int('Days is a whole number.')
    .min(1, 'A link is good for 1 to 400 days.')
    .max(400, 'A link is good for 1 to 400 days.')
    .default(60),
});
export const revokeLinkSchema = planKeySchema.extend({ linkId: id });

/** A mark from the phone: the phone makes the id, so a mark sent twice is kept once. */
export const plantedMarkSchema = z.object({
  id: z.string().regex(/^[A-Za-z0-9-]{8,64}$/, 'The mark has no usable id.'),
  rowId: id,
  plantedOn: z.string().regex(/^\d{4}-\d{2}-\d{2}$/, 'The day must be written YYYY-MM-DD.'),
  lotNumber: z.string().trim().max(60).nullable().default(null),
  areaAcres: z.coerce.number().positive('Acres must be above zero.').max(100_000).nullable().default(null),
  note: z.string().trim().max(1000, 'Keep the note under 1,000 characters.').nullable().default(null),
  photo: z
    .string()
    .max(1_500_000, 'The photo is too big.')
    .regex(/^data:image\/(jpeg|png|webp);base64,[A-Za-z0-9+/=]+$/, 'The photo must be a picture.')
    .nullable()
    .default(null),
});
export type PlantedMark = z.infer<typeof plantedMarkSchema>;
