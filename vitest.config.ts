import { fileURLToPath } from 'node:url';
import { defineConfig } from 'vitest/config';

const root = fileURLToPath(new URL('.', import.meta.url)).replace(/\/$/, '');
const resolve = {
  alias: [
    { find: /^@\//, replacement: `${root}/` },
    { find: 'server-only', replacement: `${root}/tests/support/empty.ts` },
  ],
};

/** One project a folder of tests; those that touch the database get a prepared file (tests/support/database.ts). */
function project(name: string, options: { database?: boolean; timeoutSeconds?: number } = {}) {
  return {
    resolve,
    test: {
      name,
      include: [`tests/${name}/**/*.test.{ts,tsx}`],
      environment: 'node',
      testTimeout: (options.timeoutSeconds ?? 20) * 1000,
      hookTimeout: 60_000,
      setupFiles: ['tests/support/seeded-properties.ts', ...(options.database ? ['tests/support/database.ts'] : [])],
      globalSetup: options.database ? ['tests/support/prepare-database.ts'] : [],
    },
  };
}

export default defineConfig({
  test: {
    maxWorkers: 2,
    projects: [
      project('unit'),
      project('published'),
      project('access', { database: true, timeoutSeconds: 60 }),
      project('robustness', { database: true, timeoutSeconds: 300 }),
    ],
  },
});
