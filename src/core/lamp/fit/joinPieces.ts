import { type FreePieces, lineAlone, type PieceLine } from './freePieces'
import type { PieceCost } from './pieceCosts'
import { type Shape, withTurns } from './shape'

/**
 * A shape of so many pieces from lines that were free to end anywhere: each knot where the lines
 * beside it cross, if that is between the last point of the one and the first of the other, and at
 * the nearer of these points if not. A good place to start from where knots stand in wide gaps.
 * Source: Hudson, Journal of the American Statistical Association 61 (1966) 1097 [from memory].
 */
export function joinPieces(
  costs: readonly (readonly (PieceCost | null)[])[],
  places: readonly number[],
  { cut }: FreePieces,
  pieces: number,
  level: ArrayLike<number>,
): Shape | null {
  const ends = cut(pieces)
  if (!ends) return null
  const lines = ends.slice(1).map((end, i): (PieceLine & Span) | null => {
    const from = ends[i] as number
    const line = lineAlone(costs[from]?.[end] as PieceCost, from === 0)
    return line && { ...line, from: places[from] as number, to: places[end] as number }
  })
  const levels = [0]
  const voltages = [0]
  for (let i = 1; i < ends.length; i++) {
    const place = places[ends[i] as number] as number
    const left = lines[i - 1] ?? null
    const right = lines[i] ?? null
    const next = i + 1 < ends.length ? firstAbove(level, place) : place
    const crossing = left && right ? crossingOf(left, right) : Number.NaN
    const at = Number.isNaN(crossing) ? place : Math.min(next, Math.max(place, crossing))
    levels.push(at)
    voltages.push(left ? valueAt(left, at) : right ? valueAt(right, at) : (voltages.at(-1) ?? 0))
  }
  return withTurns(levels, voltages)
}

type Span = { readonly from: number; readonly to: number }

/** Voltage of a line at a level, V. */
function valueAt({ u, v, from, to }: PieceLine & Span, level: number): number {
  return u + ((level - from) / (to - from)) * (v - u)
}

/** Level at which two lines cross, V; NaN where they never do. */
function crossingOf(one: PieceLine & Span, other: PieceLine & Span): number {
  const slope = (line: PieceLine & Span) => (line.v - line.u) / (line.to - line.from)
  const apart = valueAt(one, 0) - valueAt(other, 0)
  const turn = slope(other) - slope(one)
  return turn === 0 ? Number.NaN : apart / turn
}

/** Level of the first point above a place; the place itself where there is none. */
function firstAbove(level: ArrayLike<number>, place: number): number {
  for (let i = 0; i < level.length; i++) {
    if ((level[i] as number) > place) return level[i] as number
  }
  return place
}
