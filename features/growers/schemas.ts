import { z } from 'zod';
import { STATE_CODES } from './model';

const nameOf = (thing: string) =>
  z
    .string(`Write the name of the ${thing}.`)
    .trim()
    .min(2, `Write the name of the ${thing}.`)
    .max(100, 'Use at most 100 characters.');

const optionalText = (longest: number) =>
  z
    .string()
    .trim()
    .max(longest, `Use at most ${longest} characters.`)
    .optional()
    .transform((text) => text || null);

export const operationIdSchema = z.object({ operationId: z.string().min(1) });

const place = {
  name: nameOf('operation'),
  state: z
    .string()
    .trim()
    .toUpperCase()
    .optional()
    .transform((text) => text || null)
    .refine((code) => code === null || STATE_CODES.includes(code), 'Choose a state from the list.'),
  county: optionalText(60),
  note: optionalText(1000),
};

export const newOperationSchema = z.object({
  ...place,
  /** The rep who will serve it; a rep who makes an operation serves it. */
  repId: z
    .string()
    .optional()
    .transform((text) => text || null),
});

export const changedOperationSchema = z.object({ operationId: z.string().min(1), ...place });

export const assignmentSchema = z.object({
  operationId: z.string('Choose an operation.').min(1, 'Choose an operation.'),
  personId: z.string('Choose a person.').min(1, 'Choose a person.'),
});

export const newFarmSchema = z.object({ operationId: z.string().min(1), name: nameOf('farm') });

export const renamedFarmSchema = z.object({ operationId: z.string().min(1), farmId: z.string().min(1), name: nameOf('farm') });
