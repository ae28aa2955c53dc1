import {
  type PartsOut,
  periodOf,
  type RateObservation,
  type RateParts,
} from './thresholdsFromRatesModel'

/** Errors of counting, as standard deviations. */
export type CountingErrors = {
  /** Of a count, flashes. */
  readonly count: number
  /** Of a time, s. */
  readonly time: number
}

/**
 * Counting within a time that starts and stops at any moment, known as ±1 flash: the count is the whole number
 * just below or just above, and over all moments its variance is the mean of p(1 − p), which is 1/6.
 */
export const plusMinusOneFlash = 1 / Math.sqrt(6)

/**
 * What is unknown: strike and extinction voltage, V, then, in units of their standard deviations, how far
 * each part that has a tolerance is out.
 */
export type Unknowns = readonly number[]

/** A tolerance as a standard deviation: anywhere within the limits alike (JCGM 100:2008, 4.3.7; from memory). */
const deviationOf = (tolerance: number) => tolerance / Math.sqrt(3)

/** The least-squares problem of thresholds from rates. */
export type Problem = {
  readonly observations: readonly RateObservation[]
  /** Number of parts with a tolerance. */
  readonly uncertainParts: number
  /** Flashes expected of an observation; NaN where the lamp would not flash. */
  readonly expected: (observation: RateObservation, unknowns: Unknowns) => number
  /** Standard deviation of a count near `flashes`, flashes. */
  readonly deviation: (observation: RateObservation, flashes: number) => number
}

/** Sets the problem up. */
export function problemOf(
  observations: readonly RateObservation[],
  parts: RateParts,
  errors: CountingErrors,
): Problem {
  const { resistanceTolerance, capacitanceTolerance, supplyTolerance } = parts
  const deviations = [resistanceTolerance, capacitanceTolerance, supplyTolerance].map(deviationOf)
  const uncertain = deviations.flatMap((deviation, i) => (deviation > 0 ? [i] : []))
  const outOf = (unknowns: Unknowns): PartsOut => {
    const out = [0, 0, 0]
    for (const [k, i] of uncertain.entries()) {
      out[i] = (deviations[i] as number) * (unknowns[2 + k] ?? 0)
    }
    const [resistance = 0, capacitance = 0, supply = 0] = out
    return { resistance, capacitance, supply }
  }
  return {
    observations,
    uncertainParts: uncertain.length,
    expected: ({ supplyVoltage, time }, unknowns) => {
      const [strike = 0, extinction = 0] = unknowns
      return time / periodOf(supplyVoltage, strike, extinction, parts, outOf(unknowns))
    },
    deviation: ({ time }, flashes) => Math.hypot(errors.count, (errors.time * flashes) / time),
  }
}

/** How far counts lie from expectation, each in its standard deviations; then the parts, likewise. */
export function residuals(problem: Problem, unknowns: Unknowns): number[] {
  const counts = problem.observations.map(
    (seen) =>
      (seen.flashes - problem.expected(seen, unknowns)) / problem.deviation(seen, seen.flashes),
  )
  return [...counts, ...unknowns.slice(2).map((value) => -value)]
}

/** Sum of squares of the residuals; infinite where the lamp would not flash at some supply. */
export function misfit(problem: Problem, unknowns: Unknowns): number {
  let sum = 0
  for (const value of residuals(problem, unknowns)) sum += value * value
  return Number.isNaN(sum) ? Number.POSITIVE_INFINITY : sum
}

/** How the count expected of an observation changes with each unknown, by central differences. */
export function gradient(
  problem: Problem,
  observation: RateObservation,
  unknowns: Unknowns,
): number[] {
  const [strike = 0, extinction = 0] = unknowns
  const lowest = Math.min(...problem.observations.map(({ supplyVoltage }) => supplyVoltage))
  // Near the supply voltage the logarithm bends sharply: the step keeps well away from it.
  const room = Math.min(strike - extinction, extinction, Math.abs(lowest - strike))
  return unknowns.map((value, k) => {
    let step = k < 2 ? 1e-4 * room : 1e-4
    // Leakage may leave less room than the supply voltage shows.
    for (let tries = 0; tries < 30; tries++) {
      const at = (shifted: number) => problem.expected(observation, unknowns.with(k, shifted))
      const slope = (at(value + step) - at(value - step)) / (2 * step)
      if (Number.isFinite(slope)) return slope
      step /= 4
    }
    return Number.NaN
  })
}
