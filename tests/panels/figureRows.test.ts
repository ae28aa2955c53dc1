import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { formatQuantity, parseQuantity, type Stage, solveStage } from '../../src/core'
import { figureGroups } from '../../src/panels/words/figureRows'
import { anyStage } from '../chart/drawing'
import { stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'

const groupsOf = (stage: Stage) => figureGroups(stage, solveStage(stage))
const rowsOf = (stage: Stage) => groupsOf(stage).flatMap((group) => group.rows)
const figureOf = (stage: Stage, name: string) =>
  rowsOf(stage)
    .find((row) => row.name === name)
    ?.value.replaceAll('\u00A0', ' ')

/** The unit each figure is measured in. */
const unitOf: Readonly<Record<string, RegExp>> = {
  Rate: /Hz$/,
  Period: /(s|min|h|days|years)$/,
  'Flash lasts': /(s|min|h|days|years)$/,
  'First flash after': /(s|min|h|days|years)$/,
  Jitter: /(s|min|h|days|years)$/,
  'Mean period': /(s|min|h|days|years)$/,
  Highest: /V$/,
  Lowest: /V$/,
  Mean: /V$/,
  'Least to recover': /(F|any)$/,
  'Peak current': /A$/,
  'Mean current': /A$/,
  'Rms current': /A$/,
  'Charge a flash': /C$/,
  'Energy a flash': /J$/,
  'Mean power': /W$/,
  'Mean supply current': /A$/,
  'Supply power': /W$/,
  'Series resistor': /W$/,
  'In the supply': /W$/,
  'Lead resistor': /W$/,
  Leakage: /W$/,
  'Lamp current': /A$/,
  'Lamp voltage': /V$/,
  'Capacitor voltage': /V$/,
  'Supply current': /A$/,
  'Lamp power': /W$/,
}

describe('the figures of a cycle', () => {
  const stage = stageOf()
  const cycle = solveStage(stage).cycle!

  it('stand in four groups: time, capacitor, lamp, supply and resistors', () => {
    expect(groupsOf(stage).map((group) => group.title)).toEqual([
      'Time',
      'Capacitor',
      'Lamp',
      'Supply and resistors',
    ])
  })

  it('are the cycle’s own, to three figures', () => {
    const read = (name: string, unit: 'Hz' | 'V' | 'A' | 'W') => {
      const parsed = parseQuantity(figureOf(stage, name)!, unit)
      return parsed.ok ? parsed.value : Number.NaN
    }
    expect(read('Rate', 'Hz') / cycle.frequency).toBeCloseTo(1, 2)
    expect(read('Highest', 'V') / cycle.highVoltage).toBeCloseTo(1, 2)
    expect(read('Lowest', 'V') / cycle.lowVoltage).toBeCloseTo(1, 2)
    expect(read('Peak current', 'A') / cycle.peakLampCurrent).toBeCloseTo(1, 2)
    expect(read('Mean supply current', 'A') / cycle.meanSupplyCurrent).toBeCloseTo(1, 2)
    expect(read('Series resistor', 'W') / cycle.meanSeriesPower).toBeCloseTo(1, 2)
    expect(figureOf(stage, 'Charge a flash')).toBe(
      formatQuantity(cycle.flashCharge, 'C').replaceAll('\u00A0', ' '),
    )
  })

  it('show source, lead resistor and leakage only where there are any', () => {
    const names = rowsOf(stage).map((row) => row.name)
    for (const name of ['In the supply', 'Lead resistor', 'Leakage']) {
      expect(names).not.toContain(name)
    }
    const more = stageOf({ sourceResistance: 1600, leadResistance: 470, leakageResistance: 1e9 })
    for (const name of ['In the supply', 'Lead resistor', 'Leakage']) {
      expect(figureOf(more, name)).toMatch(/W$/)
    }
  })

  it('show jitter only where the strike is delayed', () => {
    expect(figureOf(stage, 'Jitter')).toBeUndefined()
    const late = stageOf({ strikeDelay: 5e-3 })
    expect(figureOf(late, 'Jitter')).toMatch(/ms$/)
    expect(figureOf(late, 'Mean period')).toMatch(/s$/)
  })

  it('say that any capacitance will do where the lamp recovers at once', () => {
    expect(figureOf(stage, 'Least to recover')).toBe('any')
    expect(figureOf(stageOf({ recoveryTime: 1e-3 }), 'Least to recover')).toMatch(/F$/)
  })
})

describe('the figures of a stage at rest', () => {
  it('are those of each rest it has', () => {
    expect(groupsOf(stageOf({ supplyVoltage: 60 })).map(({ title }) => title)).toEqual([
      'Resting dark',
    ])
    const lit = stageOf({ supplyVoltage: 150, seriesResistance: 33e3 })
    expect(groupsOf(lit).map(({ title }) => title)).toEqual(['Resting lit'])
    const latch = stageOf({ supplyVoltage: 74, seriesResistance: 100e3 })
    expect(groupsOf(latch).map(({ title }) => title)).toEqual(['Resting dark', 'Resting lit'])
  })

  it('add up: what the supply gives is what lamp and resistor take', () => {
    const lit = stageOf({ supplyVoltage: 150, seriesResistance: 33e3 })
    const watts = (name: string) => {
      const parsed = parseQuantity(figureOf(lit, name)!, 'W')
      return parsed.ok ? parsed.value : Number.NaN
    }
    const taken = watts('Lamp power') + watts('Series resistor')
    expect(taken / watts('Supply power')).toBeCloseTo(1, 2)
  })
})

describe('every row', () => {
  it('has its unit, a meaning in a sentence, and a name of its own in its group', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        for (const { rows } of groupsOf(stage)) {
          expect(new Set(rows.map((row) => row.name)).size).toBe(rows.length)
          for (const { name, value, meaning } of rows) {
            expect(unitOf[name], name).toBeDefined()
            expect(value, name).toMatch(unitOf[name]!)
            expect(meaning).toMatch(/^[A-Z].{10,}\.$/)
          }
        }
      }),
      { seed: 931, numRuns: 200 },
    )
  })

  it('holds numbers that are numbers, whatever the design', () => {
    fc.assert(
      fc.property(anyStage, (stage) => {
        for (const { name, value } of rowsOf(stage)) {
          expect(value, name).not.toMatch(/NaN|undefined|null|Infinity|∞|–/)
          expect(value, name).not.toBe('')
        }
      }),
      { seed: 932, numRuns: 300 },
    )
  })
})
