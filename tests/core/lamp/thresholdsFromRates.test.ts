import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { genericSmallLamp, type Lamp, type Stage, solveStage } from '../../../src/core'
import { type RateOptions, thresholdsFromRates } from '../../../src/core/lamp/thresholdsFromRates'
import { bestFit } from '../../../src/core/lamp/thresholdsFromRatesFit'
import {
  asMarked,
  periodOf,
  type RateObservation,
  type RateParts,
} from '../../../src/core/lamp/thresholdsFromRatesModel'
import { misfit, problemOf } from '../../../src/core/lamp/thresholdsFromRatesProblem'
import { normal, seeded } from './seeded'

const parts: RateParts = {
  seriesResistance: 2.2e6,
  resistanceTolerance: 0.01,
  capacitance: 0.47e-6,
  capacitanceTolerance: 0.05,
  supplyTolerance: 0.005,
  leakageResistance: Number.POSITIVE_INFINITY,
  preStrikeCurrent: 0,
  glowResistance: 0,
  flashTime: 0,
}
const exactly = { ...parts, resistanceTolerance: 0, capacitanceTolerance: 0, supplyTolerance: 0 }

function found(
  observations: readonly RateObservation[],
  with_: RateParts,
  options: RateOptions = {},
) {
  const result = thresholdsFromRates(observations, with_, options)
  if (!result.ok) throw new Error(result.reason)
  return result
}

function reason(observations: readonly RateObservation[], with_: RateParts = parts) {
  const result = thresholdsFromRates(observations, with_)
  return result.ok ? '' : result.reason
}

/** Counts without error: not whole ones. */
function counted(
  supplies: readonly number[],
  strike: number,
  extinction: number,
  with_: RateParts = exactly,
): RateObservation[] {
  return supplies.map((supplyVoltage) => ({
    supplyVoltage,
    flashes: 100 / periodOf(supplyVoltage, strike, extinction, with_, asMarked),
    time: 100,
  }))
}

/** Counts of the core's own exact cycles. */
function countedOn(lamp: Lamp, supplies: readonly number[], leakageResistance: number) {
  const cycles = supplies.map((supplyVoltage) => {
    const stage: Stage = {
      supplyVoltage,
      sourceResistance: 0,
      seriesResistance: parts.seriesResistance,
      capacitance: parts.capacitance,
      leakageResistance,
      leadResistance: 0,
      lamp,
    }
    return solveStage(stage).cycle!
  })
  const observations = cycles.map(({ period }, i) => ({
    supplyVoltage: supplies[i]!,
    flashes: 100 / period,
    time: 100,
  }))
  return { observations, flashTime: cycles.map(({ glowTime }) => glowTime) }
}

describe('thresholds from rates', () => {
  it.each([
    ['65 / 55 V: oberlin.edu, neon oscillator lab', 65, 55],
    ['80 / 50 V: Braga, institute article min375', 80, 50],
    ['90 / 60 V: Braga, institute article min375', 90, 60],
  ])('come back for the published pair %s', (_, strike, extinction) => {
    // Charging time R·C·ln((E − Ve)/(E − Vs)), the textbook formula, worked here on its own.
    const observations = [100, 120, 150].map((supplyVoltage) => {
      const charging = 2.2e6 * 0.47e-6
      const period = charging * Math.log((supplyVoltage - extinction) / (supplyVoltage - strike))
      return { supplyVoltage, flashes: 60 / period, time: 60 }
    })
    for (const some of [observations, observations.slice(0, 2)]) {
      const result = found(some, parts)
      expect(result.strike).toBeCloseTo(strike, 6)
      expect(result.extinction).toBeCloseTo(extinction, 6)
    }
  })

  it('come back from exact cycles of a lamp that is nearly a switch', () => {
    const knots = [
      { current: 0, voltage: 0 },
      { current: 1e-13, voltage: 82 },
      { current: 1e-3, voltage: 58 },
      { current: 3000, voltage: 90 },
    ]
    const lamp = { knots, recoveryTime: 0, strikeDelay: 0 }
    for (const leakage of [Number.POSITIVE_INFINITY, 50e6]) {
      const { observations } = countedOn(lamp, [95, 115, 160], leakage)
      const result = found(observations, { ...parts, leakageResistance: leakage })
      expect(result.strike).toBeCloseTo(82, 3)
      expect(result.extinction).toBeCloseTo(58, 3)
    }
  })

  it('come back from exact cycles of an ordinary lamp, its own current and flash allowed for', () => {
    const lamp = { knots: genericSmallLamp, recoveryTime: 0, strikeDelay: 0 }
    const { observations, flashTime } = countedOn(lamp, [85, 95, 120], 1e9)
    const leaky = { ...parts, leakageResistance: 1e9 }
    const allowed = { ...leaky, preStrikeCurrent: 0.2e-6, flashTime: flashTime[1]! }
    const errors = (result: ReturnType<typeof found>) =>
      Math.hypot(result.strike - 75, result.extinction - 55)
    // Flashes are not all of one length, as is taken here; not allowed for, it is out by far more.
    const ignored = errors(found(observations, leaky))
    expect(errors(found(observations, allowed))).toBeLessThan(ignored / 4)
    // Each timed without its own flash, the rest is exact.
    const darkOnly = observations.map((seen, i) => ({
      ...seen,
      time: seen.time - seen.flashes * flashTime[i]!,
    }))
    expect(errors(found(darkOnly, { ...allowed, flashTime: 0 }))).toBeLessThan(1e-4)
  })

  it('come back for any lamp and any supplies above strike', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 55, max: 130, noNaN: true }),
        fc.double({ min: 0.4, max: 0.93, noNaN: true }),
        fc.double({ min: 1.05, max: 1.3, noNaN: true }),
        fc.double({ min: 1.2, max: 2, noNaN: true }),
        (strike, share, near, further) => {
          const supplies = [strike * near, strike * near * further]
          const result = found(counted(supplies, strike, strike * share), parts)
          expect(Math.abs(result.strike / strike - 1)).toBeLessThan(1e-6)
          expect(Math.abs(result.extinction / strike / share - 1)).toBeLessThan(1e-5)
        },
      ),
      { seed: 31, numRuns: 150 },
    )
  })

  it('are never a worse fit than a search of every pair on a fine grid', () => {
    const random = seeded(32)
    for (let run = 0; run < 5; run++) {
      // Counts a good deal out, so that none fits well.
      const observations = counted([92, 100, 125, 150], 80, 60).map((seen) => ({
        ...seen,
        flashes: seen.flashes * (1 + 0.2 * (random() - 0.5)),
      }))
      const problem = problemOf(observations, exactly, { count: 0.4, time: 0 })
      const best = bestFit(problem)!
      let least = Number.POSITIVE_INFINITY
      for (let strike = 40; strike < 92; strike += 0.2) {
        for (let extinction = 0.4; extinction < strike; extinction += 0.4) {
          least = Math.min(least, misfit(problem, [strike, extinction]))
        }
      }
      expect(best.misfit).toBeLessThanOrEqual(least)
    }
  })
})

describe('the uncertainty stated', () => {
  // Three deviations of a share of 500 runs about 0.95 are 0.029.
  const runs = 500
  it.each([
    ['two supplies, ±1 flash', [1.08, 1.5], 0, 'normal'],
    ['four supplies, ±1 flash', [1.08, 1.3, 1.5, 1.8], 0, 'normal'],
    ['three supplies, timed by hand', [1.1, 1.3, 1.7], 0.3, 'normal'],
    ['three supplies, parts anywhere within their limits', [1.1, 1.3, 1.7], 0, 'even'],
  ] as const)(
    'holds the true thresholds at the stated rate: %s',
    (_, ratios, timeError, scatter) => {
      const random = seeded(33)
      const insideOf = { strike: 0, extinction: 0 }
      const within = (limit: number) =>
        scatter === 'even' ? limit * (2 * random() - 1) : (limit / Math.sqrt(3)) * normal(random)
      const options = { next: null, timeError, ...(timeError > 0 ? { countError: 0 } : {}) }
      let misfits = 0
      for (let run = 0; run < runs; run++) {
        const strike = 62 + 30 * random()
        const extinction = strike * (0.65 + 0.25 * random())
        const out = {
          resistance: within(parts.resistanceTolerance),
          capacitance: within(parts.capacitanceTolerance),
          supply: within(parts.supplyTolerance),
        }
        const observations = ratios.map((ratio) => {
          const supplyVoltage = strike * ratio
          const period = periodOf(supplyVoltage, strike, extinction, parts, out)
          const time = 80 + 80 * random()
          if (timeError === 0) {
            // Started at any moment of the period: the flash just before or just after.
            return { supplyVoltage, flashes: Math.floor(time / period + random()), time }
          }
          const flashes = Math.round(time / period)
          return { supplyVoltage, flashes, time: flashes * period + timeError * normal(random) }
        })
        const result = found(observations, parts, options)
        if (Math.abs(result.strike - strike) < 1.96 * result.strikeDeviation) insideOf.strike++
        if (Math.abs(result.extinction - extinction) < 1.96 * result.extinctionDeviation) {
          insideOf.extinction++
        }
        misfits += result.misfit
      }
      for (const inside of Object.values(insideOf)) {
        expect(inside / runs).toBeGreaterThan(0.921)
        // Even scatter has an end, and so lies inside more often.
        expect(inside / runs).toBeLessThan(scatter === 'even' ? 1 : 0.979)
      }
      // The misfit left has as its mean the freedom there is.
      const freedom = ratios.length - 2
      expect(Math.abs(misfits / runs - freedom)).toBeLessThan(0.01 + 0.15 * freedom)
    },
    30_000,
  )

  it('is that of the parts where counting is long, and says so', () => {
    const long = counted([90, 140], 80, 60).map(({ supplyVoltage, flashes }) => ({
      supplyVoltage,
      flashes: 100 * flashes,
      time: 10_000,
    }))
    const result = found(long, parts)
    expect(result.fromCounting.strike).toBeLessThan(result.strikeDeviation / 2)
    expect(result.remarks.join(' ')).toContain('tolerances of the parts')
    // A supply meter 0.5 % out moves both thresholds 0.5 %, by a rectangular deviation.
    const meterOnly = found(long, { ...exactly, supplyTolerance: 0.005 })
    const rest = meterOnly.strikeDeviation ** 2 - meterOnly.fromCounting.strike ** 2
    expect(Math.sqrt(rest)).toBeCloseTo((80 * 0.005) / Math.sqrt(3), 2)
  })

  it('grows together for both thresholds where resistor and capacitor are out', () => {
    const seen = counted([90, 140], 80, 60)
    const bigger = { ...exactly, capacitance: exactly.capacitance * 1.001 }
    const moved = found(seen, bigger)
    const both = found(seen, { ...exactly, capacitanceTolerance: 0.05 })
    const counting = found(seen, exactly)
    const share = (whole: number, own: number) => Math.sqrt(whole ** 2 - own ** 2)
    // The tolerance moves each threshold as a changed capacitor does: 0.05/√3 against 0.001.
    const scale = 0.05 / Math.sqrt(3) / 0.001
    expect(share(both.strikeDeviation, counting.strikeDeviation)).toBeCloseTo(
      Math.abs(moved.strike - 80) * scale,
      1,
    )
    expect(share(both.extinctionDeviation, counting.extinctionDeviation)).toBeCloseTo(
      Math.abs(moved.extinction - 60) * scale,
      1,
    )
  })

  it('doubts counts that no one pair of thresholds explains', () => {
    const seen = counted([90, 110, 140, 170], 80, 60)
    const odd = seen.map((each, i) => (i === 1 ? { ...each, flashes: each.flashes * 1.1 } : each))
    expect(found(seen, exactly).chance).toBeGreaterThan(0.99)
    const result = found(odd, exactly)
    expect(result.chance).toBeLessThan(0.01)
    expect(result.remarks.join(' ')).toContain('do not agree with one pair')
  })
})

describe('the voltages chosen', () => {
  it('are called bad where close together or far above strike, and good where one is near it', () => {
    expect(found(counted([88, 130], 80, 60), parts).illConditioned).toBe(false)
    for (const supplies of [
      [120, 124],
      [180, 220],
    ]) {
      const result = found(counted(supplies, 80, 60), parts)
      expect(result.illConditioned).toBe(true)
      expect(result.remarks[0]).toContain('tell strike from extinction')
    }
  })

  it('have as condition the ratio of the singular values of the slopes', () => {
    // 2 × 2 by hand: rows are slopes of the counts, all of deviation 0.4.
    const seen = counted([90, 130], 80, 60)
    const rows = seen.map(({ supplyVoltage, flashes }) => {
      const period = 100 / flashes
      const charging = 2.2e6 * 0.47e-6
      return [
        ((-flashes / period) * charging) / (supplyVoltage - 80),
        ((flashes / period) * charging) / (supplyVoltage - 60),
      ] as const
    })
    const [[a, b], [c, d]] = rows as unknown as [[number, number], [number, number]]
    const size = a * a + b * b + c * c + d * d
    const determinant = Math.abs(a * d - b * c)
    const spread = Math.sqrt(size * size - 4 * determinant * determinant)
    const byHand = Math.sqrt((size + spread) / (size - spread))
    expect(found(seen, exactly).condition / byHand).toBeCloseTo(1, 5)
  })

  it('lead to the next that helps most: none of the range does better when really tried', () => {
    const seen = counted([120, 150], 80, 60)
    const next = { low: 70, high: 200, time: 100 }
    const result = found(seen, exactly, { next })
    const tried = (supplyVoltage: number) => {
      const more = found([...seen, ...counted([supplyVoltage], 80, 60)], exactly, { next: null })
      return Math.hypot(more.strikeDeviation, more.extinctionDeviation)
    }
    const best = tried(result.next!.supplyVoltage)
    expect(best).toBeCloseTo(
      Math.hypot(result.next!.strikeDeviation, result.next!.extinctionDeviation),
      6,
    )
    const margin = Math.max(0.03 * result.strike, 2 * result.strikeDeviation)
    for (let supply = result.strike + margin + 0.5; supply < 200; supply += 3) {
      expect(tried(supply)).toBeGreaterThan(best * 0.999)
    }
    expect(best).toBeLessThan(Math.hypot(result.strikeDeviation, result.extinctionDeviation) / 1.5)
    expect(result.next!.supplyVoltage).toBeGreaterThan(result.strike)
  })

  it('lead to none where the range lies below strike', () => {
    const next = { low: 20, high: 60, time: 100 }
    expect(found(counted([120, 150], 80, 60), parts, { next }).next).toBeNull()
  })
})

describe('rates that cannot be', () => {
  const [low, high] = counted([100, 140], 80, 60) as [RateObservation, RateObservation]

  it('rise with falling voltage', () => {
    expect(reason([{ ...low, flashes: high.flashes * 1.2 }, high])).toContain('even slower')
    expect(reason([low, { ...low, supplyVoltage: 110, flashes: 400 }, high])).toContain('faster at')
  })

  it('ask for an extinction below nothing: R·C larger than given', () => {
    expect(reason([low, high], { ...exactly, capacitance: 0.1e-6 })).toContain('below 0 V')
  })

  it('ask for both thresholds at one voltage, or strike at the supply', () => {
    const small = { ...exactly, capacitance: 500e-6 }
    expect(reason([low, high], small)).toMatch(/same voltage|at or above the lowest supply/)
  })

  it.each([
    [[], 'two supply voltages'],
    [[low], 'two supply voltages'],
    [[low, low], 'same supply voltage'],
    [[low, { ...high, flashes: 0 }], 'Count 2'],
    [[low, { ...high, time: -1 }], 'Count 2'],
    [[{ ...low, supplyVoltage: Number.NaN }, high], 'Count 1'],
  ] as const)('or are no counts: %j', (observations, words) => {
    expect(reason(observations)).toContain(words)
  })

  it.each([
    [{ seriesResistance: 0 }, 'series resistor'],
    [{ capacitance: Number.NaN }, 'capacitor'],
    [{ capacitanceTolerance: -0.1 }, 'tolerance'],
    [{ leakageResistance: 0 }, 'leakage'],
    [{ preStrikeCurrent: -1 }, 'pre-strike'],
    [{ glowResistance: -1 }, 'glow'],
    [{ flashTime: -1 }, 'flash'],
    [{ flashTime: 10 }, 'flash alone'],
  ])('or are counted with parts that cannot be: %j', (change, words) => {
    expect(reason([low, high], { ...parts, ...change })).toContain(words)
  })

  it('or are without any error', () => {
    expect(thresholdsFromRates([low, high], parts, { countError: 0 })).toMatchObject({ ok: false })
  })

  it('or come with a leakage that would keep the lamp dark', () => {
    expect(reason([low, high], { ...exactly, leakageResistance: 1e3 })).not.toBe('')
  })
})
