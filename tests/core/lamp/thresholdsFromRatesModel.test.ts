import { describe, expect, it } from 'vitest'
import { asMarked, periodOf, type RateParts } from '../../../src/core/lamp/thresholdsFromRatesModel'

const parts: RateParts = {
  seriesResistance: 20e3,
  resistanceTolerance: 0,
  capacitance: 50e-6,
  capacitanceTolerance: 0,
  supplyTolerance: 0,
  leakageResistance: Number.POSITIVE_INFINITY,
  preStrikeCurrent: 0,
  glowResistance: 0,
  flashTime: 0,
}

describe('the period of a lamp that is a plain switch', () => {
  it('is 0.693 s in the problem "sujet 15a" (studylibfr.com 1284227)', () => {
    expect(periodOf(110, 90, 70, parts, asMarked)).toBeCloseTo(Math.LN2, 12)
  })

  it('is 1/27.80 Hz with a glow resistance, in 15b of the same', () => {
    const glowing = { ...parts, seriesResistance: 1e3, glowResistance: 100 }
    expect(1 / periodOf(110, 90, 70, glowing, asMarked)).toBeCloseTo(27.8, 2)
  })

  it('is half a second with 9.79 MΩ in a lycée exercise (studylibfr.com 2305675)', () => {
    const slow = { ...parts, seriesResistance: 9.79e6, capacitance: 0.1e-6 }
    expect(1 / periodOf(120, 90, 70, slow, asMarked)).toBeCloseTo(2, 2)
  })

  it('is 16.64 s in a problem of Alexander & Sadiku, chapter 7 (parts from memory)', () => {
    const slow = { ...parts, seriesResistance: 4e6, capacitance: 6e-6 }
    expect(periodOf(120, 75, 30, slow, asMarked)).toBeCloseTo(16.64, 2)
  })

  it('is R·C for 90 V, 80 V and 62.8 V (berkeleyphysicsdemos.net, node 396)', () => {
    expect(periodOf(90, 80, 62.8, parts, asMarked)).toBeCloseTo(1, 2)
  })

  it('takes leakage as Thévenin does', () => {
    // 20 kΩ and 20 kΩ: half the supply behind half the resistance.
    const leaky = { ...parts, leakageResistance: 20e3 }
    const halved = { ...parts, seriesResistance: 10e3 }
    expect(periodOf(220, 90, 70, leaky, asMarked)).toBeCloseTo(
      periodOf(110, 90, 70, halved, asMarked),
      14,
    )
  })

  it('takes the lamp’s pre-strike current as the leakage it is like', () => {
    const sipping = { ...parts, preStrikeCurrent: 90 / 20e3 }
    const leaky = { ...parts, leakageResistance: 20e3 }
    expect(periodOf(220, 90, 70, sipping, asMarked)).toBeCloseTo(
      periodOf(220, 90, 70, leaky, asMarked),
      14,
    )
  })

  it('is none where the lamp would not flash', () => {
    expect(periodOf(90, 90, 70, parts, asMarked)).toBeNaN()
    expect(periodOf(110, 70, 70, parts, asMarked)).toBeNaN()
    expect(periodOf(110, 90, 0, parts, asMarked)).toBeNaN()
    // Glowing through 100 kΩ it would rest above 70 V.
    expect(periodOf(110, 90, 70, { ...parts, glowResistance: 100e3 }, asMarked)).toBeNaN()
  })
})
