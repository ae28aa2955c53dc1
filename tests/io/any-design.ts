import fc from 'fast-check'
import type { Design, Knot } from '../../src/core'
import { designLimits, type Limit, textLimits } from '../../src/io/designLimits'

/** Objects like those of the program, not ones without a prototype. */
function record<T>(fields: { readonly [K in keyof T]: fc.Arbitrary<T[K]> }): fc.Arbitrary<T> {
  return fc.record<T>(fields, { noNullPrototype: true })
}

/** Any double of a range, with its ends and round numbers drawn often. */
function within({ least, aboveLeast, most }: Limit): fc.Arbitrary<number> {
  return fc
    .oneof(
      fc.double({ min: least, max: most, noNaN: true }).map((value) => (value === 0 ? 0 : value)),
      fc.integer({ min: -12, max: 4 }).map((power) => Math.min(most, 4.7 * 10 ** power)),
      fc.constantFrom(least, most),
    )
    .filter((value) => !aboveLeast || value > least)
}

const anyKnots: fc.Arbitrary<readonly Knot[]> = fc
  .uniqueArray(fc.double({ min: -15, max: 2, noNaN: true }), { minLength: 1, maxLength: 63 })
  .chain((powers) => {
    const currents = [...new Set(powers.map((power) => 10 ** power))].sort((a, b) => a - b)
    const { length } = currents
    return fc
      .array(within(designLimits.voltage), { minLength: length, maxLength: length })
      .map((voltages) => [
        { current: 0, voltage: 0 },
        ...currents.map((current, i) => ({ current, voltage: voltages[i] ?? 0 })),
      ])
  })

function textUpTo(most: number): fc.Arbitrary<string> {
  const units = fc.constantFrom('grapheme' as const, 'binary' as const, 'grapheme-ascii' as const)
  return units
    .chain((unit) => fc.string({ unit, maxLength: most }))
    .map((text) => text.slice(0, most))
}

/** Any design the program allows, from the usual to the absurd. */
export const anyDesign: fc.Arbitrary<Design> = record({
  title: textUpTo(textLimits.title.most),
  note: textUpTo(textLimits.note.most),
  lampName: textUpTo(textLimits.lampName.most),
  stage: record({
    supplyVoltage: within(designLimits.supplyVoltage),
    sourceResistance: within(designLimits.sourceResistance),
    seriesResistance: within(designLimits.seriesResistance),
    capacitance: within(designLimits.capacitance),
    leakageResistance: fc.oneof(
      fc.constant(Number.POSITIVE_INFINITY),
      within(designLimits.leakageResistance),
    ),
    leadResistance: within(designLimits.leadResistance),
    lamp: record({
      knots: anyKnots,
      recoveryTime: within(designLimits.recoveryTime),
      strikeDelay: within(designLimits.strikeDelay),
    }),
    stray: fc.option(within(designLimits.strayCapacitance), { nil: undefined }),
  }).map(({ stray, ...stage }) =>
    stray === undefined ? stage : { ...stage, strayCapacitance: stray },
  ),
})

/** A design as someone would have it after an afternoon's work. */
export const benchDesign: Design = {
  title: 'Jetty light, north end',
  note: 'Tried on the bench 3 May; the spare stack is in the boathouse.',
  lampName: 'Small standard lamp, no. 3 of the bag',
  stage: {
    supplyVoltage: 118.5,
    sourceResistance: 1600,
    seriesResistance: 2.2e6,
    capacitance: 4.7e-7,
    leakageResistance: 1e9,
    leadResistance: 470,
    lamp: {
      knots: [
        { current: 0, voltage: 0 },
        { current: 2.1e-7, voltage: 76.4 },
        { current: 8.7e-5, voltage: 55.8 },
        { current: 6e-4, voltage: 60.2 },
        { current: 0.0079, voltage: 83.5 },
      ],
      recoveryTime: 2e-4,
      strikeDelay: 0.003,
    },
  },
}
