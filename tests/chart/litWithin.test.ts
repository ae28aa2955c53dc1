import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { heldBack, isRise } from '../../src/chart/lampLight'
import { litWithin } from '../../src/chart/litWithin'
import type { Trace } from '../../src/chart/traceOf'
import type { Phase } from '../../src/core'

const phase = (kind: Phase['kind'], duration: number): Phase => ({
  kind,
  duration,
  from: 0,
  to: 0,
  toward: 0,
  timeConstant: 1,
  anchorCurrent: 0,
  anchorLevel: 0,
  conductance: 0,
})

const dark = phase('dark', 0.9)
const glow = phase('glow', 0.1)
const looping: Trace = {
  phases: [dark, glow, dark, glow],
  moments: [],
  length: 2,
  loop: { from: 0, to: 1 },
}

describe('whether the lamp was lit since the frame before', () => {
  it('sees a flash that fell between two frames', () => {
    expect(litWithin(looping, 0.89, 0.05)).toBe(false)
    expect(litWithin(looping, 0.95, 0.1)).toBe(true)
    // The whole flash went by as the marker came round.
    expect(litWithin(looping, 0.05, 0.2)).toBe(true)
    expect(litWithin(looping, 0.05, 0.04)).toBe(false)
    expect(litWithin(looping, 0.5, 7)).toBe(true)
  })

  it('misses none, whatever the frames', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0.001, max: 0.4, noNaN: true }), { maxLength: 40 }),
        (steps) => {
          let time = 0
          let rounds = 0
          let seen = 0
          let before = false
          for (const step of steps) {
            const went = time + step
            time = went % 1
            if (went >= 1) rounds++
            const lit = litWithin(looping, time, step)
            if (lit && !before) seen++
            before = lit
          }
          // A flash each round at least, unless two run together because no frame fell between them.
          expect(rounds === 0 || seen > 0).toBe(true)
        },
      ),
      { seed: 7, numRuns: 300 },
    )
  })

  it('stays lit at the end of a trace that rests lit', () => {
    const rest: Trace = { ...looping, phases: [dark, glow], length: 1, loop: null }
    expect(litWithin(rest, 1, 0)).toBe(true)
    expect(litWithin(rest, 0.3, 0)).toBe(false)
  })
})

describe('holding flashes back', () => {
  it('never lets more than three begin in a second, whatever is wanted', () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.tuple(
            fc.double({ min: 0, max: 1, noNaN: true }),
            fc.double({ min: 0.001, max: 0.1, noNaN: true }),
          ),
          { maxLength: 200 },
        ),
        (frames) => {
          let now = 0
          let shown = 0
          let risen = Number.NEGATIVE_INFINITY
          const rises: number[] = []
          for (const [wanted, elapsed] of frames) {
            now += elapsed
            const next = heldBack(shown, wanted, now - risen)
            if (isRise(shown, next)) {
              risen = now
              rises.push(now)
            }
            shown = next
          }
          for (const begin of rises) {
            expect(
              rises.filter((rise) => rise >= begin && rise < begin + 1).length,
            ).toBeLessThanOrEqual(3)
          }
        },
      ),
      { seed: 3, numRuns: 300 },
    )
  })
})
