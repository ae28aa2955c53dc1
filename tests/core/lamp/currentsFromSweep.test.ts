import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { currentsFromSweep, type SweepReading } from '../../../src/core/lamp/currentsFromSweep'
import type { MeterPlace, SweepSetup } from '../../../src/core/lamp/sweepSetup'

const setup: SweepSetup = {
  seriesResistance: 100e3,
  meterResistance: 10e6,
  meterPlace: 'lamp',
  readingError: { absolute: 0.05, relative: 0 },
}

function pointOf(reading: SweepReading, change: Partial<SweepSetup> = {}) {
  const result = currentsFromSweep([reading], { ...setup, ...change })
  if (!result.ok) throw new Error(result.message)
  return result.points[0]!
}

describe('currents from a sweep', () => {
  it('takes the current of a meter across the lamp out of that through the resistor', () => {
    // 30 V across 100 kΩ are 300 µA, of which 60 V put 6 µA through 10 MΩ.
    expect(pointOf({ supply: 90, lamp: 60 }).current).toBeCloseTo(294e-6, 12)
  })

  it('takes nothing out where the meter did not load the lamp, or takes no current', () => {
    const whole = pointOf({ supply: 90, lamp: 60 }, { meterPlace: 'supply' }).current
    expect(whole).toBeCloseTo(300e-6, 12)
    const none = { meterResistance: Number.POSITIVE_INFINITY }
    expect(pointOf({ supply: 90, lamp: 60 }, none).current).toBe(whole)
  })

  it('adds the current past the resistor where the meter was across that', () => {
    const point = pointOf({ supply: 90, lamp: 30 }, { meterPlace: 'resistor' })
    expect(point.voltage).toBe(60)
    expect(point.current).toBeCloseTo(303e-6, 12)
  })

  it('finds the true point again wherever the meter was, whatever its resistance', () => {
    const positive = (low: number, high: number) => fc.double({ min: low, max: high, noNaN: true })
    fc.assert(
      fc.property(
        positive(1e-6, 1e-3),
        positive(20, 120),
        positive(1e4, 1e6),
        positive(1e6, 1e8),
        fc.constantFrom<MeterPlace>('lamp', 'supply', 'resistor'),
        (current, voltage, seriesResistance, meterResistance, meterPlace) => {
          const parallel = 1 / (1 / seriesResistance + 1 / meterResistance)
          // Kirchhoff's laws for each of the three circuits.
          const across = {
            lamp: (current + voltage / meterResistance) * seriesResistance,
            supply: current * seriesResistance,
            resistor: current * parallel,
          }[meterPlace]
          const supply = voltage + across
          const lamp = meterPlace === 'resistor' ? across : voltage
          const change = { seriesResistance, meterResistance, meterPlace }
          const point = pointOf({ supply, lamp }, change)
          expect(point.voltage).toBeCloseTo(voltage, 8)
          expect(Math.abs(point.current / current - 1)).toBeLessThan(1e-6)
        },
      ),
      { seed: 31 },
    )
  })

  it.each<MeterPlace>(['lamp', 'supply', 'resistor'])(
    'gives errors that agree with moving each reading a little, with the meter at the %s',
    (meterPlace) => {
      const readingError = { absolute: 0.03, relative: 0.002 }
      const change = { meterPlace, readingError }
      const reading = { supply: 120, lamp: 55 }
      const point = pointOf(reading, change)
      const step = 1e-3
      let currentSquare = 0
      let voltageSquare = 0
      let product = 0
      for (const key of ['supply', 'lamp'] as const) {
        const moved = pointOf({ ...reading, [key]: reading[key] + step }, change)
        const error = Math.hypot(readingError.absolute, readingError.relative * reading[key])
        const byCurrent = ((moved.current - point.current) / step) * error
        const byVoltage = ((moved.voltage - point.voltage) / step) * error
        currentSquare += byCurrent ** 2
        voltageSquare += byVoltage ** 2
        product += byCurrent * byVoltage
      }
      expect(point.sigmaCurrent / Math.sqrt(currentSquare)).toBeCloseTo(1, 6)
      expect(point.sigmaVoltage / Math.sqrt(voltageSquare)).toBeCloseTo(1, 6)
      expect((point.covariance ?? 0) / product).toBeCloseTo(1, 6)
    },
  )

  it('leaves a row out with a sentence and its number, and loses none', () => {
    const readings = [
      { supply: 40, lamp: 39.9 },
      { supply: Number.NaN, lamp: 10 },
      { supply: 50, lamp: Number.POSITIVE_INFINITY },
      { supply: -50, lamp: 20 },
      { supply: 50, lamp: 70 },
      { supply: 90, lamp: 60, row: 17 },
    ]
    const none = { meterResistance: Number.POSITIVE_INFINITY }
    const result = currentsFromSweep(readings, { ...setup, ...none })
    expect(result.leftOut.map(({ row }) => row)).toEqual([2, 3, 4, 5])
    for (const { reason } of result.leftOut) expect(reason).toMatch(/^[A-Z].*[.?]$/)
    if (!result.ok) throw new Error(result.message)
    expect(result.points.map(({ row }) => row)).toEqual([1, 17])
  })

  it('accounts for every row of anything', () => {
    const number = fc.oneof(fc.double(), fc.double({ min: -10, max: 300, noNaN: true }))
    fc.assert(
      fc.property(
        fc.array(fc.record({ supply: number, lamp: number }), { maxLength: 40 }),
        fc.constantFrom<MeterPlace>('lamp', 'supply', 'resistor'),
        fc.boolean(),
        (readings, meterPlace, given) => {
          const { readingError, ...rest } = setup
          const whole = { ...rest, meterPlace, ...(given && readingError ? { readingError } : {}) }
          const result = currentsFromSweep(readings, whole)
          const points = result.ok ? result.points : []
          const rows = [...points, ...result.leftOut].map(({ row }) => row).sort((a, b) => a - b)
          expect(rows).toEqual(readings.map((_, i) => i + 1))
        },
      ),
      { seed: 32 },
    )
  })

  it('keeps a current that is below zero by no more than its own error', () => {
    const point = pointOf({ supply: 50, lamp: 50.05 }, { meterPlace: 'supply' })
    expect(point.current).toBeLessThan(0)
    expect(-point.current).toBeLessThan(3 * point.sigmaCurrent)
  })

  it('tells up from down by the supply where it is not said', () => {
    const supplies = [10, 20, 30, 30, 25, 20]
    const readings = supplies.map((supply) => ({ supply, lamp: supply - 1 }))
    const result = currentsFromSweep(readings, { ...setup, meterPlace: 'supply' })
    if (!result.ok) throw new Error(result.message)
    expect(result.points.map(({ direction }) => direction)).toEqual([
      'up',
      'up',
      'up',
      'up',
      'down',
      'down',
    ])
  })

  it.each([
    [{ seriesResistance: 0 }, /resistor/],
    [{ seriesResistance: Number.NaN }, /resistor/],
    [{ meterResistance: -1 }, /meter/],
    [{ resistorTolerance: -0.1 }, /tolerances/],
    [{ readingError: { absolute: 0, relative: 0 } }, /without any error/],
  ])('refuses a set-up that cannot be: %o', (change, words) => {
    const result = currentsFromSweep([{ supply: 90, lamp: 60 }], { ...setup, ...change })
    expect(result.ok ? '' : result.message).toMatch(words)
  })

  it('says so where there is nothing', () => {
    const result = currentsFromSweep([], setup)
    expect(result.ok ? '' : result.message).toBe('There are no readings yet.')
  })
})
