import { type Quadratic, quadraticAt } from './lowerEnvelope'
import type { PieceCost } from './pieceCosts'

/**
 * The least cost of everything up to a knot, as a quadratic in that knot's voltage, for one choice of
 * the places of the knots before; and how to find those knots' voltages again.
 */
export type Chain = Quadratic & {
  /** Place of the knot. */
  readonly place: number
  readonly before: Chain | null
  /** The voltage of the knot before is `base + gain` times this one's. */
  readonly base: number
  readonly gain: number
}

/** Which way the voltage goes along a piece, and how much it may rise there at most, V. */
export type Course = { readonly rising: true; readonly most: number } | { readonly rising: false }

/** The part of a chain a piece may start from. `lowEnd` and `highEnd` mark ends where nothing goes on. */
export type ChainPart = {
  readonly item: Chain
  readonly low: number
  readonly high: number
  readonly lowEnd: boolean
  readonly highEnd: boolean
}

/** The chain before the first piece: 0 V at no current. */
export const originChain: Chain = {
  square: 0,
  linear: 0,
  constant: 0,
  low: 0,
  high: 0,
  place: 0,
  before: null,
  base: 0,
  gain: 0,
}

/**
 * Hands on every chain that comes of `part` by one more piece ending at `place`: the voltage where
 * the piece starts is free within its bounds, or rests on one of them.
 */
export function extendChain(
  part: ChainPart,
  cost: PieceCost,
  course: Course,
  place: number,
  give: (chain: Chain) => void,
): void {
  const { item, low, high } = part
  // Rising: v − most ≤ u ≤ v. Falling: v ≤ u. The best free u is p − s·v.
  const stiffness = item.square + cost.uu
  const p = stiffness > 0 ? (item.linear + cost.u1) / stiffness : Number.NaN
  const s = stiffness > 0 ? cost.uv / stiffness : Number.NaN
  const turn = p / (1 + s)

  if (stiffness > 0 && high > low) {
    let from = course.rising ? turn : 0
    let to = course.rising ? (p + course.most) / (1 + s) : turn
    if (s > 0) {
      from = Math.max(from, (p - high) / s)
      to = Math.min(to, (p - low) / s)
    }
    if (s > 0 || (p >= low && p <= high)) give(along(item, cost, place, p, -s, from, to))
  }
  if (high > low) {
    const upTo = course.rising ? least(high, turn) : high
    const downTo = course.rising ? low : most(low, turn)
    give(along(item, cost, place, 0, 1, downTo, upTo))
    if (course.rising) {
      const above = (p + course.most) / (1 + s)
      give(
        along(
          item,
          cost,
          place,
          -course.most,
          1,
          most(low + course.most, above),
          high + course.most,
        ),
      )
    }
  }
  for (const end of [part.lowEnd ? low : Number.NaN, part.highEnd ? high : Number.NaN]) {
    if (Number.isNaN(end)) continue
    if (course.rising) give(along(item, cost, place, end, 0, end, end + course.most))
    else give(along(item, cost, place, end, 0, 0, end))
    if (low === high) break
  }
}

/** The chain in which the voltage before is `base + gain·v`, for v from `low` to `high`. */
function along(
  item: Chain,
  cost: PieceCost,
  place: number,
  base: number,
  gain: number,
  low: number,
  high: number,
): Chain {
  const square = item.square + cost.uu
  const linear = item.linear + cost.u1
  return {
    square: square * gain * gain + 2 * cost.uv * gain + cost.vv,
    linear: linear * gain + cost.v1 - base * (square * gain + cost.uv),
    constant: item.constant + cost.rest + base * (square * base - 2 * linear),
    low,
    high,
    place,
    before: item,
    base,
    gain,
  }
}

/** The lesser of a bound and another that may be unknown (NaN). */
function least(bound: number, other: number): number {
  return Number.isNaN(other) ? bound : Math.min(bound, other)
}

/** The greater of a bound and another that may be unknown (NaN). */
function most(bound: number, other: number): number {
  return Number.isNaN(other) ? bound : Math.max(bound, other)
}

/** The least a chain costs between two voltages, and the voltage where it does. */
export function leastOf(q: Quadratic, low: number, high: number): { at: number; cost: number } {
  const bottom = q.square > 0 ? q.linear / q.square : q.linear > 0 ? high : low
  const at = Math.min(high, Math.max(low, bottom))
  return { at, cost: quadraticAt(q, at) }
}

/** The part of a chain that costs no more than `limit`; null where nothing of it does. */
export function withinLimit(chain: Chain, limit: number): Chain | null {
  const { square, linear, constant, low, high } = chain
  if (!(high > low)) return null
  if (!(limit < Number.POSITIVE_INFINITY) || !(square > 0)) return chain
  const middle = linear / square
  const room = (limit - constant) / square + middle * middle
  if (!(room >= 0)) return null
  const reach = Math.sqrt(room)
  const from = Math.max(low, middle - reach)
  const to = Math.min(high, middle + reach)
  if (!(to > from)) return null
  return from === low && to === high ? chain : { ...chain, low: from, high: to }
}
