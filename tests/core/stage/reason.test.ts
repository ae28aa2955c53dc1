import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { branchesOf, type Remedy, type Stage, solveStage } from '../../../src/core/index'
import { byRatio, stages } from '../../support/lampArbitrary'
import { knotsOf, stageOf } from '../../support/stages'

/** The stage with a remedy taken this far past its limits. */
function cured(stage: Stage, remedy: Remedy, past: number): Stage {
  const changed: Record<string, number> = {}
  for (const { quantity, sense, value } of remedy) {
    changed[quantity] = sense === 'at least' ? value * (1 + past) : value / (1 + past)
  }
  return { ...stage, ...changed }
}

const flashes = (stage: Stage) => solveStage(stage).verdict === 'flashes'

describe('remedies', () => {
  it('cure: a per cent past the limit it flashes, unless it flashes nearer only, the window being narrower', () => {
    const tried: Record<string, number> = {}
    let narrow = 0
    fc.assert(
      fc.property(stages(), (stage) => {
        for (const remedy of solveStage(stage).reason.remedies) {
          const name = remedy.map((change) => `${change.quantity} ${change.sense}`).join(' and ')
          tried[name] = (tried[name] ?? 0) + 1
          if (flashes(cured(stage, remedy, 0.01))) continue
          narrow++
          const nearer = [1e-3, 1e-4, 1e-5, 1e-6].some((past) =>
            flashes(cured(stage, remedy, past)),
          )
          expect(nearer).toBe(true)
        }
      }),
      { seed: 181, numRuns: 3000 },
    )
    const all = Object.values(tried).reduce((sum, count) => sum + count, 0)
    expect(narrow).toBeLessThan(0.03 * all)
    for (const name of [
      'supplyVoltage at least',
      'supplyVoltage at most',
      'seriesResistance at least',
      'seriesResistance at most',
      'seriesResistance at least and supplyVoltage at least',
      'leakageResistance at least',
      'capacitance at least',
    ]) {
      expect(tried[name], name).toBeGreaterThan(10)
    }
  })

  it('do not cure short of the limit', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        for (const remedy of solveStage(stage).reason.remedies) {
          // Of a pair, either change may be more than is needed.
          if (remedy.length > 1) continue
          const change = remedy[0]
          if (change?.quantity === 'leadResistance') continue
          expect(flashes(cured(stage, remedy, -1e-6))).toBe(false)
        }
      }),
      { seed: 182, numRuns: 1000 },
    )
  })

  it('are none where it flashes, and come with the smallest change first', () => {
    fc.assert(
      fc.property(stages({ delay: false }), (stage) => {
        const { verdict, reason } = solveStage(stage)
        if (verdict === 'flashes') expect(reason.remedies).toEqual([])
        const sizes = reason.remedies.map(([change]) => {
          if (change === undefined || change.quantity === 'seriesResistance') return null
          return Math.abs(Math.log(change.value / stage[change.quantity]))
        })
        const known = sizes.filter((size) => size !== null)
        expect(known).toEqual([...known].sort((a, b) => a - b))
      }),
      { seed: 183, numRuns: 800 },
    )
  })

  it('of a lead resistor that straightens the fall cure too, and are none where less of it would not', () => {
    let offered = 0
    let none = 0
    fc.assert(
      fc.property(stages({ lead: false }), byRatio(1.1, 100), (drawn, ratio) => {
        const slopes = drawn.lamp.knots.slice(1).map((right, n) => {
          const left = drawn.lamp.knots[n] ?? right
          return (left.voltage - right.voltage) / (right.current - left.current)
        })
        const stage = { ...drawn, leadResistance: Math.max(...slopes) * ratio }
        const { verdict, reason } = solveStage(stage)
        if (reason.code !== 'no falling region') return
        expect(verdict).not.toBe('flashes')
        const limits = reason.remedies.flat()
        if (limits.length === 0) {
          none++
          // Then none of many smaller ones makes it flash, a hundredth more or less included.
          for (let n = 0; n < 60; n++) {
            const lead = Math.max(...slopes) * (1 - n / 60)
            const band = [0.99, 1, 1.01].map((part) => ({ ...stage, leadResistance: lead * part }))
            expect(band.every(flashes)).toBe(false)
          }
          return
        }
        offered++
        expect(flashes(cured(stage, limits, 0.01))).toBe(true)
      }),
      { seed: 184, numRuns: 600 },
    )
    expect(offered).toBeGreaterThan(20)
    expect(none).toBeGreaterThan(20)
  })

  it('respect what the source takes: with a source of its own a stage is cured by less series resistance', () => {
    const lit = solveStage(stageOf({ sourceResistance: 300e3, seriesResistance: 33e3 }))
    const alone = solveStage(stageOf({ seriesResistance: 333e3 }))
    const value = (solution: typeof lit) =>
      solution.reason.remedies.flat().find((change) => change.quantity === 'seriesResistance')
    expect(value(lit)?.value).toBeCloseTo((value(alone)?.value ?? 0) - 300e3, 3)
  })

  it('change resistor and supply together where neither alone will do', () => {
    // At 60 V it never strikes with any resistor; at 100 Ω no supply avoids the valley.
    const stage = stageOf({ supplyVoltage: 60, seriesResistance: 100 })
    const { remedies } = solveStage(stage).reason
    expect(remedies).toHaveLength(1)
    expect(remedies[0]?.map((change) => change.quantity)).toEqual([
      'seriesResistance',
      'supplyVoltage',
    ])
    expect(flashes(cured(stage, remedies[0] ?? [], 0.01))).toBe(true)
  })

  it('change both so far that the lamp can recover as well', () => {
    const stage = stageOf({
      supplyVoltage: 60,
      seriesResistance: 100,
      capacitance: 1e-9,
      recoveryTime: 1e-3,
    })
    const { remedies } = solveStage(stage).reason
    expect(remedies).toHaveLength(1)
    expect(remedies[0]).toHaveLength(2)
    expect(flashes(cured(stage, remedies[0] ?? [], 0.01))).toBe(true)
  })
})

describe('the reason', () => {
  it('goes with the verdict', () => {
    const allowed: Record<string, readonly string[]> = {
      flashes: ['between knee and valley'],
      'stays dark': [
        'supply below strike',
        'leakage holds it below strike',
        'too little current at the knee',
      ],
      'stays lit': ['too much current at the valley', 'cannot recover', 'no falling region'],
      latches: ['two rests'],
      'over range': ['strike beyond the data', 'current beyond the data'],
    }
    fc.assert(
      fc.property(stages(), (stage) => {
        const { verdict, reason } = solveStage(stage)
        expect(allowed[verdict]).toContain(reason.code)
      }),
      { seed: 185, numRuns: 1500 },
    )
  })

  it('says truly what flows at strike and at extinction voltage', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const { reason, verdict } = solveStage(stage)
        const path = branchesOf(stage.lamp.knots, stage.leadResistance)
        expect(reason.strike?.voltage).toBe(path.level[path.top[0] as number])
        if (path.top.length !== 2 || reason.strike === null || reason.extinction === null) return
        if (verdict === 'flashes') {
          expect(reason.currentAtStrike).toBeGreaterThan(reason.strike.current)
          expect(reason.currentAtExtinction).toBeLessThan(reason.extinction.current)
        }
        if (reason.code === 'too much current at the valley') {
          expect(reason.currentAtExtinction).toBeGreaterThanOrEqual(reason.extinction.current)
        }
        if (reason.code === 'too little current at the knee') {
          expect(reason.currentAtStrike).toBeLessThanOrEqual(reason.strike.current)
        }
      }),
      { seed: 186, numRuns: 1000 },
    )
  })

  it('of a lamp whose data ends in the fall is not that it has none', () => {
    const knots = knotsOf([0, 0], [0.2e-6, 75], [90e-6, 55])
    const dark = solveStage(stageOf({ knots, supplyVoltage: 70 }))
    expect(dark.verdict).toBe('stays dark')
    expect(dark.reason).toMatchObject({
      code: 'supply below strike',
      strike: { voltage: 75, current: 0.2e-6 },
      extinction: null,
    })
    expect(solveStage(stageOf({ knots })).reason.code).toBe('strike beyond the data')
  })

  it('of a rest where a lead resistor has straightened the first of two falls is that', () => {
    const knots = knotsOf([0, 0], [1e-3, 70], [2e-3, 65], [3e-3, 80], [4e-3, 30], [9e-3, 120])
    const solution = solveStage(
      stageOf({ knots, leadResistance: 6e3, seriesResistance: 18e3, supplyVoltage: 125 }),
    )
    expect(solution.verdict).toBe('stays lit')
    expect(solution.reason.code).toBe('no falling region')
  })
})
