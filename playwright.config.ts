import { defineConfig } from '@playwright/test';

/** Journeys in Debian's Chromium against the built product, which global set-up starts on a throwaway database. */
export default defineConfig({
  testDir: 'e2e/journeys',
  globalSetup: './e2e/fixtures/global-setup.ts',
  outputDir: 'test-results/journeys',
  timeout: 90_000,
  expect: { timeout: 10_000 },
  forbidOnly: true,
  retries: 0,
  // Two cores carry the browser, the server and PostgreSQL already.
  workers: 1,
  reporter: [['list']],
  use: {
    browserName: 'chromium',
    viewport: { width: 1440, height: 900 },
    locale: 'en-GB',
    timezoneId: 'UTC',
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      // Chromium's sandbox refuses to run as root.
      args: process.getuid?.() === 0 ? ['--no-sandbox'] : [],
    },
  },
});
