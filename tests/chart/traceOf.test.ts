import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { traceOf } from '../../src/chart/traceOf'
import { momentAt, type Solution, type Stage, solveStage } from '../../src/core'
import { stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'
import { anyStage, extremeStages } from './drawing'

const spans = ['cycles', 'flash', 'switch-on'] as const
const both = (stage: Stage): [Stage, Solution] => [stage, solveStage(stage)]
const feedOf = (stage: Stage) => ({
  supplyVoltage: stage.supplyVoltage,
  feedResistance: stage.sourceResistance + stage.seriesResistance,
  leadResistance: stage.leadResistance,
})

describe('traceOf', () => {
  it('lays three cycles end to end', () => {
    const [stage, solution] = both(stageOf())
    const trace = traceOf(stage, solution, 'cycles')
    const period = solution.cycle!.period
    expect(trace.length).toBeCloseTo(3 * period, 12)
    expect(trace.loop).toEqual({ from: 0, to: period })
    expect(traceOf(stage, solution, 'flash')).toEqual(trace)
  })

  it('begins at switch-on with the capacitor empty, when asked', () => {
    const [stage, solution] = both(stageOf())
    const { moments } = traceOf(stage, solution, 'switch-on')
    expect(moments[0]).toMatchObject({ time: 0, voltage: 0, lampCurrent: 0, lit: false })
    const strike = moments.find((moment) => moment.lit)!
    expect(strike.time).toBeCloseTo(solution.cycle!.firstStrike, 9)
  })

  it('runs on in time, with no jump of the voltage anywhere', () => {
    fc.assert(
      fc.property(stages(), fc.constantFrom(...spans), (stage, span) => {
        const { moments, phases } = traceOf(stage, solveStage(stage), span)
        expect(moments.every((moment, k) => moment.time >= (moments[k - 1]?.time ?? 0))).toBe(true)
        for (const [k, phase] of phases.slice(1).entries()) {
          expect(phase.from / phases[k]!.to).toBeCloseTo(1, 9)
        }
      }),
      { seed: 741, numRuns: 150 },
    )
  })

  it('comes back, where it loops, to the state it set out from', () => {
    fc.assert(
      fc.property(stages(), fc.constantFrom(...spans), (stage, span) => {
        const solution = solveStage(stage)
        const { loop, phases, length } = traceOf(stage, solution, span)
        expect(loop === null).toBe(solution.cycle === null)
        if (loop === null) return
        expect(loop.from).toBeGreaterThanOrEqual(-1e-9 * length)
        expect(loop.to).toBeLessThanOrEqual(length * (1 + 1e-9))
        expect((loop.to - loop.from) / solution.cycle!.period).toBeCloseTo(1, 6)
        const middle = (loop.to - loop.from) / 2
        const first = momentAt(phases, feedOf(stage), loop.from + middle)!
        const next = momentAt(phases, feedOf(stage), loop.to + middle)!
        expect(next.voltage / first.voltage).toBeCloseTo(1, 6)
      }),
      { seed: 742, numRuns: 300 },
    )
  })

  it('follows a stage that does not flash to where it rests', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const solution = solveStage(stage)
        fc.pre(['stays dark', 'stays lit', 'latches'].includes(solution.verdict))
        const { moments, length } = traceOf(stage, solution, 'switch-on')
        const end = moments.at(-1)!
        const rest = solution.fromSwitchOn.at(-1)!
        expect(end.time / length).toBeCloseTo(1, 9)
        // Six time constants: all but a 400th of the last approach.
        expect(Math.abs(end.voltage - rest.to)).toBeLessThanOrEqual(
          Math.abs(rest.from - rest.to) / 400 + 1e-9 * rest.to,
        )
      }),
      { seed: 743, numRuns: 300 },
    )
  })

  it.each(extremeStages)('has 2 to 1000 moments and no end in the infinite: %s', (_, stage) => {
    for (const span of spans) {
      const { moments, length } = traceOf(stage, solveStage(stage), span)
      expect(length).toBeGreaterThan(0)
      expect(Number.isFinite(length)).toBe(true)
      expect(moments.length).toBeGreaterThanOrEqual(2)
      // The light is drawn there and back: twice as many points, and 2000 are what a path may have.
      expect(moments.length).toBeLessThanOrEqual(1000)
    }
  })

  it('holds no number that is none, for any design', () => {
    fc.assert(
      fc.property(anyStage, fc.constantFrom(...spans), (stage, span) => {
        const { moments, length } = traceOf(stage, solveStage(stage), span)
        expect(Number.isFinite(length)).toBe(true)
        expect(moments.length).toBeLessThanOrEqual(1000)
        expect(
          moments.filter(
            ({ time, voltage, lampCurrent }) => !Number.isFinite(time + voltage + lampCurrent),
          ),
        ).toEqual([])
      }),
      { seed: 744, numRuns: 300 },
    )
  })
})
