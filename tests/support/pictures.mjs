/**
 * Takes pictures of the built page to look at, into `screenshots/`: each width, both themes, each panel,
 * each example and some extremes. With `--readme` it takes the README's own into `e2e/pictures/` instead.
 */
import { mkdirSync, readdirSync } from 'node:fs'
import { fileURLToPath } from 'node:url'
import { chromium } from 'playwright-core'
import { preview } from 'vite'
import { findOrFetchBrowser, launchOptions } from './find-browser.mjs'

const top = fileURLToPath(new URL('../..', import.meta.url))
const forReadme = process.argv.includes('--readme')
const folder = `${top}${forReadme ? 'e2e/pictures' : 'screenshots'}`
mkdirSync(folder, { recursive: true })

/** @typedef {import('playwright-core').Page} Page */
/** @typedef {{ name: string, width: number, dark?: boolean, whole?: boolean, act?: (page: Page) => Promise<unknown> }} Shot */

/** @param {string} part @param {string} text */
const type = (part, text) => async (/** @type {Page} */ page) => {
  await page.locator(`.fields input[data-part="${part}"]`).fill(text)
  await page.keyboard.press('Enter')
}
/** @param {string} name */
const openPanel = (name) => async (/** @type {Page} */ page) => {
  await page.getByRole('navigation', { name: 'Panels' }).getByRole('button', { name }).click()
  await page.waitForTimeout(200)
}
/** @param {string} title */
const openExample = (title) => async (/** @type {Page} */ page) => {
  await page.getByRole('button', { name: 'Examples' }).click()
  await page.getByRole('button', { name: title }).click()
}
/** @param {string} value */
const choose = (value) => (/** @type {Page} */ page) =>
  page.locator(`input[type=radio][value="${value}"]`).check({ force: true })
/** @param {...((page: Page) => Promise<unknown>)} acts */
const all =
  (...acts) =>
  async (/** @type {Page} */ page) => {
    for (const act of acts) await act(page)
  }

/** @type {[string, ((page: Page) => Promise<unknown>)?][]} */
const scenes = [
  ['flasher'],
  ['flasher-linear', choose('linear')],
  ['flasher-one-flash', all(choose('flash'), type('leadResistance', '1k'))],
  ['flasher-from-switch-on', all(choose('switch-on'), type('leakageResistance', '22M'))],
  ['indicator', openExample('Workshop panel lamp')],
  ['gate', openExample('Gate blinker')],
  [
    'latches',
    all(
      type('supplyVoltage', '80'),
      type('seriesResistance', '47k'),
      type('leakageResistance', '200k'),
    ),
  ],
  ['over-range', type('seriesResistance', '100')],
  ['lamp-panel', openPanel('Lamp')],
  ['slope-chosen', (page) => page.locator('[data-handle="slope"]').focus()],
  ['examples-menu', (page) => page.getByRole('button', { name: 'Examples' }).click()],
  ['link-menu', (page) => page.locator('[popovertarget=link]').click()],
  ['wrong-input', type('seriesResistance', '12 parsec')],
  [
    'extreme-high',
    all(type('supplyVoltage', '20k'), type('leadResistance', '10M'), type('capacitance', '1')),
  ],
  [
    'extreme-low',
    all(type('supplyVoltage', '0'), type('seriesResistance', '1'), type('capacitance', 'none')),
  ],
]

/** @type {Shot[]} */
const shots = forReadme
  ? [{ name: 'page', width: 1440 }]
  : [1440, 1024, 390].flatMap((width) =>
      [false, true].flatMap((dark) =>
        scenes.map(([name, act]) => ({
          name: `${name}-${width}-${dark ? 'dark' : 'light'}`,
          width,
          dark,
          whole: true,
          ...(act === undefined ? {} : { act }),
        })),
      ),
    )

const only = process.argv.find((word) => word.startsWith('--only='))?.slice(7)
const server = await preview({ root: top, preview: { port: 4721, host: '127.0.0.1' } })
const browser = await chromium.launch(launchOptions(findOrFetchBrowser()))
for (const shot of shots.filter(({ name }) => only === undefined || name.includes(only))) {
  const context = await browser.newContext({
    viewport: { width: shot.width, height: shot.width < 500 ? 844 : 900 },
    colorScheme: shot.dark ? 'dark' : 'light',
    reducedMotion: 'reduce',
    hasTouch: shot.width < 500,
  })
  const page = await context.newPage()
  page.on('pageerror', (error) => console.log(`${shot.name}: ${error.message}`))
  await page.goto('http://127.0.0.1:4721/')
  await page.waitForSelector('[data-verdict]')
  await page.evaluate(() => document.fonts.ready)
  await shot.act?.(page)
  await page.waitForTimeout(250)
  const beyond = await page.evaluate(
    () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
  )
  if (beyond > 0) console.log(`${shot.name}: ${beyond} px wider than the screen`)
  await page.screenshot({ path: `${folder}/${shot.name}.png`, fullPage: shot.whole === true })
  await context.close()
}
await browser.close()
await server.close()
console.log(`${readdirSync(folder).length} pictures in ${folder.slice(top.length)}`)
