import { defineConfig, devices } from '@playwright/test'

/** Long walks at the desk: a step of their own, `node scripts/test.mjs desk`, since all browser tests in a row outlast the time that a check of a change may take. */
const DESK = /\/(?:amounts|compare|drafts|files|hand|wall)\.spec\.ts$/

/** Browser tests run on Debian's Chromium against a built application with the demo workshop; `node scripts/test.mjs e2e` starts both. */
export default defineConfig({
  testDir: 'tests/e2e',
  projects: [{ name: 'e2e', testIgnore: DESK }, { name: 'desk', testMatch: DESK }],
  fullyParallel: false,
  workers: 1,
  retries: 0,
  timeout: 120_000,
  expect: { timeout: 20_000 },
  use: {
    baseURL: process.env.TEST_BASE_URL,
    ...devices['Desktop Chrome'],
    viewport: { width: 1440, height: 950 },
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        '--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync',
        '--use-angle=swiftshader', '--enable-unsafe-swiftshader',
      ],
    },
    trace: 'off',
    actionTimeout: 30_000,
  },
})
