import { bisect } from '../stage/recovery'
import { inverseOf, type Matrix } from './thresholdsFromRatesMatrix'
import type { RateObservation } from './thresholdsFromRatesModel'
import { gradient, type Problem, type Unknowns } from './thresholdsFromRatesProblem'

/** Supply voltages to choose the next from, V, and the time to count there, s. */
export type NextChoice = { readonly low: number; readonly high: number; readonly time: number }

/** The supply voltage at which one more count would help most. */
export type NextVoltage = {
  /** V */
  readonly supplyVoltage: number
  /** Standard deviations to expect of both thresholds with that count added, V. */
  readonly strikeDeviation: number
  readonly extinctionDeviation: number
}

const places = 120

/**
 * Tries supply voltages over the range and keeps the one that makes the sum of both thresholds' variances
 * smallest. It stays two deviations, and 3 % at least, above strike: closer by, the lamp may not strike at
 * all and its own small current counts. Null where the range holds no such voltage.
 *
 * @param normal the present normal matrix, parts included.
 */
export function nextVoltage(
  problem: Problem,
  unknowns: Unknowns,
  normal: Matrix,
  strikeDeviation: number,
  choice: NextChoice,
): NextVoltage | null {
  const strike = unknowns[0] as number
  const margin = Math.max(0.03 * strike, 2 * strikeDeviation)
  // With leakage the supply must lie further up: the same lamp, striking that much later, must still flash.
  const later = unknowns.with(0, strike + margin)
  const isTooLow = (supplyVoltage: number) =>
    !Number.isFinite(problem.expected({ supplyVoltage, flashes: 1, time: 1 }, later))
  if (!(choice.high > choice.low) || isTooLow(choice.high)) return null
  const low = isTooLow(choice.low) ? bisect(choice.low, choice.high, isTooLow) : choice.low
  let best: (NextVoltage & { readonly sum: number }) | null = null
  for (let k = 0; k <= places; k++) {
    // Closer together low down, where a volt matters most.
    const supplyVoltage = low + (choice.high - low) * (k / places) ** 2
    const trial: RateObservation = { supplyVoltage, flashes: 1, time: choice.time }
    const flashes = problem.expected(trial, unknowns)
    const deviation = problem.deviation(trial, flashes)
    const row = gradient(problem, trial, unknowns).map((slope) => slope / deviation)
    const inverse = inverseOf(
      normal.map((line, i) =>
        line.map((value, j) => value + (row[i] as number) * (row[j] as number)),
      ),
    )
    if (inverse === null) continue
    const [ofStrike, ofExtinction] = [inverse[0]?.[0] as number, inverse[1]?.[1] as number]
    const sum = ofStrike + ofExtinction
    if (best !== null && best.sum <= sum) continue
    best = {
      supplyVoltage,
      strikeDeviation: Math.sqrt(ofStrike),
      extinctionDeviation: Math.sqrt(ofExtinction),
      sum,
    }
  }
  if (best === null) return null
  const { sum: _, ...next } = best
  return next
}
