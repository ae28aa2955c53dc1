import type { Page } from '@playwright/test'
import { solveStage } from '../src/core'
import { expect, openBench, test } from './support/bench'
import { designWith, fragmentOf, stageWith } from './support/designs'

test.use({ contextOptions: { reducedMotion: 'no-preference' } })

/** Brightness of the lamp drawn on the page: when, s, and how much, 0 … 1. */
type Brightness = readonly (readonly [time: number, light: number])[]

/**
 * Most flashes within any one second: rises of a tenth or more, as WCAG 2.3.1 counts opposing changes of a
 * tenth of the greatest luminance.
 */
function mostFlashes(samples: Brightness): number {
  const rises: number[] = []
  let low = samples[0]![1]
  let high = samples[0]![1]
  let rising = false
  for (const [time, light] of samples) {
    if (rising) {
      if (light > high) high = light
      if (light < high - 0.1) {
        rising = false
        low = light
      }
    } else {
      if (light < low) low = light
      if (light > low + 0.1) {
        rising = true
        high = light
        rises.push(time)
      }
    }
  }
  return Math.max(
    0,
    ...rises.map((start) => rises.filter((time) => time >= start && time < start + 0.999).length),
  )
}

/** Looks at the lamp in every frame. */
const watchLamp = (page: Page, milliseconds: number): Promise<Brightness> =>
  page.evaluate(
    (length) =>
      new Promise<[number, number][]>((resolve) => {
        const glow = document.querySelector('.lamp-glow')!
        const samples: [number, number][] = []
        const look = (now: number) => {
          samples.push([now / 1000, Number(getComputedStyle(glow).opacity)])
          if (now / 1000 - samples[0]![0] < length / 1000) requestAnimationFrame(look)
          else resolve(samples)
        }
        requestAnimationFrame(look)
      }),
    milliseconds,
  )

test('the count itself tells three flashes a second from more', () => {
  const blinking = (rate: number): Brightness =>
    Array.from({ length: 180 }, (_, k) => [k / 60, ((k / 60) * rate) % 1 < 0.3 ? 1 : 0] as const)
  expect(mostFlashes(blinking(0))).toBe(0)
  expect(mostFlashes(blinking(2))).toBe(2)
  expect(mostFlashes(blinking(3))).toBe(3)
  expect(mostFlashes(blinking(5))).toBe(5)
  expect(mostFlashes(Array.from({ length: 180 }, (_, k) => [k / 60, 0.55] as const))).toBe(0)
})

/** The capacitor with which the stage of `stageWith` flashes so often; the period goes as the capacitance. */
const capacitorFor = (rate: number) => (0.47e-6 * solveStage(stageWith({})).cycle!.frequency) / rate

for (const [rate, speeds] of [
  [2.6, ['auto', '10']],
  [2.9, ['1', '0.1']],
  [25, ['auto', '0.1']],
  [900, ['auto', '0.001', '1']],
] as const) {
  test(`the lamp of a stage that flashes ${rate} times a second never flashes more than three times on screen`, async ({
    page,
  }) => {
    await openBench(page, fragmentOf(designWith({ capacitance: capacitorFor(rate) })))
    let flashed = 0
    for (const speed of speeds) {
      await page.getByLabel('Speed of the marker').selectOption(speed)
      const count = mostFlashes(await watchLamp(page, 1700))
      expect(count, `at speed ${speed}`).toBeLessThanOrEqual(3)
      flashed += count
    }
    // It does flash where that is slow enough to be seen.
    if (rate !== 2.9) expect(flashed).toBeGreaterThan(0)
  })
}

test('stepping the marker lights the lamp and puts it out', async ({ page }) => {
  await openBench(page)
  await page.getByRole('button', { name: 'Stop the marker' }).click()
  const seen = new Set<string>()
  for (let k = 0; k < 4; k++) {
    await page.getByRole('button', { name: 'Step on to the next corner' }).click()
    seen.add(await page.locator('.lamp-glow').evaluate((glow) => getComputedStyle(glow).opacity))
  }
  expect(seen).toEqual(new Set(['0', '1']))
})

test.describe('with reduced motion', () => {
  test.use({ contextOptions: { reducedMotion: 'reduce' } })

  test('the marker starts still and the lamp does not flash until it is run', async ({ page }) => {
    await openBench(page)
    await expect(page.getByRole('button', { name: 'Run the marker' })).toBeVisible()
    const place = () =>
      page
        .locator('.markers .marker')
        .evaluateAll((markers) => markers.map((marker) => marker.getAttribute('transform')))
    const before = await place()
    expect(mostFlashes(await watchLamp(page, 900))).toBe(0)
    expect(await place()).toEqual(before)
    await page.getByRole('button', { name: 'Run the marker' }).click()
    await expect.poll(place).not.toEqual(before)
  })

  test('a lamp that stays lit shines, one that stays dark does not', async ({ page }) => {
    for (const [supplyVoltage, light] of [
      [300, 1],
      [50, 0],
    ] as const) {
      await openBench(page, fragmentOf(designWith({ supplyVoltage })))
      expect((await watchLamp(page, 50)).at(-1)![1]).toBe(light)
    }
  })
})
