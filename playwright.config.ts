import { defineConfig } from '@playwright/test'

/** Debian's Chromium, one after the other; a server and its studio stand ready (scripts/test.mjs). */
export default defineConfig({
  testDir: 'tests/e2e',
  outputDir: '.data-test/e2e',
  workers: 1,
  retries: 0,
  forbidOnly: true,
  timeout: 120_000,
  expect: { timeout: 10_000 },
  use: {
    baseURL: process.env.TEST_BASE_URL,
    viewport: { width: 1180, height: 820 },
    locale: 'en-GB',
    timezoneId: 'Europe/London',
    permissions: ['camera'],
    trace: 'retain-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update', '--disable-sync', '--use-fake-ui-for-media-stream', '--use-fake-device-for-media-stream'],
    },
  },
})
