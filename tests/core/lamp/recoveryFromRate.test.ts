import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { genericSmallLamp, type Stage, solveStage } from '../../../src/core'
import { recoveryFromRate } from '../../../src/core/lamp/recoveryFromRate'

const fast: Stage = {
  supplyVoltage: 120,
  sourceResistance: 0,
  seriesResistance: 1.5e6,
  capacitance: 1e-9,
  leakageResistance: Number.POSITIVE_INFINITY,
  leadResistance: 0,
  lamp: { knots: genericSmallLamp, recoveryTime: 0, strikeDelay: 0 },
}
const withRecovery = (stage: Stage, recoveryTime: number): Stage => ({
  ...stage,
  lamp: { ...stage.lamp, recoveryTime },
})
const rateOf = (stage: Stage, recoveryTime: number) =>
  solveStage(withRecovery(stage, recoveryTime)).cycle?.frequency ?? null

function found(stage: Stage, frequency: number, uncertainty = 0) {
  const result = recoveryFromRate(stage, { frequency, uncertainty })
  if (!result.ok) throw new Error(result.reason)
  return result
}

describe('the recovery time from the rate', () => {
  it('makes a fast oscillator faster, and its flashes smaller', () => {
    const ideal = solveStage(fast).cycle!
    const slowed = solveStage(withRecovery(fast, 3e-4)).cycle!
    expect(slowed.frequency).toBeGreaterThan(ideal.frequency * 1.01)
    expect(slowed.highVoltage).toBeLessThan(ideal.highVoltage)
  })

  it('comes back from the rate it makes', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -5.5, max: -2.5, noNaN: true }),
        fc.double({ min: 90, max: 160, noNaN: true }),
        fc.constantFrom(0.33e-9, 1e-9, 10e-9),
        fc.constantFrom(0, 2e-5),
        (power, supplyVoltage, capacitance, strikeDelay) => {
          const stage = {
            ...fast,
            supplyVoltage,
            capacitance,
            lamp: { ...fast.lamp, strikeDelay },
          }
          const rate = rateOf(stage, 10 ** power)
          const ideal = rateOf(stage, 0)!
          // Where it hardly shows in the rate, the rate hardly shows it.
          fc.pre(rate !== null && rate > ideal * 1.0001)
          const result = found(stage, rate!)
          expect(Math.abs(result.recoveryTime / 10 ** power - 1)).toBeLessThan(1e-6)
          expect(result.strikeReached).toBeLessThan(result.strikeRested)
        },
      ),
      { seed: 51, numRuns: 120 },
    )
  })

  it('counts for nothing where the stage already has one', () => {
    const rate = rateOf(fast, 2e-4)!
    expect(found(withRecovery(fast, 9e-4), rate)).toEqual(found(fast, rate))
  })

  it('has a range that goes with the uncertainty of the rate', () => {
    const rate = rateOf(fast, 2e-4)!
    const result = found(fast, rate, 0.01)
    expect(rateOf(fast, result.low)!).toBeCloseTo(rate * 0.99, 3)
    expect(rateOf(fast, result.high!)!).toBeCloseTo(rate * 1.01, 3)
    expect(result.low).toBeLessThan(2e-4)
    expect(result.high!).toBeGreaterThan(2e-4)
  })

  it('is not sure where none at all would do too', () => {
    const result = found(fast, rateOf(fast, 1e-5)!, 0.05)
    expect(result.low).toBe(0)
    expect(result.remarks[0]).toContain('no sure recovery time')
    expect(found(fast, rateOf(fast, 0)! * 0.99, 0.05)).toMatchObject({ recoveryTime: 0, low: 0 })
  })

  it('explains no rate slower than the ideal, and says so', () => {
    const result = recoveryFromRate(fast, { frequency: rateOf(fast, 0)! * 0.9, uncertainty: 0.02 })
    expect(!result.ok && result.reason).toContain('it is not that')
  })

  it('explains no rate beyond that of a lamp which can only just let go', () => {
    // Every strike waits 0.2 ms on average, so no recovery brings it to 5 kHz.
    const stage = { ...fast, lamp: { ...fast.lamp, strikeDelay: 2e-4 } }
    for (let power = -6; power < 0; power += 0.05) {
      expect(rateOf(stage, 10 ** power) ?? 0).toBeLessThan(5000)
    }
    const result = recoveryFromRate(stage, { frequency: 5000, uncertainty: 0 })
    expect(!result.ok && result.reason).toContain('No recovery time')
  })

  it('is doubted where it would hardly let go, or take longer than lamps do', () => {
    const ideal = rateOf(fast, 0)!
    expect(found(fast, ideal * 1.2).remarks).toEqual([])
    expect(found(fast, ideal * 50).remarks.join(' ')).toContain('almost at extinction')
    const slow = { ...fast, capacitance: 1e-6 }
    expect(found(slow, rateOf(slow, 0)! * 1.2).remarks.join(' ')).toContain('from memory')
  })

  it('is none of a stage that does not flash, or of no rate', () => {
    const dark = recoveryFromRate({ ...fast, supplyVoltage: 60 }, { frequency: 1, uncertainty: 0 })
    expect(!dark.ok && dark.reason).toContain('does not flash')
    for (const [frequency, uncertainty] of [
      [0, 0],
      [Number.NaN, 0],
      [1, 1],
      [1, -0.1],
    ] as const) {
      expect(recoveryFromRate(fast, { frequency, uncertainty }).ok).toBe(false)
    }
    const broken = { ...fast, capacitance: -1 }
    expect(recoveryFromRate(broken, { frequency: 1, uncertainty: 0 }).ok).toBe(false)
  })
})
