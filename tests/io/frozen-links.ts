import type { Design } from '../../src/core'

type FrozenLink = { readonly version: number; readonly fragment: string; readonly design: Design }

/**
 * Links as they were sent out, one or more for every format there ever was. Nothing here is ever
 * edited or removed: a new format adds its own.
 */
export const frozenLinks: readonly FrozenLink[] = [
  {
    version: 1,
    fragment:
      '#1.fac5ab0e.LY3BDoIwDIZfpeFcmw2EYXwDE096IxwmTEYcGxnzwNu7MXto-__98rcrbiqEHcw86YBgnQ8alB0LLJ5-ViM4C0EreCk7aKjgLvfrYWyr9LEHOXxg3mD-Y04G7b6bohjwWKQxCbGj9CMYuazpA8UY9864nArsOG-pRt4whmXJUuGZhDoJ5IfKjmDIKG7lMaoeu5J4gkRD53xircC6pjarBhtGmRYXbCuq-_4H',
    design: {
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
    },
  },
  {
    version: 1,
    fragment:
      '#1.22c4e4e5.i1YKLklN11Hwyy9KKU7NLElVeNQwWeFRyzQFI4UP8yctVNJRAqNoAz1jNKBjAIZ5pTk5UKahnlGqrqFhrE60IZA2BYkYGOgYGQBBbCwA',
    design: {
      title: 'Steg, Nordseite – № 2 💡',
      note: '',
      lampName: '',
      stage: {
        supplyVoltage: 1 / 3,
        sourceResistance: 0,
        seriesResistance: 0,
        capacitance: 0,
        leakageResistance: Number.POSITIVE_INFINITY,
        leadResistance: 0,
        lamp: {
          knots: [
            { current: 0, voltage: 0 },
            { current: 1e-15, voltage: 0 },
            { current: 100, voltage: 20_000 },
          ],
          recoveryTime: 0,
          strikeDelay: 0,
        },
        strayCapacitance: 1.2e-11,
      },
    },
  },
]
