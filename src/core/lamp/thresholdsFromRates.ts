import { formatQuantity } from '../quantity/formatQuantity'
import { chiSquareBelow } from './strikeTestsDistributions'
import { bestFit, priorOf, weightedRows } from './thresholdsFromRatesFit'
import { inverseOf, type Matrix, normalMatrix } from './thresholdsFromRatesMatrix'
import { faultInRates, type RateObservation, type RateParts } from './thresholdsFromRatesModel'
import { type NextChoice, type NextVoltage, nextVoltage } from './thresholdsFromRatesNext'
import { plusMinusOneFlash, problemOf } from './thresholdsFromRatesProblem'
import { faultInTrend, remarksOnRates } from './thresholdsFromRatesRemarks'

/** How rates are to be read. */
export type RateOptions = {
  /** Standard deviation of a count, flashes; `plusMinusOneFlash` if absent. 0 = timed from flash to flash. */
  readonly countError?: number
  /** Standard deviation of a time, s; 0 if absent. */
  readonly timeError?: number
  /**
   * Where the next count may be taken; if absent up to 1.5 times the highest supply, for the longest time;
   * null = not asked for.
   */
  readonly next?: NextChoice | null
}

/** Strike and extinction voltage from rates. Deviations are standard deviations. */
export type RateThresholds =
  | {
      readonly ok: true
      /** V */
      readonly strike: number
      readonly extinction: number
      /** V, from counting and parts together. */
      readonly strikeDeviation: number
      readonly extinctionDeviation: number
      /** Between the errors of both, −1 … 1. */
      readonly correlation: number
      /** V, from counting alone, the parts being as marked. */
      readonly fromCounting: { readonly strike: number; readonly extinction: number }
      /** Sum of squares that is left, and how many counts more than unknowns it rests on. */
      readonly misfit: number
      readonly freedom: number
      /** Chance of a worse misfit if one pair of thresholds holds for all counts; null without freedom. */
      readonly chance: number | null
      /**
       * Ratio of the largest to the smallest change of both thresholds, V, that counting errors of the same
       * weight make. Above `worstCondition` the voltages were badly chosen.
       */
      readonly condition: number
      readonly illConditioned: boolean
      readonly next: NextVoltage | null
      readonly remarks: readonly string[]
    }
  | { readonly ok: false; readonly reason: string }

/** Condition above which the chosen voltages are called bad: own choice. */
const worstCondition = 40

/**
 * Strike and extinction voltage from flashes counted at two or more supply voltages, with resistor and
 * capacitor known, by least squares over all counts. Tolerances of the parts are common to all counts: each
 * is one more unknown, held near its marking by its own deviation, so that they weigh on both thresholds
 * together as they should, and many counts may even correct them.
 */
export function thresholdsFromRates(
  observations: readonly RateObservation[],
  parts: RateParts,
  options: RateOptions = {},
): RateThresholds {
  const errors = { count: options.countError ?? plusMinusOneFlash, time: options.timeError ?? 0 }
  const fault =
    faultInRates(observations, parts) ??
    (errors.count >= 0 && errors.time >= 0 && errors.count + errors.time > 0
      ? null
      : 'Give an error of the count or of the time: without one no uncertainty can be told.')
  if (fault !== null) return { ok: false, reason: fault }
  const problem = problemOf(observations, parts, errors)
  const trend = faultInTrend(problem)
  if (trend !== null) return { ok: false, reason: trend }
  const fit = bestFit(problem)
  if (fit === null) {
    const reason = 'With this leakage the lamp could not flash at the lowest of these supplies.'
    return { ok: false, reason }
  }
  const [strike, extinction] = fit.unknowns as readonly [number, number]
  const edge = reasonAtEdge(strike, extinction, observations)
  if (edge !== null) return { ok: false, reason: edge }

  const rows = weightedRows(problem, fit.unknowns)
  const normal = normalMatrix(rows, priorOf(fit.unknowns))
  const all = inverseOf(normal)
  const counting = inverseOf(normalMatrix(rows, [0, 0]))
  if (all === null || counting === null) {
    const reason =
      'These supply voltages tell strike from extinction not at all: take one much closer to strike.'
    return { ok: false, reason }
  }
  const strikeDeviation = deviation(all, 0)
  const extinctionDeviation = deviation(all, 1)
  const condition = conditionOf(counting)
  const freedom = observations.length - 2
  const supplies = observations.map(({ supplyVoltage }) => supplyVoltage)
  const usual = {
    low: 0,
    high: 1.5 * Math.max(...supplies),
    time: Math.max(...observations.map(({ time }) => time)),
  }
  const choice = options.next === undefined ? usual : options.next
  const figures = {
    strike,
    extinction,
    strikeDeviation,
    extinctionDeviation,
    correlation: (all[0]?.[1] as number) / (strikeDeviation * extinctionDeviation),
    fromCounting: { strike: deviation(counting, 0), extinction: deviation(counting, 1) },
    misfit: fit.misfit,
    freedom,
    chance: freedom > 0 ? 1 - chiSquareBelow(fit.misfit, freedom) : null,
    condition,
    illConditioned: condition > worstCondition,
    next:
      choice === null ? null : nextVoltage(problem, fit.unknowns, normal, strikeDeviation, choice),
  }
  return { ok: true, ...figures, remarks: remarksOnRates(figures, problem) }
}

const deviation = (covariance: Matrix, k: number) => Math.sqrt(covariance[k]?.[k] as number)

/** Ratio of the long to the short half axis of the ellipse of errors. */
function conditionOf(covariance: Matrix): number {
  const [a, b] = [covariance[0]?.[0] as number, covariance[1]?.[1] as number]
  const c = covariance[0]?.[1] as number
  const long = (a + b + Math.hypot(a - b, 2 * c)) / 2
  // The short one from the determinant: as a difference it would have no figures left.
  return long / Math.sqrt(Math.max(a * b - c * c, Number.MIN_VALUE))
}

/** Why a fit that ran into an end of what is possible is none. */
function reasonAtEdge(
  strike: number,
  extinction: number,
  observations: readonly RateObservation[],
): string | null {
  const lowest = Math.min(...observations.map(({ supplyVoltage }) => supplyVoltage))
  if (extinction < 2e-3 * strike) {
    return 'These rates ask for an extinction voltage below 0 V. Resistor times capacitor is larger than given, or a count is wrong.'
  }
  if (lowest - strike < 1e-5 * lowest) {
    return `These rates ask for a strike voltage at or above the lowest supply, ${formatQuantity(lowest, 'V')}. A count is wrong, or leakage slows it there.`
  }
  if (strike - extinction < 1e-3 * strike) {
    return 'These rates ask for strike and extinction at the same voltage. Resistor times capacitor is smaller than given, or a count is wrong.'
  }
  return null
}
