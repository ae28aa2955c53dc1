import {
  type BrowserContext,
  type BrowserContextOptions,
  test as base,
  expect,
  type Page,
} from '@playwright/test'

/** A page in a browser that has never seen this program. */
type Fresh = (options?: BrowserContextOptions) => Promise<Page>

type Fixtures = {
  /** Faults noted in the test's own browser: script errors, messages of the console, foreign requests. */
  readonly faults: readonly string[]
  readonly fresh: Fresh
}

/**
 * The test function of all browser tests. Whatever else a test asks, it fails when a page throws, writes an
 * error or a warning to the console, or asks anything of another server.
 */
export const test = base.extend<Fixtures>({
  actionTimeout: 8_000,
  faults: [
    async ({ context, baseURL }, use) => {
      const faults = watch(context, baseURL!)
      await use(faults)
      expect(faults, 'faults of the page').toEqual([])
    },
    { auto: true },
  ],
  fresh: async ({ browser, baseURL }, use) => {
    const contexts: BrowserContext[] = []
    const faults: (readonly string[])[] = []
    await use(async (options = {}) => {
      const context = await browser.newContext({
        baseURL: baseURL!,
        reducedMotion: 'reduce',
        ...options,
      })
      contexts.push(context)
      faults.push(watch(context, baseURL!))
      return context.newPage()
    })
    for (const context of contexts) await context.close()
    expect(faults.flat(), 'faults of the page').toEqual([])
  },
})

export { expect }

function watch(context: BrowserContext, address: string): readonly string[] {
  const faults: string[] = []
  const { origin } = new URL(address)
  context.on('weberror', (fault) => faults.push(`thrown: ${fault.error().message}`))
  context.on('console', (message) => {
    // The icon is fetched by the browser when it likes, also while the network is off.
    const ofIcon = message.location().url.endsWith('/icon.svg')
    if (!ofIcon && (message.type() === 'error' || message.type() === 'warning')) {
      faults.push(`${message.type()}: ${message.text()}`)
    }
  })
  context.on('request', (request) => {
    const url = request.url()
    if (!url.startsWith(`${origin}/`) && !/^(?:data|blob):/.test(url)) {
      faults.push(`request to another server: ${url}`)
    }
  })
  return faults
}

/** Opens the page anew, with what follows `#` in its address, and waits until it stands. */
export async function openBench(page: Page, fragment = ''): Promise<void> {
  // A mere change of what follows "#" would not load the page again.
  if (page.url() !== 'about:blank') await page.goto('about:blank')
  await page.goto(`./${fragment}`)
  await standing(page)
}

/** Waits until the page shows a verdict and its letters are those it keeps. */
export async function standing(page: Page): Promise<void> {
  await expect(page.locator('[data-verdict]')).toBeVisible()
  await page.evaluate(() => document.fonts.ready)
  await frames(page)
}

/** Waits until what was asked for before is on the screen. */
export const frames = (page: Page): Promise<void> =>
  page.evaluate(
    () =>
      new Promise<void>((resolve) =>
        requestAnimationFrame(() => requestAnimationFrame(() => resolve())),
      ),
  )
