import { weightedCost } from './alongShape'
import { type FreePieces, freePieces } from './freePieces'
import { joinPieces } from './joinPieces'
import { type KnotProblem, optimalKnots } from './optimalKnots'
import { pieceRules } from './phases'
import { pieceCosts, type WeightedPoints } from './pieceCosts'
import { keepCourse, type Shape, withTurns } from './shape'

/** Levels between which one straight falling piece must run, V. */
export type Bridge = { readonly knee: number; readonly valley: number }

/** Pairs of chains compared in one search at most: some hundredths of a second's work. */
const patience = 4e5

/** A start this many times as dear as what must be beaten is not worth moving. */
const hopeless = 4

/** What a shape must keep to. */
export type ShapeRules = {
  /** What the voltage must rise by less than the level along each piece, V. */
  readonly leastRise: number
  readonly bridge: Bridge | null
}

/** Points of fixed weights and the places where knots may stand, 0 first and the last point's level last. */
export type KnotSearch = {
  readonly points: WeightedPoints
  readonly places: readonly number[]
  readonly problem: KnotProblem
  readonly free: FreePieces
}

/** Shapes to be moved off their places, and whether the search for the best ran to its end. */
export type KnotsFound = { readonly shapes: readonly Shape[]; readonly complete: boolean }

/** Makes ready for searches with up to `mostPieces` pieces. */
export function prepareSearch(
  points: WeightedPoints,
  places: readonly number[],
  mostPieces: number,
  { leastRise, bridge }: ShapeRules,
): KnotSearch {
  const ends = bridge && {
    knee: places.indexOf(bridge.knee),
    valley: places.indexOf(bridge.valley),
  }
  const costs = pieceCosts(points, places)
  const rules = pieceRules(places, leastRise, ends)
  const free = freePieces(costs, mostPieces, rules)
  return { points, places, problem: { costs, rules, remainders: free.remainders }, free }
}

/**
 * Shapes of so many pieces to be moved off their places: the best with knots at the places, where
 * one costs less than `limit`, and one with its knots where lines free of each other cross.
 */
export function searchKnots(
  { points, places, problem, free }: KnotSearch,
  pieces: number,
  { leastRise, bridge }: ShapeRules,
  limit: number,
): KnotsFound {
  const joined = bridge ? null : joinPieces(problem.costs, places, free, pieces, points.level)
  const kept = joined && keepCourse(joined, leastRise)
  const promising = kept !== null && weightedCost(points, kept) < hopeless * limit
  const found = optimalKnots(problem, pieces, limit, patience)
  const choice = found === 'too long' ? null : found
  const levels = choice?.places.map((place) => places[place] as number) ?? []
  const best = choice && withTurns(levels, choice.voltages)
  const shapes = [promising ? kept : null, best].filter((shape) => shape !== null)
  return { shapes, complete: found !== 'too long' }
}
