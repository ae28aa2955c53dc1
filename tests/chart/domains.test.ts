import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { planeDomain, timeDomain, voltageDomain } from '../../src/chart/domains'
import { traceOf } from '../../src/chart/traceOf'
import { branchesOf, equivalentSource, kneeIndexOf, loadLineOf, solveStage } from '../../src/core'
import { anyDesign } from '../io/any-design'
import { stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'
import { kinds } from './drawing'

const pathOf = (stage: Parameters<typeof solveStage>[0]) =>
  branchesOf(stage.lamp.knots, stage.leadResistance)

describe('voltageDomain', () => {
  it('begins at 0 V and reaches past supply and knee', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const path = pathOf(stage)
        const [from, to] = voltageDomain(stage, path)
        expect(from).toBe(0)
        expect(to).toBeGreaterThan(1.09 * stage.supplyVoltage)
        const knee = kneeIndexOf(stage.lamp.knots)!
        expect(to).toBeGreaterThan(path.level[knee]!)
      }),
      { seed: 731 },
    )
  })

  it('is not stretched by a steep glow branch that runs out of sight', () => {
    const steep = stageOf({ leadResistance: 100e3 })
    expect(voltageDomain(steep, pathOf(steep))[1]).toBeLessThan(200)
  })

  it('has a volt at least, whatever the design', () => {
    fc.assert(
      fc.property(anyDesign, ({ stage }) => {
        const [from, to] = voltageDomain(stage, pathOf(stage))
        expect(from).toBe(0)
        expect(to).toBeGreaterThanOrEqual(1)
        expect(Number.isFinite(to)).toBe(true)
      }),
      { seed: 732 },
    )
  })
})

describe('planeDomain', () => {
  it('runs, when logarithmic, from 10 nA or less at the knee’s left to beyond the characteristic', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const path = pathOf(stage)
        const [low, high] = planeDomain('logarithmic', stage, path)
        expect(low).toBeLessThanOrEqual(1e-8)
        expect(low).toBeLessThan(path.current[kneeIndexOf(stage.lamp.knots)!]!)
        expect(high).toBeGreaterThan(path.current.at(-1)!)
      }),
      { seed: 733 },
    )
  })

  it('reaches, when logarithmic, so far down that a load line of the highest resistance is in sight', () => {
    const stage = stageOf({ supplyVoltage: 120, seriesResistance: 1e13 })
    const [low] = planeDomain('logarithmic', stage, pathOf(stage))
    expect(low).toBeLessThan(12e-12 / 2)
  })

  it('runs, when linear, from 0 to 1.6 times what the load line passes at 0 V', () => {
    const stage = stageOf({ supplyVoltage: 120, seriesResistance: 1e6 })
    const [from, to] = planeDomain('linear', stage, pathOf(stage))
    expect(from).toBe(0)
    expect(to).toBeCloseTo(1.6 * 120e-6, 12)
  })

  it('ends, when linear, at three times the last current, however much the supply could give', () => {
    const stage = stageOf({ supplyVoltage: 150, seriesResistance: 100 })
    expect(planeDomain('linear', stage, pathOf(stage))).toEqual([0, 24e-3])
  })

  it('is a rising range of finite currents for every design', () => {
    fc.assert(
      fc.property(anyDesign, fc.constantFrom(...kinds), ({ stage }, kind) => {
        const [from, to] = planeDomain(kind, stage, pathOf(stage))
        expect(to).toBeGreaterThan(from)
        expect(Number.isFinite(to)).toBe(true)
        if (kind === 'logarithmic') expect(from).toBeGreaterThanOrEqual(1e-16)
      }),
      { seed: 734 },
    )
  })
})

describe('timeDomain', () => {
  const flasher = stageOf()
  const solution = solveStage(flasher)
  const cycle = solution.cycle!

  it('shows two and a quarter cycles, no more than the trace holds', () => {
    const { length } = traceOf(flasher, solution, 'cycles')
    expect(timeDomain('cycles', solution, length)).toEqual([0, 2.25 * cycle.period])
    expect(2.25 * cycle.period).toBeLessThan(length)
  })

  it('shows one flash from a little before the strike to a little after extinction', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const solved = solveStage(stage)
        fc.pre(solved.cycle?.phases[0]?.kind === 'dark')
        const trace = traceOf(stage, solved, 'flash')
        const [from, to] = timeDomain('flash', solved, trace.length)
        const first = trace.moments.find((moment) => moment.lit)!
        const { period, glowTime } = solved.cycle!
        expect(from).toBeLessThan(first.time)
        expect(to).toBeGreaterThan(first.time + glowTime * 0.999)
        expect((to - from) / (1.32 * glowTime)).toBeCloseTo(1, 6)
        expect(to).toBeLessThan(trace.length)
        expect(first.time).toBeLessThanOrEqual(period)
      }),
      { seed: 735, numRuns: 200 },
    )
  })

  it('shows all there is from switch-on, and where nothing flashes', () => {
    expect(timeDomain('switch-on', solution, 3.5)).toEqual([0, 3.5])
    const dark = solveStage(stageOf({ supplyVoltage: 60 }))
    for (const span of ['cycles', 'flash', 'switch-on'] as const) {
      expect(timeDomain(span, dark, 7)).toEqual([0, 7])
    }
  })

  it('tells supply and leakage apart: the linear axis follows the Thévenin source', () => {
    const leaky = stageOf({ leakageResistance: 2.2e6 })
    const source = equivalentSource(loadLineOf(leaky))
    const [, to] = planeDomain('linear', leaky, pathOf(leaky))
    expect(to).toBeCloseTo((1.6 * source.voltage) / source.resistance, 12)
  })
})
