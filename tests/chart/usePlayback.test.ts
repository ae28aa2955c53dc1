import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Trace } from '../../src/chart/traceOf'
import { advance } from '../../src/chart/usePlayback'

const traceOf = (length: number, loop: Trace['loop']): Trace => ({
  phases: [],
  moments: [],
  length,
  loop,
})

const share = fc.double({ min: 0, max: 1, noNaN: true })

describe('advance', () => {
  it('moves on by as much time as went by', () => {
    expect(advance(traceOf(3, { from: 0, to: 1 }), 0.25, 0.5)).toBe(0.75)
    expect(advance(traceOf(3, null), 0.25, 0.5)).toBe(0.75)
  })

  it('stays at the end of a trace that does not loop', () => {
    expect(advance(traceOf(3, null), 2.9, 0.5)).toBe(3)
    expect(advance(traceOf(3, null), 8, 0)).toBe(3)
  })

  it('runs through what comes before the loop once', () => {
    const trace = traceOf(5, { from: 2, to: 3 })
    expect(advance(trace, 0.5, 1)).toBe(1.5)
    expect(advance(trace, 2.5, 1)).toBeCloseTo(2.5, 12)
    expect(advance(trace, 1.5, 3)).toBeCloseTo(2.5, 12)
  })

  it('keeps within the loop, in phase, however many rounds one step takes', () => {
    fc.assert(
      fc.property(
        share,
        share,
        fc.integer({ min: 0, max: 1000 }),
        share,
        (from, part, rounds, more) => {
          const period = 0.5 + part
          const loop = { from, to: from + period }
          const trace = traceOf(from + 2 * period, loop)
          const start = from + more * period * 0.999
          const time = advance(trace, start, (rounds + part) * period)
          expect(time).toBeGreaterThanOrEqual(loop.from)
          expect(time).toBeLessThanOrEqual(loop.to)
          const turns = (start - from) / period + rounds + part
          const off = (time - from) / period - (turns - Math.floor(turns))
          expect(Math.abs(off - Math.round(off))).toBeLessThan(1e-9 * (1 + rounds))
        },
      ),
      { seed: 781 },
    )
  })

  it('takes the same way in one step as in many', () => {
    fc.assert(
      fc.property(fc.array(share, { minLength: 1, maxLength: 30 }), (steps) => {
        const trace = traceOf(4, { from: 0.7, to: 2 })
        const all = steps.reduce((sum, step) => sum + step, 0)
        const once = advance(trace, 0, all)
        const many = steps.reduce((time, step) => advance(trace, time, step), 0)
        const off = (once - many) / 1.3
        expect(Math.abs(off - Math.round(off))).toBeLessThan(1e-9)
      }),
      { seed: 782 },
    )
  })

  it('stands still on a loop of no length', () => {
    expect(advance(traceOf(2, { from: 1, to: 1 }), 1, 0.5)).toBe(1)
  })

  it('brings a time left over from a longer trace into the loop', () => {
    const time = advance(traceOf(3, { from: 0, to: 1 }), 7.25, 0)
    expect(time).toBeCloseTo(0.25, 12)
  })
})
