import { z } from 'zod';
import { isIsoDate } from '@/lib/dates';
import { BUFFER_METHODS } from './lime';

const choices = z.object({
  columns: z.record(z.string(), z.string()).optional(),
  bufferMethod: z.enum(BUFFER_METHODS).optional(),
  phosphorusMethod: z.enum(['Bray P1', 'Bray P2', 'Mehlich 3', 'Olsen']).optional(),
  nutrientUnit: z.enum(['ppm', 'lb/ac']).optional(),
  sampledOn: z
    .string()
    .refine(
      (text) => isIsoDate(text) && text >= '1950-01-01' && text <= '2100-01-01',
      'Write the date sampled as year, month and day.',
    )
    .optional(),
  fieldNames: z.record(z.string(), z.string()).optional(),
});

export const inspectSoilSchema = z.object({ uploadId: z.string().min(1), choices: choices.default({}) });

export const keepSoilSchema = inspectSoilSchema.extend({
  /** Samples that repeat one kept already are left out unless this is said. */
  keepRepeats: z.boolean().default(false),
});

export const keepSurveySchema = z.object({ uploadId: z.string().min(1) });
