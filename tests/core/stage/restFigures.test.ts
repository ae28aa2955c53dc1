import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { restFigures, solveStage } from '../../../src/core/index'
import { stages } from '../../support/lampArbitrary'
import { stageOf } from '../../support/stages'

describe('the figures of a rest', () => {
  it('balance: the supply gives what lamp, resistors and leakage take', () => {
    let rests = 0
    fc.assert(
      fc.property(stages(), (stage) => {
        const { operatingPoints, verdict } = solveStage(stage)
        const point = operatingPoints.find((found) => found.stable)
        if (point === undefined || verdict === 'flashes' || verdict === 'over range') return
        rests++
        const figures = restFigures(stage, point)
        const leaked = figures.capacitorVoltage / stage.leakageResistance
        const scale = stage.supplyVoltage / (stage.sourceResistance + stage.seriesResistance)
        expect(Math.abs(figures.lampCurrent + leaked - figures.supplyCurrent)).toBeLessThan(
          1e-9 * scale,
        )
        const used =
          figures.lampPower +
          figures.seriesPower +
          figures.supplyCurrent ** 2 * stage.sourceResistance +
          figures.lampCurrent ** 2 * stage.leadResistance +
          leaked * figures.capacitorVoltage
        expect(Math.abs(used - figures.supplyPower)).toBeLessThan(
          1e-9 * scale * stage.supplyVoltage,
        )
      }),
      { seed: 195, numRuns: 600 },
    )
    expect(rests).toBeGreaterThan(100)
  })

  it('of an indicator: about 2.7 mA from 150 V through 33 kΩ', () => {
    // By hand: the glow branch from 60 V at 0.6 mA to 84 V at 8 mA is 3.24 kΩ on 58.05 V.
    const stage = stageOf({ supplyVoltage: 150, seriesResistance: 33e3 })
    const point = solveStage(stage).operatingPoints.find((found) => found.stable)
    if (point === undefined) throw new Error('It should rest.')
    const slope = 24 / 7.4e-3
    const current = (150 - (60 - slope * 0.6e-3)) / (33e3 + slope)
    expect(restFigures(stage, point).lampCurrent).toBeCloseTo(current, 12)
    expect(restFigures(stage, point).seriesPower).toBeCloseTo(current ** 2 * 33e3, 9)
  })
})
