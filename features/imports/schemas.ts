import { z } from 'zod';
import { IMPORT_KINDS } from './model';

export const uploadQuerySchema = z.object({
  kind: z.enum(IMPORT_KINDS, `Say what is brought in: ${IMPORT_KINDS.join(', ')}.`),
  operation: z.string().optional(),
});

export const uploadIdSchema = z.object({ uploadId: z.string().min(1) });
