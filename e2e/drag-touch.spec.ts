import type { Page } from '@playwright/test'
import { expect, frames, openBench, test } from './support/bench'
import {
  carry,
  distanceTo,
  fingerOf,
  grabbed,
  middleOf,
  placeOnLoadLine,
  showPlane,
} from './support/drag'
import { allSpoken, rangeOf, spoken, undoButton } from './support/readings'

test.use({ hasTouch: true, isMobile: true, viewport: { width: 390, height: 844 } })

/** Handles with a way to go, px: short, for a narrow screen. */
const ways = {
  supply: { x: 0, y: 40 },
  slope: { x: 24, y: 0 },
  'knot-1': { x: 8, y: 22 },
  'knot-2': { x: -14, y: 16 },
  'knot-3': { x: -4, y: -16 },
  'knot-4': { x: -6, y: 16 },
} as const

const finger = async (page: Page) => fingerOf(await page.context().newCDPSession(page))

/** Where the page is rolled to; a drag must not roll it. */
const rolledTo = (page: Page) => page.evaluate(() => [window.scrollX, window.scrollY])

test.beforeEach(async ({ page }) => {
  await openBench(page)
  await showPlane(page)
})

for (const [what, ids] of [
  ['supply end and slope', ['supply', 'slope']],
  ['the knots', ['knot-1', 'knot-2', 'knot-3', 'knot-4']],
] as const) {
  test(`${what} follow a finger, the page keeps still, and each drag is one step to undo`, async ({
    page,
  }) => {
    const touch = await finger(page)
    const first = await allSpoken(page)
    for (const id of ids) {
      await showPlane(page)
      const rolled = await rolledTo(page)
      const from = await middleOf(grabbed(page, id))
      await touch.down(from)
      const to = await carry(page, touch, from, ways[id])
      const handle = await middleOf(grabbed(page, id))
      expect.soft(Math.abs(handle.x - to.x), `${id} across`).toBeLessThanOrEqual(2)
      expect.soft(Math.abs(handle.y - to.y), `${id} up`).toBeLessThanOrEqual(2)
      expect.soft(await rolledTo(page), `${id}: the page`).toEqual(rolled)
      await touch.up()
      await frames(page)
      expect.soft(await allSpoken(page), id).not.toEqual(first)
      if (await undoButton(page).isEnabled()) await undoButton(page).click()
      expect.soft(await allSpoken(page), id).toEqual(first)
      await expect.soft(undoButton(page)).toBeDisabled()
    }
  })
}

test('the load line itself follows a finger', async ({ page }) => {
  const touch = await finger(page)
  const rolled = await rolledTo(page)
  const said = await spoken(rangeOf(page, 'slope'))
  const from = await placeOnLoadLine(page)
  await touch.down(from)
  const to = await carry(page, touch, from, { x: -16, y: 12 })
  expect(await distanceTo(grabbed(page, 'load-line'), to)).toBeLessThanOrEqual(2)
  expect(await rolledTo(page)).toEqual(rolled)
  await touch.up()
  await frames(page)
  expect(await spoken(rangeOf(page, 'slope'))).not.toBe(said)
  await expect(undoButton(page)).toBeEnabled()
})

test('a touch that the system takes away puts everything back', async ({ page }) => {
  const touch = await finger(page)
  for (const id of ['supply', 'slope', 'knot-1'] as const) {
    const said = await allSpoken(page)
    const from = await middleOf(grabbed(page, id))
    await touch.down(from)
    await carry(page, touch, from, ways[id], 4)
    expect(await allSpoken(page)).not.toEqual(said)
    await touch.cancel()
    await frames(page)
    expect(await allSpoken(page)).toEqual(said)
  }
  await expect(undoButton(page)).toBeDisabled()
})

test('a handle is placed by a tap, with no drag at all', async ({ page }) => {
  const touch = await finger(page)
  const tap = await middleOf(grabbed(page, 'supply'))
  await touch.down(tap)
  await touch.up()
  const place = page.getByRole('button', { name: 'Place with a click' })
  await place.scrollIntoViewIfNeeded()
  const button = await middleOf(place)
  await page.touchscreen.tap(button.x, button.y)
  await showPlane(page)
  const plane = (await page.locator('[data-ground="plane"]').boundingBox())!
  const before = await spoken(rangeOf(page, 'supply'))
  await page.touchscreen.tap(plane.x + plane.width * 0.7, plane.y + plane.height * 0.35)
  await frames(page)
  expect(await spoken(rangeOf(page, 'supply'))).not.toBe(before)
})

test('a finger beside the handles rolls the page, so that nobody is caught on the plane', async ({
  page,
}) => {
  const touch = await finger(page)
  const [, before] = await rolledTo(page)
  const plane = (await page.locator('[data-ground="plane"]').boundingBox())!
  const said = await allSpoken(page)
  const from = { x: plane.x + plane.width * 0.15, y: plane.y + plane.height * 0.75 }
  await touch.down(from)
  await carry(page, touch, from, { x: 0, y: -150 }, 12)
  await touch.up()
  await expect.poll(async () => (await rolledTo(page))[1]).toBeGreaterThan(before! + 50)
  expect(await allSpoken(page)).toEqual(said)
})

test('what is touched is 24 px or more, and 44 where it stands free', async ({ page }) => {
  const tall = await page
    .getByRole('group', { name: 'Marker' })
    .getByRole('button')
    .evaluateAll((buttons) => buttons.map((button) => button.getBoundingClientRect().height))
  expect(tall.length).toBe(3)
  expect(Math.min(...tall)).toBeGreaterThanOrEqual(44)
  const all = await page
    .locator('button:visible, select:visible, input[type="text"]:visible')
    .evaluateAll((elements) =>
      elements.map((element) => {
        const { width, height } = element.getBoundingClientRect()
        const name = element.getAttribute('aria-label') ?? element.textContent
        return { name, side: Math.min(width, height) }
      }),
    )
  expect(all.length).toBeGreaterThan(20)
  // Half a row's height is all that two step buttons in one field can have.
  expect(all.filter(({ side }) => side < 20)).toEqual([])
})
