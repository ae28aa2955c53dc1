import { Outcome, Solver } from 'odex'
import { type Knot, type Stage, solveStage } from '../../src/core'
import { quantile } from './quantile'

/**
 * A larger lamp of our own making, on which both ways can be tried: the dark branch of a small
 * lamp, hundreds of megohms, would have the step-by-step method take hours.
 */
const stage: Stage = {
  supplyVoltage: 120,
  sourceResistance: 0,
  seriesResistance: 150e3,
  capacitance: 0.1e-6,
  leakageResistance: Number.POSITIVE_INFINITY,
  leadResistance: 0,
  lamp: {
    knots: [
      { current: 0, voltage: 0 },
      { current: 5e-6, voltage: 60 },
      { current: 20e-6, voltage: 75 },
      { current: 2e-3, voltage: 55 },
      { current: 5e-3, voltage: 58 },
      { current: 60e-3, voltage: 93 },
    ],
    recoveryTime: 0,
    strikeDelay: 0,
  },
}

/** Inductance in the lamp's lead, H: small enough that the smooth model's cycle is nearly the exact one. */
const inductance = 3e-3

/** Relative tolerance of the step-by-step method. */
const tolerance = 1e-8

/** Time of one solution, ns: the median of some batches, each of stages not seen before. */
function timeToSolve(): number {
  const solutions = 2000
  let seen = 0
  let flashes = 0
  const batch = () => {
    const began = performance.now()
    for (let i = 0; i < solutions; i++) {
      seen++
      const seriesResistance = stage.seriesResistance * (1 + seen * 1e-7)
      if (solveStage({ ...stage, seriesResistance }).cycle !== null) flashes++
    }
    return ((performance.now() - began) / solutions) * 1e6
  }
  for (let i = 0; i < 10; i++) batch()
  const times = Array.from({ length: 25 }, batch)
  if (flashes !== seen) throw new Error('the stage of the bench is meant to flash')
  return quantile(times, 0.5)
}

/** Voltage across the lamp, V, going on straight beyond either end. */
function lampVoltage(knots: readonly Knot[], current: number): number {
  let right = 1
  while (right + 1 < knots.length && current > knots[right]!.current) right++
  const from = knots[right - 1]!
  const to = knots[right]!
  const slope = (to.voltage - from.voltage) / (to.current - from.current)
  return from.voltage + (current - from.current) * slope
}

/** One period of the smooth model L·di/dt = v − V(i), C·dv/dt = (E − v)/R − i, step by step. */
function followOnePeriod(period: number, voltage: number) {
  const { supplyVoltage, seriesResistance, capacitance, lamp } = stage
  const { knots } = lamp
  const dark = (knots[1]!.current * voltage) / knots[1]!.voltage
  const solver = new Solver(2)
  solver.relativeTolerance = tolerance
  solver.absoluteTolerance = [tolerance * supplyVoltage, tolerance * knots[3]!.current]
  solver.initialStepSize = 1e-9
  solver.maxSteps = 1e8
  const began = performance.now()
  const { y, outcome, nEval } = solver.solve(
    (_, [v, i]) => [
      ((supplyVoltage - v!) / seriesResistance - i!) / capacitance,
      (v! - lampVoltage(knots, i!)) / inductance,
    ],
    0,
    [voltage, dark],
    period,
  )
  if (outcome !== Outcome.Converged) throw new Error('the step-by-step method gave up')
  return { time: (performance.now() - began) * 1e6, voltage: y[0]!, evaluations: nEval }
}

/** Times a solution by the core, and the same cycle followed step by step. */
export async function run(report: (line: string) => void): Promise<void> {
  const { cycle } = solveStage(stage)
  if (cycle === null) throw new Error('the stage of the bench is meant to flash')
  const exact = timeToSolve()
  report(`one solution of a six-knot lamp that flashes: ${(exact / 1000).toFixed(2)} µs (median)`)

  const followed = Array.from({ length: 3 }, () => followOnePeriod(cycle.period, cycle.lowVoltage))
  const steps = quantile(
    followed.map(({ time }) => time),
    0.5,
  )
  const { voltage, evaluations } = followed[0]!
  const swing = cycle.highVoltage - cycle.lowVoltage
  const apart = (100 * Math.abs(voltage - cycle.lowVoltage)) / swing
  report(
    `one period step by step at tolerance ${tolerance}, ${inductance * 1000} mH: ${(steps / 1e6).toFixed(0)} ms (median of 3), ${evaluations} evaluations`,
  )
  report(`it comes back to its start within ${apart.toFixed(2)} % of the swing`)
  report(`ratio: ${Math.round(steps / exact)}`)
}
