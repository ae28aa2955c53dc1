import { describe, expect, it } from 'vitest'
import { type Cycle, cycleWithWaits, type Stage, solveStage } from '../../../src/core/index'
import { exponentialDraws } from '../../support/draws'
import { knotsOf, stageOf } from '../../support/stages'

function cycleOf(stage: Stage): Cycle {
  const { cycle, reason } = solveStage(stage)
  if (cycle === null) throw new Error(`No cycle: ${reason.code}`)
  return cycle
}

/** Mean and deviation of the period over drawn waits, their standard errors, and how many went over range. */
function drawn(stage: Stage, count: number, seed: number) {
  const draw = exponentialDraws(seed, stage.lamp.strikeDelay)
  const periods: number[] = []
  let lost = 0
  for (let n = 0; n < count; n++) {
    // The very first strike is not the cycle's own: it comes at once, so that each run draws one wait.
    let first = true
    const cycle = cycleWithWaits(stage, () => {
      if (!first) return draw()
      first = false
      return 0
    })
    if (cycle === null) lost++
    else periods.push(cycle.period)
  }
  const kept = periods.length
  const mean = periods.reduce((sum, period) => sum + period, 0) / kept
  const moment = (power: number) =>
    periods.reduce((sum, period) => sum + (period - mean) ** power, 0) / kept
  const variance = moment(2)
  const deviation = Math.sqrt(variance)
  return {
    mean,
    meanError: deviation / Math.sqrt(kept),
    deviation,
    // Standard error of a standard deviation from the fourth moment.
    deviationError: Math.sqrt((moment(4) - variance ** 2) / kept) / (2 * deviation),
    lostShare: lost / count,
    lostError: Math.sqrt(((lost / count) * (1 - lost / count)) / count),
  }
}

// The glow branch goes on to 400 V, so that even long waits stay on the data.
const tall = knotsOf([0, 0], [0.2e-6, 75], [90e-6, 55], [0.6e-3, 60], [8e-3, 84], [0.2, 400])
const tau = 2.2e6 * 0.47e-6

const cases: readonly (readonly [string, Stage])[] = [
  ['short against RC', stageOf({ strikeDelay: tau / 1000, knots: tall })],
  ['a tenth of RC', stageOf({ strikeDelay: tau / 10, knots: tall })],
  ['comparable with RC', stageOf({ strikeDelay: tau, knots: tall })],
  ['long against RC', stageOf({ strikeDelay: 30 * tau, knots: tall })],
  [
    'a tenth of RC, with leakage and a lead resistor',
    stageOf({ strikeDelay: tau / 10, knots: tall, leakageResistance: 30e6, leadResistance: 5e3 }),
  ],
  [
    'a tenth of RC, with a flash as long as the dark',
    stageOf({
      supplyVoltage: 120,
      seriesResistance: 6e3,
      capacitance: 1e-6,
      strikeDelay: 0.6e-3,
      knots: knotsOf([0, 0], [1e-3, 75], [16e-3, 55], [30e-3, 93], [60e-3, 150]),
    }),
  ],
]

describe('the jitter of a lamp that strikes at random', () => {
  it.each(cases)('is what 20 000 drawn cycles show: delay %s', (_, stage) => {
    const cycle = cycleOf(stage)
    const found = drawn(stage, 20_000, 171)
    expect(found.lostShare).toBe(0)
    expect(cycle.overRangeChance).toBeLessThan(1e-9)
    expect(Math.abs(cycle.meanPeriod - found.mean)).toBeLessThan(4 * found.meanError)
    expect(Math.abs(cycle.periodDeviation - found.deviation)).toBeLessThan(4 * found.deviationError)
  })

  it('is what 20 000 drawn cycles show when some are lost off the end of the data', () => {
    const stage = stageOf({ strikeDelay: tau / 10 })
    const cycle = cycleOf(stage)
    const found = drawn(stage, 20_000, 172)
    expect(found.lostShare).toBeGreaterThan(0.01)
    expect(Math.abs(cycle.overRangeChance - found.lostShare)).toBeLessThan(4 * found.lostError)
    expect(Math.abs(cycle.meanPeriod - found.mean)).toBeLessThan(4 * found.meanError)
    expect(Math.abs(cycle.periodDeviation - found.deviation)).toBeLessThan(4 * found.deviationError)
  })

  it('loses as many as wait longer than it takes to charge to the end of the data: by hand', () => {
    const delay = tau / 10
    const towards = 120 - 2.2e6 * 0.2e-6
    const allowed = tau * Math.log((towards - 75) / (towards - 84))
    const { overRangeChance } = cycleOf(stageOf({ strikeDelay: delay }))
    expect(overRangeChance / Math.exp(-allowed / delay)).toBeCloseTo(1, 9)
  })

  it('is none without delay', () => {
    const cycle = cycleOf(stageOf())
    expect(cycle).toMatchObject({ periodDeviation: 0, overRangeChance: 0 })
    expect(cycle.meanPeriod).toBe(cycle.period)
  })

  it('comes, for short delays, to the delay and what it adds to the flash, in proportion', () => {
    // A wait dt raises the voltage by dt·(dv/dt at the knee); the discharge then begins so much higher and
    // takes longer by that over its own rate there. One straight glow piece from 55 V at 90 µA.
    const slope = (0.2 - 90e-6) / (400 - 55)
    const knots = knotsOf([0, 0], [0.2e-6, 75], [90e-6, 55], [0.2, 400])
    const spare = 45 / 2.2e6
    const landing = 90e-6 + 20 * slope
    const factor = 1 + (spare - 0.2e-6) / (landing - spare)
    for (const strikeDelay of [1e-3, 1e-6, 1e-9, 1e-11]) {
      const cycle = cycleOf(stageOf({ strikeDelay, knots, capacitance: 100e-6 }))
      expect(Math.abs(cycle.periodDeviation / (factor * strikeDelay) - 1)).toBeLessThan(1e-4)
    }
  })

  it('comes, for delays without end, to the delay alone, the voltage standing at its highest', () => {
    const strikeDelay = 1e4 * tau
    const cycle = cycleOf(stageOf({ strikeDelay, knots: tall }))
    expect(cycle.periodDeviation / strikeDelay).toBeCloseTo(1, 4)
    expect(cycle.highVoltage).toBeCloseTo(120 - 2.2e6 * 0.2e-6, 9)
  })

  it('keeps its figures where the delay is a billionth of the flash', () => {
    const wanted = { supplyVoltage: 120, capacitance: 100e-6, leadResistance: 10e3, knots: tall }
    const plain = cycleOf(stageOf({ ...wanted, strikeDelay: 1e-3 })).periodDeviation / 1e-3
    const tiny = cycleOf(stageOf({ ...wanted, strikeDelay: 1e-9 })).periodDeviation / 1e-9
    expect(tiny / plain).toBeCloseTo(1, 4)
  })
})

describe('a cycle with a delay', () => {
  it('waits the mean delay at strike voltage, while the capacitor goes on charging', () => {
    const cycle = cycleOf(stageOf({ strikeDelay: 0.02, knots: tall }))
    const waiting = cycle.phases.find((phase) => phase.kind === 'waiting')
    expect(waiting?.duration).toBe(0.02)
    expect(waiting?.from).toBe(75)
    const towards = 120 - 2.2e6 * 0.2e-6
    expect(waiting?.to).toBeCloseTo(towards - (towards - 75) * Math.exp(-0.02 / tau), 10)
    expect(cycle.highVoltage).toBe(waiting?.to)
    expect(cycle.highVoltage).toBeGreaterThan(cycleOf(stageOf({ knots: tall })).highVoltage)
  })

  it('is the one drawn with that wait every time', () => {
    const stage = stageOf({ strikeDelay: 0.02, knots: tall, recoveryTime: 0.05 })
    const same = cycleWithWaits(stage, () => 0.02)
    expect(same?.period).toBe(cycleOf(stage).period)
    expect(same?.firstStrike).toBe(cycleOf(stage).firstStrike)
    expect(same?.periodDeviation).toBe(0)
    expect(same?.meanPeriod).toBe(same?.period)
  })

  it('asks for one wait a strike, the first included', () => {
    let asked = 0
    cycleWithWaits(stageOf({ strikeDelay: 1, knots: tall }), () => {
      asked++
      return 0.001
    })
    expect(asked).toBe(2)
  })

  it('is none where the stage does not flash with such a wait', () => {
    expect(cycleWithWaits(stageOf(), () => 10)).toBeNull()
    expect(cycleWithWaits(stageOf({ seriesResistance: 33e3 }), () => 0)).toBeNull()
  })
})
