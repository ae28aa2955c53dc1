import { describe, expect, it } from 'vitest'
import { lifeAtCurrent, peakOfAcRating } from '../../../src/core/lamp/ratings'

describe('a rating in volts ac', () => {
  it('becomes a dc peak with the step shown, beside what the sheet says', () => {
    // 65 V ac and 90 V dc: SPC Technology data sheet for A1A; √2 × 65 = 91.92 by hand.
    const { peak, step } = peakOfAcRating(65, 90)
    expect(peak).toBeCloseTo(91.9239, 4)
    expect(step).toBe('65\u00A0V ac × √2 = 92\u00A0V; the sheet says 90\u00A0V dc')
  })

  it('agrees with the dc rating of the same sheet within 3 %', () => {
    // 65 / 90 V and 95 / 135 V: the same sheet.
    for (const [ac, dc] of [
      [65, 90],
      [95, 135],
    ] as const) {
      expect(Math.abs(peakOfAcRating(ac, dc).peak / dc - 1)).toBeLessThan(0.03)
    }
  })

  it('says nothing of a sheet that gives no dc', () => {
    expect(peakOfAcRating(95, null).step).toBe('95\u00A0V ac × √2 = 134\u00A0V')
  })

  it('refuses what is no voltage', () => {
    for (const ac of [-1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(() => peakOfAcRating(ac, null)).toThrow(RangeError)
    }
  })
})

describe('life at another current', () => {
  it('goes with the third power: an eighth at twice the current', () => {
    expect(lifeAtCurrent(25_000 * 3600, 0.6e-3, 1.2e-3)).toBeCloseTo(3125 * 3600, 3)
  })

  it('is endless at no current', () => {
    expect(lifeAtCurrent(1, 1, 0)).toBe(Number.POSITIVE_INFINITY)
  })
})
