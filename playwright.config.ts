import { defineConfig } from '@playwright/test';

/** Journeys through the running product: scripts/test.mjs starts it on a port of its own and names it in BASE_URL. */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'test-results',
  fullyParallel: false,
  workers: 1,
  timeout: 60_000,
  expect: { timeout: 10_000 },
  reporter: [['list']],
  forbidOnly: Boolean(process.env['CI']),
  use: {
    baseURL: process.env['BASE_URL'] ?? 'http://localhost:4321',
    viewport: { width: 1440, height: 1000 },
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
});
