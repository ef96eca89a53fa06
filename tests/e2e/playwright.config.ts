import { defineConfig } from '@playwright/test'

/**
 * Browser tests run against one started application over the seeded demo region; Debian's Chromium drives it.
 * BASE_URL points them at one that runs already.
 */
export default defineConfig({
  testDir: '.',
  testMatch: '**/*.spec.ts',
  outputDir: '../../test-results',
  globalSetup: './support/global-setup.ts',
  fullyParallel: true,
  workers: 2,
  retries: 0,
  // Generous, because the machine that runs them may be busy; no test waits for a time.
  timeout: 300_000,
  expect: { timeout: 30_000 },
  use: {
    viewport: { width: 1440, height: 900 },
    locale: 'en-GB',
    timezoneId: 'UTC',
    // Animations are the design's; tests look at what stands after them.
    contextOptions: { reducedMotion: 'reduce' },
    screenshot: 'only-on-failure',
    // Recording takes a third of the time; `--trace on` records a test that is looked into.
    trace: 'off',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        '--no-sandbox',
        '--disable-gpu',
        '--disable-background-networking',
        '--disable-component-update',
        '--disable-default-apps',
        '--disable-sync',
        '--no-first-run',
      ],
    },
  },
})
