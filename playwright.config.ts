import { defineConfig } from '@playwright/test';
import { findChromium } from './scripts/lib/chromium.mjs';

const executablePath = findChromium();

/**
 * The journeys people pay for, in the browser. `x.spec.ts` runs on both screens, `x.phone.spec.ts` and
 * `x.wide.spec.ts` on one; each file gets a server and a seeded database of its own (tests/e2e/support/site.ts).
 */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: 'test-results',
  globalSetup: './tests/e2e/support/ground.ts',
  fullyParallel: false,
  workers: 2,
  retries: 1, // on a server of its own; what needed it is named beside the count
  timeout: 90_000,
  expect: { timeout: 15_000 },
  reporter: [['list']],
  use: {
    actionTimeout: 15_000,
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    serviceWorkers: 'block', // they answer past `page.route`; the journeys without a signal allow theirs
    screenshot: 'only-on-failure',
    trace: process.env.JOURNEY_TRACES ? 'retain-on-failure' : 'off', // recording costs a third of the time
    launchOptions: {
      ...(executablePath ? { executablePath } : {}),
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
  projects: [
    {
      name: 'phone',
      testIgnore: '**/*.wide.spec.ts',
      use: { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true, deviceScaleFactor: 2 },
    },
    { name: 'wide', testIgnore: '**/*.phone.spec.ts', use: { viewport: { width: 1280, height: 800 } } },
  ],
});
