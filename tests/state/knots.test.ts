import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { lampVoltageAt } from '../../src/core'
import { genericSmallLamp } from '../../src/core/stage/genericLamp'
import { problemWithKnots } from '../../src/state/constrain'
import { constrainKnot, dropKnot, insertKnot, knotGap, moveKnot } from '../../src/state/knots'
import { anyDesign } from '../io/any-design'

const anyCoordinate = fc.oneof(
  fc.double({ min: -18, max: 4, noNaN: true }).map((power) => 10 ** power),
  fc.double(),
)

describe('constrainKnot', () => {
  it('lets a knot go where it is wanted between its neighbours', () => {
    const wanted = { current: 50e-6, voltage: 52 }
    expect(constrainKnot(genericSmallLamp, 2, wanted)).toEqual(wanted)
  })

  it('stops it a factor 1.02 from the neighbours’ currents and at 0 V and 20 kV', () => {
    const stopped = (current: number, voltage: number) =>
      constrainKnot(genericSmallLamp, 2, { current, voltage })
    expect(stopped(1e-9, -5)).toEqual({ current: 0.2e-6 * 1.02, voltage: 0 })
    expect(stopped(1, 30e3)).toEqual({ current: 0.6e-3 / 1.02, voltage: 20e3 })
    expect(knotGap).toBe(1.02)
  })

  it('holds the first at the origin and the last under 100 A', () => {
    expect(constrainKnot(genericSmallLamp, 0, { current: 1, voltage: 1 })).toEqual({
      current: 0,
      voltage: 0,
    })
    expect(constrainKnot(genericSmallLamp, 4, { current: 1e6, voltage: 90 })).toEqual({
      current: 100,
      voltage: 90,
    })
    expect(constrainKnot(genericSmallLamp, 1, { current: 0, voltage: 75 }).current).toBeGreaterThan(
      0,
    )
  })

  it('keeps the current of a knot between neighbours too close to part', () => {
    const close = [
      { current: 0, voltage: 0 },
      { current: 1, voltage: 1 },
      { current: 1.01, voltage: 2 },
      { current: 1.03, voltage: 3 },
    ]
    expect(constrainKnot(close, 2, { current: 1.02, voltage: 9 })).toEqual({
      current: 1.01,
      voltage: 9,
    })
  })

  it('keeps a coordinate that is wanted as no number', () => {
    expect(
      constrainKnot(genericSmallLamp, 2, { current: Number.NaN, voltage: Number.NaN }),
    ).toEqual(genericSmallLamp[2])
  })

  it('throws for a knot that is not there', () => {
    expect(() => constrainKnot(genericSmallLamp, 5, { current: 1, voltage: 1 })).toThrow(RangeError)
  })

  it('leaves a characteristic a characteristic, whatever is moved where', () => {
    fc.assert(
      fc.property(
        anyDesign,
        fc.nat(),
        anyCoordinate,
        anyCoordinate,
        (design, place, current, voltage) => {
          const { knots } = design.stage.lamp
          const moved = moveKnot(knots, place % knots.length, { current, voltage })
          expect(problemWithKnots(moved)).toBeNull()
          expect(moved).toHaveLength(knots.length)
        },
      ),
      { seed: 93, numRuns: 500 },
    )
  })
})

describe('insertKnot', () => {
  it('adds one on the characteristic, which stays what it was', () => {
    const added = insertKnot(genericSmallLamp, 2)
    const knots = added.ok ? added.knots : []
    expect(knots).toHaveLength(6)
    expect(knots[3]?.current).toBeCloseTo(Math.sqrt(90e-6 * 0.6e-3), 15)
    for (const current of [0, 1e-7, 1e-5, 2e-4, 3e-4, 5e-4, 5e-3]) {
      const before = lampVoltageAt(genericSmallLamp, current) ?? Number.NaN
      expect(lampVoltageAt(knots, current)).toBeCloseTo(before, 9)
    }
  })

  it('halves the current after the origin and doubles it after the last, on the same slope', () => {
    const first = insertKnot(genericSmallLamp, 0)
    expect(first.ok && first.knots[1]).toEqual({ current: 0.1e-6, voltage: 37.5 })
    const last = insertKnot(genericSmallLamp, 4)
    const end = last.ok ? last.knots[5] : undefined
    // 84 V at 8 mA, and 24 V for every 7.4 mA more.
    expect(end?.current).toBe(16e-3)
    expect(end?.voltage).toBeCloseTo(84 + (8 * 24) / 7.4, 9)
  })

  it('says why where there is no room', () => {
    const full = Array.from({ length: 64 }, (_, i) => ({ current: i, voltage: i }))
    expect(insertKnot(full, 3)).toMatchObject({
      ok: false,
      message: expect.stringContaining('at most 64'),
    })
    const close = [...genericSmallLamp.slice(0, 2), { current: 0.203e-6, voltage: 70 }]
    expect(insertKnot(close, 1)).toMatchObject({
      ok: false,
      message: expect.stringContaining('too close'),
    })
    const end = [...genericSmallLamp, { current: 99.9, voltage: 90 }]
    expect(insertKnot(end, 5)).toMatchObject({
      ok: false,
      message: expect.stringContaining('greatest current'),
    })
  })

  it('leaves a characteristic a characteristic wherever it adds', () => {
    fc.assert(
      fc.property(anyDesign, fc.nat(), (design, place) => {
        const { knots } = design.stage.lamp
        const added = insertKnot(knots, place % knots.length)
        if (added.ok) expect(problemWithKnots(added.knots)).toBeNull()
        else expect(added.message).toMatch(/\.$/)
      }),
      { seed: 94, numRuns: 500 },
    )
  })
})

describe('dropKnot', () => {
  it('takes one out, but never the origin nor the last but one', () => {
    const dropped = dropKnot(genericSmallLamp, 3)
    expect(dropped.ok && dropped.knots).toEqual(genericSmallLamp.toSpliced(3, 1))
    expect(dropKnot(genericSmallLamp, 0)).toMatchObject({
      ok: false,
      message: expect.stringContaining('origin'),
    })
    expect(dropKnot(genericSmallLamp.slice(0, 2), 1)).toMatchObject({
      ok: false,
      message: expect.stringContaining('two knots'),
    })
    expect(() => dropKnot(genericSmallLamp, 9)).toThrow(RangeError)
  })
})
