import { defineConfig, devices } from '@playwright/test'
import { demoLab, emptyLab, lookedLab, type Lab } from './tests/support/e2e-labs'

// Against `next build` and `next start`, never `next dev`. `npm test` builds first and starts the PostgreSQL server
// that TEST_DATABASE_ADMIN_URL names. The browser is Debian's; nothing is downloaded.

const serve = (lab: Lab) => ({
  name: lab.name,
  command: `node --import tsx tests/support/e2e-server.ts ${lab.name}`,
  url: `${lab.url}/sign-in`,
  reuseExistingServer: false,
  stdout: 'pipe' as const,
  timeout: 300_000,
  // It stops the processes it started, which a plain kill would leave.
  gracefulShutdown: { signal: 'SIGTERM' as const, timeout: 20_000 },
})

// As long as all the others together.
const besides = ['**/pages.spec.ts', '**/faults.spec.ts']

export default defineConfig({
  testDir: 'tests/e2e',
  timeout: 120_000,
  expect: { timeout: 15_000 },
  // Side by side on two cores: what writes to the demo or to the empty lab, and what only looks or
  // has a database of its own. Within a row one after the other.
  workers: 2,
  projects: [
    { name: 'demo', workers: 1, testIgnore: besides },
    { name: 'besides', workers: 1, testMatch: besides, use: { baseURL: lookedLab.url } },
  ],
  forbidOnly: true,
  reporter: [['list'], ['json', { outputFile: 'test-results/playwright.json' }]],
  outputDir: 'test-results/playwright',
  use: {
    ...devices['Desktop Chrome'],
    baseURL: demoLab.url,
    viewport: { width: 1440, height: 900 },
    // Each test is a new browser, in which the worker would fetch the whole application once more: only where it is tried.
    serviceWorkers: 'block',
    // A trace of every page takes longer than the page; what failed is seen on its picture.
    trace: 'off',
    screenshot: 'only-on-failure',
    launchOptions: {
      executablePath: '/usr/bin/chromium',
      args: [
        ...['--no-sandbox', '--disable-gpu', '--disable-background-networking', '--disable-component-update'],
        ...['--disable-sync', '--no-first-run'],
      ],
    },
  },
  webServer: [serve(demoLab), serve(lookedLab), serve(emptyLab)],
})
