import { dark, mayStart, type Phase, type PieceRules, phases } from './phases'
import type { PieceCost } from './pieceCosts'

/** A straight line over a piece: its voltages at the piece's ends, V. */
export type PieceLine = { readonly u: number; readonly v: number }

/**
 * The points cut into pieces that need not join, each with a line of its own that rises or falls as
 * its phase asks.
 */
export type FreePieces = {
  /**
   * Least that the points above each place can cost with so many pieces more after a piece of each
   * phase: `[pieces][phase][place]`. No real ending costs less, so a chain can be given up once its
   * cost and this together exceed an ending already known.
   */
  readonly remainders: readonly (readonly (readonly number[])[])[]
  /** The places between which the best pieces run, first and last included, so many in all; null if none. */
  readonly cut: (pieces: number) => readonly number[] | null
}

/** Cuts the points in the best way into each number of pieces up to `mostPieces`. */
export function freePieces(
  costs: readonly (readonly (PieceCost | null)[])[],
  mostPieces: number,
  rules: PieceRules,
): FreePieces {
  const last = costs.length - 1
  const none = costs.map(() => Number.POSITIVE_INFINITY)
  const alone = phases.map((phase) =>
    costs.map((row, a) =>
      row.map((cost, b) =>
        cost && rules.allows(phase, a, b)
          ? costAlone(cost, phase === 1, a === 0)
          : Number.POSITIVE_INFINITY,
      ),
    ),
  )
  const ended = none.map((value, place) => (place === last ? 0 : value))
  const remainders: number[][][] = [[none, none, ended]]
  /** The cheapest next piece after one of that phase: its phase, its end and the sum with the rest. */
  const bestNext = (pieces: number, before: Phase, a: number) => {
    let best = { phase: before, end: last, sum: Number.POSITIVE_INFINITY }
    for (const phase of phases) {
      if (!mayStart(phase, before)) continue
      const piece = alone[phase]?.[a] as number[]
      const rest = remainders[pieces - 1]?.[phase] as number[]
      for (let end = a + 1; end <= last; end++) {
        const sum = (piece[end] as number) + (rest[end] as number)
        if (sum < best.sum) best = { phase, end, sum }
      }
    }
    return best
  }
  for (let pieces = 1; pieces <= mostPieces; pieces++) {
    remainders.push(phases.map((phase) => none.map((_, a) => bestNext(pieces, phase, a).sum)))
  }
  const cut = (pieces: number) => {
    const ends = [0]
    let phase: Phase = dark
    for (let left = pieces; left > 0; left--) {
      const next = bestNext(left, phase, ends.at(-1) as number)
      if (next.sum === Number.POSITIVE_INFINITY) return null
      ends.push(next.end)
      phase = next.phase
    }
    return ends
  }
  return { remainders, cut }
}

/** The best line for a piece by itself; null where its points do not fix one. */
export function lineAlone(
  { uu, uv, vv, u1, v1 }: PieceCost,
  fromOrigin: boolean,
): PieceLine | null {
  if (fromOrigin) return vv > 0 ? { u: 0, v: v1 / vv } : null
  const determinant = uu * vv - uv * uv
  if (!(determinant > 1e-9 * uu * vv)) return null
  return { u: (vv * u1 - uv * v1) / determinant, v: (uu * v1 - uv * u1) / determinant }
}

/** Least squares of a piece by itself that rises, or falls; a little less, for what rounding takes. */
function costAlone(cost: PieceCost, falls: boolean, fromOrigin: boolean): number {
  const line = lineAlone(cost, fromOrigin)
  if (!line) return 0
  const { uu, uv, vv, u1, v1, rest } = cost
  const stiffness = uu + 2 * uv + vv
  const flat = stiffness > 0 ? (u1 + v1) ** 2 / stiffness : 0
  const fitted = line.v < line.u === falls ? line.u * u1 + line.v * v1 : fromOrigin ? 0 : flat
  return Math.max(0, (rest - fitted) * (1 - 1e-6) - 1e-10 * rest)
}
