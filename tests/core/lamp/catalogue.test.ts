import { describe, expect, it } from 'vitest'
import { solveStage } from '../../../src/core'
import { catalogue, catalogueEntry } from '../../../src/core/lamp/catalogue'
import { recordOf } from '../../../src/core/lamp/catalogueRecord'
import { thresholdsOf } from '../../../src/core/lamp/conditionsMove'
import { faultInLampRecord, stageLampOf } from '../../../src/core/lamp/lampRecord'

const sheet = 'SPC Technology data sheet for A1A/A1B/A1C/C2A/A9A'

// Designation, industry number, design current A, strike V ac and V dc at most, resistor Ω, brightness.
const onSheet = [
  ['A1A', 'NE-2', 0.6e-3, 65, 90, 100e3, 'standard'],
  ['A1B', null, 0.3e-3, 65, 90, 220e3, 'standard'],
  ['A9A', 'NE-2E', 0.7e-3, 65, 90, 100e3, 'standard'],
  ['A1C', null, 1.2e-3, 95, 135, 47e3, 'high'],
  ['C2A', 'NE-2H', 1.9e-3, 95, 135, 30e3, 'high'],
] as const

describe('the catalogue', () => {
  it.each(onSheet)(
    'has %s (%s) as its data sheet has it',
    (id, industry, current, ac, dc, resistor, brightness) => {
      const entry = catalogueEntry(id)!
      expect(entry.industryNumber?.value ?? null).toBe(industry)
      expect(entry.designCurrent).toEqual({ value: current, basis: 'data sheet', source: sheet })
      expect(entry.strikeAc).toEqual({ value: ac, basis: 'data sheet', source: sheet })
      expect(entry.strikeDc).toEqual({ value: dc, basis: 'data sheet', source: sheet })
      expect(entry.seriesResistor).toEqual({ value: resistor, basis: 'data sheet', source: sheet })
      expect(entry.brightness).toEqual({ value: brightness, basis: 'data sheet', source: sheet })
      // 25 000 h at the design current, same sheet.
      expect(entry.life).toEqual({ value: 25_000 * 3600, basis: 'data sheet', source: sheet })
    },
  )

  it('says that B1A (NE-51) is from memory throughout', () => {
    const entry = catalogueEntry('B1A')!
    expect(entry.name).toBe('B1A (NE-51)')
    const { designCurrent, strikeAc, strikeDc, seriesResistor, life, brightness } = entry
    const figures = [designCurrent, strikeAc, strikeDc, seriesResistor, life, brightness]
    expect(figures.map((figure) => figure?.value)).toEqual([
      0.3e-3,
      65,
      90,
      220e3,
      25_000 * 3600,
      'standard',
    ])
    for (const figure of figures) expect(figure?.basis).toBe('from memory')
  })

  it('has ids that differ, and no entry of an unknown id', () => {
    expect(new Set(catalogue.map(({ id }) => id)).size).toBe(catalogue.length)
    expect(catalogueEntry('A1Z')).toBeNull()
  })

  it('has resistors that agree with design current and holding voltage on 115 V ac', () => {
    // Rough, by the mean of the supply's root mean square: a third either way tells 30 kΩ from 47 kΩ.
    for (const { designCurrent, seriesResistor, family } of catalogue) {
      if (seriesResistor === null) continue
      const current = (115 - family.holding.value) / seriesResistor.value
      expect(current / designCurrent!.value).toBeGreaterThan(0.67)
      expect(current / designCurrent!.value).toBeLessThan(1.5)
    }
  })
})

describe.each(catalogue.map((entry) => [entry.name, entry] as const))('%s', (_, entry) => {
  const record = recordOf(entry)

  it('makes a record that nothing is wrong with', () => {
    expect(faultInLampRecord(record)).toBeNull()
    expect(record).toMatchObject({ name: entry.name, origin: 'catalogue', measured: null })
  })

  it('has its typical thresholds in the knots, and no lamp above the dc rating', () => {
    const { strike, extinction } = record.spread!
    expect(thresholdsOf(record.knots)).toEqual({
      strike: strike.typical,
      extinction: extinction.typical,
    })
    if (entry.strikeDc !== null) expect(strike.high).toBe(entry.strikeDc.value)
  })

  it('flashes in an ordinary stage', () => {
    const stage = {
      supplyVoltage: 150,
      sourceResistance: 0,
      seriesResistance: 2.2e6,
      capacitance: 0.47e-6,
      leakageResistance: Number.POSITIVE_INFINITY,
      leadResistance: 0,
      lamp: stageLampOf(record),
    }
    expect(solveStage(stage).verdict).toBe('flashes')
  })

  it('names a source for every fact, and says which are guessed', () => {
    for (const fact of record.facts) {
      expect(fact.source.length).toBeGreaterThan(8)
      expect(fact.guessed).toBe(
        fact.source.startsWith('guessed') || fact.label.startsWith('Recovery time'),
      )
    }
    if (entry.strikeAc !== null) {
      const strike = record.facts.find(({ label }) => label === 'Strike, at most')!
      expect(strike.value).toMatch(/ ac × √2 = .*; the sheet says /)
    }
  })
})
