import { defineConfig } from '@playwright/test'
import { endToEndOrigin } from '#tests/support/end-to-end-origin.ts'

export default defineConfig({
  testDir: 'tests/e2e',
  testMatch: '**/*.ts',
  outputDir: 'test-results/playwright',
  timeout: 60_000,
  workers: 2,
  retries: 0,
  forbidOnly: true,
  use: {
    baseURL: endToEndOrigin,
    viewport: { width: 1440, height: 900 },
    trace: 'retain-on-failure',
    launchOptions: { executablePath: '/usr/bin/chromium', args: ['--no-sandbox', '--disable-dev-shm-usage'] },
  },
  // Journeys change what others read and come one after another; looking at every page changes nothing.
  projects: [
    { name: 'journeys', testIgnore: '**/pages-are-accessible.ts', workers: 1 },
    {
      name: 'accessibility',
      testMatch: '**/pages-are-accessible.ts',
      fullyParallel: true,
      dependencies: ['journeys'],
    },
  ],
  webServer: {
    command: 'node --import tsx tests/support/end-to-end-server.ts',
    url: `${endToEndOrigin}/healthz`,
    timeout: 120_000,
    reuseExistingServer: false,
    stdout: 'ignore',
    stderr: 'pipe',
    gracefulShutdown: { signal: 'SIGTERM', timeout: 10_000 },
  },
})
