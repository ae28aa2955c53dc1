import { describe, expect, it } from 'vitest'
import { type StrikeReading, strikeTests } from '../../../src/core/lamp/strikeTests'
import { delayFromRamp } from '../../../src/core/lamp/strikeTestsDelay'
import {
  chiSquareBelow,
  chiSquareLimit,
  logGamma,
  studentBeyond,
  studentLimit,
} from '../../../src/core/lamp/strikeTestsDistributions'
import { differenceOf, sampleOf } from '../../../src/core/lamp/strikeTestsSample'
import { exponential, normal, seeded } from './seeded'

const runs = 1000
// Three standard deviations of a share of 1000 runs about 0.95 are 0.021.
const atStatedRate = (inside: number) => {
  expect(inside / runs).toBeGreaterThan(0.929)
  expect(inside / runs).toBeLessThan(0.971)
}
const within = ({ low, high }: { low: number; high: number }, value: number) =>
  low <= value && value <= high

const readings = (
  strikes: readonly number[],
  surroundings: StrikeReading['surroundings'] = null,
): StrikeReading[] => strikes.map((strike) => ({ strike, dropOut: null, surroundings }))

describe('the distributions', () => {
  it('know the gamma function: Γ(½) = √π, Γ(5) = 24, Γ(101) = 100!', () => {
    expect(logGamma(0.5)).toBeCloseTo(Math.log(Math.PI) / 2, 13)
    expect(logGamma(5)).toBeCloseTo(Math.log(24), 13)
    let factorial = 0
    for (let i = 2; i <= 100; i++) factorial += Math.log(i)
    expect(logGamma(101) / factorial).toBeCloseTo(1, 13)
  })

  // NIST/SEMATECH e-Handbook of Statistical Methods, tables 1.3.6.7.2 and 1.3.6.7.4; digits from memory.
  it.each([
    [1, 12.706],
    [2, 4.303],
    [5, 2.571],
    [10, 2.228],
    [30, 2.042],
  ])('have the 5 %% limits of t with %d degrees as tables do', (freedom, limit) => {
    expect(studentLimit(0.05, freedom)).toBeCloseTo(limit, 3)
  })

  it.each([
    [0.025, 10, 3.247],
    [0.975, 10, 20.483],
    [0.95, 1, 3.841],
    [0.975, 30, 46.979],
    [0.05, 5, 1.145],
  ])('have the χ² limit for %f with %d degrees as tables do', (below, freedom, limit) => {
    expect(chiSquareLimit(below, freedom)).toBeCloseTo(limit, 3)
  })

  it('agree with closed forms: χ² of two degrees, t of one and of two', () => {
    for (const x of [0.01, 0.5, 1, 3, 12, 60]) {
      expect(chiSquareBelow(x, 2)).toBeCloseTo(-Math.expm1(-x / 2), 13)
      expect(studentBeyond(x, 1)).toBeCloseTo(1 - (2 / Math.PI) * Math.atan(x), 12)
      expect(studentBeyond(x, 2)).toBeCloseTo(1 - x / Math.sqrt(2 + x * x), 12)
    }
  })
})

describe('repeated readings', () => {
  it('give the mean and deviation worked by hand', () => {
    // 74, 75, 77, 78: mean 76, squares 4 + 1 + 1 + 4 = 10, deviation √(10/3).
    const sample = sampleOf([74, 75, 77, 78])!
    expect(sample.mean).toBe(76)
    expect(sample.deviation).toBeCloseTo(Math.sqrt(10 / 3), 14)
    // t of three degrees 3.182: NIST/SEMATECH e-Handbook, from memory.
    expect(sample.meanInterval!.high - 76).toBeCloseTo((3.182 * Math.sqrt(10 / 3)) / 2, 3)
  })

  it('hold the true mean and deviation within their ranges at the stated rate', () => {
    const random = seeded(11)
    let means = 0
    let deviations = 0
    for (let run = 0; run < runs; run++) {
      const count = 3 + Math.floor(random() * 20)
      const sample = sampleOf(Array.from({ length: count }, () => 75 + 1.5 * normal(random)))!
      if (within(sample.meanInterval!, 75)) means++
      if (within(sample.deviationInterval!, 1.5)) deviations++
    }
    atStatedRate(means)
    atStatedRate(deviations)
  })

  it('call chance a drift once in twenty, and find a real one', () => {
    const random = seeded(12)
    let still = 0
    let found = 0
    for (let run = 0; run < runs; run++) {
      const noise = Array.from({ length: 12 }, () => normal(random))
      if (!sampleOf(noise)!.drift!.significant) still++
      const { drift } = sampleOf(noise.map((value, i) => value + 0.5 * i))!
      if (drift!.significant && Math.abs(drift!.slope - 0.5) < 3.5 * drift!.deviation) found++
    }
    atStatedRate(still)
    expect(found / runs).toBeGreaterThan(0.97)
  })

  it('do without what too few of them cannot tell', () => {
    expect(sampleOf([])).toBeNull()
    expect(sampleOf([75])).toMatchObject({ mean: 75, deviation: null, meanInterval: null })
    expect(sampleOf([75, 76, 77])!.drift).toBeNull()
    expect(sampleOf([75, 75, 75, 75])).toMatchObject({ deviation: 0, drift: { chance: 1 } })
  })
})

describe('light and dark', () => {
  it('differ by a range that holds the true difference at the stated rate', () => {
    const random = seeded(13)
    let inside = 0
    for (let run = 0; run < runs; run++) {
      const lit = Array.from({ length: 8 }, () => 75 + normal(random))
      const dark = Array.from({ length: 5 }, () => 79 + 4 * normal(random))
      if (within(differenceOf(lit, dark)!.interval, 4)) inside++
    }
    atStatedRate(inside)
  })

  it('are told apart in a sentence, and the delay then read from the light alone', () => {
    const lit = readings([75.2, 75.9, 75.4, 76.8, 75.3], 'lit')
    const dark = readings([93.1, 99.7, 94.5, 105.2], 'dark')
    const found = strikeTests([...lit, ...dark], { rampRate: 2 })
    if (!found.ok) throw new Error(found.reason)
    expect(found.darkEffect!.difference).toBeCloseTo(98.125 - 75.72, 10)
    expect(found.strikeIn.lit!.count).toBe(5)
    expect(found.strikeIn.dim).toBeUndefined()
    expect(found.remarks.join(' ')).toMatch(/In the dark it strikes 22\u00A0V later/)
    expect(found.delay!.count).toBe(5)
  })

  it('are not told apart without spread or with too few tries', () => {
    expect(differenceOf([75], [80, 81])).toBeNull()
    expect(differenceOf([75, 75], [80, 80])).toBeNull()
  })
})

describe('the strike delay from a ramp', () => {
  it('and the threshold lie within their ranges at the stated rate, without bias', () => {
    const random = seeded(14)
    let delays = 0
    let thresholds = 0
    let sum = 0
    let sumOfThresholds = 0
    for (let run = 0; run < runs; run++) {
      // Threshold 75 V, mean delay 0.4 s, ramp 5 V/s: mean excess 2 V.
      const strikes = Array.from({ length: 8 }, () => 75 + 5 * 0.4 * exponential(random))
      const found = delayFromRamp(strikes, 5)!
      if (within(found.delayInterval, 0.4)) delays++
      if (within(found.thresholdInterval, 75)) thresholds++
      sum += found.delay
      sumOfThresholds += found.threshold
    }
    atStatedRate(delays)
    atStatedRate(thresholds)
    // Deviation of one delay 0.4/√7 s, of one threshold about 0.27 V: four of the mean's deviations.
    expect(Math.abs(sum / runs - 0.4)).toBeLessThan((4 * 0.4) / Math.sqrt(7 * runs))
    expect(Math.abs(sumOfThresholds / runs - 75)).toBeLessThan((4 * 0.28) / Math.sqrt(runs))
  })

  it('is none without scatter or without a rate', () => {
    expect(delayFromRamp([75, 75, 75], 1)).toBeNull()
    expect(delayFromRamp([75], 1)).toBeNull()
    expect(delayFromRamp([75, 76], 0)).toBeNull()
    const byHand = strikeTests(readings([75, 76, 78]), { rampRate: null })
    expect(byHand).toMatchObject({ ok: true, delay: null })
  })

  it('is doubted where readings scatter alike both ways, seldom where the wait is pure', () => {
    const random = seeded(15)
    let doubtedErrors = 0
    let doubtedWaits = 0
    const doubts = (strikes: number[]) => {
      const found = strikeTests(readings(strikes), { rampRate: 1 })
      return found.ok && found.remarks.some((remark) => remark.includes('reading error'))
    }
    for (let run = 0; run < runs; run++) {
      if (doubts(Array.from({ length: 12 }, () => 75 + normal(random)))) doubtedErrors++
      if (doubts(Array.from({ length: 12 }, () => 75 + exponential(random)))) doubtedWaits++
    }
    expect(doubtedErrors / runs).toBeGreaterThan(0.5)
    expect(doubtedWaits / runs).toBeLessThan(0.04)
  })
})

describe('strike tests', () => {
  it('remark on a drift', () => {
    const found = strikeTests(readings([75, 75.6, 76, 76.7, 77, 77.5]), { rampRate: null })
    expect(found).toMatchObject({ ok: true })
    expect(found.ok && found.remarks[0]).toMatch(/strike voltage rises by about 2\.5\u00A0V/)
  })

  it.each([
    [[{ strike: Number.NaN, dropOut: null, surroundings: null }], 'Try 1'],
    [[{ strike: -3, dropOut: null, surroundings: null }], 'Try 1'],
    [[{ strike: 60, dropOut: 61, surroundings: null }], 'cannot drop out'],
    [[{ strike: null, dropOut: null, surroundings: null }], 'no reading'],
    [[], 'no reading'],
  ] as const)('say what is wrong with %j', (given, words) => {
    const found = strikeTests(given, { rampRate: null })
    expect(found.ok).toBe(false)
    expect(!found.ok && found.reason).toContain(words)
  })

  it('refuse a ramp that does not rise', () => {
    expect(strikeTests(readings([75, 76]), { rampRate: 0 })).toMatchObject({ ok: false })
  })
})
