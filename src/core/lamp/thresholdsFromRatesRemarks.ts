import { formatQuantity } from '../quantity/formatQuantity'
import type { RateObservation } from './thresholdsFromRatesModel'
import type { NextVoltage } from './thresholdsFromRatesNext'
import type { Problem } from './thresholdsFromRatesProblem'

const volts = (value: number, figures = 3) => formatQuantity(value, 'V', figures)
const rateOf = ({ flashes, time }: RateObservation) => flashes / time

/** Standard deviation of the logarithm of a rate. */
const logDeviation = (problem: Problem, seen: RateObservation) =>
  problem.deviation(seen, seen.flashes) / seen.flashes

/**
 * Why the rates as a whole cannot be those of one lamp: they fall, or stay, as the supply rises. Judged by the
 * weighted straight line through the logarithms of the rates, then pair by pair. Null where they rise.
 */
export function faultInTrend(problem: Problem): string | null {
  const { observations } = problem
  const weights = observations.map((seen) => 1 / logDeviation(problem, seen) ** 2)
  const whole = weights.reduce((sum, weight) => sum + weight, 0)
  const mean = (of: (seen: RateObservation) => number) =>
    observations.reduce((sum, seen, i) => sum + (weights[i] as number) * of(seen), 0) / whole
  const middle = mean(({ supplyVoltage }) => supplyVoltage)
  const slope = mean((seen) => (seen.supplyVoltage - middle) * Math.log(rateOf(seen)))
  if (slope <= 0) {
    return 'It flashes no faster, or even slower, at the higher supply voltages: no strike and extinction voltage do that. Look for a swapped reading, or a lamp that stays lit in between.'
  }
  for (const low of observations) {
    for (const high of observations) {
      if (!(low.supplyVoltage < high.supplyVoltage)) continue
      const fall = Math.log(rateOf(low) / rateOf(high))
      if (fall > 4 * Math.hypot(logDeviation(problem, low), logDeviation(problem, high))) {
        return `It flashes faster at ${volts(low.supplyVoltage)} than at ${volts(high.supplyVoltage)}, by more than counting can be out: no strike and extinction voltage do that.`
      }
    }
  }
  return null
}

/** What a result is looked over for. */
type Looked = {
  readonly strike: number
  readonly extinction: number
  readonly strikeDeviation: number
  readonly extinctionDeviation: number
  readonly fromCounting: { readonly strike: number; readonly extinction: number }
  readonly chance: number | null
  readonly condition: number
  readonly illConditioned: boolean
  readonly next: NextVoltage | null
}

/** Sentences about what stands out in a result. */
export function remarksOnRates(found: Looked, problem: Problem): string[] {
  const remarks: string[] = []
  const { strike, strikeDeviation, extinctionDeviation, fromCounting, next } = found
  const lowest = Math.min(...problem.observations.map(({ supplyVoltage }) => supplyVoltage))
  if (found.illConditioned) {
    remarks.push(
      'The supply voltages lie too close together, or too far above strike, to tell strike from extinction well: a small error in a count moves both a long way.',
    )
  }
  if (strikeDeviation > 0.4 * (lowest - strike)) {
    remarks.push(
      'Strike lies close to the lowest supply for its uncertainty, so the range given is rough and lopsided.',
    )
  }
  if (found.chance !== null && found.chance < 0.01) {
    remarks.push(
      'The counts do not agree with one pair of thresholds within their errors: the lamp drifts, recovers slowly or has leakage beside it, or a count is wrong.',
    )
  }
  const whole = Math.hypot(strikeDeviation, extinctionDeviation)
  if (Math.hypot(fromCounting.strike, fromCounting.extinction) < whole / 2) {
    remarks.push(
      'Most of the uncertainty comes from the tolerances of the parts: measuring resistor and capacitor helps more than counting.',
    )
  } else if (next !== null) {
    remarks.push(
      `A further count at ${volts(next.supplyVoltage)} would help most: it takes the uncertainty of strike to about ${volts(next.strikeDeviation, 2)} and of extinction to about ${volts(next.extinctionDeviation, 2)}.`,
    )
  }
  return remarks
}
