import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  type Axis,
  type CurrentAxis,
  currentAxis,
  type Domain,
  linearAxis,
  logarithmicAxis,
  magnify,
  shift,
} from '../../src/chart/axes'
import { byRatio } from '../support/lampArbitrary'
import { kinds } from './drawing'

const ranges = fc.constantFrom<Domain>([54, 558], [54, 380], [54, 270], [398, 26], [316, 26])

const linearDomain = fc
  .tuple(fc.oneof(fc.constant(0), byRatio(1e-12, 1e4)), byRatio(1e-12, 1e4))
  .map(([from, width]): Domain => [from, from + width + 1e-3 * from])

const logarithmicDomain = (least: number, most: number) =>
  fc
    .tuple(byRatio(1e-15, 1e-3), fc.double({ min: least, max: most, noNaN: true }))
    .map(([from, decades]): Domain => [from, from * 10 ** decades])

const spacing = fc.integer({ min: 30, max: 90 })

const steps = (values: readonly number[]) => values.slice(1).map((value, k) => value - values[k]!)

/** Whether a number is a whole multiple of 1, 2 or 5 of a power of ten. */
function isRound(step: number): boolean {
  const [mantissa = ''] = step.toExponential(6).split('e')
  return [1, 2, 5, 10].some((round) => Math.abs(Number(mantissa) - round) < 1e-5)
}

function expectTicksInPlace({ ticks, domain, place }: Axis) {
  let before = Number.NEGATIVE_INFINITY
  for (const { value, at } of ticks) {
    expect(value).toBeGreaterThan(before)
    expect(value).toBeGreaterThanOrEqual(domain[0])
    expect(value).toBeLessThanOrEqual(domain[1])
    expect(at).toBe(place(value))
    before = value
  }
}

describe('an even axis', () => {
  it('gives back the value it placed', () => {
    fc.assert(
      fc.property(
        linearDomain,
        ranges,
        fc.double({ min: 0, max: 1, noNaN: true }),
        (domain, range, part) => {
          const axis = linearAxis(domain, range, 60)
          const value = domain[0] + part * (domain[1] - domain[0])
          expect(Math.abs(axis.value(axis.place(value)) - value)).toBeLessThanOrEqual(
            1e-9 * Math.max(...domain),
          )
          expect(axis.place(domain[0])).toBeCloseTo(range[0], 6)
          expect(axis.place(domain[1])).toBeCloseTo(range[1], 6)
        },
      ),
      { seed: 711 },
    )
  })

  it('has numbers a person would choose: steps of 1, 2 or 5 of a power of ten, all alike', () => {
    fc.assert(
      fc.property(linearDomain, ranges, spacing, (domain, range, room) => {
        const axis = linearAxis(domain, range, room)
        expectTicksInPlace(axis)
        const values = axis.ticks.map((tick) => tick.value)
        expect(values.length).toBeGreaterThanOrEqual(1)
        const apart = steps(values)
        for (const step of apart) {
          expect(isRound(step)).toBe(true)
          expect(Math.abs(step / apart[0]! - 1)).toBeLessThan(1e-6)
          expect(Math.abs(values[0]! / step - Math.round(values[0]! / step))).toBeLessThan(1e-3)
        }
      }),
      { seed: 712, numRuns: 300 },
    )
  })

  it('leaves its labels most of the room they ask for', () => {
    fc.assert(
      fc.property(linearDomain, ranges, spacing, (domain, range, room) => {
        // A step of 2 may stand for one of up to √10, and 3 steps for 2.5: 2/√10 · 2.5/3 = 0.527.
        const { ticks } = linearAxis(domain, range, room)
        for (const step of steps(ticks.map((tick) => tick.at))) {
          expect(Math.abs(step)).toBeGreaterThan(0.52 * room)
        }
      }),
      { seed: 713, numRuns: 300 },
    )
  })
})

describe('a logarithmic axis', () => {
  it('gives back the value it placed', () => {
    fc.assert(
      fc.property(
        logarithmicDomain(0.02, 17),
        ranges,
        fc.double({ min: 0, max: 1, noNaN: true }),
        (domain, range, part) => {
          const axis = logarithmicAxis(domain, range, 62)
          const value = domain[0] * (domain[1] / domain[0]) ** part
          expect(axis.value(axis.place(value)) / value).toBeCloseTo(1, 9)
        },
      ),
      { seed: 714 },
    )
  })

  it('labels at least two round numbers, and leaves each the room it asks for', () => {
    fc.assert(
      fc.property(logarithmicDomain(0.02, 17), ranges, (domain, range) => {
        const axis = logarithmicAxis(domain, range, 62)
        expectTicksInPlace(axis)
        const labelled = axis.ticks.filter((tick) => tick.labelled)
        expect(labelled.length).toBeGreaterThanOrEqual(2)
        if (domain[1] > 10 * domain[0]) {
          for (const { value } of labelled) expect(isRound(value)).toBe(true)
        }
        for (const step of steps(labelled.map((tick) => tick.at))) {
          expect(Math.abs(step)).toBeGreaterThan(0.7 * 62)
        }
      }),
      { seed: 715, numRuns: 500 },
    )
  })

  it('labels every decade where there is room, and every few where there is not', () => {
    const labels = (domain: Domain, range: Domain) =>
      logarithmicAxis(domain, range, 62)
        .ticks.filter((tick) => tick.labelled)
        .map((tick) => tick.value)
    expect(labels([1e-8, 1e-2], [0, 504])).toEqual([1e-8, 1e-7, 1e-6, 1e-5, 1e-4, 1e-3, 1e-2])
    expect(labels([1e-8, 1e-2], [0, 326])).toEqual([1e-8, 1e-6, 1e-4, 1e-2])
    expect(labels([1e-15, 1e2], [0, 326])).toEqual([1e-12, 1e-8, 1e-4, 1])
  })

  it('draws thin lines between the decades that are the digits themselves', () => {
    const { ticks } = logarithmicAxis([1e-6, 1e-3], [0, 600], 62)
    expect(ticks.filter((tick) => tick.minor).map((tick) => tick.value)).toContain(3e-5)
    for (const { value, minor } of ticks) {
      const mantissa = Number(value.toExponential().split('e')[0])
      expect(Number.isInteger(mantissa)).toBe(true)
      expect(minor === true).toBe(mantissa !== 1)
    }
  })
})

describe('currentAxis', () => {
  it('stands what a logarithmic axis has no place for at its left end', () => {
    const axis = currentAxis('logarithmic', [1e-8, 1e-2], [54, 558])
    for (const current of [0, -1, 1e-15, 1e-8]) expect(axis.place(current)).toBe(54)
    expect(axis.place(1e-7)).toBeGreaterThan(54)
  })

  it('places zero and negative currents on a linear axis as they are', () => {
    const axis = currentAxis('linear', [0, 1e-3], [54, 554])
    expect(axis.place(0)).toBe(54)
    expect(axis.place(-1e-4)).toBeCloseTo(4, 9)
  })
})

describe('zooming and panning an axis', () => {
  const cases = fc.constantFrom(...kinds).chain((kind) =>
    fc.record({
      kind: fc.constant(kind),
      domain: kind === 'linear' ? linearDomain : logarithmicDomain(0.5, 6),
      part: fc.double({ min: 0, max: 1, noNaN: true }),
      factor: fc.double({ min: 0.5, max: 2, noNaN: true }),
    }),
  )
  const range: Domain = [54, 554]

  it('keeps the value under the pointer where it is', () => {
    fc.assert(
      fc.property(cases, ({ kind, domain, part, factor }) => {
        const axis = currentAxis(kind, domain, range)
        const at = 54 + 500 * part
        const closer = currentAxis(kind, magnify(axis, kind, axis.value(at), factor), range)
        expect(closer.place(axis.value(at))).toBeCloseTo(at, 3)
      }),
      { seed: 716 },
    )
  })

  it('shows less of a magnified axis, by the factor', () => {
    const even = linearAxis([0, 100], range, 44)
    expect(magnify(even, 'linear', 50, 2)[0]).toBeCloseTo(25, 9)
    expect(magnify(even, 'linear', 50, 2)[1]).toBeCloseTo(75, 9)
    const [low, high] = magnify(logarithmicAxis([1e-8, 1e-4], range, 62), 'logarithmic', 1e-6, 2)
    expect(low).toBeCloseTo(1e-7, 15)
    expect(high).toBeCloseTo(1e-5, 13)
  })

  it('moves by as many px as it was dragged', () => {
    fc.assert(
      fc.property(cases, fc.integer({ min: -40, max: 40 }), ({ kind, domain }, distance) => {
        fc.pre(kind === 'linear' || domain[0] > 1e-13)
        const axis = currentAxis(kind, domain, range)
        const moved = currentAxis(kind, shift(axis, kind, distance), range)
        const middle = axis.value(304)
        expect(moved.place(middle)).toBeCloseTo(304 + distance, 3)
      }),
      { seed: 717 },
    )
  })

  it('stays an axis of rising, finite numbers however long one zooms or pans', () => {
    const expectSound = (kind: CurrentAxis, [from, to]: Domain) => {
      expect(Number.isFinite(from) && Number.isFinite(to)).toBe(true)
      expect(to).toBeGreaterThan(from)
      if (kind === 'logarithmic') expect(from).toBeGreaterThan(0)
      const axis = currentAxis(kind, [from, to], range)
      expect(axis.ticks.length).toBeLessThan(400)
      for (const at of range) expect(axis.place(axis.value(at))).toBeCloseTo(at, 1)
    }
    fc.assert(
      fc.property(
        cases,
        fc.constantFrom(0.5, 1 / 1.5, 1.5, 2),
        fc.constantFrom(-400, 400),
        ({ kind, domain, part }, factor, distance) => {
          let zoomed = domain
          let panned = domain
          for (let n = 0; n < 200; n++) {
            const axis = currentAxis(kind, zoomed, range)
            zoomed = magnify(axis, kind, axis.value(54 + 500 * part), factor)
            panned = shift(currentAxis(kind, panned, range), kind, distance)
          }
          expectSound(kind, zoomed)
          expectSound(kind, panned)
        },
      ),
      { seed: 718, numRuns: 60 },
    )
  })
})
