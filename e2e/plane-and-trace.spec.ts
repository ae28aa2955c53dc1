import type { Page } from '@playwright/test'
import { expect, frames, openBench, test } from './support/bench'
import { fragmentOf, fullDesign } from './support/designs'
import { drag, grabbed, middleOf, mouseOf, showPlane } from './support/drag'
import { choose, savedDesign, stageField, undoButton } from './support/readings'

test.use({ contextOptions: { reducedMotion: 'no-preference' } })

test.beforeEach(async ({ page }) => {
  await page.setViewportSize({ width: 1440, height: 900 })
  await openBench(page)
})

/** Points of the load line as drawn, px. */
const loadLine = async (page: Page): Promise<(readonly [number, number])[]> => {
  const drawn = (await grabbed(page, 'load-line').getAttribute('d'))!
  return [...drawn.matchAll(/(-?[\d.]+)[ ,](-?[\d.]+)/g)].map(
    ([, x, y]) => [Number(x), Number(y)] as const,
  )
}

/** How far a line's points lie from the straight line between its ends, px, at most. */
function bend(points: readonly (readonly [number, number])[]): number {
  const [x0, y0] = points[0]!
  const [x1, y1] = points.at(-1)!
  const length = Math.hypot(x1 - x0, y1 - y0)
  return Math.max(
    ...points.map(([x, y]) => Math.abs((x1 - x0) * (y - y0) - (y1 - y0) * (x - x0)) / length),
  )
}

const places = async (page: Page, ids: readonly string[]) =>
  Promise.all(ids.map((id) => middleOf(grabbed(page, id))))

const ground = async (page: Page, of: 'plane' | 'trace') =>
  (await page.locator(`[data-ground="${of}"]`).boundingBox())!

/** Somewhere on the plane where nothing else can be grabbed: right of everything, high up. */
async function emptyPlace(page: Page) {
  const { x, y, width, height } = await ground(page, 'plane')
  const at = { x: x + 0.25 * width, y: y + 0.8 * height }
  const found = await page.evaluate(
    (place) => document.elementFromPoint(place.x, place.y)?.getAttribute('data-ground'),
    at,
  )
  expect(found).toBe('plane')
  return at
}

test('the load line is straight on the linear axis, bent on the logarithmic, and ends at the supply on both', async ({
  page,
}) => {
  expect(bend(await loadLine(page))).toBeGreaterThan(20)
  await choose(page, 'Current axis', 'Linear')
  await expect(page.getByRole('radio', { name: 'Linear' })).toBeChecked()
  const points = await loadLine(page)
  expect(bend(points)).toBeLessThan(0.6)
  // It meets the current axis at nothing, where the handle of its supply end stands.
  const svg = (await page.locator('.plate > svg').boundingBox())!
  const supply = await middleOf(grabbed(page, 'supply'))
  const highest = points.reduce((one, other) => (other[1] < one[1] ? other : one))
  expect(Math.hypot(highest[0] + svg.x - supply.x, highest[1] + svg.y - supply.y)).toBeLessThan(2)
  await choose(page, 'Current axis', 'Logarithmic')
  expect(bend(await loadLine(page))).toBeGreaterThan(20)
})

test('flashing reads as it should: the load line threads between knee and valley', async ({
  page,
}) => {
  const knee = await middleOf(grabbed(page, 'knot-1'))
  const valley = await middleOf(grabbed(page, 'knot-2'))
  const svg = (await page.locator('.plate > svg').boundingBox())!
  const at = (points: readonly (readonly [number, number])[], level: number) => {
    const k = points.findIndex(([, y], i) => i > 0 && y >= level)
    const [x0, y0] = points[k - 1]!
    const [x1, y1] = points[k]!
    return x0 + ((x1 - x0) * (level - y0)) / (y1 - y0)
  }
  const passes = async () => {
    const points = [...(await loadLine(page))].sort((one, other) => one[1] - other[1])
    return {
      rightOfKnee: at(points, knee.y - svg.y) + svg.x > knee.x,
      leftOfValley: at(points, valley.y - svg.y) + svg.x < valley.x,
    }
  }
  expect(await passes()).toEqual({ rightOfKnee: true, leftOfValley: true })
  await stageField(page, 'Series resistor').fill('330k')
  await frames(page)
  expect(await passes()).toEqual({ rightOfKnee: true, leftOfValley: false })
  await stageField(page, 'Series resistor').fill('1G')
  await frames(page)
  expect(await passes()).toEqual({ rightOfKnee: false, leftOfValley: true })
})

test('the plane zooms in and out by buttons and comes back to what it was', async ({ page }) => {
  const ids = ['knot-1', 'knot-2', 'knot-3']
  const all = page.getByRole('button', { name: 'Show all of the plane' })
  const whole = await places(page, ids)
  const spread = async () => {
    const [one, , other] = await places(page, ids)
    return other!.x - one!.x
  }
  const wide = await spread()
  await expect(all).toBeDisabled()
  await page.getByRole('button', { name: 'Zoom the plane out' }).click()
  await frames(page)
  expect(await spread()).toBeCloseTo(wide / 1.5, 0)
  await page.getByRole('button', { name: 'Zoom the plane in' }).click()
  await frames(page)
  expect(await spread()).toBeCloseTo(wide, 0)
  await page.getByRole('button', { name: 'Zoom the plane out' }).click()
  await all.click()
  await frames(page)
  expect(await places(page, ids)).toEqual(whole)
  await expect(all).toBeDisabled()
  // Looking is no step of the design.
  await expect(undoButton(page)).toBeDisabled()
})

test('the plane is pushed about with the mouse, and everything on it moves alike', async ({
  page,
}) => {
  const ids = ['knot-1', 'knot-2']
  const before = await places(page, ids)
  await drag(page, mouseOf(page), await emptyPlace(page), { x: 40, y: -30 })
  const after = await places(page, ids)
  for (const [k, place] of after.entries()) {
    expect(place.x - before[k]!.x).toBeCloseTo(40, 0)
    expect(place.y - before[k]!.y).toBeCloseTo(-30, 0)
  }
  await expect(undoButton(page)).toBeDisabled()
  await page.getByRole('button', { name: 'Show all of the plane' }).click()
  await frames(page)
  expect(await places(page, ids)).toEqual(before)
})

test('the wheel zooms about the pointer with Ctrl held, and else rolls the page', async ({
  page,
}) => {
  const ids = ['knot-1', 'knot-2']
  const [before, other] = await places(page, ids)
  const at = await emptyPlace(page)
  const scale = () => page.evaluate(() => window.visualViewport!.scale * window.devicePixelRatio)
  const zoomed = await scale()
  await page.mouse.move(at.x, at.y)
  await page.keyboard.down('Control')
  await page.mouse.wheel(0, -50)
  await page.keyboard.up('Control')
  await frames(page)
  const [after, otherAfter] = await places(page, ids)
  const factor = (otherAfter!.x - after!.x) / (other!.x - before!.x)
  expect(factor).toBeGreaterThan(1.1)
  // What was under the pointer stays there.
  expect((after!.x - at.x) / (before!.x - at.x)).toBeCloseTo(factor, 1)
  expect((after!.y - at.y) / (before!.y - at.y)).toBeCloseTo(factor, 1)
  expect(await scale()).toBe(zoomed)

  await page.getByRole('button', { name: 'Show all of the plane' }).click()
  const rolled = await page.evaluate(() => window.scrollY)
  await page.mouse.move(at.x, at.y)
  await page.mouse.wheel(0, 120)
  await expect.poll(() => page.evaluate(() => window.scrollY)).toBeGreaterThan(rolled + 50)
  await expect(page.getByRole('button', { name: 'Show all of the plane' })).toBeDisabled()
})

test('the time axis zooms, is pushed about, and comes back', async ({ page }) => {
  const wave = page.locator('.wave')
  const whole = (await wave.getAttribute('d'))!
  const all = page.getByRole('button', { name: 'Show all of the time' })
  await expect(all).toBeDisabled()
  await page.getByRole('button', { name: 'Zoom the time in' }).click()
  await expect(wave).not.toHaveAttribute('d', whole)
  const closer = (await wave.getAttribute('d'))!
  const box = await ground(page, 'trace')
  const plane = await places(page, ['knot-1'])
  await drag(page, mouseOf(page), { x: box.x + 200, y: box.y + 80 }, { x: -60, y: 0 })
  await expect(wave).not.toHaveAttribute('d', closer)
  expect(await places(page, ['knot-1'])).toEqual(plane)
  await all.click()
  await expect(wave).toHaveAttribute('d', whole)
})

test('one flash and the time from switch-on can be looked at too', async ({ page }) => {
  const wave = page.locator('.wave')
  const seen = new Set([await wave.getAttribute('d')])
  for (const span of ['One flash', 'From switch-on']) {
    await choose(page, 'Time', span)
    seen.add(await wave.getAttribute('d'))
  }
  expect(seen.size).toBe(3)
  await choose(page, 'Time', 'Cycles')
  expect(seen.has(await wave.getAttribute('d'))).toBe(true)
})

test('plane and trace share one voltage axis: the markers stand at one height, all the way round', async ({
  page,
}) => {
  const heights = await page.evaluate(
    () =>
      new Promise<number[][]>((resolve) => {
        const [plane, trace] = document.querySelectorAll('.markers .marker')
        const height = (marker: Element) => marker.getBoundingClientRect().top
        const seen: number[][] = []
        const look = () => {
          seen.push([height(plane!), height(trace!)])
          if (seen.length < 40) requestAnimationFrame(look)
          else resolve(seen)
        }
        requestAnimationFrame(look)
      }),
  )
  for (const [onPlane, onTrace] of heights) expect(onPlane).toBeCloseTo(onTrace!, 1)
  const travel = heights.map(([height]) => height!)
  expect(Math.max(...travel) - Math.min(...travel)).toBeGreaterThan(5)
})

test('zoomed and with a lead resistor the two still share their voltage axis', async ({ page }) => {
  await openBench(page, fragmentOf(fullDesign))
  await page.getByRole('button', { name: 'Zoom the plane out' }).click()
  for (let k = 0; k < 4; k++) {
    await page.getByRole('button', { name: 'Step on to the next corner' }).click()
    await frames(page)
    const tops = await page
      .locator('.markers .marker')
      .evaluateAll((markers) => markers.map((marker) => marker.getBoundingClientRect().top))
    expect(tops[0]).toBeCloseTo(tops[1]!, 1)
  }
})

const clock = (page: Page) => page.getByRole('group', { name: 'Marker' }).locator('output')

test('the marker runs, stops where it is, and steps from corner to corner and back', async ({
  page,
}) => {
  const reading = async () => (await clock(page).textContent()) ?? ''
  const first = await reading()
  await expect.poll(reading).not.toBe(first)
  await page.getByRole('button', { name: 'Stop the marker' }).click()
  await frames(page)
  const stopped = await reading()
  await page.waitForTimeout(300)
  expect(await reading()).toBe(stopped)

  const at = () =>
    page.locator('.markers .marker').evaluateAll((markers) =>
      markers.map((marker) => {
        const { left, top } = marker.getBoundingClientRect()
        return `${left.toFixed(1)} ${top.toFixed(1)} ${marker.classList.contains('lit')}`
      }),
    )
  const corners: string[][] = []
  for (let k = 0; k < 5; k++) {
    await page.getByRole('button', { name: 'Step on to the next corner' }).click()
    await frames(page)
    corners.push([await reading(), ...(await at())])
  }
  expect(new Set(corners.map(([time]) => time)).size).toBeGreaterThan(2)
  // Strike and extinction are among the corners: lit at some, dark at others.
  const lit = corners.map(([, plane]) => plane!.endsWith('true'))
  expect(new Set(lit)).toEqual(new Set([true, false]))
  await page.getByRole('button', { name: 'Step back to the corner before' }).click()
  await frames(page)
  expect([await reading(), ...(await at())]).toEqual(corners.at(-2))
  await page.getByRole('button', { name: 'Run the marker' }).click()
  const again = await reading()
  await expect.poll(reading).not.toBe(again)
})

test('the marker runs at the speed chosen', async ({ page }) => {
  const speed = page.getByLabel('Speed of the marker')
  for (const [value, factor] of [
    ['1', 1],
    ['0.1', 0.1],
    ['0.01', 0.01],
  ] as const) {
    await speed.selectOption(value)
    // Time the marker ran on the trace in a third of a second, from where it stands on the time axis.
    const pace = await page.evaluate(
      () =>
        new Promise<{ px: number; ms: number }>((resolve) => {
          const marker = document.querySelectorAll('.markers .marker')[1]!
          const left = () => marker.getBoundingClientRect().left
          let before = left()
          let px = 0
          let start = 0
          let last = 0
          let ms = 0
          const look = (now: number) => {
            if (start === 0) start = now
            // A frame later than a tenth of a second moves the marker by no more than that.
            else ms += Math.min(100, now - last)
            last = now
            const here = left()
            if (here > before) px += here - before
            before = here
            if (now - start < 900) requestAnimationFrame(look)
            else resolve({ px, ms })
          }
          requestAnimationFrame(look)
        }),
    )
    const { width } = await ground(page, 'trace')
    // The trace shows 2.25 periods of 0.397 s.
    const seconds = (pace.px / width) * 2.25 * 0.397
    expect(seconds / (pace.ms / 1000) / factor, value).toBeGreaterThan(0.75)
    expect(seconds / (pace.ms / 1000) / factor, value).toBeLessThan(1.25)
  }
})

test('the picture says in words what it shows', async ({ page }) => {
  const picture = page.getByRole('img', { name: /^Plane and trace\. Flashes .* times a second/ })
  await expect(picture).toBeVisible()
  await stageField(page, 'Supply').fill('50')
  await expect(page.getByRole('img', { name: /^Plane and trace\. Stays dark/ })).toBeVisible()
})

test('knee, valley, load line, strike and extinction are named where they are', async ({
  page,
}) => {
  const text = await page
    .locator('.plate > svg')
    .evaluate((svg) => [...svg.querySelectorAll('text')].map((one) => one.textContent).join(' | '))
  for (const word of [
    /knee/,
    /valley/,
    /load line/,
    /strike/,
    /extinction/,
    /characteristic|lamp/,
  ]) {
    expect(text).toMatch(word)
  }
  await showPlane(page)
  expect((await savedDesign(page)).title).toBe('Mooring beacon')
})
