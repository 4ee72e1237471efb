import { defineConfig } from '@playwright/test';

/**
 * `npm test` builds the app, seeds the demo, serves it on a free port and runs these with BASE_URL and the environment of
 * its fakes. Against a server that runs already: BASE_URL=http://localhost:3000 npm run with-fakes -- playwright test
 */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'test-results',
  timeout: 120_000,
  expect: { timeout: 20_000 },
  // One after another: they share one demo, and two cores.
  workers: 1,
  fullyParallel: false,
  forbidOnly: true,
  reporter: 'list',
  use: {
    baseURL: process.env.BASE_URL ?? process.env.APP_URL,
    viewport: { width: 1366, height: 768 },
    screenshot: 'only-on-failure',
    trace: 'off',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-quic',
        '--no-first-run',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-sync',
      ],
    },
  },
});
