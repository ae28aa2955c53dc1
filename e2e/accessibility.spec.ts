import AxeBuilder from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { expect, frames, openBench, test } from './support/bench'
import { openPanel, rangeOf, stageField } from './support/readings'

/** What axe finds wrong, in words: by all its usual rules or one of them, on all of the page or part of it. */
async function violations(
  page: Page,
  { rule, part }: { readonly rule?: string; readonly part?: string } = {},
): Promise<string[]> {
  await frames(page)
  const axe = new AxeBuilder({ page })
  if (rule !== undefined) axe.withRules(rule)
  if (part !== undefined) axe.include(part)
  const { violations: found } = await axe.analyze()
  return found.flatMap(({ id, help, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${help}: ${target} ${failureSummary}`),
  )
}

for (const colorScheme of ['light', 'dark'] as const) {
  for (const width of [1440, 390]) {
    test(`axe finds nothing wrong at ${width} px, ${colorScheme}, whatever is open`, async ({
      page,
    }) => {
      await page.emulateMedia({ colorScheme, reducedMotion: 'reduce' })
      await page.setViewportSize({ width, height: width === 390 ? 844 : 900 })
      await openBench(page)
      const fine = async (when: string, part?: string) => {
        expect.soft(await violations(page, part === undefined ? {} : { part }), when).toEqual([])
      }
      for (const figure of await page.locator('.figures details').all()) {
        await figure.evaluate((details: HTMLDetailsElement) => {
          details.open = true
        })
      }
      await fine('figures, each explained')
      await openPanel(page, 'Lamp')
      await expect(page.getByRole('region', { name: 'Name and times' })).toBeVisible()
      await rangeOf(page, 'knot-1', 'voltage').focus()
      await page.getByRole('button', { name: 'Place with a click' }).click()
      await stageField(page, 'Series resistor').fill('33 furlongs')
      await fine('the lamp’s figures, a knot chosen, a field that cannot be read')
      await stageField(page, 'Series resistor').press('Escape')
      await page.getByRole('button', { name: 'Examples', exact: true }).click()
      await fine('the examples', '#examples')
      await page.keyboard.press('Escape')
      await page.getByRole('button', { name: 'Link', exact: true }).click()
      await expect(page.getByRole('textbox', { name: 'Link to this design' })).toBeVisible()
      await fine('the link', '#link')
      await page.keyboard.press('Escape')
      await page.evaluate(() => {
        window.location.hash = '1.12345678.damaged'
      })
      await expect(page.getByRole('alert')).toBeVisible()
      await fine('a link that could not be opened', '[role="alert"]')
    })
  }
}

for (const width of [1440, 390]) {
  // WCAG 2.5.8; not among the rules that axe looks at by itself.
  test(`whatever is clicked is 24 px or stands free, at ${width} px`, async ({ page }) => {
    await page.setViewportSize({ width, height: width === 390 ? 844 : 900 })
    await openBench(page)
    await openPanel(page, 'Lamp')
    await expect(page.getByRole('region', { name: 'Name and times' })).toBeVisible()
    await rangeOf(page, 'knot-1', 'voltage').focus()
    expect(await violations(page, { rule: 'target-size' })).toEqual([])
  })
}

test('every panel below the plate is looked at above', async ({ page }) => {
  await openBench(page)
  const names = await page
    .getByRole('navigation', { name: 'Panels' })
    .getByRole('button')
    .allTextContents()
  expect(names).toEqual(['Figures', 'Lamp'])
})

test('everything that can be done with the mouse is reached by Tab, in an order that makes sense, and is seen there', async ({
  page,
}) => {
  await openBench(page)
  await page.evaluate(() => window.scrollTo(0, 0))
  const order: string[] = []
  for (let k = 0; k < 90; k++) {
    await page.keyboard.press('Tab')
    const name = await page.evaluate(() => {
      const focused = document.activeElement
      if (focused === null || focused === document.body) return null
      const labelled = (focused as HTMLInputElement).labels?.[0]?.textContent
      return focused.getAttribute('aria-label') ?? labelled ?? focused.textContent ?? ''
    })
    if (name === null) break
    order.push(name.trim())
  }
  const wanted = [
    /^Title of the design/,
    /^Examples/,
    /^Open/,
    /^Save/,
    /^Link/,
    /^Light or dark/,
    /^Supply/,
    /^Series resistor/,
    /^Capacitor/,
    /^Supply end of the load line/,
    /^Slope of the load line/,
    /^Knee: voltage/,
    /^(Stop|Run) the marker/,
    /^Figures/,
  ]
  let from = 0
  for (const name of wanted) {
    const found = order.findIndex((one, k) => k >= from && name.test(one))
    expect(found, `${name} after ${order[from]}, in: ${order.join(' · ')}`).toBeGreaterThanOrEqual(
      0,
    )
    from = found
  }
})

test('the verdict is announced when it changes, the many figures are not', async ({ page }) => {
  await openBench(page)
  await expect(page.locator('[data-verdict]')).toHaveAttribute('aria-live', 'polite')
  const chatter = await page
    .getByRole('region', { name: 'Figures' })
    .locator('output:not([aria-live="off"]), [aria-live="polite"], [role="status"]')
    .count()
  expect(chatter).toBe(0)
})
