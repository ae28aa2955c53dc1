import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  equivalentSource,
  loadCurrent,
  loadLineOf,
  resistanceThrough,
  seriesResistanceThrough,
} from '../../../src/core/index'
import { byRatio, evenly } from '../../support/lampArbitrary'
import { stageOf } from '../../support/stages'

const volts = evenly(1, 1000)
const close = (found: number, expected: number, scale = Math.abs(expected)) =>
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(1e-12 * scale)

describe('the load line', () => {
  it('runs from the supply voltage at no current to supply over resistance at no voltage', () => {
    const line = loadLineOf(stageOf({ supplyVoltage: 100, seriesResistance: 50e3 }))
    expect(loadCurrent(line, 100)).toBe(0)
    expect(loadCurrent(line, 0)).toBe(2e-3)
    expect(loadCurrent(line, 150)).toBeLessThan(0)
  })

  it('is that of one source with its resistance, as Thévenin’s theorem says', () => {
    fc.assert(
      fc.property(volts, byRatio(1, 1e9), byRatio(1, 1e12), volts, (supply, feed, leak, level) => {
        const line = loadLineOf(
          stageOf({ supplyVoltage: supply, seriesResistance: feed, leakageResistance: leak }),
        )
        const source = equivalentSource(line)
        close(source.voltage, (supply * leak) / (feed + leak))
        close(source.resistance, (feed * leak) / (feed + leak))
        const scale = (supply + level) / feed + level / leak
        close(loadCurrent(line, level), (source.voltage - level) / source.resistance, 10 * scale)
      }),
      { seed: 104, numRuns: 300 },
    )
  })

  it('passes through the point it is taken through', () => {
    fc.assert(
      fc.property(
        volts,
        byRatio(1e-9, 1),
        fc.constantFrom(0, 1e-9, 1e-6),
        (level, current, leak) => {
          const supply = 1.7 * level
          const resistance = resistanceThrough(supply, leak, level, current)
          close(
            loadCurrent({ voltage: supply, resistance, leakage: leak }, level),
            current,
            3 * current + 3 * level * leak,
          )
        },
      ),
      { seed: 105, numRuns: 300 },
    )
  })
})

describe('the series resistor for a point of the plane', () => {
  const stage = stageOf({ supplyVoltage: 120, sourceResistance: 100e3 })

  it('leaves the source its part', () => {
    expect(seriesResistanceThrough(stage, 60, 100e-6)).toBeCloseTo(500e3, 6)
  })

  it('is none above the supply voltage, nor where the source alone passes too little', () => {
    expect(seriesResistanceThrough(stage, 130, 1e-6)).toBeNull()
    expect(seriesResistanceThrough(stage, 60, 1e-3)).toBeNull()
  })

  it('is none for no current without leakage, and some with it', () => {
    expect(seriesResistanceThrough(stage, 60, 0)).toBeNull()
    expect(seriesResistanceThrough({ ...stage, leakageResistance: 1e6 }, 60, 0)).toBeCloseTo(
      900e3,
      6,
    )
  })
})
