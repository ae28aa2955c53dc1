import { defineConfig } from '@playwright/test'
import { launchOptions } from './tests/support/find-browser.mjs'

/** The port the built page is served on while browser tests run. */
const port = Number(process.env.GLOWLOOP_PORT ?? 4719)
const address = `http://127.0.0.1:${port}/`

export default defineConfig({
  testDir: 'e2e',
  // Playwright empties this folder at its start, so nothing else may live in it.
  outputDir: '.reports/browser',
  fullyParallel: true,
  workers: 2,
  retries: 0,
  forbidOnly: Boolean(process.env.CI),
  globalTimeout: 9 * 60_000,
  use: {
    browserName: 'chromium',
    baseURL: address,
    // The marker stands still unless a test is about its running: a page that draws all the time without a
    // graphics card slows every test down.
    contextOptions: { reducedMotion: 'reduce' },
    launchOptions: launchOptions(),
    screenshot: 'only-on-failure',
    trace: 'off',
  },
  webServer: {
    command: `npm exec vite -- preview --host 127.0.0.1 --port ${port} --strictPort`,
    url: address,
    // A server left over from an earlier build would be tested instead of this one.
    reuseExistingServer: false,
  },
})
