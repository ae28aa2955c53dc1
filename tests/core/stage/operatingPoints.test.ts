import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  branchesOf,
  lampVoltageAt,
  loadCurrent,
  loadLineOf,
  type Stage,
  solveStage,
} from '../../../src/core/index'
import { stages } from '../../support/lampArbitrary'
import { knotsOf, stageOf } from '../../support/stages'

/** Crossings counted from changes of sign over a fine walk along the characteristic. */
function crossingsWalked(stage: Stage): number {
  const { current, level } = branchesOf(stage.lamp.knots, stage.leadResistance)
  const line = loadLineOf(stage)
  let count = 0
  let before = loadCurrent(line, 0) >= 0
  for (let k = 0; k + 1 < current.length; k++) {
    for (let n = 1; n <= 50; n++) {
      const part = n / 50
      const i = (current[k] as number) * (1 - part) + (current[k + 1] as number) * part
      const v = (level[k] as number) * (1 - part) + (level[k + 1] as number) * part
      const above = loadCurrent(line, v) - i > 0
      if (above !== before) count++
      before = above
    }
  }
  return count
}

describe('operating points', () => {
  const knots = knotsOf([0, 0], [1e-6, 80], [1e-4, 60], [1e-3, 100])

  it('are one in the falling region, which cannot hold, where the stage flashes', () => {
    const points = solveStage(stageOf({ knots, seriesResistance: 2e6 })).operatingPoints
    expect(points).toHaveLength(1)
    expect(points[0]).toMatchObject({ stable: false, lit: true })
  })

  it('are three where it latches: dark, falling and lit', () => {
    const solution = solveStage(stageOf({ knots, supplyVoltage: 79, seriesResistance: 60e3 }))
    expect(solution.verdict).toBe('latches')
    expect(solution.operatingPoints.map((point) => [point.stable, point.lit])).toEqual([
      [true, false],
      [false, true],
      [true, true],
    ])
  })

  it('are one at nothing without supply', () => {
    const points = solveStage(stageOf({ knots, supplyVoltage: 0 })).operatingPoints
    expect(points).toMatchObject([{ current: 0, voltage: 0, capacitorVoltage: 0, stable: true }])
  })

  it('count one at the valley itself once, and it holds', () => {
    // The load line passes 60 V at 100 µA.
    const solution = solveStage(stageOf({ knots, supplyVoltage: 120, seriesResistance: 600e3 }))
    expect(solution.operatingPoints).toHaveLength(1)
    expect(solution.operatingPoints[0]?.current).toBeCloseTo(1e-4, 12)
    expect(solution.operatingPoints[0]?.stable).toBe(true)
    expect(solution.verdict).toBe('stays lit')
  })

  it('count one at a knot within the falling region once, and it does not', () => {
    // The load line passes 70 V at 50 µA.
    const bent = knotsOf([0, 0], [1e-6, 80], [5e-5, 70], [1e-4, 40], [1e-3, 100])
    const points = solveStage(
      stageOf({ knots: bent, supplyVoltage: 75, seriesResistance: 100e3 }),
    ).operatingPoints
    expect(points).toHaveLength(3)
    expect(points[1]).toMatchObject({ stable: false, voltage: 70 })
  })

  it('can rest in a flat piece of the glow branch', () => {
    const flat = knotsOf([0, 0], [1e-6, 80], [1e-4, 60], [1e-3, 60], [2e-3, 100])
    const solution = solveStage(stageOf({ knots: flat, seriesResistance: 120e3 }))
    expect(solution.verdict).toBe('stays lit')
    expect(solution.operatingPoints).toHaveLength(1)
    expect(solution.operatingPoints[0]).toMatchObject({ stable: true, lit: true, voltage: 60 })
    expect(solution.operatingPoints[0]?.current).toBeCloseTo(0.5e-3, 12)
  })

  it('lie on the characteristic and on the load line, and none is missed', () => {
    fc.assert(
      fc.property(stages({ recovery: false }), (stage) => {
        const line = loadLineOf(stage)
        const { operatingPoints } = solveStage(stage)
        for (const point of operatingPoints) {
          const across = lampVoltageAt(stage.lamp.knots, point.current) as number
          const drop = stage.leadResistance * point.current
          expect(Math.abs(across - point.voltage)).toBeLessThan(1e-9 * (across + drop))
          expect(Math.abs(point.voltage + drop - point.capacitorVoltage)).toBeLessThan(
            1e-9 * (across + drop),
          )
          const scale = line.voltage / line.resistance + point.current
          expect(Math.abs(loadCurrent(line, point.capacitorVoltage) - point.current)).toBeLessThan(
            1e-9 * scale,
          )
        }
        expect(operatingPoints.length).toBe(crossingsWalked(stage))
      }),
      { seed: 106, numRuns: 600 },
    )
  })

  it('cannot hold where an odd number lie on either side', () => {
    let threes = 0
    fc.assert(
      fc.property(stages({ recovery: false }), (stage) => {
        const { operatingPoints } = solveStage(stage)
        if (operatingPoints.length === 3) threes++
        for (let k = 1; k + 1 < operatingPoints.length; k += 2) {
          expect(operatingPoints[k]?.stable).toBe(false)
        }
      }),
      { seed: 107, numRuns: 600 },
    )
    expect(threes).toBeGreaterThan(5)
  })
})
