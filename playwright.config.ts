import { defineConfig } from '@playwright/test';

/** Debian's Chromium; as root and in containers it runs without its own sandbox, and asks nothing of the network. */
const launchOptions = {
  executablePath: process.env.SELVEDGE_CHROMIUM ?? '/usr/bin/chromium',
  args: [
    '--no-sandbox',
    '--disable-gpu',
    '--disable-quic',
    '--no-first-run',
    '--disable-background-networking',
    '--disable-component-update',
    '--disable-sync',
  ],
};

export default defineConfig({
  testDir: 'tests/e2e',
  testMatch: '**/*.spec.ts',
  outputDir: 'test-results',
  fullyParallel: true,
  forbidOnly: true,
  // A test that needs a second try is wrong: it counts as failed.
  retries: 0,
  workers: 2,
  timeout: 90_000,
  expect: { timeout: 15_000 },
  reporter: [['list']],
  globalSetup: './tests/support/e2e/start-for-journeys.ts',
  use: {
    launchOptions,
    viewport: { width: 1440, height: 900 },
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
  },
});
