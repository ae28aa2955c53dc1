import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { shownBrightness } from '../../src/chart/lampLight'
import { cornerBeside, speedFor, speeds, speedWords } from '../../src/panels/speeds'
import { byRatio } from '../support/lampArbitrary'

describe('speedFor', () => {
  it('is real speed for a pace an eye can follow', () => {
    for (const period of [0.4, 1, 2.5, 12]) expect(speedFor(period)).toBe(1)
  })

  it('slows a fast stage down and speeds a slow one up, as little as needed', () => {
    expect(speedFor(1e-3)).toBe(1e-3)
    expect(speedFor(0.1)).toBe(0.1)
    expect(speedFor(60)).toBe(10)
    expect(speedFor(600)).toBe(100)
    fc.assert(
      fc.property(byRatio(1e-6, 1200), (period) => {
        const speed = speedFor(period)
        expect(speeds).toContain(speed)
        const shown = period / speed
        expect(shown).toBeGreaterThanOrEqual(0.37)
        expect(shown).toBeLessThanOrEqual(12)
        const nearer = speeds.filter((one) =>
          speed > 1 ? one < speed && one >= 1 : one > speed && one <= 1,
        )
        for (const one of nearer) {
          expect(period / one < 0.37 || period / one > 12).toBe(true)
        }
      }),
      { seed: 901, numRuns: 500 },
    )
  })

  it('never suits a stage with a speed at which the lamp on the page could not flash', () => {
    fc.assert(
      fc.property(byRatio(1e-6, 1e4), (period) => {
        const rate = speedFor(period) / period
        expect(shownBrightness(0, false, 1 / 60, rate)).toBe(0)
        expect(shownBrightness(0, true, 1 / 60, rate)).toBe(1)
      }),
      { seed: 902, numRuns: 300 },
    )
  })

  it('is the fastest or the slowest there is beyond what they can do', () => {
    expect(speedFor(1e6)).toBe(100)
    expect(speedFor(1e-9)).toBe(1e-6)
    expect(speedFor(0)).toBe(1e-6)
    expect(speedFor(Number.POSITIVE_INFINITY)).toBe(100)
  })
})

describe('speedWords', () => {
  it('says how many times real speed it is, or which part of it', () => {
    expect([100, 10, 1, 0.1, 1e-3].map(speedWords)).toEqual([
      '100 × real',
      '10 × real',
      'real speed',
      '1/10 of real',
      '1/1000 of real',
    ])
    expect(new Set(speeds.map(speedWords)).size).toBe(speeds.length)
  })
})

describe('cornerBeside', () => {
  const phases = [{ duration: 0.5 }, { duration: 0.25 }, { duration: 0.25 }]

  it('is the next end of a phase, or the one before', () => {
    expect(cornerBeside(phases, 0.2, 1)).toBe(0.5)
    expect(cornerBeside(phases, 0.6, 1)).toBe(0.75)
    expect(cornerBeside(phases, 0.6, -1)).toBe(0.5)
    expect(cornerBeside(phases, 0.2, -1)).toBe(0)
  })

  it('goes on from a corner it stands on', () => {
    expect(cornerBeside(phases, 0.5, 1)).toBe(0.75)
    expect(cornerBeside(phases, 0.5, -1)).toBe(0)
  })

  it('goes round at either end', () => {
    expect(cornerBeside(phases, 1, 1)).toBe(0)
    expect(cornerBeside(phases, 0, -1)).toBe(1)
  })

  it('stays at the beginning of nothing', () => {
    expect(cornerBeside([], 0, 1)).toBe(0)
    expect(cornerBeside([], 0, -1)).toBe(0)
  })

  it('reaches every corner in turn, forwards and back', () => {
    fc.assert(
      fc.property(fc.array(byRatio(1e-4, 10), { minLength: 1, maxLength: 12 }), (durations) => {
        const rows = durations.map((duration) => ({ duration }))
        const forwards: number[] = []
        let time = 0
        for (let n = 0; n < rows.length; n++) {
          time = cornerBeside(rows, time, 1)
          forwards.push(time)
        }
        expect(forwards.every((corner, k) => corner > (forwards[k - 1] ?? 0))).toBe(true)
        const back: number[] = [time]
        for (let n = 1; n < rows.length; n++) back.push(cornerBeside(rows, back.at(-1)!, -1))
        expect(back.toReversed()).toEqual(forwards)
      }),
      { seed: 903 },
    )
  })
})
