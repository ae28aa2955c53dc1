import { describe, expect, it } from 'vitest'
import {
  catalogueEntry,
  faultInLampRecord,
  kneeIndexOf,
  recordOf,
  recordWithThresholds,
} from '../../../src/core'

const entry = catalogueEntry('A1A')
if (entry === null) throw new Error('A1A is missing')
const record = recordOf(entry)

const read = {
  strike: { value: 71.5, deviation: 0.4 },
  extinction: { value: 56.25, deviation: 0.3 },
  strikeDelay: 0.02,
  origin: 'strike tests',
  measured: { rows: [['71.5', '56.25', 'lit']] },
} as const

describe('a lamp with thresholds read', () => {
  it('strikes and goes out at what was read, with twice the deviation as its spread', () => {
    const made = recordWithThresholds(record, read)
    if (!made.ok) throw new Error(made.reason)
    const { knots, spread, strikeDelay, origin } = made.record
    const knee = kneeIndexOf(knots) ?? -1
    expect(knots[knee]?.voltage).toBeCloseTo(71.5, 9)
    expect(Math.min(...knots.slice(knee).map(({ voltage }) => voltage))).toBeCloseTo(56.25, 9)
    expect(spread?.strike.low).toBeCloseTo(70.7, 9)
    expect(spread?.strike.high).toBeCloseTo(72.3, 9)
    expect(spread?.extinction.typical).toBe(56.25)
    expect(strikeDelay).toBe(0.02)
    expect(origin).toBe('strike tests')
    expect(faultInLampRecord(made.record)).toBeNull()
  })

  it('says what was measured and what was merely kept', () => {
    const made = recordWithThresholds(record, read)
    if (!made.ok) throw new Error(made.reason)
    const guessed = made.record.facts.filter((fact) => fact.guessed).map(({ label }) => label)
    expect(guessed).toEqual(['Shape of the curve'])
    expect(made.record.facts.map(({ label }) => label)).toContain('Strike delay')
  })

  it('keeps what was not read', () => {
    const made = recordWithThresholds(record, { ...read, extinction: null, strikeDelay: null })
    if (!made.ok) throw new Error(made.reason)
    expect(made.record.spread?.extinction).toEqual(record.spread?.extinction)
    expect(made.record.strikeDelay).toBe(record.strikeDelay)
  })

  it('refuses thresholds that no glow lamp has', () => {
    const made = recordWithThresholds(record, { ...read, strike: { value: 50, deviation: 1 } })
    expect(made).toMatchObject({ ok: false })
    if (!made.ok) expect(made.reason).toContain('strike must lie above extinction')
  })
})
