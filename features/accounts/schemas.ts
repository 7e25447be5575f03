import { z } from 'zod';
import { ROLES } from './model';

const EASY = ['password', 'passwort', 'qwerty', '12345', 'letmein', 'soybean', 'welcome', 'hilum', 'abc123', 'iloveyou'];

export const emailSchema = z
  .string()
  .trim()
  .toLowerCase()
  .pipe(z.email('Write an e-mail address like name@farm.example.'))
  .pipe(z.string().max(200, 'This e-mail address is too long.'));

/** At least ten characters and not one that guessers try first. */
export const passwordSchema = z
  .string()
  .min(10, 'Use at least 10 characters. A few unrelated words are easy to keep and hard to guess.')
  .max(200, 'Use at most 200 characters.')
  .refine((password) => new Set(password).size >= 5, 'Use at least 5 different characters.')
  .refine(
    (password) =>
      !EASY.some(
        (word) =>
          password
            .toLowerCase()
            .replace(/[^a-z0-9]/g, '')
            .replace(/\d+$/, '') === word,
      ),
    'This is one of the first passwords a guesser tries. Choose another.',
  );

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

export const ownAccountSchema = z.object({ name: personNameSchema, wantsMail: z.boolean() });

export const newManagerSchema = z.object({
  dealershipName: z.string().trim().min(2, 'Write the name of the dealership.').max(100),
  name: personNameSchema,
  email: emailSchema,
  password: passwordSchema,
});
