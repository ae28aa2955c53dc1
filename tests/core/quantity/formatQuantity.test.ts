import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  type FormatOptions,
  formatParts,
  formatQuantity,
} from '../../../src/core/quantity/formatQuantity'
import type { Unit } from '../../../src/core/quantity/units'

/** As formatted, with plain spaces for reading. */
function plain(value: number, unit: Unit, options?: number | FormatOptions): string {
  return formatQuantity(value, unit, options).replace(/[\u202F\u00A0]/g, ' ')
}

describe('formatQuantity', () => {
  it.each<[number, Unit, string]>([
    [4.7e6, 'Ω', '4.7 MΩ'],
    [4.7e-7, 'F', '470 nF'],
    [1e-5, 'F', '10 µF'],
    [1e-11, 'F', '10 pF'],
    [2e-7, 'A', '200 nA'],
    [0.0006, 'A', '600 µA'],
    [90, 'V', '90 V'],
    [20000, 'V', '20 kV'],
    [0.47, 'Ω', '0.47 Ω'],
    [0.05, 'Ω', '0.05 Ω'],
    [0.01, 'Hz', '0.01 Hz'],
    [0.0047, 'Ω', '4.7 mΩ'],
    [1e13, 'Ω', '10 TΩ'],
    [0.5, 'Hz', '0.5 Hz'],
    [0.0083, 'Hz', '8.3 mHz'],
    [2630, 'Hz', '2.63 kHz'],
    [5, '%', '5 %'],
    [0.25, '%', '0.25 %'],
    [12345, '%', '12345 %'],
    [0.05, '', '0.05'],
    [-5, 'V', '\u22125 V'],
    [0, 'V', '0 V'],
    [-0, 'V', '0 V'],
  ])('writes %d %s as %j', (value, unit, text) => {
    expect(plain(value, unit)).toBe(text)
  })

  it('rounds before it chooses the prefix', () => {
    expect(plain(999.96e3, 'Ω', { keepZeros: true })).toBe('1.00 MΩ')
    expect(plain(999.4e3, 'Ω')).toBe('999 kΩ')
    expect(plain(999.96e3, 'Ω', 4)).toBe('1 MΩ')
    expect(plain(999.96e3, 'Ω', 5)).toBe('999.96 kΩ')
    expect(plain(0.99996, 'A')).toBe('1 A')
    expect(plain(99.96, 'V')).toBe('100 V')
  })

  it('keeps trailing zeros only when asked, and pads where figures are few', () => {
    expect(plain(4.7e6, 'Ω', { keepZeros: true })).toBe('4.70 MΩ')
    expect(plain(4.7e6, 'Ω', { keepZeros: true, figures: 5 })).toBe('4.7000 MΩ')
    expect(plain(123e3, 'Ω', 2)).toBe('120 kΩ')
    expect(plain(100e3, 'Ω')).toBe('100 kΩ')
  })

  it('puts a no-break space between number and unit and none without a unit', () => {
    expect(formatQuantity(4700, 'Ω')).toBe('4.7\u00A0kΩ')
    expect(formatQuantity(1.5, '')).toBe('1.5')
    expect(formatParts(4700, 'Ω')).toEqual({ number: '4.7', unit: 'kΩ' })
  })

  it('writes what is no number, and infinity in the word of the caller', () => {
    expect(formatQuantity(Number.NaN, 'V')).toBe('–')
    expect(plain(Number.POSITIVE_INFINITY, 'Ω')).toBe('∞ Ω')
    expect(plain(Number.NEGATIVE_INFINITY, 'V')).toBe('\u2212∞ V')
    expect(plain(Number.POSITIVE_INFINITY, 'Ω', { infinite: 'none' })).toBe('none')
  })

  it.each<[number, string]>([
    [1.5, '1.5 s'],
    [0.0123, '12.3 ms'],
    [45e-6, '45 µs'],
    [120, '120 s'],
    [120.4, '2 min'],
    [200, '3 min 20 s'],
    [3599.6, '60 min'],
    [7199.4, '119 min 59 s'],
    [7199.7, '2 h'],
    [8100, '2 h 15 min'],
    [172799, '2 days'],
    [273600, '3 days 4 h'],
    [863900, '10 days'],
    [1e7, '116 days'],
    [31557600 * 2.25, '2.25 years'],
    [-200, '\u22123 min 20 s'],
  ])('writes %d s as %j', (value, text) => {
    expect(plain(value, 's')).toBe(text)
  })

  it('keeps a long time in seconds where every figure is wanted', () => {
    expect(plain(200.4, 's', { figures: 'all' })).toBe('200.4 s')
  })

  it('falls back to a power of ten beyond its prefixes', () => {
    expect(plain(1e-30, 'F')).toBe('1e\u221215 fF')
    expect(plain(2.5e25, 'V')).toBe('2.5e22 kV')
  })

  it('throws on a count of figures that makes no sense', () => {
    expect(() => formatQuantity(1, 'V', 0)).toThrow(RangeError)
    expect(() => formatQuantity(1, 'V', 2.5)).toThrow(RangeError)
    expect(() => formatQuantity(1, 'V', 18)).toThrow(RangeError)
  })

  it('is off by at most half of the last figure and never shows 1000 before a prefix', () => {
    const scale: Readonly<Record<string, number>> = {
      f: 1e-15,
      p: 1e-12,
      n: 1e-9,
      µ: 1e-6,
      m: 1e-3,
      k: 1e3,
      M: 1e6,
      G: 1e9,
      T: 1e12,
    }
    fc.assert(
      fc.property(
        fc.double({ min: -11, max: 14, noNaN: true }),
        fc.integer({ min: 1, max: 9 }),
        (power, figures) => {
          const value = 10 ** power
          const { number, unit } = formatParts(value, 'Ω', figures)
          const factor = unit === 'Ω' ? 1 : (scale[unit.charAt(0)] ?? Number.NaN)
          expect(Math.abs(Number(number) * factor - value) / value).toBeLessThanOrEqual(
            0.5 * 10 ** (1 - figures) * (1 + 1e-9),
          )
          expect(Number(number)).toBeLessThan(1000)
        },
      ),
      { seed: 21, numRuns: 2000 },
    )
  })
})
