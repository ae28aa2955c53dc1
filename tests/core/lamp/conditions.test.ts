import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { faultInKnots, genericSmallLamp, kneeIndexOf } from '../../../src/core'
import { lampUnder } from '../../../src/core/lamp/conditions'
import {
  conditionSources,
  defaultEffects,
  type LampConditions,
  noConditions,
} from '../../../src/core/lamp/conditionsDefaults'
import { movedKnots, thresholdsOf } from '../../../src/core/lamp/conditionsMove'

const lamp = { knots: genericSmallLamp, recoveryTime: 1e-4, strikeDelay: 0.01 }
const hours = 3600

function under(change: Partial<LampConditions>, lampThere = lamp) {
  const found = lampUnder(lampThere, { ...noConditions, on: true, ...change })
  if (!found.ok) throw new Error(found.reason)
  return found
}

describe('a lamp under conditions', () => {
  it('is left alone while they are off, and by an ordinary lit room when on', () => {
    const off = lampUnder(lamp, { ...noConditions, surroundings: 'dark', temperature: -40 })
    expect(off).toMatchObject({ ok: true, sentences: [] })
    expect(off.ok && off.lamp).toBe(lamp)
    expect(noConditions.on).toBe(false)
    expect(under({}).lamp).toBe(lamp)
  })

  it('strikes 20 V later in the dark, and waits: tens of volts and to seconds, from memory', () => {
    const { lamp: dark, sentences } = under({ surroundings: 'dark' })
    expect(thresholdsOf(dark.knots)).toEqual({ strike: 95, extinction: 55 })
    expect(dark.strikeDelay).toBeCloseTo(1.01, 12)
    expect(sentences[0]).toBe(
      'In the dark it strikes up to 20\u00A0V later and waits up to 1\u00A0s longer on average.',
    )
  })

  it('says when strike then lies above the end of what is known of it', () => {
    // The generic lamp ends at 84 V.
    expect(under({ surroundings: 'dark' }).sentences[1]).toContain('above the 84\u00A0V')
    expect(under({ surroundings: 'dim' }).sentences).toHaveLength(1)
  })

  it('moves by −3.5 mV/°C from 25 °C, both thresholds alike', () => {
    const cold = under({ temperature: -15 })
    expect(cold.strikeShift).toBeCloseTo(0.14, 12)
    expect(thresholdsOf(cold.lamp.knots)!.strike).toBeCloseTo(75.14, 12)
    expect(thresholdsOf(cold.lamp.knots)!.extinction).toBeCloseTo(55.14, 12)
    expect(cold.sentences).toEqual(['At −15\u00A0°C strike and extinction lie 140\u00A0mV higher.'])
    // The published range, from memory, is −2 … −5 mV/°C.
    expect(defaultEffects.perKelvin).toBeLessThan(-2e-3)
    expect(defaultEffects.perKelvin).toBeGreaterThan(-5e-3)
  })

  it('ages evenly, 5 V up by the end of its life and no further', () => {
    expect(under({ timeOfUse: 5000 * hours }).strikeShift).toBeCloseTo(1, 12)
    expect(under({ timeOfUse: 25_000 * hours }).extinctionShift).toBeCloseTo(5, 12)
    const old = under({ timeOfUse: 90_000 * hours })
    expect(old.strikeShift).toBe(5)
    expect(old.sentences[0]).toBe(
      'At the end of its life it strikes about 5\u00A0V later and goes out 5\u00A0V higher.',
    )
    const down = { ...defaultEffects, strikeAtEnd: -5, extinctionAtEnd: -4 }
    expect(under({ timeOfUse: 90_000 * hours, effects: down }).sentences[0]).toContain('earlier')
  })

  it('adds up what acts together', () => {
    const all = under({ surroundings: 'dim', temperature: 65, timeOfUse: 25_000 * hours })
    expect(all.strikeShift).toBeCloseTo(5 - 0.14 + 5, 12)
    expect(all.extinctionShift).toBeCloseTo(-0.14 + 5, 12)
    expect(all.sentences.length).toBeGreaterThanOrEqual(3)
  })

  it('says what every effect rests on, and which are from memory', () => {
    expect(Object.keys(conditionSources).sort()).toEqual(Object.keys(defaultEffects).sort())
    for (const key of ['dark', 'perKelvin', 'strikeAtEnd', 'extinctionAtEnd'] as const) {
      expect(conditionSources[key]).toContain('from memory')
    }
    expect(conditionSources.dim).toContain('guessed')
  })

  it('is none where strike would fall to extinction, or with conditions that cannot be', () => {
    const effects = { ...defaultEffects, dark: { strikeRise: -30, delayGrowth: 0 } }
    const broken = lampUnder(lamp, { ...noConditions, on: true, surroundings: 'dark', effects })
    expect(!broken.ok && broken.reason).toContain('no glow lamp any more')
    const rising = { ...lamp, knots: genericSmallLamp.slice(0, 2) }
    const flat = lampUnder(rising, { ...noConditions, on: true, surroundings: 'dark' })
    expect(!flat.ok && flat.reason).toContain('never falls')
    for (const change of [
      { temperature: Number.NaN },
      { timeOfUse: -1 },
      { effects: { ...defaultEffects, life: 0 } },
      { effects: { ...defaultEffects, perKelvin: Number.NaN } },
      { effects: { ...defaultEffects, dim: { strikeRise: 1, delayGrowth: -1 } } },
    ]) {
      expect(lampUnder(lamp, { ...noConditions, on: true, ...change }).ok).toBe(false)
    }
  })
})

/** A lamp with knots on every part, level tops and feet among them. */
const anyKnots = fc
  .tuple(
    fc.array(fc.double({ min: 0, max: 70, noNaN: true }), { maxLength: 3 }),
    fc.array(fc.double({ min: 56, max: 74, noNaN: true }), { maxLength: 3 }),
    fc.array(fc.double({ min: 55, max: 140, noNaN: true }), { minLength: 1, maxLength: 3 }),
    fc.boolean(),
  )
  .map(([dark, falling, glow, level]) => {
    const up = (a: number, b: number) => a - b
    const voltages = [
      0,
      ...dark.sort(up),
      ...(level ? [75] : []),
      75,
      ...falling.sort(up).reverse(),
      55,
      ...(level ? [55] : []),
      ...glow.sort(up),
    ]
    return voltages.map((voltage, i) => ({ current: i * 1e-4, voltage }))
  })

describe('a characteristic moved', () => {
  const shift = fc.double({ min: -9, max: 40, noNaN: true })

  it('has its thresholds where they were to be, and rises and falls where it did', () => {
    fc.assert(
      fc.property(anyKnots, shift, shift, (knots, strikeShift, extinctionShift) => {
        const moved = movedKnots(knots, strikeShift, extinctionShift)
        if (75 + strikeShift <= 55 + extinctionShift) {
          expect(moved).toBeNull()
          return
        }
        expect(faultInKnots(moved!)).toBeNull()
        const { strike, extinction } = thresholdsOf(moved!)!
        expect(strike).toBeCloseTo(75 + strikeShift, 9)
        expect(extinction).toBeCloseTo(55 + extinctionShift, 9)
        expect(kneeIndexOf(moved!)).toBe(kneeIndexOf(knots))
        for (let i = 1; i < knots.length; i++) {
          const before = knots[i]!.voltage - knots[i - 1]!.voltage
          const after = moved![i]!.voltage - moved![i - 1]!.voltage
          expect(moved![i]!.current).toBe(knots[i]!.current)
          // Differences that rounding swallows may vanish, never turn round.
          if (Math.abs(before) > 1e-9) expect(Math.sign(after)).toBe(Math.sign(before))
        }
      }),
      { seed: 41, numRuns: 300 },
    )
  })

  it('is itself where nothing shifts', () => {
    expect(movedKnots(genericSmallLamp, 0, 0)).toEqual(genericSmallLamp)
  })

  it('can be moved back', () => {
    const back = movedKnots(movedKnots(genericSmallLamp, 12, -3)!, -12, 3)!
    for (const [i, knot] of back.entries()) {
      expect(knot.voltage).toBeCloseTo(genericSmallLamp[i]!.voltage, 10)
    }
  })
})
