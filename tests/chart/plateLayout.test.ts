import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Box, bottomOf, plateLayout, rightOf } from '../../src/chart/plateLayout'

/** What an axis writes below its box: numbers, then its title. */
const belowAxis = 34

const anyWidth = fc.double({ min: 280, max: 3000, noNaN: true })

const apart = (a: Box, b: Box) =>
  rightOf(a) <= b.x || rightOf(b) <= a.x || bottomOf(a) <= b.y || bottomOf(b) <= a.y

describe('plateLayout', () => {
  it('keeps every drawing on the plate, clear of the others, with room for the axes', () => {
    fc.assert(
      fc.property(anyWidth, (width) => {
        const layout = plateLayout(width)
        const { plane, trace, current } = layout
        expect(layout.width).toBeLessThanOrEqual(width)
        for (const box of [plane, trace, current]) {
          expect(box.width).toBeGreaterThan(180)
          expect(box.height).toBeGreaterThanOrEqual(70)
          expect(box.x).toBeGreaterThanOrEqual(50)
          expect(box.y).toBeGreaterThanOrEqual(20)
          expect(rightOf(box)).toBeLessThanOrEqual(layout.width)
          expect(bottomOf(box)).toBeLessThan(layout.height)
        }
        expect(bottomOf(current) + belowAxis).toBeLessThanOrEqual(layout.height)
        expect(bottomOf(plane) + belowAxis).toBeLessThanOrEqual(
          layout.stacked ? trace.y : layout.height,
        )
        expect(apart(plane, trace) && apart(trace, current) && apart(plane, current)).toBe(true)
      }),
      { seed: 701 },
    )
  })

  it('stands plane and trace on one voltage axis from 680 px on, and one above the other below', () => {
    fc.assert(
      fc.property(anyWidth, (width) => {
        const { plane, trace, stacked } = plateLayout(width)
        expect(stacked).toBe(Math.floor(width) < 680)
        if (stacked) expect([trace.x, trace.width]).toEqual([plane.x, plane.width])
        else expect([trace.y, trace.height]).toEqual([plane.y, plane.height])
      }),
      { seed: 702 },
    )
  })

  it('stands lamp current and light under the trace, on its time axis', () => {
    fc.assert(
      fc.property(anyWidth, (width) => {
        const { trace, current } = plateLayout(width)
        expect([current.x, current.width]).toEqual([trace.x, trace.width])
        expect(current.y).toBeGreaterThan(bottomOf(trace))
      }),
      { seed: 703 },
    )
  })

  it('is never narrower than 280 px', () => {
    for (const width of [0, 120, 279.9]) expect(plateLayout(width)).toEqual(plateLayout(280))
  })
})
