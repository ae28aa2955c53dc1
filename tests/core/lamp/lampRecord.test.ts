import { describe, expect, it } from 'vitest'
import { solveStage } from '../../../src/core'
import { catalogueEntry } from '../../../src/core/lamp/catalogue'
import { recordOf } from '../../../src/core/lamp/catalogueRecord'
import {
  faultInLampRecord,
  knotsWithoutBase,
  leadResistanceWith,
  stageLampOf,
} from '../../../src/core/lamp/lampRecord'

const record = recordOf(catalogueEntry('A1A')!)
const turned = record.knots.map(({ current, voltage }) => ({ current, voltage: voltage * 1.1 }))

describe('a lamp record', () => {
  it('is the same lamp both ways round unless it differs by polarity', () => {
    expect(stageLampOf(record, 'reverse')).toEqual(stageLampOf(record, 'forward'))
    const odd = { ...record, reverseKnots: turned }
    expect(stageLampOf(odd).knots).toBe(record.knots)
    expect(stageLampOf(odd, 'reverse').knots).toBe(turned)
  })

  it('brings the resistor in its base into the lead and not into its characteristic', () => {
    const based = { ...record, baseResistance: 30e3 }
    expect(stageLampOf(based).knots).toBe(record.knots)
    expect(leadResistanceWith(based, 470)).toBe(30_470)
  })

  it('rests as the lamp and its base resistor do in series', () => {
    const solution = solveStage({
      supplyVoltage: 120,
      sourceResistance: 0,
      seriesResistance: 70e3,
      capacitance: 0,
      leakageResistance: Number.POSITIVE_INFINITY,
      leadResistance: leadResistanceWith({ ...record, baseResistance: 30e3 }, 0),
      lamp: stageLampOf(record),
    })
    // By hand: 120 V = I·100 kΩ + V(I), glow branch 55 V + (I − 90 µA)·5 V/510 µA.
    const byHand = (120 - 55 + (90e-6 * 5) / 510e-6) / (100e3 + 5 / 510e-6)
    expect(solution.operatingPoints.find(({ lit, stable }) => lit && stable)?.current).toBeCloseTo(
      byHand,
      12,
    )
  })

  it('gives the glass alone where the base resistor was measured along', () => {
    const atTerminals = record.knots.map(({ current, voltage }) => ({
      current,
      voltage: voltage + 1000 * current,
    }))
    const inner = knotsWithoutBase(atTerminals, 1000)!
    for (const [i, knot] of inner.entries()) {
      expect(knot.voltage).toBeCloseTo(record.knots[i]!.voltage, 10)
    }
    expect(knotsWithoutBase(atTerminals, 1e6)).toBeNull()
  })

  it.each([
    [{ baseResistance: -1 }, 'base'],
    [{ recoveryTime: Number.NaN }, 'recovery'],
    [{ strikeDelay: -1 }, 'delay'],
    [{ knots: [] }, 'two knots'],
    [{ reverseKnots: [{ current: 0, voltage: 1 }] }, 'other way round'],
    [
      {
        spread: {
          strike: { low: 80, typical: 75, high: 90 },
          extinction: { low: 50, typical: 55, high: 60 },
        },
      },
      'strike voltages',
    ],
    [
      {
        spread: {
          strike: { low: 60, typical: 75, high: 90 },
          extinction: { low: 50, typical: 55, high: Number.POSITIVE_INFINITY },
        },
      },
      'extinction voltages',
    ],
    [
      {
        spread: {
          strike: { low: 50, typical: 55, high: 90 },
          extinction: { low: 50, typical: 55, high: 60 },
        },
      },
      'below the typical strike',
    ],
  ])('says what is wrong with %j', (change, words) => {
    expect(faultInLampRecord({ ...record, ...change })).toContain(words)
  })
})
