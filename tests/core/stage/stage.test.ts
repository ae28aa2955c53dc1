import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  cycleWithWaits,
  defaultStrayCapacitance,
  effectiveCapacitance,
  faultInStage,
  feedResistance,
  type Stage,
  solveStage,
} from '../../../src/core/index'
import { leastResistance } from '../../../src/core/stage/stage'
import { stages } from '../../support/lampArbitrary'
import { knotsOf, stageOf } from '../../support/stages'

const endless = Number.POSITIVE_INFINITY

const faults: readonly (readonly [string, Stage, string])[] = [
  ['a negative supply', stageOf({ supplyVoltage: -1 }), 'supply voltage'],
  ['a supply that is no number', stageOf({ supplyVoltage: Number.NaN }), 'supply voltage'],
  ['an endless supply', stageOf({ supplyVoltage: endless }), 'supply voltage'],
  ['a negative source resistance', stageOf({ sourceResistance: -1 }), 'source resistance'],
  ['a negative series resistor', stageOf({ seriesResistance: -1e-9 }), 'series resistor'],
  ['an endless series resistor', stageOf({ seriesResistance: endless }), 'series resistor'],
  ['a negative capacitor', stageOf({ capacitance: -1e-12 }), 'capacitor'],
  ['a capacitor that is no number', stageOf({ capacitance: Number.NaN }), 'capacitor'],
  ['no stray capacitance', stageOf({ strayCapacitance: 0 }), 'stray'],
  ['an endless stray capacitance', stageOf({ strayCapacitance: endless }), 'stray'],
  ['no leakage resistance', stageOf({ leakageResistance: 0 }), 'leakage'],
  ['a negative leakage resistance', stageOf({ leakageResistance: -5 }), 'leakage'],
  ['a leakage too small to invert', stageOf({ leakageResistance: 1e-320 }), 'leakage'],
  ['a leakage that is no number', stageOf({ leakageResistance: Number.NaN }), 'leakage'],
  ['a negative lead resistor', stageOf({ leadResistance: -1 }), 'lead resistor'],
  ['an endless lead resistor', stageOf({ leadResistance: endless }), 'lead resistor'],
  ['a negative recovery time', stageOf({ recoveryTime: -1 }), 'recovery time'],
  ['an endless recovery time', stageOf({ recoveryTime: endless }), 'recovery time'],
  ['a negative strike delay', stageOf({ strikeDelay: -1 }), 'strike delay'],
  ['a strike delay that is no number', stageOf({ strikeDelay: Number.NaN }), 'strike delay'],
  ['knots that are no lamp', stageOf({ knots: knotsOf([0, 0]) }), 'two knots'],
]

describe('what makes a stage impossible to reckon with', () => {
  it.each(faults)('finds %s and says which part it is', (_, stage, words) => {
    expect(faultInStage(stage)).toContain(words)
  })

  it.each(faults)('does not solve %s', (_, stage) => {
    expect(() => solveStage(stage)).toThrow(RangeError)
    expect(() => cycleWithWaits(stage, () => 0)).toThrow(RangeError)
  })

  it('finds none in a stage with nothing fitted and nothing connected', () => {
    const bare = stageOf({ supplyVoltage: 0, seriesResistance: 0, capacitance: 0 })
    expect(faultInStage(bare)).toBeNull()
    expect(solveStage(bare).verdict).toBe('stays dark')
  })

  it('never keeps a sound stage from being solved', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        expect(faultInStage(stage)).toBeNull()
        expect(() => solveStage(stage)).not.toThrow()
      }),
      { seed: 102, numRuns: 500 },
    )
  })
})

describe('the capacitance in force', () => {
  it('is the capacitor fitted', () => {
    expect(effectiveCapacitance(stageOf({ capacitance: 1e-12 }))).toBe(1e-12)
    expect(solveStage(stageOf()).strayOnly).toBe(false)
  })

  it('is the stray capacitance where none is fitted, 10 pF unless told', () => {
    expect(defaultStrayCapacitance).toBe(10e-12)
    expect(effectiveCapacitance(stageOf({ capacitance: 0 }))).toBe(10e-12)
    expect(effectiveCapacitance(stageOf({ capacitance: 0, strayCapacitance: 3e-12 }))).toBe(3e-12)
    const bare = solveStage(stageOf({ capacitance: 0 }))
    expect(bare.strayOnly).toBe(true)
    expect(bare.capacitance).toBe(10e-12)
  })

  it('counts alone: a fitted capacitor of the same size flashes at the same rate', () => {
    const bare = solveStage(stageOf({ capacitance: 0 })).cycle
    const fitted = solveStage(stageOf({ capacitance: 10e-12 })).cycle
    expect(bare?.period).toBeGreaterThan(0)
    expect(bare?.period).toBe(fitted?.period)
  })
})

describe('the resistance that feeds the capacitor', () => {
  it('is source and series together', () => {
    expect(feedResistance(stageOf({ sourceResistance: 300, seriesResistance: 700 }))).toBe(1000)
  })

  it('is never quite nothing', () => {
    expect(feedResistance(stageOf({ sourceResistance: 0, seriesResistance: 0 }))).toBe(
      leastResistance,
    )
    expect(leastResistance).toBe(1e-6)
  })

  it('sets the cycle, however it is divided', () => {
    const whole = solveStage(stageOf()).cycle
    const shared = solveStage(stageOf({ sourceResistance: 0.7e6, seriesResistance: 1.5e6 })).cycle
    expect(shared?.period).toBe(whole?.period)
    expect(shared?.meanSourcePower).toBeCloseTo(((whole?.meanSeriesPower ?? 0) * 0.7) / 2.2, 15)
  })
})
