import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatQuantity } from '../../../src/core/quantity/formatQuantity'
import { type ParseOptions, parseQuantity } from '../../../src/core/quantity/parseQuantity'
import { type Unit, units } from '../../../src/core/quantity/units'

function readAs(text: string, unit: Unit, options?: ParseOptions): number | string {
  const read = parseQuantity(text, unit, options)
  return read.ok ? read.value : read.message
}

function messageOf(text: string, unit: Unit, options?: ParseOptions): string {
  const read = parseQuantity(text, unit, options)
  return read.ok ? `accepted as ${read.value}` : read.message
}

describe('parseQuantity', () => {
  // IEC 60062 letter codes: the letter stands where the decimal mark would.
  it.each<[string, Unit, number]>([
    ['4R7', 'Ω', 4.7],
    ['R47', 'Ω', 0.47],
    ['47R', 'Ω', 47],
    ['4K7', 'Ω', 4700],
    ['4k7', 'Ω', 4700],
    ['4M7', 'Ω', 4.7e6],
    ['1G5', 'Ω', 1.5e9],
    ['4R7 Ω', 'Ω', 4.7],
    ['2n2', 'F', 2.2e-9],
    ['p47', 'F', 0.47e-12],
    ['µ47', 'F', 0.47e-6],
    ['2n2F', 'F', 2.2e-9],
    ['4V7', 'V', 4.7],
  ])('reads the marking code %s in %s as %d', (text, unit, value) => {
    expect(readAs(text, unit)).toBe(value)
  })

  it.each<[string, Unit, number]>([
    ['4.7 MΩ', 'Ω', 4.7e6],
    ['0,47u', 'F', 4.7e-7],
    ['470n', 'F', 4.7e-7],
    ['33k', 'Ω', 33000],
    ['1e6', 'Ω', 1e6],
    ['4E7', 'Ω', 4e7],
    ['1.5 Meg', 'Ω', 1.5e6],
    ['2.2 megohms', 'Ω', 2.2e6],
    ['4.7 kilohm', 'Ω', 4700],
    ['4.7kOhm', 'Ω', 4700],
    ['100', 'Ω', 100],
    ['100 ohms', 'Ω', 100],
    ['90 V', 'V', 90],
    ['1.2kV', 'V', 1200],
    ['10 µF', 'F', 1e-5],
    ['10 \u03BCF', 'F', 1e-5],
    ['0.5mA', 'A', 0.0005],
    ['200 nA', 'A', 2e-7],
    ['10 M\u2126', 'Ω', 1e7],
    ['2,5 Hz', 'Hz', 2.5],
    ['250 mW', 'W', 0.25],
    ['5 %', '%', 5],
    ['5 percent', '%', 5],
    ['550 mAh', 'Ah', 0.55],
    ['.5', 'V', 0.5],
    [',5', 'V', 0.5],
    ['5.', 'V', 5],
    ['+5 V', 'V', 5],
    ['1e\u22127', 'A', 1e-7],
    ['4.7\u202FMΩ', 'Ω', 4.7e6],
    ['4.7\u00A0MΩ', 'Ω', 4.7e6],
    ['4.7\u2009M\u2009Ω', 'Ω', 4.7e6],
    ['  4.7 M  ', 'Ω', 4.7e6],
    ['4.7\u200BM', 'Ω', 4.7e6],
  ])('reads %j in %s as %d', (text, unit, value) => {
    expect(readAs(text, unit)).toBe(value)
  })

  it.each<[string, number]>([
    ['1 000 000', 1e6],
    ['1\u202F000\u202F000', 1e6],
    ["1'000'000", 1e6],
    ['1,000.5', 1000.5],
    ['1.000,5', 1000.5],
    ['1,000,000', 1e6],
    ['1.000.000', 1e6],
    ['12 345,5', 12345.5],
    ['1,234,567.25 k', 1234567250],
  ])('reads %j with its thousands set off as %d', (text, value) => {
    expect(readAs(text, 'Ω')).toBe(value)
  })

  it('takes a lone mark for the decimal mark, and says so where it looks like thousands', () => {
    const remark = expect.stringContaining('decimal mark')
    expect(parseQuantity('1,000', 'Ω')).toEqual({ ok: true, value: 1, note: remark })
    expect(parseQuantity('10.000', 'V')).toEqual({ ok: true, value: 10, note: remark })
    expect(parseQuantity('1.234', 'V')).toEqual({ ok: true, value: 1.234 })
    expect(parseQuantity('0,470', 'V')).toEqual({ ok: true, value: 0.47 })
  })

  it.each(['1,2.3', '1,000.000,5', '10 20', '1 00 000', '1..5', '1,00,000.5'])(
    'refuses %j, which can be read in more than one way',
    (text) => {
      expect(messageOf(text, 'Ω')).toContain('more than one way')
    },
  )

  it.each<[string, number]>([
    ['3 min 20 s', 200],
    ['2 h 15 min', 8100],
    ['1.5 h', 5400],
    ['2 days', 172800],
    ['5min', 300],
    ['1 year', 31557600],
    ['20 s', 20],
    ['5 ms', 0.005],
  ])('reads the time %j as %d s', (text, seconds) => {
    expect(readAs(text, 's')).toBe(seconds)
  })

  it.each(['20 s 3 min', '3 min 4 min', '1 h 30', '3 min 20 s x'])(
    'does not guess at the time %j',
    (text) => {
      expect(messageOf(text, 's')).toContain('not understood as a time')
    },
  )

  it('keeps milli and mega apart and remarks on an unlikely milli', () => {
    expect(parseQuantity('4.7m', 'Ω')).toEqual({
      ok: true,
      value: 0.0047,
      note: 'Read as 4.7 milliohms; for megohms write M: 4.7\u00A0MΩ.',
    })
    expect(parseQuantity('5m', 's')).toMatchObject({
      value: 0.005,
      note: expect.stringContaining('min'),
    })
    expect(parseQuantity('5 ms', 's')).toEqual({ ok: true, value: 0.005 })
    expect(parseQuantity('2 mF', 'F')).toMatchObject({
      value: 0.002,
      note: expect.stringContaining('microfarads'),
    })
    expect(parseQuantity('2 mhz', 'Hz')).toMatchObject({
      value: 0.002,
      note: expect.stringContaining('megahertz write M'),
    })
    expect(parseQuantity('470n', 'Ω')).toMatchObject({
      value: 4.7e-7,
      note: expect.stringContaining('470 nanoohms'),
    })
  })

  it.each<[string, Unit, string]>([
    ['5 M', 'F', 'write µ or u for microfarads'],
    ['5 MA', 'A', 'write m for milliamps'],
    ['5 MV', 'V', 'write k for kilovolts'],
    ['5 k', 's', 'min for minutes'],
    ['5 k', '%', '5 %'],
    ['5 f', 'Ω', 'femto'],
  ])('refuses %j in %s and says what to write', (text, unit, advice) => {
    expect(messageOf(text, unit)).toContain(advice)
  })

  it('takes "none" and an empty field only where the part may be left out', () => {
    const leakage = { none: Number.POSITIVE_INFINITY, min: 1 }
    for (const text of ['', '  ', 'none', 'None', '∞', '∞ Ω', '∞\u202FΩ', 'inf', 'infinite']) {
      expect(readAs(text, 'Ω', leakage), text).toBe(Number.POSITIVE_INFINITY)
    }
    for (const text of ['', 'none']) expect(readAs(text, 'F', { none: 0 }), text).toBe(0)
    expect(messageOf('∞', 'F', { none: 0 })).toContain('finite capacitance')
    expect(messageOf('infant', 'Ω', leakage)).toContain('not understood')
    expect(messageOf('inf V', 'Ω', leakage)).toContain('finite resistance')
    expect(messageOf('none', 'V')).toContain('not understood')
    expect(messageOf('inf', 'V')).toContain('finite voltage')
    expect(messageOf('', 'V')).toBe('Type a voltage, for example 90 V.')
  })

  it.each([
    'abc',
    'NaN',
    'MΩ',
    '4.7.M',
    'Ω 5',
    '5 flurbs',
    '1/2',
    '4.7M7',
    '--5',
    '5 5k5',
    '10²',
    '٣',
    '½',
    '１',
  ])('does not understand %j and gives an example', (text) => {
    expect(messageOf(text, 'Ω')).toMatch(/4\.7 MΩ\.$/)
  })

  it('names the unit that was wanted and what came instead', () => {
    expect(messageOf('90 V', 'Ω')).toBe('A resistance in Ω is wanted here; “90 V” is a voltage.')
    expect(messageOf('5 min', 'V')).toBe('A voltage in V is wanted here; “5 min” is a time.')
    expect(messageOf('50 mAh', 'A')).toContain('is a battery capacity')
    expect(messageOf('4n7F', 'Ω')).toContain('is a capacitance')
    expect(messageOf('5 V', '')).toBe('A plain number is wanted here; “5 V” is a voltage.')
  })

  it('refuses hexadecimal, a sign below zero, and numbers beyond what can be held', () => {
    expect(messageOf('0x1F', 'Ω')).toContain('Only decimal numbers')
    expect(messageOf('-5', 'Ω')).toContain('leave out the minus sign')
    expect(messageOf('\u22125', 'V', { min: 1, max: 9 })).toContain('leave out the minus sign')
    expect(messageOf('1e400', 'Ω')).toContain('too large')
    expect(messageOf(`1e${'9'.repeat(30)}`, 'Ω')).toContain('too large')
    expect(messageOf(`1e-${'9'.repeat(30)}`, 'Ω')).toContain('too small')
    expect(messageOf('1e-400', 'Ω')).toContain('too small')
    expect(readAs('0e-400', 'Ω')).toBe(0)
    expect(readAs('-0', 'Ω')).toBe(0)
    expect(readAs('-5', '', { min: -10 })).toBe(-5)
  })

  it('refuses very long text at once, even if most of it is blank', () => {
    expect(messageOf('9'.repeat(1e6), 'Ω')).toContain('too long')
    expect(messageOf(`${' '.repeat(500)}5`, 'Ω', { none: 0 })).toContain('too long')
    expect(messageOf(`4.7${'k'.repeat(40)}`, 'Ω').length).toBeLessThan(120)
  })

  it('states the bounds with their units, and accepts the bounds themselves', () => {
    const range = { min: 1, max: 1e9 }
    expect(readAs('1', 'Ω', range)).toBe(1)
    expect(readAs('1G', 'Ω', range)).toBe(1e9)
    expect(messageOf('2G', 'Ω', range)).toBe(
      'The resistance must be from 1\u00A0Ω to 1\u00A0GΩ; this is 2\u00A0GΩ.',
    )
    expect(messageOf('0', 'V', { min: 1 })).toBe(
      'The voltage must be at least 1\u00A0V; this is 0\u00A0V.',
    )
    expect(messageOf('5', '', { min: Number.NEGATIVE_INFINITY, max: 1 })).toContain('at most 1;')
    expect(messageOf('4.7m', 'Ω', range)).toContain('for megohms write M')
  })

  it('reads back every printed value exactly, in every unit', () => {
    const anyUnit = fc.constantFrom(...(Object.keys(units) as Unit[]))
    const size = fc.double({ min: 1e-18, max: 1e15, noNaN: true })
    fc.assert(
      fc.property(anyUnit, size, (unit, value) => {
        expect(readAs(formatQuantity(value, unit, { figures: 'all' }), unit)).toBe(value)
      }),
      { seed: 11, numRuns: 2000 },
    )
  })

  it('never throws and never returns a value outside its bounds, whatever is typed', () => {
    const anyUnit = fc.constantFrom(...(Object.keys(units) as Unit[]))
    const typed = fc.oneof(
      fc.string({ unit: 'grapheme' }),
      fc.string({ unit: fc.constantFrom(...'0123456789.,-+eEmMkKuµnpRΩVs inf∞\u202F') }),
    )
    let accepted = 0
    fc.assert(
      fc.property(typed, anyUnit, (text, unit) => {
        const read = parseQuantity(text, unit, { min: 0.001, max: 1000 })
        if (read.ok) {
          accepted += 1
          expect(read.value).toBeGreaterThanOrEqual(0.001)
          expect(read.value).toBeLessThanOrEqual(1000)
        } else expect(read.message).toMatch(/\.$/)
      }),
      { seed: 12, numRuns: 5000 },
    )
    expect(accepted).toBeGreaterThan(50)
  })
})
