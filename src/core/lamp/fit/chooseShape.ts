import { type Bridging, bridgeOver, reallyFalls } from './bridge'
import { type FittedShape, type Weighed, weighShapes } from './criterion'
import type { Free } from './residuals'
import { type ShapeWanted, searchRound } from './searchRound'
import type { Shape } from './shape'
import type { Sheared } from './sheared'

/** The shape that the criterion chose, or why there is none. */
export type ChosenShape =
  | {
      readonly ok: true
      readonly shape: Shape
      readonly free: readonly Free[]
      readonly cost: number
      readonly errorScale: number
      readonly values: Weighed['values']
      /** Whether the last search ran to its end for each number of knots. */
      readonly proven: boolean
      /** The points it was fitted to. */
      readonly sheared: Sheared
      /** Where one straight piece joins knee and valley: how many points it passes over; else null. */
      readonly bridged: number | null
    }
  | { readonly ok: false; readonly message: string }

/** Rounds of search at most; two are usual, and two more with a bridge. */
const mostRounds = 10

/** Places of the first rounds, which show roughly where the knots are, and of those after. */
const fewPlaces = 18
const manyPlaces = 64

/** Levels must rise by this part of the last more than the voltage does, so that currents increase. */
const leastPart = 1e-9

/**
 * Searches among few places, then among many until nothing better is found. Where the readings
 * turn out to pass over the falling region, it begins again with the two sides joined by one straight
 * piece. Gives the part done, 0 … 1.
 */
export function* chooseShape(points: Sheared, wanted: ShapeWanted): Generator<number, ChosenShape> {
  const leastRise = leastPart * (points.level.at(-1) as number)
  let sheared = points
  let bridging: Bridging | null = null
  let fitted: readonly FittedShape[] = []
  let best: Weighed | null = null
  let proven = false
  for (let round = 0; round < mostRounds; round++) {
    yield round / mostRounds
    const places = fitted.length === 0 ? fewPlaces : manyPlaces
    const { shapes: found, complete } = searchRound(
      sheared,
      wanted,
      { leastRise, bridge: bridging?.bridge ?? null },
      places,
      fitted,
    )
    if (found.length === 0) break
    proven = complete
    const before = best
    best = weighShapes(found, sheared.level.length, wanted.errors)
    const settled =
      found === fitted ||
      !complete ||
      (before && fitted.length > 0 && before.least - best.least < 1e-3)
    fitted = found
    if (!settled) continue
    if (bridging) break
    bridging = bridgeOver(sheared, best.chosen.shape, best.errorScale)
    if (!bridging) break
    sheared = bridging.sides
    fitted = []
  }
  if (!best) return { ok: false, message: 'No characteristic of a lamp fits these readings.' }
  const { chosen, errorScale, values } = best
  if (!reallyFalls(sheared, chosen.shape, errorScale)) {
    return {
      ok: false,
      message:
        'The voltage never clearly falls as the current rises, so these readings show no strike: the sweep must have dark readings and lit ones.',
    }
  }
  return {
    ok: true,
    ...chosen,
    errorScale,
    values,
    proven,
    sheared,
    bridged: bridging?.between ?? null,
  }
}
