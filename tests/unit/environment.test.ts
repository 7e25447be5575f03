import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';

const OURS = ['NODE_ENV', 'HOST', 'PORT', 'HILUM_ADDRESS', 'SMTP_URL', 'HILUM_SHOW_OUTBOX', 'DATABASE_URL'];

/** The configuration as a process that starts with these settings reads it. */
async function started(settings: Record<string, string>) {
  vi.resetModules();
  for (const name of OURS) vi.stubEnv(name, settings[name] ?? '');
  return (await import('@/lib/env')).environment();
}

beforeEach(() => vi.resetModules());
afterEach(() => vi.unstubAllEnvs());

describe('who sees the outbox', () => {
  test.each([
    ['tried out on one machine, in production', { NODE_ENV: 'production' }, true],
    ['reached from outside, in production', { NODE_ENV: 'production', HOST: '0.0.0.0' }, false],
    ['behind a proxy with an address of its own', { NODE_ENV: 'production', HILUM_ADDRESS: 'https://hilum.example.org' }, false],
    ['with a mail server', { NODE_ENV: 'production', SMTP_URL: 'smtp://mail.example.org' }, false],
    ['asked for', { NODE_ENV: 'production', HOST: '0.0.0.0', HILUM_SHOW_OUTBOX: 'yes' }, true],
    ['asked not to', { NODE_ENV: 'development', HILUM_SHOW_OUTBOX: 'no' }, false],
    ['in development', { NODE_ENV: 'development' }, true],
  ])('%s', async (_what, settings, shown) => {
    expect((await started(settings)).showOutbox).toBe(shown);
  });
});

describe('a wrong setting', () => {
  test('is named with what it must be', async () => {
    await expect(started({ PORT: 'eighty', DATABASE_URL: 'mysql://x' })).rejects.toThrow(
      /PORT[\s\S]*DATABASE_URL|DATABASE_URL[\s\S]*PORT/,
    );
  });
});
