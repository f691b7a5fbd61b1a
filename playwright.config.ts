import { defineConfig, devices } from '@playwright/test';
import { DATA_FOLDER, PORT, SITE } from './tests/e2e/site.ts';

/** Debian's own; nothing is downloaded, and it asks nobody for anything. */
const chromium = {
  executablePath: '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    // Drawing by a graphics card that is not there costs more than the pages themselves.
    '--disable-gpu',
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
    // A trace of every test slows all of them down; a picture of a failure is cheap.
    screenshot: 'only-on-failure',
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
