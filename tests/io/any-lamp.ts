import fc from 'fast-check'
import { genericSmallLamp } from '../../src/core'
import { type LampRecord, lampOrigins, type PlainData } from '../../src/core/lamp/lampRecord'

/** A lamp as someone would have it after a sweep. */
export const sweptLamp: LampRecord = {
  name: 'No. 3 of the bag',
  note: 'Lens slightly grey.',
  origin: 'sweep',
  knots: genericSmallLamp,
  reverseKnots: genericSmallLamp.map(({ current, voltage }) => ({
    current,
    voltage: 1.02 * voltage,
  })),
  baseResistance: 0,
  recoveryTime: 2e-4,
  strikeDelay: 0.003,
  spread: {
    strike: { low: 74, typical: 75, high: 76.5 },
    extinction: { low: 54.5, typical: 55, high: 55.5 },
  },
  facts: [{ label: 'Bought', value: 'spring', source: 'own note', guessed: false }],
  measured: {
    series: 220e3,
    rows: [
      [10, 9.9],
      [90, 61.2, null],
    ],
    meter: { ohms: 1e7 },
  },
}

const anyData: fc.Arbitrary<PlainData> = fc
  .jsonValue({ maxDepth: 4 })
  // What is refused has tests of its own.
  .filter((value) => !/"(__proto__|constructor|prototype)":/.test(JSON.stringify(value)))
  .map((value) => JSON.parse(JSON.stringify(value)) as PlainData)

const volts = fc.double({ min: 0, max: 20e3, noNaN: true }).map((value) => value + 0)
const span = fc.tuple(volts, volts, volts).map((values) => {
  const [low, typical, high] = values.sort((a, b) => a - b) as [number, number, number]
  return { low, typical, high }
})

/** Any lamp the program allows. */
export const anyLamp: fc.Arbitrary<LampRecord> = fc.record(
  {
    name: fc.string({ unit: 'grapheme', maxLength: 20 }).map((text) => text.slice(0, 60)),
    note: fc.string({ unit: 'binary', maxLength: 60 }).map((text) => text.slice(0, 400)),
    origin: fc.constantFrom(...lampOrigins),
    knots: fc.constant(genericSmallLamp),
    reverseKnots: fc.constantFrom(null, sweptLamp.reverseKnots),
    baseResistance: fc.double({ min: 0, max: 1e6, noNaN: true }).map((value) => value + 0),
    recoveryTime: fc.constantFrom(0, 1e-4, 1000),
    strikeDelay: fc.constantFrom(0, 0.25),
    spread: fc.option(
      fc
        .tuple(span, span)
        .filter(([strike, extinction]) => extinction.typical < strike.typical)
        .map(([strike, extinction]) => ({ strike, extinction })),
    ),
    facts: fc.array(
      fc.record(
        {
          label: fc.string({ maxLength: 30 }),
          value: fc.string({ maxLength: 30 }),
          source: fc.string({ maxLength: 30 }),
          guessed: fc.boolean(),
        },
        { noNullPrototype: true },
      ),
      { maxLength: 4 },
    ),
    measured: anyData,
  },
  { noNullPrototype: true },
)
