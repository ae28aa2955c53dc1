import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  type Cycle,
  momentAt,
  type Stage,
  sampleCycle,
  solveStage,
  tracePhases,
} from '../../../src/core/index'
import { evenly, stages } from '../../support/lampArbitrary'
import { knotsOf, stageOf } from '../../support/stages'

function cycleOf(stage: Stage): Cycle {
  const { cycle, reason } = solveStage(stage)
  if (cycle === null) throw new Error(`No cycle: ${reason.code}`)
  return cycle
}

const delayed = stageOf({ strikeDelay: 0.02, leadResistance: 2e3, leakageResistance: 50e6 })

describe('the moment at a time', () => {
  const cycle = cycleOf(delayed)

  it('is that of the phase that holds it, the later one where two meet', () => {
    let start = 0
    for (const phase of cycle.phases) {
      const moment = momentAt(cycle.phases, cycle, start)
      expect(moment?.voltage).toBeCloseTo(phase.from, 9)
      expect(moment?.lit).toBe(phase.kind === 'glow')
      start += phase.duration
    }
  })

  it('is the last of the last phase beyond their end, and none of no phases', () => {
    const last = momentAt(cycle.phases, cycle, cycle.period * 2)
    expect(last?.voltage).toBe(cycle.lowVoltage)
    expect(last?.time).toBeCloseTo(cycle.period, 12)
    expect(momentAt([], cycle, 0)).toBeNull()
  })

  it('obeys the circuit: supply current through the feed, lead resistor’s drop, capacitor’s voltage', () => {
    fc.assert(
      fc.property(stages(), evenly(0, 1), (stage, part) => {
        const found = solveStage(stage).cycle
        if (found === null) return
        const moment = momentAt(found.phases, found, found.period * part)
        if (moment === null) throw new Error('A cycle has moments.')
        const feed = stage.sourceResistance + stage.seriesResistance
        const scale = stage.supplyVoltage
        expect(
          Math.abs(moment.supplyCurrent * feed + moment.voltage - stage.supplyVoltage),
        ).toBeLessThan(1e-12 * scale)
        expect(
          Math.abs(moment.lampVoltage + stage.leadResistance * moment.lampCurrent - moment.voltage),
        ).toBeLessThan(1e-12 * scale)
      }),
      { seed: 191, numRuns: 500 },
    )
  })

  it('changes as capacitor and currents say: C·dv/dt is what lamp and leakage leave', () => {
    let start = 0
    for (const phase of cycle.phases) {
      const time = start + phase.duration / 2
      const step = phase.duration / 1e4
      const [a, b, c] = [time - step, time, time + step].map((t) =>
        momentAt(cycle.phases, cycle, t),
      )
      start += phase.duration
      if (!a || !b || !c) throw new Error('A cycle has moments.')
      const rate = (c.voltage - a.voltage) / (2 * step)
      const spare = b.supplyCurrent - b.voltage / 50e6 - b.lampCurrent
      expect((delayed.capacitance * rate) / spare).toBeCloseTo(1, 5)
    }
  })
})

describe('samples of a cycle', () => {
  const cycle = cycleOf(delayed)

  it.each([0, 1, -3, Number.NaN])('are none when %d are asked for', (count) => {
    expect(sampleCycle(cycle, count)).toEqual([])
  })

  it('are both ends when two are asked for, the last just before the lamp goes out', () => {
    const [first, last, none] = sampleCycle(cycle, 2)
    expect(none).toBeUndefined()
    expect(first).toMatchObject({ time: 0, voltage: cycle.lowVoltage, lit: false })
    expect(last).toMatchObject({ time: cycle.period, voltage: cycle.lowVoltage, lit: true })
  })

  it('are evenly spaced, and each is the moment at its time', () => {
    const samples = sampleCycle(cycle, 1000)
    expect(samples).toHaveLength(1000)
    samples.forEach((sample, n) => {
      expect(sample.time).toBeCloseTo((cycle.period * n) / 999, 12)
      if (n === 999) return
      const moment = momentAt(cycle.phases, cycle, sample.time)
      expect(sample.voltage).toBeCloseTo(moment?.voltage ?? 0, 9)
      expect(sample.lit).toBe(moment?.lit)
    })
  })

  it('average to the cycle’s mean voltage', () => {
    const samples = sampleCycle(cycle, 20_001)
    const sum = samples.slice(0, -1).reduce((total, sample) => total + sample.voltage, 0)
    expect(sum / 20_000 / cycle.meanVoltage).toBeCloseTo(1, 5)
  })

  it('stay between the cycle’s extremes, whatever the stage', () => {
    fc.assert(
      fc.property(stages(), fc.integer({ min: 2, max: 60 }), (stage, count) => {
        const found = solveStage(stage).cycle
        if (found === null) return
        const samples = sampleCycle(found, count)
        expect(samples).toHaveLength(count)
        const inside = samples.every(
          ({ voltage, lampCurrent }) =>
            voltage <= found.highVoltage * (1 + 1e-12) &&
            voltage >= found.lowVoltage * (1 - 1e-12) &&
            lampCurrent <= found.peakLampCurrent * (1 + 1e-9),
        )
        expect(inside).toBe(true)
      }),
      { seed: 192, numRuns: 500 },
    )
  })
})

describe('a trace for drawing', () => {
  it('has both ends of every phase and as many between as asked, in order of time', () => {
    fc.assert(
      fc.property(stages(), fc.integer({ min: 0, max: 20 }), (stage, between) => {
        const { fromSwitchOn } = solveStage(stage)
        const feed = {
          supplyVoltage: stage.supplyVoltage,
          feedResistance: stage.sourceResistance + stage.seriesResistance,
          leadResistance: stage.leadResistance,
        }
        const moments = tracePhases(fromSwitchOn, feed, between)
        expect(moments).toHaveLength(fromSwitchOn.length * (between + 2))
        fromSwitchOn.forEach((phase, n) => {
          const mine = moments.slice(n * (between + 2), (n + 1) * (between + 2))
          expect(mine[0]?.voltage).toBe(phase.from)
          if (Number.isFinite(phase.duration)) expect(mine.at(-1)?.voltage).toBe(phase.to)
          const [low, high] = [Math.min(phase.from, phase.to), Math.max(phase.from, phase.to)]
          const sound = mine.every(
            (moment, k) =>
              Number.isFinite(moment.time) &&
              moment.time >= (mine[k - 1]?.time ?? moment.time) &&
              moment.voltage >= low - 1e-12 * high &&
              moment.voltage <= high + 1e-12 * high,
          )
          expect(sound).toBe(true)
        })
      }),
      { seed: 193, numRuns: 400 },
    )
  })

  it('follows an endless phase for as many time constants as it has patience', () => {
    const stage = stageOf({ supplyVoltage: 70 })
    const { fromSwitchOn, operatingPoints } = solveStage(stage)
    expect(fromSwitchOn.at(-1)?.duration).toBe(Number.POSITIVE_INFINITY)
    const feed = { supplyVoltage: 70, feedResistance: 2.2e6, leadResistance: 0 }
    const rest = operatingPoints[0]?.capacitorVoltage ?? 0
    for (const patience of [1, 5, 12]) {
      const last = tracePhases(fromSwitchOn, feed, 10, patience).at(-1)
      const from = fromSwitchOn.at(-1)?.from ?? 0
      expect(last?.voltage).toBeCloseTo(rest - (rest - from) * Math.exp(-patience), 9)
    }
  })

  it('of a lamp held lit stands still at extinction voltage', () => {
    const stage = stageOf({ capacitance: 1e-9, recoveryTime: 0.5 })
    const { fromSwitchOn } = solveStage(stage)
    const feed = { supplyVoltage: 120, feedResistance: 2.2e6, leadResistance: 0 }
    const held = tracePhases(fromSwitchOn.slice(-1), feed, 3)
    expect(held).toHaveLength(5)
    for (const moment of held) expect(moment).toMatchObject({ voltage: 55, lit: true })
  })

  it('of nothing is nothing', () => {
    expect(tracePhases([], cycleOf(stageOf()), 5)).toEqual([])
  })
})

describe('what happens from switch-on', () => {
  it('begins with an empty capacitor, goes on without a jump, and ends at the rest or closes the cycle', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const { fromSwitchOn, cycle, operatingPoints, verdict, reason } = solveStage(stage)
        fromSwitchOn.forEach((phase, n) => {
          expect(phase.from).toBe(n === 0 ? 0 : fromSwitchOn[n - 1]?.to)
        })
        const last = fromSwitchOn.at(-1)
        if (cycle !== null) {
          expect(fromSwitchOn.slice(-cycle.phases.length)).toEqual(cycle.phases)
        } else if (verdict !== 'over range' && reason.code !== 'cannot recover') {
          expect(last?.duration).toBe(Number.POSITIVE_INFINITY)
          const rests = operatingPoints.filter((point) => point.stable)
          const nearest = Math.min(
            ...rests.map((point) => Math.abs(point.capacitorVoltage - (last?.to ?? 0))),
          )
          expect(nearest).toBeLessThan(1e-9 * stage.supplyVoltage)
        }
      }),
      { seed: 194, numRuns: 800 },
    )
  })

  it('without supply is one endless dark phase at nothing', () => {
    expect(solveStage(stageOf({ supplyVoltage: 0 })).fromSwitchOn).toMatchObject([
      { kind: 'dark', from: 0, to: 0, duration: Number.POSITIVE_INFINITY },
    ])
  })

  it('over range ends where the data does', () => {
    const knots = knotsOf([0, 0], [1e-6, 80], [1e-4, 60], [1e-3, 100])
    const { fromSwitchOn } = solveStage(stageOf({ knots, seriesResistance: 10e3 }))
    expect(fromSwitchOn.at(-1)).toMatchObject({ kind: 'glow', to: 100 })
    expect(fromSwitchOn.at(-1)?.duration).toBeLessThan(1)
  })
})
