import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { branchesOf } from '../../../src/core/index'
import { evenly, knotRows } from '../../support/lampArbitrary'
import { knotsOf } from '../../support/stages'

const ends = (knots: ReturnType<typeof knotsOf>, lead = 0) => {
  const { bottom, top, firstGlowPiece } = branchesOf(knots, lead)
  return { bottom, top, firstGlowPiece }
}

describe('the rising branches of a characteristic', () => {
  it('are a dark one and a glow one for a plain lamp', () => {
    expect(ends(knotsOf([0, 0], [1, 70], [2, 50], [3, 90]))).toEqual({
      bottom: [0, 2],
      top: [1, 3],
      firstGlowPiece: 1,
    })
  })

  it('are one where nothing falls', () => {
    expect(ends(knotsOf([0, 0], [1, 70]))).toEqual({ bottom: [0], top: [1], firstGlowPiece: 0 })
  })

  it('are one more for every further fall', () => {
    const knots = knotsOf([0, 0], [1, 70], [2, 50], [3, 60], [4, 40], [5, 90])
    expect(ends(knots)).toEqual({ bottom: [0, 2, 4], top: [1, 3, 5], firstGlowPiece: 1 })
  })

  it('take in a flat knee to its far end and a flat valley from its near end', () => {
    const knots = knotsOf([0, 0], [1, 70], [2, 70], [3, 50], [4, 50], [5, 90])
    expect(ends(knots)).toEqual({ bottom: [0, 3], top: [2, 5], firstGlowPiece: 2 })
  })

  it('leave a flat piece between two falls to the falling region', () => {
    const knots = knotsOf([0, 0], [1, 70], [2, 60], [3, 60], [4, 50], [5, 90])
    expect(ends(knots)).toEqual({ bottom: [0, 4], top: [1, 5], firstGlowPiece: 1 })
  })

  it('end where the data ends in a fall', () => {
    expect(ends(knotsOf([0, 0], [1, 70], [2, 50]))).toMatchObject({ bottom: [0], top: [1] })
  })

  it('have one fall less where the lead resistor outdoes its slope', () => {
    const knots = knotsOf([0, 0], [1, 70], [2, 50], [3, 60], [4, 20], [5, 90])
    expect(ends(knots, 19.9).bottom).toEqual([0, 2, 4])
    expect(ends(knots, 20.1).bottom).toEqual([0, 4])
    expect(ends(knots, 40.1).bottom).toEqual([0])
  })

  it('lie at the lamp’s voltage plus the lead resistor’s', () => {
    expect(branchesOf(knotsOf([0, 0], [1, 70], [2, 50]), 5).level).toEqual([0, 75, 60])
  })

  it('rise from bottom to top, and fall from each top to the next bottom, in every lamp', () => {
    fc.assert(
      fc.property(knotRows(), evenly(0, 1e5), (knots, lead) => {
        const { level, bottom, top } = branchesOf(knots, lead)
        expect(bottom[0]).toBe(0)
        expect(bottom.length).toBe(top.length)
        bottom.forEach((first, branch) => {
          const last = top[branch] as number
          expect(last).toBeGreaterThan(first)
          for (let k = first; k < last; k++) {
            expect(level[k + 1]).toBeGreaterThanOrEqual(level[k] as number)
          }
          const end = bottom[branch + 1] ?? knots.length - 1
          for (let k = last; k < end; k++) {
            expect(level[k + 1]).toBeLessThanOrEqual(level[k] as number)
          }
          if (end > last) expect(level[end]).toBeLessThan(level[last] as number)
        })
      }),
      { seed: 103, numRuns: 500 },
    )
  })
})
