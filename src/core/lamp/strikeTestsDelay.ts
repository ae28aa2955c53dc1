import { chiSquareLimit } from './strikeTestsDistributions'
import { chanceOutside, type Interval, momentsOf } from './strikeTestsSample'

/** Strike delay read from the scatter of strikes under a steady ramp. */
export type DelayFromRamp = {
  /** Number of readings it was read from. */
  readonly count: number
  /** Mean delay, s, and its range of 95 %. */
  readonly delay: number
  readonly delayInterval: Interval
  /** Mean voltage past the threshold at which it struck, V. */
  readonly meanExcess: number
  /** Strike voltage without delay, V, and its range of 95 %: it lies below the lowest reading. */
  readonly threshold: number
  readonly thresholdInterval: Interval
  /**
   * How far the lowest reading lies below the mean, in standard deviations: about 1 of a pure random wait,
   * more the likelier it is that readings err both ways.
   */
  readonly reachBelow: number
}

/** What the delay rests on. */
export const delaySource =
  'two-parameter exponential: excess n/(n − 1)·(mean − least), threshold least − excess/n, unbiased; ' +
  'ranges from χ² with 2n − 2 degrees (Johnson, Kotz & Balakrishnan, Continuous Univariate ' +
  'Distributions 1, chapter 19; from memory)'

/**
 * The random wait, exponential, seen through a ramp of `rate` V/s: each strike is late by the rate times its
 * wait, so readings scatter upwards from the threshold. The lowest of n is still too high by the mean
 * excess over n; both estimates are corrected for that. It takes the wait to be the same however far past
 * the threshold the voltage is, which holds for a few volts.
 *
 * @param strikes V, two at least, not all equal: else null.
 * @param rate V/s, more than zero: else null.
 */
export function delayFromRamp(strikes: readonly number[], rate: number): DelayFromRamp | null {
  const count = strikes.length
  if (count < 2 || !(rate > 0 && Number.isFinite(rate))) return null
  const { mean, squares } = momentsOf(strikes)
  const least = Math.min(...strikes)
  if (!(mean > least)) return null
  const past = count * (mean - least)
  const meanExcess = past / (count - 1)
  const freedom = 2 * (count - 1)
  const excess = (below: number) => (2 * past) / chiSquareLimit(below, freedom)
  const low = excess(1 - chanceOutside / 2)
  const high = excess(chanceOutside / 2)
  // n·(least − threshold)/excess follows F with 2 and 2n − 2 degrees, whose tail is a plain power.
  const reach = (tail: number) =>
    (meanExcess * (count - 1) * Math.expm1(-Math.log(tail) / (count - 1))) / count
  return {
    count,
    delay: meanExcess / rate,
    delayInterval: { low: low / rate, high: high / rate },
    meanExcess,
    threshold: least - meanExcess / count,
    thresholdInterval: {
      low: least - reach(chanceOutside / 2),
      high: least - reach(1 - chanceOutside / 2),
    },
    reachBelow: (mean - least) / Math.sqrt(squares / (count - 1)),
  }
}
