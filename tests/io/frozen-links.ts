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
  {
    version: 2,
    fragment:
      '#2.a4af4afa.XVLbjtMwEP0Vy8_eKHF654kHBBIIpAL7UvXBbSapVceObKdLVeWj-AW-jOOk7C4bRYk9c-bMmcuOf1L-4HrPQqQusIPR9kyeC473q8tYyVzN4onYQTVc7IpiKYpFnouyzNMjZCbpYSlsb4wokiHP8JXjT-4RkK2Sf1lms8mVr6WYz7PFdFuIRZ4V43klVmW23osbd1432vIND9HrM7FIIQbosS4SrF_IBhaMbk7RXFnj6ZrBeVCBthR0iMoeAZMyqeGh86QqvrndydLJuCe-WcpsJXi8dvqoDK5JID-BFOfZIDj9itoeo3YQcg-BbPkqZKziHjJfDIip1RFCNzvg1YEA4d-nCi7ORNUQZF6U6VMRKR97ZH9-szwr2SM8AVNIwnlLKvSeKsFq71rmqSMVqWKgovAOg1K2Ur5iFV20GgUK3vQUAqHOWplAw148syT13j0lWbuUtQAaymf4GR05RpSsy8m6-mcFgVdtt0VivslR2tHZSqdkIMKE0JToe4Lq3nvXw2cbeHilW1BEajvyKiI_WoO7bulb_TMkLnS2rmns022EP49mqxMA8IqMun6E6IjOYjUk8qPi81uoBNl_2AJAJP5M5pL25yGtVQlCTzV5wlr8eC1MwjPRvY8fLBqF-8vUX2xG10Cvx33P82EY9n8B',
    design: {
      title: 'Harbour steps blinker',
      note: '',
      lampName: 'No. 3 of the bag',
      stage: {
        supplyVoltage: 117,
        sourceResistance: 1600,
        seriesResistance: 3300000,
        capacitance: 2.2e-7,
        leakageResistance: Number.POSITIVE_INFINITY,
        leadResistance: 1000,
        lamp: {
          knots: [
            {
              current: 0,
              voltage: 0,
            },
            {
              current: 1.8e-7,
              voltage: 73.4,
            },
            {
              current: 0.000092,
              voltage: 55.6,
            },
            {
              current: 0.0006,
              voltage: 60.1,
            },
            {
              current: 0.008,
              voltage: 83.9,
            },
          ],
          recoveryTime: 0.0002,
          strikeDelay: 0.002,
        },
      },
      lampDetails: {
        origin: 'strike tests',
        note: 'Lens slightly grey.',
        baseResistance: 22000,
        otherWay: null,
        spread: {
          strike: {
            low: 72.8,
            typical: 73.4,
            high: 74,
          },
          extinction: {
            low: 55.2,
            typical: 55.6,
            high: 56,
          },
        },
        facts: [
          {
            label: 'Strike voltage',
            value: '73.4 V ± 0.3 V',
            source: 'measured, from repeated tries; standard deviation',
            guessed: false,
          },
        ],
        measured: {
          rows: [
            ['73.1', '55.4', 'lit'],
            ['73.7', '55.8', 'lit'],
          ],
          rampRate: 0,
        },
        conditions: {
          on: true,
          surroundings: 'dim',
          temperature: 5,
          timeOfUse: 0,
          effects: {
            dim: {
              strikeRise: 5,
              delayGrowth: 0.02,
            },
            dark: {
              strikeRise: 20,
              delayGrowth: 1,
            },
            perKelvin: -0.0035,
            referenceTemperature: 25,
            strikeAtEnd: 5,
            extinctionAtEnd: 5,
            life: 90000000,
          },
        },
      },
    },
  },
]
