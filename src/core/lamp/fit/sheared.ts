import type { SweepPoint } from '../sweepPoint'

/**
 * Points of a sweep against `level = voltage + shear · current`, as a load line of that resistance
 * would cut them, in rising order. Currents run over six decades and the dark ones are often lost
 * in the errors of reading, so they give no order; levels do, and a straight line of voltage
 * against current is one against level too.
 */
export type Sheared = {
  /** Ω. */
  readonly shear: number
  readonly level: Float64Array
  readonly voltage: Float64Array
  /** Variances and covariance of each point's errors, V². */
  readonly levelVariance: Float64Array
  readonly voltageVariance: Float64Array
  readonly covariance: Float64Array
}

/** Puts points in the order of their level. */
export function shearPoints(points: readonly SweepPoint[], shear: number): Sheared {
  const levels = points.map(({ current, voltage }) => voltage + shear * current)
  const from = points.map((_, i) => i)
  from.sort((a, b) => (levels[a] as number) - (levels[b] as number))
  const column = (value: (point: SweepPoint) => number) =>
    Float64Array.from(from, (i) => value(points[i] as SweepPoint))
  return {
    shear,
    level: Float64Array.from(from, (i) => levels[i] as number),
    voltage: column(({ voltage }) => voltage),
    voltageVariance: column(({ sigmaVoltage }) => sigmaVoltage ** 2),
    levelVariance: column(
      (p) => p.sigmaVoltage ** 2 + 2 * shear * (p.covariance ?? 0) + (shear * p.sigmaCurrent) ** 2,
    ),
    covariance: column(
      ({ sigmaVoltage, covariance = 0 }) => sigmaVoltage ** 2 + shear * covariance,
    ),
  }
}

/** The points but for some, which are named by their places in the order. */
export function withoutPoints(sheared: Sheared, some: readonly number[]): Sheared {
  const out = new Set(some)
  const stays = (_: number, i: number) => !out.has(i)
  return {
    shear: sheared.shear,
    level: sheared.level.filter(stays),
    voltage: sheared.voltage.filter(stays),
    levelVariance: sheared.levelVariance.filter(stays),
    voltageVariance: sheared.voltageVariance.filter(stays),
    covariance: sheared.covariance.filter(stays),
  }
}

/** Enough points to choose the shear by. */
const sampled = 600

/** A change of current over the whole range counts like this many of voltage. */
const currentShare = 3

/** Nearly as little travel as the least: one point among the wrong ones makes more than twice that. */
const nearly = 0.15

/**
 * The shear that lays the sweep out as one curve, Ω: the one with which voltage and current, each as
 * a part of its greatest, go up and down least from point to point. With too small a one, dark and
 * lit points of one level fall among each other; with too large a one the errors of the currents
 * shuffle the dark ones. Of all that do nearly as well as the best, the middle one. Null where no
 * current is above zero.
 */
export function chooseShear(points: readonly SweepPoint[]): number | null {
  const every = Math.ceil(points.length / sampled)
  const some = points.filter((_, i) => i % every === 0)
  const voltage = Math.max(...some.map((point) => point.voltage))
  const current = Math.max(...some.map((point) => point.current))
  if (!(voltage > 0 && current > 0)) return null
  const shears = Array.from({ length: 40 }, (_, i) => (voltage / current) * 2 ** (i / 2 - 4))
  const travels = shears.map((shear) => travelOf(some, shear, voltage, current))
  const least = Math.min(...travels)
  const best = travels.indexOf(least)
  const good = (i: number) => (travels[i] ?? Number.POSITIVE_INFINITY) <= least + nearly
  let low = best
  let high = best
  while (good(low - 1)) low--
  while (good(high + 1)) high++
  return shears[(low + high) >> 1] as number
}

/** How far voltage and current go up and down from point to point in the order of their levels. */
function travelOf(
  points: readonly SweepPoint[],
  shear: number,
  mostVoltage: number,
  mostCurrent: number,
): number {
  const level = ({ current, voltage }: SweepPoint) => voltage + shear * current
  const placed = points.toSorted((a, b) => level(a) - level(b))
  let travel = 0
  for (let i = 1; i < placed.length; i++) {
    const here = placed[i] as SweepPoint
    const before = placed[i - 1] as SweepPoint
    travel += Math.abs(here.voltage - before.voltage) / mostVoltage
    travel += (currentShare * Math.abs(here.current - before.current)) / mostCurrent
  }
  return travel
}

/**
 * Variance of a point's distance, upright, from a line of that slope (voltage over level), V².
 * Source: the effective variance, Orear, American Journal of Physics 50 (1982) 912, with the
 * covariance added [from memory].
 */
export function effectiveVariance(sheared: Sheared, point: number, slope: number): number {
  return (
    (sheared.voltageVariance[point] as number) -
    2 * slope * (sheared.covariance[point] as number) +
    slope * slope * (sheared.levelVariance[point] as number)
  )
}
