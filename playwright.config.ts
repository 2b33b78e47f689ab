import { defineConfig } from '@playwright/test';

/**
 * Browser tests run against a stack that is already up; `npm test` brings up one of its own. To run them against
 * another, set its variables first: `. .local/demo/environment.sh && npx playwright test`.
 */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'test-results',
  forbidOnly: true,
  retries: 0,
  workers: 2,
  // Without a graphics card one frame of the room view takes up to two seconds.
  timeout: 120_000,
  expect: { timeout: 20_000 },
  reporter: [
    ['list'],
    ['json', { outputFile: process.env.PLAYWRIGHT_RESULTS ?? 'test-results/results.json' }],
  ],
  use: {
    baseURL: process.env.APP_ORIGIN ?? 'http://localhost:4300',
    viewport: { width: 1440, height: 900 },
    locale: 'en-US',
    timezoneId: 'America/New_York',
    actionTimeout: 30_000,
    navigationTimeout: 60_000,
    trace: 'retain-on-failure',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
        '--use-gl=angle',
        '--use-angle=swiftshader',
        '--enable-unsafe-swiftshader',
      ],
    },
  },
});
