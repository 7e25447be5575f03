import { z } from 'zod';
import { ROLES } from './model';
import { passwordProblem } from './password-rules';

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .pipe(z.email('Write an e-mail address like name@farm.example.'))
  .pipe(z.string().max(200, 'This e-mail address is too long.'));

/** A password by the rules of password-rules.ts; that it is not made of the e-mail is checked where the e-mail is known. */
export const passwordSchema = z.string('Write a password.').superRefine((password, context) => {
  const problem = passwordProblem(password);
  if (problem) context.addIssue({ code: 'custom', message: problem });
});

export const personNameSchema = z.string().trim().min(2, 'Write the name.').max(100, 'Use at most 100 characters.');

export const signInSchema = z.object({ email: emailSchema, password: z.string().min(1, 'Write your password.').max(1000) });

export const askPasswordResetSchema = z.object({ email: emailSchema });

export const resetPasswordSchema = z
  .object({ token: z.string().min(1), password: passwordSchema, repeated: z.string() })
  .refine((form) => form.password === form.repeated, {
    message: 'The two passwords differ. Write the same twice.',
    path: ['repeated'],
  });

export const changePasswordSchema = z
  .object({ current: z.string().min(1, 'Write your present password.'), password: passwordSchema, repeated: z.string() })
  .refine((form) => form.password === form.repeated, {
    message: 'The two passwords differ. Write the same twice.',
    path: ['repeated'],
  });

export const inviteSchema = z
  .object({
    email: emailSchema,
    name: personNameSchema,
    role: z.enum(ROLES, 'Choose grower, rep or manager.'),
    operationId: z.string().optional(),
  })
  .refine((form) => form.role !== 'grower' || Boolean(form.operationId), {
    message: 'Choose the operation this grower belongs to.',
    path: ['operationId'],
  });

export const acceptInvitationSchema = z
  .object({ token: z.string().min(1), name: personNameSchema, password: passwordSchema, repeated: z.string() })
  .refine((form) => form.password === form.repeated, {
    message: 'The two passwords differ. Write the same twice.',
    path: ['repeated'],
  });

export const personIdSchema = z.object({ personId: z.string().min(1) });

export const mailIdSchema = z.object({ mailId: z.string().min(1) });

export const invitationIdSchema = z.object({ invitationId: z.string().min(1) });

export const dealershipSchema = z.object({
  name: z.string().trim().min(2, 'Write the name of the dealership.').max(100, 'Use at most 100 characters.'),
  currentSeason: z.coerce
    .number('Write the season as a year, like 2027.')
    .int('Write the season as a year, like 2027.')
    .min(2000, 'Write the season as a year, like 2027.')
    .max(2100, 'Write the season as a year, like 2027.'),
  soybeanPriceDollarsPerBushel: z.coerce
    .number('Write the price in dollars, like 10.50.')
    .min(1, 'At least $1 a bushel.')
    .max(50, 'At most $50 a bushel.'),
});

export const ownAccountSchema = z.object({ name: personNameSchema, wantsMail: z.boolean() });

export const newManagerSchema = z.object({
  dealershipName: z.string().trim().min(2, 'Write the name of the dealership.').max(100),
  name: personNameSchema,
  email: emailSchema,
  password: passwordSchema,
});
