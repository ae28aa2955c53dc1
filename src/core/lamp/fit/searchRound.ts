import { slopesAlong, weightedCost } from './alongShape'
import { candidatePlaces } from './candidatePlaces'
import { type FittedShape, weighShapes, worthOf } from './criterion'
import { freeNumbers, refineKnots } from './refineKnots'
import { prepareSearch, type ShapeRules, searchKnots } from './searchKnots'
import type { Shape } from './shape'
import { effectiveVariance, type Sheared } from './sheared'

/** What is to be chosen, and among what. */
export type ShapeWanted = {
  readonly leastKnots: number
  readonly mostKnots: number
  readonly errors: 'given' | 'estimated'
}

/** What a round found, and whether each of its searches ran to its end. */
export type RoundFound = { readonly shapes: readonly FittedShape[]; readonly complete: boolean }

/**
 * One look for better shapes with each number of knots, few first: among some places along the
 * sweep and the knots of all shapes so far, then moved off those places. `fitted` are the shapes
 * so far; what comes back is no worse for any number of knots. A number that could not win, however
 * its knots stood among the places, stays without.
 */
export function searchRound(
  sheared: Sheared,
  { leastKnots, mostKnots, errors }: ShapeWanted,
  rules: ShapeRules,
  mostPlaces: number,
  fitted: readonly FittedShape[],
): RoundFound {
  const { level, voltage } = sheared
  const count = level.length
  const first = fitted.length === 0
  let shapes = fitted
  let complete = true
  const prepare = () => {
    const points = { level, voltage, weight: weightsBy(sheared, shapes, errors) }
    const kept = [
      ...shapes.flatMap(({ shape }) => shape.levels),
      ...(rules.bridge ? [rules.bridge.knee, rules.bridge.valley] : []),
    ]
    const places = candidatePlaces(level, voltage, mostPlaces, !first, kept)
    return prepareSearch(points, places, mostKnots - 1, rules)
  }
  let search = prepare()
  for (let knots = leastKnots; knots <= mostKnots; knots++) {
    // At first each number of knots learns from the fewer ones before it.
    if (first && shapes.length > 0) search = prepare()
    const reached = shapes.map(({ shape }) => ({
      knots: shape.levels.length,
      cost: weightedCost(search.points, shape),
    }))
    const limit = Math.min(
      worthOf(knots, reached, count, errors),
      ...reached.filter((one) => one.knots === knots).map(({ cost }) => cost),
    )
    const found = searchKnots(search, knots - 1, rules, limit)
    complete &&= found.complete
    for (const shape of found.shapes) {
      const now = refine(sheared, shape, rules)
      const best = shapes.find((one) => one.shape.levels.length === knots)
      if (!best || now.cost < best.cost) shapes = [...shapes.filter((one) => one !== best), now]
    }
    // More knots would take longer still.
    if (!complete) break
  }
  return { shapes, complete }
}

/**
 * A point's weight is one over its effective variance, which answers to the slope of the best shape
 * there; as long as there is none, to its own voltage over its level.
 */
function weightsBy(
  sheared: Sheared,
  shapes: readonly FittedShape[],
  errors: 'given' | 'estimated',
): Float64Array {
  const { level, voltage } = sheared
  const slopes =
    shapes.length > 0
      ? slopesAlong(sheared, weighShapes(shapes, level.length, errors).chosen.shape)
      : level.map((at, i) => (at > 0 ? Math.min(1, (voltage[i] as number) / at) : 1))
  return Float64Array.from(slopes, (slope, i) => 1 / effectiveVariance(sheared, i, slope))
}

/** Knots off their places. The last stays at the last reading, and both ends of a bridge at theirs. */
function refine(sheared: Sheared, shape: Shape, { leastRise, bridge }: ShapeRules): FittedShape {
  const ends = bridge ? [shape.knee, shape.valley] : []
  const free = freeNumbers(shape, [...ends, shape.levels.length - 1])
  return { ...refineKnots(sheared, shape, free, leastRise), free }
}
