import { Solver } from 'odex'
import { describe, expect, it } from 'vitest'
import { type Cycle, type Stage, solveStage } from '../../../src/core/index'
import { knotsOf, stageOf } from '../../support/stages'

/*
 * The independent check: the model with jumps is the limit of `L·di/dt = v − V(i)`, `C·dv/dt = (E − v)/R −
 * v/R_leak − i` as L → 0. That one has no branches and no jumps, and a general solver for differential
 * equations (odex: Hairer & Wanner's extrapolation method) follows it.
 */

/** Period, s, and highest lamp current, A, of the smooth model once it has settled. */
function smooth(stage: Stage, cycle: Cycle, inductance: number) {
  const { knots } = stage.lamp
  const across = (current: number) => {
    let k = 0
    while (k + 2 < knots.length && current > (knots[k + 1]?.current ?? 0)) k++
    const left = knots[k] ?? { current: 0, voltage: 0 }
    const right = knots[k + 1] ?? left
    const slope = (right.voltage - left.voltage) / (right.current - left.current)
    return left.voltage + slope * (current - left.current) + stage.leadResistance * current
  }
  const middle = (cycle.highVoltage + cycle.lowVoltage) / 2
  const solver = new Solver(2)
  solver.absoluteTolerance = [1e-8 * stage.supplyVoltage, 1e-8 * cycle.peakLampCurrent]
  solver.relativeTolerance = 1e-8
  solver.maxSteps = 1e8
  solver.initialStepSize = 1e-9
  solver.denseOutput = true
  const marks: number[] = []
  let peak = 0
  let before = 0
  solver.solve(
    (_, [v = 0, i = 0]) => [
      ((stage.supplyVoltage - v) / stage.seriesResistance - v / stage.leakageResistance - i) /
        stage.capacitance,
      (v - across(i)) / inductance,
    ],
    0,
    [cycle.lowVoltage, 0],
    1e9,
    (_, from, to, [v = 0, i = 0], at) => {
      if (marks.length > 0) peak = Math.max(peak, i)
      if (at !== undefined && before > middle && v <= middle) {
        let [a, b] = [from, to]
        for (let n = 0; n < 60; n++) {
          const half = (a + b) / 2
          if (at(0, half) > middle) a = half
          else b = half
        }
        marks.push(b)
      }
      before = v
      return marks.length < 3
    },
  )
  return { period: (marks[2] ?? 0) - (marks[1] ?? 0), peak }
}

// Stout lamps of our own making, whose knee and valley lie less than a decade apart: the solver's steps must
// be short against the inductance over the dark branch's resistance, and a small lamp's is hundreds of megohms.
const stages: readonly (readonly [string, Stage])[] = [
  [
    'a plain lamp',
    stageOf({
      supplyVoltage: 120,
      seriesResistance: 6e3,
      capacitance: 1e-6,
      knots: knotsOf([0, 0], [4e-3, 75], [16e-3, 55], [60e-3, 93]),
    }),
  ],
  [
    'a lamp of seven knots with leakage and a lead resistor',
    stageOf({
      supplyVoltage: 140,
      seriesResistance: 6e3,
      capacitance: 1e-6,
      leakageResistance: 60e3,
      leadResistance: 200,
      knots: knotsOf(
        [0, 0],
        [1.5e-3, 50],
        [4e-3, 75],
        [8e-3, 65],
        [16e-3, 55],
        [30e-3, 58],
        [80e-3, 93],
      ),
    }),
  ],
  [
    'a lamp with three branches, going out in two stages',
    stageOf({
      supplyVoltage: 180,
      seriesResistance: 15e3,
      capacitance: 1e-6,
      knots: knotsOf([0, 0], [4e-3, 90], [12e-3, 45], [20e-3, 70], [30e-3, 50], [80e-3, 120]),
    }),
  ],
  [
    'a lamp with three branches, going round the upper two alone',
    stageOf({
      supplyVoltage: 160,
      seriesResistance: 4.9e3,
      capacitance: 1e-6,
      knots: knotsOf([0, 0], [4e-3, 80], [8e-3, 60], [14e-3, 85], [24e-3, 50], [80e-3, 110]),
    }),
  ],
]

describe('the smooth model, as its inductance shrinks', () => {
  it.each(stages)('comes to our period and peak current: %s', (_, stage) => {
    const { cycle } = solveStage(stage)
    if (cycle === null) throw new Error('It should flash.')
    const off = [30e-3, 10e-3, 3e-3, 1e-3, 0.3e-3].map((inductance) => {
      const found = smooth(stage, cycle, inductance)
      return {
        period: Math.abs(found.period / cycle.period - 1),
        peak: Math.abs(found.peak / cycle.peakLampCurrent - 1),
      }
    })
    for (let k = 1; k < off.length; k++) {
      expect(off[k]?.period).toBeLessThan(0.6 * (off[k - 1]?.period ?? 0))
      expect(off[k]?.peak).toBeLessThan(0.75 * (off[k - 1]?.peak ?? 0))
    }
    // With 0.3 mH, under a thousandth of r²C, r being the shallowest fall, both are within some two per mille.
    expect(off.at(-1)?.period).toBeLessThan(2e-3)
    expect(off.at(-1)?.peak).toBeLessThan(2.5e-3)
  })
})
