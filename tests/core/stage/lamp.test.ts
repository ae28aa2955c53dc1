import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { faultInKnots, kneeIndexOf, lampVoltageAt } from '../../../src/core/index'
import { genericSmallLamp } from '../../../src/core/stage/genericLamp'
import { knotRows } from '../../support/lampArbitrary'
import { knotsOf } from '../../support/stages'

describe('what makes knots a characteristic', () => {
  it.each([
    ['no knots', [], 'two knots'],
    ['one knot', knotsOf([0, 0]), 'two knots'],
    ['a first knot off zero volts', knotsOf([0, 1], [1, 2]), '0 A and 0 V'],
    ['a first knot off zero amps', knotsOf([1e-9, 0], [1, 2]), '0 A and 0 V'],
    ['two knots at one current', knotsOf([0, 0], [1e-6, 70], [1e-6, 50]), 'Knot 3: the current'],
    ['currents that go back', knotsOf([0, 0], [1e-6, 70], [1e-7, 50]), 'Knot 3: the current'],
    ['a current that is no number', knotsOf([0, 0], [Number.NaN, 70]), 'Knot 2: the current'],
    ['an endless current', knotsOf([0, 0], [Number.POSITIVE_INFINITY, 7]), 'Knot 2: the current'],
    ['a negative voltage', knotsOf([0, 0], [1, 70], [2, -1e-9]), 'Knot 3: the voltage'],
    ['a voltage that is no number', knotsOf([0, 0], [1, Number.NaN]), 'Knot 2: the voltage'],
    ['an endless voltage', knotsOf([0, 0], [1, Number.POSITIVE_INFINITY]), 'Knot 2: the voltage'],
  ])('refuses %s and says where', (_, knots, words) => {
    expect(faultInKnots(knots)).toContain(words)
  })

  it('accepts two knots, a valley at no volts, flat runs and currents over 24 decades', () => {
    expect(faultInKnots(knotsOf([0, 0], [1, 1]))).toBeNull()
    expect(faultInKnots(knotsOf([0, 0], [1e-6, 70], [1e-3, 0], [1, 90]))).toBeNull()
    expect(faultInKnots(knotsOf([0, 0], [1e-6, 70], [2e-6, 70], [1, 50], [2, 50]))).toBeNull()
    expect(faultInKnots(knotsOf([0, 0], [1e-15, 70], [1e9, 50]))).toBeNull()
    expect(faultInKnots(genericSmallLamp)).toBeNull()
  })

  it('accepts every lamp these tests draw', () => {
    fc.assert(
      fc.property(knotRows(), (knots) => {
        expect(faultInKnots(knots)).toBeNull()
        expect(knots.length).toBeGreaterThanOrEqual(3)
        expect(knots.length).toBeLessThanOrEqual(9)
      }),
      { seed: 101, numRuns: 300 },
    )
  })
})

describe('the knee', () => {
  it('is the first knot after which the voltage falls', () => {
    expect(kneeIndexOf(genericSmallLamp)).toBe(1)
    expect(kneeIndexOf(knotsOf([0, 0], [1, 50], [2, 70], [3, 60], [4, 90], [5, 10]))).toBe(2)
  })

  it('is the last of several at one voltage', () => {
    expect(kneeIndexOf(knotsOf([0, 0], [1, 70], [2, 70], [3, 60]))).toBe(2)
  })

  it('is missing where the voltage never falls', () => {
    expect(kneeIndexOf(knotsOf([0, 0], [1, 70]))).toBeNull()
    expect(kneeIndexOf(knotsOf([0, 0], [1, 70], [2, 70], [3, 80]))).toBeNull()
  })
})

describe('the voltage across the lamp', () => {
  it('is that of a knot at a knot, and halfway between halfway', () => {
    for (const knot of genericSmallLamp) {
      expect(lampVoltageAt(genericSmallLamp, knot.current)).toBeCloseTo(knot.voltage, 12)
    }
    expect(lampVoltageAt(knotsOf([0, 0], [2, 70], [4, 50]), 3)).toBe(60)
  })

  it('is unknown below zero, beyond the last knot and for no number', () => {
    expect(lampVoltageAt(genericSmallLamp, -1e-12)).toBeNull()
    expect(lampVoltageAt(genericSmallLamp, 8.001e-3)).toBeNull()
    expect(lampVoltageAt(genericSmallLamp, Number.NaN)).toBeNull()
  })
})

describe('the generic small lamp', () => {
  it('strikes within the data sheet limit for its kind', () => {
    // 65 V ac / 90 V dc at most for A1A, A1B, A9A [S: SPC Technology data sheet for A1A/A1B/A1C/C2A/A9A].
    const knee = genericSmallLamp[kneeIndexOf(genericSmallLamp) as number]
    expect(knee?.voltage).toBeLessThan(90)
  })

  it('holds at its design current 10 to 20 V below its strike voltage', () => {
    // "holds 10–20 V below that" [S: internationallight.com, neon lamps]; 0.6 mA is the A1A's design current
    // [S: SPC Technology data sheet].
    const held = 75 - (lampVoltageAt(genericSmallLamp, 0.6e-3) as number)
    expect(held).toBeGreaterThanOrEqual(10)
    expect(held).toBeLessThanOrEqual(20)
  })
})
