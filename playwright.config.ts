import { defineConfig, devices } from '@playwright/test';
import { DATA_FOLDER, PORT, SITE } from './tests/e2e/site.ts';

/** Debian's own; nothing is downloaded, and it asks nobody for anything. */
const chromium = {
  executablePath: '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
    '--no-first-run',
    '--disable-quic',
  ],
};

export default defineConfig({
  testDir: 'tests/e2e',
  testMatch: '**/*.spec.ts',
  outputDir: 'test-results',
  forbidOnly: true,
  // A retry would hide what happens now and then.
  retries: 0,
  workers: 2,
  timeout: 45_000,
  reporter: [['list'], ['json', { outputFile: '.data/test/playwright.json' }]],
  use: {
    ...devices['Desktop Chrome'],
    channel: undefined,
    baseURL: SITE,
    launchOptions: chromium,
    trace: 'retain-on-failure',
  },
  webServer: {
    command: 'exec node scripts/start.mjs',
    env: { PORT: String(PORT), DATA_FOLDER },
    url: `${SITE}/readyz`,
    reuseExistingServer: false,
    timeout: 120_000,
    gracefulShutdown: { signal: 'SIGTERM', timeout: 30_000 },
    stdout: 'ignore',
    stderr: 'pipe',
  },
});
