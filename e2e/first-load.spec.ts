import type { Page } from '@playwright/test'
import { expect, frames, openBench, test } from './support/bench'
import { drag, grabbed, middleOf, mouseOf, showPlane } from './support/drag'
import { choose, openPanel, rangeOf, savedDesign, stageField, verdict } from './support/readings'

/** Everything a person can set off on the page, once. */
async function tryEverything(page: Page): Promise<void> {
  await showPlane(page)
  await drag(page, mouseOf(page), await middleOf(grabbed(page, 'supply')), { x: 0, y: -30 })
  await rangeOf(page, 'slope').press('ArrowUp')
  await stageField(page, 'Capacitor').fill('330n')
  await stageField(page, 'Capacitor').press('Enter')
  await choose(page, 'Current axis', 'Linear')
  await choose(page, 'Current axis', 'Logarithmic')
  await page.getByRole('button', { name: 'Zoom the plane in' }).click()
  await page.getByRole('button', { name: 'Show all of the plane' }).click()
  await page.getByRole('button', { name: 'Step on to the next corner' }).click()
  await openPanel(page, 'Lamp')
  await expect(page.getByRole('region', { name: 'Knots of the characteristic' })).toBeVisible()
  await openPanel(page, 'Figures')
  await page.getByRole('button', { name: 'Link', exact: true }).click()
  await expect(page.getByRole('textbox', { name: 'Link to this design' })).toHaveValue(/#1\./)
  await page.keyboard.press('Escape')
  await savedDesign(page)
  await page
    .getByLabel('Open a saved design')
    .setInputFiles({ name: 'x.json', mimeType: 'application/json', buffer: Buffer.from('{}') })
  await expect(page.getByRole('alert')).toBeVisible()
  await page.getByRole('alert').getByRole('button', { name: 'Close' }).click()
  await page.getByRole('button', { name: 'Examples', exact: true }).click()
  await page.getByRole('button', { name: /Workshop panel lamp/ }).click()
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'stays lit')
}

/** Long enough for all that the page fetches by itself after it stands. */
const settled = 2500

test('a first visit shows a flashing stage: verdict, rate and voltages in one sentence', async ({
  page,
}) => {
  await openBench(page)
  await expect(page).toHaveTitle(/Glowloop/)
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Glowloop')
  await expect(verdict(page)).toHaveAttribute('data-verdict', 'flashes')
  // From the textbook: RC ln((E − Ve)/(E − Vs)) with 120 V, 2.2016 MΩ, 0.47 µF, 55 V and 75 V is 0.381 s;
  // the flash itself and the lamp's dark current make it a little longer.
  const [, rate, every] = /([\d.]+) times a second, every (\d+)\sms/.exec(
    (await verdict(page).textContent())!,
  )!
  expect(Number(every)).toBeGreaterThan(381)
  expect(Number(every)).toBeLessThan(410)
  expect(Number(rate) * Number(every)).toBeGreaterThan(990)
  expect(Number(rate) * Number(every)).toBeLessThan(1010)
  await expect(verdict(page)).toContainText('55 V')
  await expect(verdict(page)).toContainText('75 V')
})

test('the verdict can be read at arm’s length on every screen', async ({ page }) => {
  await openBench(page)
  for (const width of [1440, 1024, 390]) {
    await page.setViewportSize({ width, height: width === 390 ? 844 : 900 })
    await frames(page)
    await expect(verdict(page)).toBeInViewport()
    const size = await verdict(page).evaluate((h) =>
      Number.parseFloat(getComputedStyle(h).fontSize),
    )
    expect(size).toBeGreaterThanOrEqual(20)
  }
})

test('all it loads comes from its own folder, and once it stands it asks for nothing more', async ({
  page,
}) => {
  const requests: string[] = []
  page.on('request', (request) => requests.push(request.url()))
  await openBench(page)
  await page.waitForTimeout(settled)
  expect(requests.length).toBeGreaterThan(2)
  requests.length = 0
  await tryEverything(page)
  // The browser itself may ask for the page's icon again when the address changes.
  expect(requests.filter((url) => !/^blob:|\/icon\.svg$/.test(url))).toEqual([])
})

test('once it stands, everything works with no network at all', async ({ page, context }) => {
  await openBench(page)
  await page.waitForTimeout(settled)
  await context.setOffline(true)
  await tryEverything(page)
})

test('what is built forbids itself every other server', async ({ page }) => {
  await openBench(page)
  const policy = await page
    .locator('meta[http-equiv="Content-Security-Policy"]')
    .getAttribute('content')
  expect(policy).toContain("default-src 'none'")
  expect(policy).toContain("connect-src 'self'")
  expect(policy).not.toMatch(/https?:|\*|unsafe/)
})

for (const width of [1440, 1024, 390]) {
  test(`nothing needs sideways scrolling at ${width} px, light or dark`, async ({ page }) => {
    await page.setViewportSize({ width, height: width === 390 ? 844 : 900 })
    await openBench(page)
    const fits = async (when: string) => {
      for (const colorScheme of ['light', 'dark'] as const) {
        await page.emulateMedia({ colorScheme })
        await frames(page)
        const beyond = await page.evaluate(() => {
          const { scrollWidth, clientWidth } = document.documentElement
          return Math.max(scrollWidth, document.body.scrollWidth) - clientWidth
        })
        expect.soft(beyond, `${when}, ${colorScheme}`).toBe(0)
      }
    }
    await fits('at first')
    await rangeOf(page, 'knot-1', 'voltage').focus()
    await fits('with a knot chosen')
    await openPanel(page, 'Lamp')
    await expect(page.getByRole('region', { name: 'Name and times' })).toBeVisible()
    await fits('with the lamp’s figures open')
    await stageField(page, 'Series resistor').fill('33 furlongs')
    await stageField(page, 'Lead resistor').fill('33 furlongs')
    await fits('with fields that cannot be read')
    await page.getByRole('button', { name: 'Examples', exact: true }).click()
    await fits('with the examples open')
    await page.keyboard.press('Escape')
    await page.getByRole('button', { name: 'Link', exact: true }).click()
    await expect(page.getByRole('textbox', { name: 'Link to this design' })).toBeVisible()
    await fits('with the link open')
    await page.keyboard.press('Escape')
    await page.getByRole('textbox', { name: 'Title of the design' }).fill('W'.repeat(80))
    await page.getByRole('textbox', { name: 'Lamp', exact: true }).fill('W'.repeat(60))
    await fits('with long names')
    await page.evaluate(() => {
      window.location.hash = `1.damaged.${'x'.repeat(500)}`
    })
    await expect(page.getByRole('alert')).toBeVisible()
    await fits('with a link that could not be opened')
  })
}

test('menus stay inside the window at 390 px', async ({ page }) => {
  await page.setViewportSize({ width: 390, height: 844 })
  await openBench(page)
  for (const [button, menu] of [
    ['Examples', '#examples'],
    ['Link', '#link'],
  ] as const) {
    await page.getByRole('button', { name: button, exact: true }).click()
    await expect(page.locator(menu)).toBeVisible()
    const box = (await page.locator(menu).boundingBox())!
    expect(box.x).toBeGreaterThanOrEqual(0)
    expect(box.x + box.width).toBeLessThanOrEqual(390)
    expect(box.y).toBeGreaterThanOrEqual(0)
    expect(box.y + box.height).toBeLessThanOrEqual(844)
    await page.keyboard.press('Escape')
    await expect(page.locator(menu)).toBeHidden()
  }
})

test('the page goes light and dark by itself and by choice, and remembers the choice', async ({
  page,
}) => {
  const paper = () => page.evaluate(() => getComputedStyle(document.body).backgroundColor)
  await page.emulateMedia({ colorScheme: 'light' })
  await openBench(page)
  const light = await paper()
  await page.emulateMedia({ colorScheme: 'dark' })
  const dark = await paper()
  expect(dark).not.toBe(light)
  await page.getByLabel('Light or dark page').selectOption('light')
  await expect.poll(paper).toBe(light)
  await openBench(page)
  await expect.poll(paper).toBe(light)
  await page.getByLabel('Light or dark page').selectOption('system')
  await expect.poll(paper).toBe(dark)
})
