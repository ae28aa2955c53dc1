import type { Page } from '@playwright/test'
import { expect, frames, openBench, test } from './support/bench'
import { designWith, fragmentOf } from './support/designs'
import { carry, grabbed, middleOf, mouseOf, showPlane } from './support/drag'
import { openPanel, stageField } from './support/readings'

const cautions = (page: Page) => page.getByRole('complementary', { name: 'Cautions' })

const overVoltage = /limit is 60\sV dc/
const overCharge = /more than the 45\sµC/
const mains = /Fed from the mains\?.*local codes.*licensed/

const open = (page: Page, supplyVoltage: number, capacitance: number) =>
  openBench(page, fragmentOf(designWith({ supplyVoltage, capacitance })))

test('above 60 V it warns of the voltage, and defers to local codes and licensed people', async ({
  page,
}) => {
  await open(page, 61, 1e-8)
  await expect(cautions(page)).toContainText(overVoltage)
  await expect(cautions(page)).toContainText(/61\sV/)
  await expect(cautions(page)).toContainText(mains)
  await expect(cautions(page)).not.toContainText(overCharge)
})

test('above 45 µC it warns of the charge, at low voltages too', async ({ page }) => {
  // 1 µF at 50 V is 50 µC; 0.5 µF at 90 V is just 45 µC, and at 91 V more.
  await open(page, 50, 1e-6)
  await expect(cautions(page)).toContainText(overCharge)
  await expect(cautions(page)).toContainText(/50\sµC at 50\sV/)
  await expect(cautions(page)).toContainText(mains)
  await expect(cautions(page)).not.toContainText(overVoltage)
  await open(page, 91, 0.5e-6)
  await expect(cautions(page)).toContainText(overCharge)
  await expect(cautions(page)).toContainText(overVoltage)
  await open(page, 90, 0.49e-6)
  await expect(cautions(page)).not.toContainText(overCharge)
})

test('at 50 V with a small capacitor there is nothing to warn of, and at 60 V neither', async ({
  page,
}) => {
  await open(page, 50, 0.47e-6)
  await expect(cautions(page)).toHaveCount(0)
  await open(page, 60, 0.47e-6)
  await expect(cautions(page)).toHaveCount(0)
})

test('it appears while the supply is typed or dragged past 60 V, before anything is let go', async ({
  page,
}) => {
  await open(page, 55, 1e-8)
  await expect(cautions(page)).toHaveCount(0)
  await stageField(page, 'Supply').pressSequentially('70')
  await expect(cautions(page)).toContainText(overVoltage)
  await stageField(page, 'Supply').press('Escape')
  await expect(cautions(page)).toHaveCount(0)

  await showPlane(page)
  const from = await middleOf(grabbed(page, 'supply'))
  await mouseOf(page).down(from)
  await carry(page, mouseOf(page), from, { x: 0, y: -60 })
  await expect(cautions(page)).toContainText(overVoltage)
  await mouseOf(page).up()
})

for (const [width, colorScheme] of [
  [1440, 'light'],
  [1024, 'dark'],
  [390, 'light'],
] as const) {
  test(`every caution is plain to see at ${width} px without a click, whatever else is open`, async ({
    page,
  }) => {
    await page.emulateMedia({ colorScheme })
    await page.setViewportSize({ width, height: width === 390 ? 844 : 900 })
    await open(page, 240, 1e-6)
    const seen = async () => {
      const items = cautions(page).getByRole('listitem')
      expect(await items.count()).toBe(4)
      for (const item of await items.all()) {
        await item.scrollIntoViewIfNeeded()
        const text = (await item.textContent()) ?? ''
        expect(text.trim().length).toBeGreaterThan(40)
        const state = await item.evaluate((element) => {
          const range = document.createRange()
          range.selectNodeContents(element)
          const lines = [...range.getClientRects()]
          const style = getComputedStyle(element)
          return {
            // Not covered, cut off or shrunk anywhere along its lines.
            inSight: lines.every((line) => {
              const at = document.elementFromPoint(
                line.left + line.width / 2,
                line.top + line.height / 2,
              )
              return at !== null && (element.contains(at) || at.contains(element))
            }),
            size: Number.parseFloat(style.fontSize),
            faint: Number(style.opacity) < 1 || style.visibility !== 'visible',
          }
        })
        expect(state.inSight, text).toBe(true)
        expect(state.size).toBeGreaterThanOrEqual(13)
        expect(state.faint).toBe(false)
      }
      expect(await cautions(page).locator('summary, button, [hidden]').count()).toBe(0)
    }
    await seen()
    await openPanel(page, 'Lamp')
    await seen()
    await page.evaluate(() => {
      window.location.hash = 'damaged'
    })
    await expect(page.getByRole('alert')).toBeVisible()
    await seen()
  })
}

test('the footer says what the page is and is not, always', async ({ page }) => {
  await open(page, 5, 0)
  await frames(page)
  await expect(page.getByRole('contentinfo')).toContainText(/local codes/)
  await expect(page.getByRole('contentinfo')).toContainText(/licensed/)
})
