import type { Page } from '@playwright/test'
import { expect, frames, openBench, test } from './support/bench'
import { carry, grabbed, middleOf, mouseOf, showPlane } from './support/drag'
import { verdict } from './support/readings'

declare global {
  interface Window {
    /** What was shifted while something was dragged, and how much. */
    shifts: string[]
  }
}

/** Notes every shift from now on, also within half a second of a press, which the browser's own sum leaves out. */
async function noteShifts(page: Page): Promise<void> {
  await page.evaluate(() => {
    window.shifts = []
    type Shift = PerformanceEntry & { value: number; sources: { node: Node | null }[] }
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries() as Shift[]) {
        for (const { node } of entry.sources) {
          const element = node instanceof Element ? node : node?.parentElement
          window.shifts.push(`${element?.tagName} ${element?.className} ${entry.value}`)
        }
      }
    }).observe({ type: 'layout-shift' })
  })
}

for (const width of [1440, 1024, 390]) {
  test(`nothing else on the page moves while something is dragged, at ${width} px`, async ({
    page,
  }) => {
    await page.setViewportSize({ width, height: width === 390 ? 844 : 900 })
    await openBench(page)
    await showPlane(page)
    await noteShifts(page)
    const plane = page.locator('[data-ground="plane"]')
    const mouse = mouseOf(page)
    // Through several verdicts, so that sentence, cautions, figures and fields all change their length.
    for (const [id, legs] of [
      ['supply', [70, 70, 70, -20, -20]],
      ['slope', [64, 64, 64, -60]],
      ['knot-1', [40, 50, -30]],
    ] as const) {
      const place = (await plane.boundingBox())!
      const verdicts = new Set([await verdict(page).getAttribute('data-verdict')])
      let at = await middleOf(grabbed(page, id))
      await mouse.down(at)
      await page.evaluate(() => {
        window.shifts = []
      })
      let moved = 0
      for (const leg of legs) {
        at = await carry(page, mouse, at, id === 'slope' ? { x: leg, y: 0 } : { x: 0, y: leg }, 6)
        verdicts.add(await verdict(page).getAttribute('data-verdict'))
        const now = (await plane.boundingBox())!
        moved = Math.max(moved, Math.abs(now.x - place.x), Math.abs(now.y - place.y))
      }
      expect.soft(await page.evaluate(() => window.shifts), `${id}: shifts`).toEqual([])
      expect.soft(moved, `${id}: px the plane moved under the pointer`).toBeLessThan(1)
      expect(verdicts.size, `${id}: verdicts seen`).toBeGreaterThan(1)
      await page.keyboard.press('Escape')
      await mouse.up()
      await frames(page)
    }
  })
}
