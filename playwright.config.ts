import { defineConfig } from '@playwright/test';

/** Two servers: one on an empty database with a manager only (the main job from nothing), one on the demo scenario. */
const FRESH_PORT = 3211;
const DEMO_PORT = 3212;

function server(port: number, script: string) {
  return {
    command: `node --import tsx --conditions=react-server ${script} && node node_modules/next/dist/bin/next start --hostname 127.0.0.1 --port ${port}`,
    url: `http://127.0.0.1:${port}/sign-in`,
    timeout: 120_000,
    reuseExistingServer: false,
    env: {
      HOST: '127.0.0.1',
      PORT: String(port),
      DATABASE_URL: `file:build/e2e/${port}.db`,
      HILUM_SHOW_OUTBOX: 'yes',
      NODE_ENV: 'production',
    },
  };
}

export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'build/test-results/e2e',
  timeout: 120_000,
  expect: { timeout: 15_000 },
  workers: 1,
  fullyParallel: false,
  forbidOnly: true,
  retries: 0,
  reporter: [['list'], ['json', { outputFile: process.env.PLAYWRIGHT_JSON_OUTPUT_FILE ?? 'build/test-results/playwright.json' }]],
  use: {
    browserName: 'chromium',
    acceptDownloads: true,
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
  projects: [
    {
      name: 'main-job',
      testMatch: /main-job.*\.spec\.ts/,
      use: { baseURL: `http://127.0.0.1:${FRESH_PORT}`, viewport: { width: 1440, height: 900 } },
    },
    {
      name: 'demo',
      testIgnore: /main-job.*\.spec\.ts/,
      use: { baseURL: `http://127.0.0.1:${DEMO_PORT}`, viewport: { width: 1440, height: 900 } },
    },
  ],
  webServer: [server(FRESH_PORT, 'tests/support/fresh-database.ts'), server(DEMO_PORT, 'tests/support/demo-database.ts')],
});
