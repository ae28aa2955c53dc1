import type { WeightedPoints } from '../../../src/core/lamp/fit/pieceCosts'

/**
 * The least cost of a characteristic of so many pieces by trying everything: all places of the
 * knots, all ways to share the pieces among dark, falling and glow, and for the bounds on rise and
 * fall every choice of which of them hold as equalities; the rest is a plain solution of the
 * normal equations. Slow, and shares nothing with the search it checks.
 */
export function exhaustiveCost(
  points: WeightedPoints,
  places: readonly number[],
  pieces: number,
  leastRise: number,
): number {
  let best = Number.POSITIVE_INFINITY
  for (const knots of placings(places, pieces)) {
    for (let dark = 1; dark <= pieces - 2; dark++) {
      for (let falling = 1; dark + falling < pieces; falling++) {
        const falls = knots.slice(1).map((_, i) => i >= dark && i < dark + falling)
        best = Math.min(best, leastWithin(points, knots, falls, leastRise))
      }
    }
  }
  return best
}

/** Every choice of knots: the first place, the last, and so many between. */
function placings(places: readonly number[], pieces: number): readonly (readonly number[])[] {
  const inner = places.slice(1, -1)
  const choose = (from: number, count: number): number[][] =>
    count === 0
      ? [[]]
      : inner
          .slice(from)
          .flatMap((place, i) => choose(from + i + 1, count - 1).map((rest) => [place, ...rest]))
  return choose(0, pieces - 1).map((some) => [places[0]!, ...some, places.at(-1)!])
}

function leastWithin(
  points: WeightedPoints,
  knots: readonly number[],
  falls: readonly boolean[],
  leastRise: number,
): number {
  const pieces = falls.length
  const room = falls.map((_, i) => knots[i + 1]! - knots[i]! - leastRise)
  let best = Number.POSITIVE_INFINITY
  // Per piece: 0 free, 1 flat, 2 rising as far as it may, or falling to nothing.
  for (let code = 0; code < 3 ** pieces; code++) {
    const kinds = falls.map((_, i) => Math.floor(code / 3 ** i) % 3)
    const held = kinds.map((kind, i) => (kind === 2 && falls[i] ? 3 : kind))
    const voltages = solve(points, knots, held, room)
    if (!voltages) continue
    const fine = falls.every((fall, i) => {
      const rise = voltages[i + 1]! - voltages[i]!
      return fall
        ? rise <= 1e-9 && voltages[i + 1]! >= -1e-9
        : rise >= -1e-9 && rise <= room[i]! + 1e-9
    })
    if (fine) best = Math.min(best, costOf(points, knots, voltages))
  }
  return best
}

/** Best voltages with some pieces held: each voltage is a free number or follows the one before. */
function solve(
  points: WeightedPoints,
  knots: readonly number[],
  held: readonly number[],
  room: readonly number[],
): readonly number[] | null {
  const unknown = [-1]
  const offset = [0]
  let count = 0
  for (const [i, how] of held.entries()) {
    unknown.push(how === 0 ? count++ : how === 3 ? -1 : unknown[i]!)
    offset.push(how === 0 || how === 3 ? 0 : offset[i]! + (how === 2 ? room[i]! : 0))
  }
  const rows = Array.from({ length: count }, () => new Array<number>(count + 1).fill(0))
  for (let p = 0; p < points.level.length; p++) {
    const { piece, part } = placeOf(knots, points.level[p]!)
    const share = new Array<number>(count).fill(0)
    let rest = points.voltage[p]!
    for (const [knot, weight] of [
      [piece, 1 - part],
      [piece + 1, part],
    ] as const) {
      rest -= weight * offset[knot]!
      if (unknown[knot]! >= 0) share[unknown[knot]!]! += weight
    }
    for (let i = 0; i < count; i++) {
      for (let j = 0; j < count; j++) rows[i]![j]! += points.weight[p]! * share[i]! * share[j]!
      rows[i]![count]! += points.weight[p]! * share[i]! * rest
    }
  }
  const found = eliminate(rows)
  return found && offset.map((add, i) => add + (unknown[i]! < 0 ? 0 : found[unknown[i]!]!))
}

/** Gauss's elimination with the largest pivot; null where the rows fix nothing. */
function eliminate(rows: number[][]): readonly number[] | null {
  const size = rows.length
  for (let i = 0; i < size; i++) {
    let pivot = i
    for (let k = i; k < size; k++)
      if (Math.abs(rows[k]![i]!) > Math.abs(rows[pivot]![i]!)) pivot = k
    if (Math.abs(rows[pivot]![i]!) < 1e-10) return null
    ;[rows[i], rows[pivot]] = [rows[pivot]!, rows[i]!]
    for (let k = 0; k < size; k++) {
      if (k === i) continue
      const factor = rows[k]![i]! / rows[i]![i]!
      for (let j = i; j <= size; j++) rows[k]![j]! -= factor * rows[i]![j]!
    }
  }
  return rows.map((row, i) => row[size]! / row[i]!)
}

function placeOf(knots: readonly number[], level: number): { piece: number; part: number } {
  let piece = 0
  while (piece + 2 < knots.length && level > knots[piece + 1]!) piece++
  return { piece, part: (level - knots[piece]!) / (knots[piece + 1]! - knots[piece]!) }
}

/** Weighted squares of the points' distances from straight lines between knots. */
export function costOf(
  points: WeightedPoints,
  knots: readonly number[],
  voltages: readonly number[],
): number {
  let sum = 0
  for (let p = 0; p < points.level.length; p++) {
    const { piece, part } = placeOf(knots, points.level[p]!)
    const line = voltages[piece]! + part * (voltages[piece + 1]! - voltages[piece]!)
    sum += points.weight[p]! * (points.voltage[p]! - line) ** 2
  }
  return sum
}
