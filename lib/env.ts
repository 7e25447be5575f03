import { z } from 'zod';

const yesNo = z.enum(['yes', 'no']).transform((word) => word === 'yes');

const schema = z.object({
  NODE_ENV: z.string().default('development'),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(1).max(65535).default(3000),
  HILUM_ADDRESS: z.url().optional(),
  DATABASE_URL: z
    .string()
    .regex(/^(file:|libsql:|https?:|wss?:)/, 'must start with file:, libsql:, http(s): or ws(s):')
    .default('file:data/hilum.db'),
  DATABASE_AUTH_TOKEN: z.string().optional(),
  SMTP_URL: z
    .string()
    .regex(/^smtps?:\/\//, 'must start with smtp:// or smtps://')
    .optional(),
  MAIL_FROM: z.string().default('Hilum <no-reply@localhost>'),
  HILUM_SHOW_OUTBOX: yesNo.optional(),
  HILUM_DEMO: yesNo.default(true),
  HILUM_TILE_URL: z.string().optional(),
  HILUM_TILE_CREDIT: z.string().default(''),
});

export type Environment = z.infer<typeof schema> & { address: string; showOutbox: boolean };

let parsed: Environment | null = null;

/** The configuration, checked once. Throws an error that names each wrong variable and what it must be. */
export function environment(): Environment {
  if (parsed) return parsed;
  const given = Object.fromEntries(Object.entries(process.env).filter(([, value]) => value !== ''));
  const result = schema.safeParse(given);
  if (!result.success) {
    const lines = result.error.issues.map((problem) => `  ${problem.path.join('.')}: ${problem.message}`);
    throw new Error(`The configuration is wrong (see .env.example):\n${lines.join('\n')}`);
  }
  const value = result.data;
  const address = (value.HILUM_ADDRESS ?? `http://${value.HOST}:${value.PORT}`).replace(/\/$/, '');
  parsed = {
    ...value,
    address,
    showOutbox: value.HILUM_SHOW_OUTBOX ?? (value.NODE_ENV !== 'production' || isTriedOut(value, address)),
  };
  return parsed;
}

/**
 * A server that only this machine reaches and that can send no mail is being tried out: without the outbox nobody could open an
 * invitation. Anything others reach shows it only when asked to.
 */
function isTriedOut({ HOST, SMTP_URL }: { HOST: string; SMTP_URL?: string }, address: string): boolean {
  const loopback = /^(localhost|127(\.\d+){3}|::1|\[::1\])$/;
  return !SMTP_URL && loopback.test(HOST) && loopback.test(new URL(address).hostname);
}
