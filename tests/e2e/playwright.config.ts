import { defineConfig } from '@playwright/test'

const MINUTE_MS = 60_000

export default defineConfig({
  testDir: '.',
  testMatch: '**/*.e2e.ts',
  outputDir: '../../test-results',
  globalSetup: '../support/stack.ts',
  // Two browsers and the product share the machine.
  workers: 2,
  fullyParallel: true,
  retries: 0,
  timeout: 3 * MINUTE_MS,
  expect: { timeout: 10_000 },
  reporter: [['list']],
  use: {
    viewport: { width: 1440, height: 900 },
    actionTimeout: 20_000,
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    screenshot: 'only-on-failure',
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      // No sandbox inside a container run as root, and no talk to the outside.
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
})
