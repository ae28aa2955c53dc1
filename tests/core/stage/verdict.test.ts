import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { branchesOf, type Stage, solveStage, type Window } from '../../../src/core/index'
import { meanWait, paceOf } from '../../../src/core/stage/solveStage'
import { supplyWindows } from '../../../src/core/stage/windows'
import { byRatio, closeSpread, evenly, stages } from '../../support/lampArbitrary'
import { simulateJumps } from '../../support/simulateJumps'
import { simulateSmooth, slopesOf } from '../../support/simulateSmooth'
import { knotsOf, stageOf } from '../../support/stages'

const near = (value: number, windows: readonly Window[], part: number) =>
  windows.some(
    ({ min, max }) => Math.abs(value / min - 1) < part || Math.abs(value / max - 1) < part,
  )

/** Within a per cent of an edge, where a simulation with a small inductance or in steps may fall off it. */
function nearAnEdge(stage: Stage): boolean {
  const { windows, operatingPoints, leastCapacitance } = solveStage(stage)
  const path = branchesOf(stage.lamp.knots, stage.leadResistance)
  const supplies = supplyWindows(path, paceOf(stage, meanWait(stage.lamp.strikeDelay)))
  const total = windows.map(({ min, max }) => ({
    min: min + stage.sourceResistance,
    max: max + stage.sourceResistance,
  }))
  const levels = path.level.slice(1)
  return (
    near(stage.seriesResistance + stage.sourceResistance, total, 0.01) ||
    near(stage.supplyVoltage, supplies, 0.01) ||
    (leastCapacitance !== null && Math.abs(stage.capacitance / leastCapacitance - 1) < 0.05) ||
    // A crossing within a per cent of a knot, and folds within two per cent of one level, as well.
    operatingPoints.some((point) =>
      stage.lamp.knots.some((knot) => Math.abs(point.current / knot.current - 1) < 0.01),
    ) ||
    levels.some((a, n) => levels.slice(n + 1).some((b) => a !== b && Math.abs(a / b - 1) < 0.02))
  )
}

describe('the verdict', () => {
  it('is what brute force on the smooth model sees, from switch-on and from lit', () => {
    const seen: Record<string, number> = {}
    fc.assert(
      fc.property(stages({ recovery: false, delay: false, spread: closeSpread }), (stage) => {
        const { steepestFall, shallowest } = slopesOf(stage)
        // One inductance must be small for every slope, and the steps then not too many: no flat runs, and
        // slopes and resistance within some decades of each other.
        fc.pre(steepestFall > 0 && steepestFall * stage.seriesResistance < 150 * shallowest ** 2)
        fc.pre(!nearAnEdge(stage))
        const verdict = solveStage(stage).verdict
        const end = stage.lamp.knots.at(-1) ?? { current: 0, voltage: 0 }
        const top = end.voltage + stage.leadResistance * end.current
        const dark = simulateSmooth(stage)
        const found =
          dark === 'stays dark' &&
          simulateSmooth(stage, { voltage: top, current: end.current * 0.999 }) === 'stays lit'
            ? 'latches'
            : dark
        seen[verdict] = (seen[verdict] ?? 0) + 1
        expect(found).toBe(verdict)
      }),
      { seed: 151, numRuns: 250, endOnFailure: true },
    )
    expect(Object.keys(seen).sort()).toEqual([
      'flashes',
      'latches',
      'over range',
      'stays dark',
      'stays lit',
    ])
    expect(seen.flashes).toBeGreaterThan(50)
  })

  it('is what brute force with recovery and strike delay sees, and so is the period', () => {
    const seen: Record<string, number> = {}
    let periods = 0
    fc.assert(
      fc.property(
        stages({ recovery: false, delay: false, spread: closeSpread }),
        evenly(0, 2),
        byRatio(0.003, 0.5),
        evenly(-1, 1),
        byRatio(0.003, 0.3),
        (drawn, recovers, recovery, waits, delay) => {
          const tau = drawn.seriesResistance * drawn.capacitance
          const stage: Stage = {
            ...drawn,
            lamp: {
              ...drawn.lamp,
              recoveryTime: recovers > 0.5 ? recovery * tau : 0,
              strikeDelay: waits > 0 ? delay * tau : 0,
            },
          }
          const path = branchesOf(stage.lamp.knots, stage.leadResistance)
          fc.pre(path.top.length === 2 && !nearAnEdge(stage))
          const flat = path.level.some((level, n) => n > 0 && level === path.level[n - 1])
          fc.pre(!flat)
          const { verdict, cycle } = solveStage(stage)
          const run = simulateJumps(stage, 5e-3)
          const code = solveStage(stage).reason.code
          seen[code] = (seen[code] ?? 0) + 1
          expect(run.seen).toBe(
            verdict === 'flashes' || verdict === 'over range' ? verdict : 'rests',
          )
          if (cycle === null || cycle.highVoltage - cycle.lowVoltage < 5) return
          periods++
          expect(Math.abs(run.period / cycle.period - 1)).toBeLessThan(3e-3)
          expect(Math.abs(run.highVoltage - cycle.highVoltage)).toBeLessThan(0.02)
        },
      ),
      { seed: 152, numRuns: 400, endOnFailure: true },
    )
    expect(periods).toBeGreaterThan(50)
    expect(seen['cannot recover']).toBeGreaterThan(3)
    expect(seen['strike beyond the data']).toBeGreaterThan(3)
  })
})

describe('each verdict, by hand', () => {
  const knots = knotsOf([0, 0], [1e-6, 80], [1e-4, 60], [1e-3, 100])
  const solve = (supplyVoltage: number, seriesResistance: number, more = {}) =>
    solveStage(stageOf({ knots, supplyVoltage, seriesResistance, ...more }))

  it('flashes: 20 µA at strike, 30 µA at extinction voltage', () => {
    expect(solve(120, 2e6)).toMatchObject({
      verdict: 'flashes',
      reason: {
        code: 'between knee and valley',
        strike: { voltage: 80, current: 1e-6 },
        extinction: { voltage: 60, current: 1e-4 },
        currentAtStrike: 2e-5,
        currentAtExtinction: 3e-5,
        remedies: [],
      },
    })
  })

  it('stays dark: the supply is short of strike voltage, exactly equal included', () => {
    expect(solve(79, 2e6)).toMatchObject({
      verdict: 'stays dark',
      cycle: null,
      reason: { code: 'supply below strike' },
    })
    expect(solve(80, 2e6).reason.code).toBe('supply below strike')
    expect(solve(0, 2e6).reason.code).toBe('supply below strike')
  })

  it('stays dark: leakage halves what the supply gives', () => {
    expect(solve(120, 2e6, { leakageResistance: 2e6 })).toMatchObject({
      verdict: 'stays dark',
      reason: { code: 'leakage holds it below strike' },
    })
  })

  it('stays dark: 0.8 µA where the knee wants 1 µA', () => {
    expect(solve(120, 50e6)).toMatchObject({
      verdict: 'stays dark',
      reason: { code: 'too little current at the knee', currentAtStrike: 8e-7 },
    })
  })

  it('stays lit: 120 µA where the valley holds down to 100 µA', () => {
    expect(solve(120, 0.5e6)).toMatchObject({
      verdict: 'stays lit',
      reason: { code: 'too much current at the valley' },
    })
    expect(solve(120, 0.5e6).reason.currentAtExtinction).toBeCloseTo(1.2e-4, 15)
  })

  it('latches: dark at 79 V, though lit it would go on', () => {
    const solution = solve(79, 60e3)
    expect(solution).toMatchObject({ verdict: 'latches', reason: { code: 'two rests' } })
  })

  it('over range: the strike lands beyond 75 V, where the data ends', () => {
    const short = knotsOf([0, 0], [1e-6, 80], [1e-4, 60], [1e-3, 75])
    expect(solve(120, 2e6, { knots: short })).toMatchObject({
      verdict: 'over range',
      reason: { code: 'strike beyond the data' },
    })
  })

  it('over range: the current climbs past 1 mA', () => {
    expect(solve(120, 10e3)).toMatchObject({
      verdict: 'over range',
      reason: { code: 'current beyond the data' },
    })
  })

  it('names the branch it goes round where there are several', () => {
    const two = knotsOf([0, 0], [4e-3, 90], [12e-3, 45], [20e-3, 70], [30e-3, 50], [80e-3, 120])
    const upper = solve(180, 5e3, { knots: two })
    expect(upper).toMatchObject({
      verdict: 'flashes',
      reason: { extinction: { voltage: 50, current: 30e-3 } },
    })
  })
})
