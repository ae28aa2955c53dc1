import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { mostFlashesPerSecond, shownBrightness } from '../../src/chart/lampLight'
import { uniformDraws } from '../support/draws'
import { byRatio } from '../support/lampArbitrary'

/** Screen times, s, at which the lamp on the page grows brighter, while frames come as they come. */
function risesIn(rate: number, share: number, frames: readonly number[]): number[] {
  const rises: number[] = []
  let now = 0
  let shown = 0
  let before = 0
  for (const frame of frames) {
    const start = now
    now += frame
    // Lit at any time since the frame before: a flash begins with each period and lasts its share of it.
    const flash = Math.floor(now * rate) / rate
    const lit = flash > start || start - Math.floor(start * rate) / rate < share / rate
    before = shown
    shown = shownBrightness(before, lit, frame, rate)
    if (shown > before) rises.push(now)
  }
  return rises
}

/** Most rises within any second. */
const mostInASecond = (rises: readonly number[]) =>
  Math.max(
    0,
    ...rises.map((start) => rises.filter((rise) => rise >= start && rise < start + 1).length),
  )

const steadyFrames = (perSecond: number) =>
  Array.from({ length: perSecond * 12 }, () => 1 / perSecond)

describe('shownBrightness', () => {
  it('shines at once when the lamp lights, and fades to nothing after it', () => {
    let shown = shownBrightness(0, true, 1 / 60, 1)
    expect(shown).toBe(1)
    const seen = [shown]
    for (let n = 0; n < 60; n++) {
      shown = shownBrightness(shown, false, 1 / 60, 1)
      expect(shown).toBeLessThanOrEqual(seen.at(-1)!)
      seen.push(shown)
    }
    expect(shown).toBe(0)
    // Long enough to be seen: a twentieth of a second after it is still half as bright.
    expect(seen[3]).toBeGreaterThan(0.5)
  })

  it('fades by the clock, not by the frame', () => {
    const once = shownBrightness(1, false, 0.1, 1)
    const twice = shownBrightness(shownBrightness(1, false, 0.05, 1), false, 0.05, 1)
    expect(twice).toBeCloseTo(once, 12)
  })

  it('stays as it is while no time goes by', () => {
    expect(shownBrightness(0.6, false, 0, 1)).toBe(0.6)
  })

  it('shines steadily, lit or not, where it would flash more often than three times a second', () => {
    const steady = shownBrightness(0, true, 1 / 60, 50)
    expect(steady).toBeGreaterThan(0.2)
    expect(steady).toBeLessThan(1)
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.boolean(),
        fc.double({ min: 0, max: 0.1, noNaN: true }),
        byRatio(3.001, 1e9),
        (before, lit, elapsed, rate) => {
          expect(shownBrightness(before, lit, elapsed, rate)).toBe(steady)
        },
      ),
      { seed: 771 },
    )
  })

  it('still flashes at two and a half a second, each flash seen', () => {
    const rises = risesIn(2.5, 0.02, steadyFrames(60))
    expect(rises.length).toBeGreaterThanOrEqual(28)
  })

  it('never flashes more than three times in any second, at any rate and however frames come', () => {
    fc.assert(
      fc.property(
        fc.oneof(byRatio(0.1, 100), fc.double({ min: 2, max: 3.2, noNaN: true })),
        byRatio(1e-4, 0.9),
        fc.oneof(
          fc.constantFrom(24, 25, 30, 50, 60, 90, 120, 144).map(steadyFrames),
          // Frames that come late: up to the tenth of a second after which the marker waits.
          fc.integer({ min: 1 }).map((seed) => {
            const draw = uniformDraws(seed)
            return Array.from({ length: 250 }, () => 0.004 + 0.096 * draw() ** 3)
          }),
        ),
        (rate, share, frames) => {
          expect(mostInASecond(risesIn(rate, share, frames))).toBeLessThanOrEqual(
            mostFlashesPerSecond,
          )
        },
      ),
      { seed: 772, numRuns: 400 },
    )
  })
})
