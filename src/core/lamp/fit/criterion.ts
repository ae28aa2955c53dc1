import type { CostedShape } from './refineKnots'
import type { Free } from './residuals'

/** A shape after refining, with the numbers that were free in it. */
export type FittedShape = CostedShape & { readonly free: readonly Free[] }

/** The shape with the least criterion, and what all of them came to. */
export type Weighed = {
  readonly chosen: FittedShape
  readonly least: number
  readonly values: readonly { readonly knots: number; readonly value: number }[]
  /** What the points' errors must be multiplied by to agree with their scatter. */
  readonly errorScale: number
}

/** Costs below this part of a point's variance are rounding: a thousandth of its error. */
const rounding = 1e-6

/** How many numbers a knot more counts for. */
const numbersPerKnot = 3

/**
 * Schwarz's criterion with its count of numbers: `χ² + k ln n` where the errors are known (`trusted`),
 * `n ln(χ²/n) + k ln n` where only their proportions are. A knot's voltage counts once and its
 * place twice: a place that fits noise best can be looked for all along the curve, which a plain
 * count would reward. The two are own choice, no source.
 */
function criterionOf(cost: number, pieces: number, count: number, trusted: boolean): number {
  const misfit = trusted ? cost : count * Math.log(Math.max(cost / count, rounding))
  return misfit + numbersPerKnot * pieces * Math.log(count)
}

/** The most so many pieces may cost and still come below a value of the criterion. */
function costBelow(value: number, pieces: number, count: number, trusted: boolean): number {
  const misfit = value - numbersPerKnot * pieces * Math.log(count)
  return trusted ? misfit : count * Math.exp(misfit / count)
}

/**
 * Whether errors given can be taken at their word: χ² is not beyond its mean by more than three of
 * its standard deviations.
 */
function agrees(cost: number, freedom: number): boolean {
  return cost / Math.max(1, freedom) <= 1 + 3 * Math.sqrt(2 / Math.max(1, freedom))
}

/** The most that so many knots may cost and still win against what other numbers of them cost. */
export function worthOf(
  knots: number,
  reached: readonly { readonly knots: number; readonly cost: number }[],
  count: number,
  errors: 'given' | 'estimated',
): number {
  const others = reached.filter((one) => one.knots !== knots)
  const trusted =
    errors === 'given' && others.some((one) => agrees(one.cost, count - 2 * one.knots))
  const values = others.map((one) => criterionOf(one.cost, one.knots - 1, count, trusted))
  return costBelow(Math.min(...values), knots - 1, count, trusted)
}

/** Chooses the shape with the least criterion. */
export function weighShapes(
  shapes: readonly FittedShape[],
  count: number,
  errors: 'given' | 'estimated',
): Weighed {
  const trusted =
    errors === 'given' && shapes.some(({ cost, free }) => agrees(cost, count - free.length))
  const values = shapes.map(({ cost, shape: { levels } }) => ({
    knots: levels.length,
    value: criterionOf(cost, levels.length - 1, count, trusted),
  }))
  const least = Math.min(...values.map(({ value }) => value))
  const chosen = shapes[values.findIndex(({ value }) => value === least)] as FittedShape
  const reduced = chosen.cost / Math.max(1, count - chosen.free.length)
  const sorted = values.toSorted((a, b) => a.knots - b.knots)
  return { chosen, least, values: sorted, errorScale: trusted ? 1 : Math.sqrt(reduced) }
}
