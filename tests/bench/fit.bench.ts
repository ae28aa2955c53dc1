import { currentsFromSweep, fitCharacteristic, fittingSweep, type SweepSetup } from '../../src/core'
import { randomLamp, seeded, sweepOf } from '../core/lamp/syntheticSweep'
import { quantile } from './quantile'

const base = {
  meterResistance: 10e6,
  meterPlace: 'lamp',
  readingError: { absolute: 0.05, relative: 0 },
} as const
const lamps = 40

/** A sweep of a lamp of our own making. */
function readingsOf(seed: number, setup: SweepSetup, count: number) {
  const random = seeded(seed)
  return sweepOf(randomLamp(random), setup, { to: 220, count, error: 0.05 }, random)
}

/** Times of fits of 500 points each, ms: sweeps with and without the falling region in them. */
function timesToFit(seriesResistance: number): readonly number[] {
  const setup = { ...base, seriesResistance }
  return Array.from({ length: lamps }, (_, i) => {
    const currents = currentsFromSweep(readingsOf(i + 1, setup, 500), setup)
    if (!currents.ok) throw new Error(currents.message)
    const began = performance.now()
    const fit = fitCharacteristic(currents.points, { errors: 'given' })
    if (!fit.ok) throw new Error(fit.message)
    return performance.now() - began
  })
}

/** Times the fit of a sweep: 500 points, and 10⁵ rows from readings to knots. */
export async function run(report: (line: string) => void): Promise<void> {
  for (const [words, resistance] of [
    ['falling region bridged', 100e3],
    ['falling region measured', 1e6],
  ] as const) {
    const times = timesToFit(resistance)
    const [middle, late] = [0.5, 0.95].map((part) => quantile(times, part).toFixed(0))
    report(
      `a fit of 500 points to 8 knots at most, ${words}: ${middle} ms (median of ${lamps} lamps), ${late} ms (95 %), ${times[0]?.toFixed(0)} ms the first time`,
    )
  }
  const setup = { ...base, seriesResistance: 100e3 }
  const readings = readingsOf(1, setup, 1e5)
  const times = Array.from({ length: 5 }, () => {
    const began = performance.now()
    const steps = fittingSweep(readings, setup)
    let step = steps.next()
    let longest = 0
    let last = began
    while (!step.done) {
      step = steps.next()
      longest = Math.max(longest, performance.now() - last)
      last = performance.now()
    }
    if (!step.value.fit.ok) throw new Error(step.value.fit.message)
    return { whole: performance.now() - began, longest }
  })
  const whole = quantile(
    times.map((time) => time.whole),
    0.5,
  )
  const longest = Math.max(...times.map((time) => time.longest))
  report(
    `10⁵ rows from readings to knots: ${whole.toFixed(0)} ms (median of 5); longest between two chances to stop: ${longest.toFixed(0)} ms`,
  )
}
