import { chiSquareLimit, studentBeyond, studentLimit } from './strikeTestsDistributions'

/** A range that holds the true value in 95 of 100 such series of readings. */
export type Interval = { readonly low: number; readonly high: number }

/** Chance of being outside a range, and of calling chance a difference. */
export const chanceOutside = 0.05

/** How a reading changes along the run. */
export type Drift = {
  /** V per reading, by least squares, and its standard deviation. */
  readonly slope: number
  readonly deviation: number
  /** Chance of a slope as large as this without any drift, 0 … 1. */
  readonly chance: number
  readonly significant: boolean
}

/** Repeated readings of one quantity, V. */
export type Sample = {
  readonly count: number
  readonly mean: number
  /** Null of one reading. */
  readonly meanInterval: Interval | null
  /** Standard deviation of single readings, with n − 1; null of one reading. */
  readonly deviation: number | null
  readonly deviationInterval: Interval | null
  /** Null of fewer than four readings. */
  readonly drift: Drift | null
}

/** What the ranges of a sample rest on. */
export const sampleSource =
  'mean ± t·s/√n, and s·√((n − 1)/χ²) for the deviation: normal readings, 95 % ' +
  '(NIST/SEMATECH e-Handbook of Statistical Methods, 1.3.5.2 and 1.3.5.8; numbers from memory)'

/** Mean and sum of squares about it. */
export function momentsOf(values: readonly number[]): { mean: number; squares: number } {
  let sum = 0
  for (const value of values) sum += value
  const mean = sum / values.length
  let squares = 0
  for (const value of values) squares += (value - mean) ** 2
  return { mean, squares }
}

/**
 * Mean, spread and drift of readings in the order they were taken, V. Null of none. Where all readings are
 * equal the deviation is zero: the meter's last digit is then all that is known of it.
 */
export function sampleOf(values: readonly number[]): Sample | null {
  const count = values.length
  if (count === 0) return null
  const { mean, squares } = momentsOf(values)
  if (count === 1) {
    const none = { meanInterval: null, deviation: null, deviationInterval: null, drift: null }
    return { count, mean, ...none }
  }
  const freedom = count - 1
  const deviation = Math.sqrt(squares / freedom)
  const reach = (studentLimit(chanceOutside, freedom) * deviation) / Math.sqrt(count)
  return {
    count,
    mean,
    meanInterval: { low: mean - reach, high: mean + reach },
    deviation,
    deviationInterval: {
      low: Math.sqrt(squares / chiSquareLimit(1 - chanceOutside / 2, freedom)),
      high: Math.sqrt(squares / chiSquareLimit(chanceOutside / 2, freedom)),
    },
    drift: count < 4 ? null : driftOf(values, mean, squares),
  }
}

/** Straight line through readings against their number, by least squares, with Student's test of its slope. */
function driftOf(values: readonly number[], mean: number, squares: number): Drift {
  const count = values.length
  const middle = (count - 1) / 2
  const spread = (count * (count * count - 1)) / 12
  let together = 0
  for (const [i, value] of values.entries()) together += (i - middle) * (value - mean)
  const slope = together / spread
  const left = Math.max(0, squares - slope * together)
  const deviation = Math.sqrt(left / (count - 2) / spread)
  const chance = deviation > 0 ? studentBeyond(slope / deviation, count - 2) : slope === 0 ? 1 : 0
  return { slope, deviation, chance, significant: chance < chanceOutside }
}

/** The difference between two groups of readings. */
export type Difference = {
  /** Mean of the second less mean of the first, V. */
  readonly difference: number
  readonly interval: Interval
  /** Chance of a difference as large as this where there is none, 0 … 1. */
  readonly chance: number
  readonly significant: boolean
}

/**
 * Compares two groups by Welch's test, which asks for neither equal spread nor equal number
 * [Welch, Biometrika 34 (1947) 28; freedom after Satterthwaite; both from memory]. Null where either group
 * has fewer than two readings, or where neither has any spread to judge by.
 */
export function differenceOf(
  first: readonly number[],
  second: readonly number[],
): Difference | null {
  if (first.length < 2 || second.length < 2) return null
  const a = momentsOf(first)
  const b = momentsOf(second)
  const ofFirst = a.squares / (first.length - 1) / first.length
  const ofSecond = b.squares / (second.length - 1) / second.length
  const variance = ofFirst + ofSecond
  if (variance === 0) return null
  const freedom =
    variance ** 2 / (ofFirst ** 2 / (first.length - 1) + ofSecond ** 2 / (second.length - 1))
  const difference = b.mean - a.mean
  const reach = studentLimit(chanceOutside, freedom) * Math.sqrt(variance)
  const chance = studentBeyond(difference / Math.sqrt(variance), freedom)
  return {
    difference,
    interval: { low: difference - reach, high: difference + reach },
    chance,
    significant: chance < chanceOutside,
  }
}
