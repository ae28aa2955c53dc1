import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { faultInStage, type Stage } from '../../src/core'
import { checkDesign } from '../../src/io/designFormat'
import { constrainDesign, constrainNumber, problemWithKnots } from '../../src/state/constrain'
import { freshDesign } from '../../src/state/fresh'
import { anyDesign } from '../io/any-design'

const anyNumber = fc.oneof(
  fc.double(),
  fc.double({ min: -1e5, max: 1e5 }),
  fc.constantFrom(0, -0, Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY),
)

describe('constrainNumber', () => {
  it('moves a number into its range', () => {
    expect(constrainNumber('supplyVoltage', 25e3, 90)).toBe(20e3)
    expect(constrainNumber('supplyVoltage', -5, 90)).toBe(0)
    expect(constrainNumber('supplyVoltage', 120, 90)).toBe(120)
    expect(Object.is(constrainNumber('leadResistance', -0, 90), 0)).toBe(true)
  })

  it('keeps the number before where none is wanted', () => {
    expect(constrainNumber('supplyVoltage', Number.NaN, 90)).toBe(90)
    expect(constrainNumber('leakageResistance', 0, 1e9)).toBe(1e9)
    expect(constrainNumber('strayCapacitance', -1, 1e-11)).toBe(1e-11)
  })

  it('lets only the leakage be infinite', () => {
    expect(constrainNumber('leakageResistance', Number.POSITIVE_INFINITY, 1)).toBe(
      Number.POSITIVE_INFINITY,
    )
    expect(constrainNumber('seriesResistance', Number.POSITIVE_INFINITY, 1)).toBe(1e13)
  })
})

describe('constrainDesign', () => {
  it('leaves every allowed design as it is', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        expect(constrainDesign(design, freshDesign)).toStrictEqual(design)
      }),
      { seed: 91, numRuns: 200 },
    )
  })

  it('makes an allowed design of any numbers and texts', () => {
    const anyStage = fc.record<Stage>(
      {
        supplyVoltage: anyNumber,
        sourceResistance: anyNumber,
        seriesResistance: anyNumber,
        capacitance: anyNumber,
        leakageResistance: anyNumber,
        leadResistance: anyNumber,
        strayCapacitance: anyNumber,
        lamp: fc.record({
          knots: fc.array(fc.record({ current: anyNumber, voltage: anyNumber }), { maxLength: 70 }),
          recoveryTime: anyNumber,
          strikeDelay: anyNumber,
        }),
      },
      { noNullPrototype: true },
    )
    const anyText = fc.string({ unit: 'binary', maxLength: 600 })
    fc.assert(
      fc.property(anyText, anyText, anyText, anyStage, (title, note, lampName, stage) => {
        const made = constrainDesign({ title, note, lampName, stage }, freshDesign)
        expect(checkDesign(made)).toMatchObject({ ok: true })
        expect(faultInStage(made.stage)).toBeNull()
      }),
      { seed: 92, numRuns: 500 },
    )
  })

  it('cuts a text that is too long, but no character in half', () => {
    const long = { ...freshDesign, title: `${'x'.repeat(79)}💡y`, lampName: 'z'.repeat(100) }
    const cut = constrainDesign(long, freshDesign)
    expect(cut.title).toBe('x'.repeat(79))
    expect(cut.lampName).toBe('z'.repeat(60))
  })

  it('keeps the lamp as it was where the wanted knots are no characteristic', () => {
    const { lamp } = freshDesign.stage
    for (const knots of [
      [],
      lamp.knots.slice(1),
      lamp.knots.toReversed(),
      Array(65).fill(lamp.knots[0]),
    ]) {
      const wanted = { ...freshDesign, stage: { ...freshDesign.stage, lamp: { ...lamp, knots } } }
      expect(constrainDesign(wanted, freshDesign).stage.lamp.knots).toBe(lamp.knots)
    }
  })
})

describe('problemWithKnots', () => {
  const origin = { current: 0, voltage: 0 }

  it('finds none in a characteristic and says what is wrong elsewhere', () => {
    expect(problemWithKnots(freshDesign.stage.lamp.knots)).toBeNull()
    expect(problemWithKnots([origin])).toContain('two knots at least')
    expect(problemWithKnots([origin, { current: 101, voltage: 1 }])).toContain('Knot 2 lies beyond')
    expect(problemWithKnots([origin, { current: 1, voltage: 30e3 }])).toContain(
      'Knot 2 lies beyond',
    )
    const many = Array.from({ length: 65 }, (_, i) => ({ current: i, voltage: i }))
    expect(problemWithKnots(many)).toContain('at most 64 knots')
  })
})
