/** The course of a characteristic: dark branch, falling region, glow branch. */
export const dark = 0
export const falling = 1
export const glow = 2
export const phases = [dark, falling, glow] as const
export type Phase = (typeof phases)[number]

/** Which pieces a characteristic may have. */
export type PieceRules = {
  /** Whether a piece of that phase may join those two places. */
  readonly allows: (phase: Phase, from: number, to: number) => boolean
  /** Most the voltage may rise between two places, V, so that the current increases; below 0: not at all. */
  readonly mostRise: (from: number, to: number) => number
}

/** Whether a piece of phase `next` may follow one of phase `before`. */
export function mayStart(next: Phase, before: Phase): boolean {
  return next === before || next === before + 1
}

/**
 * Rules for knots at those places: the level rises by `leastRise` more than the voltage, V; where
 * there is a bridge, one falling piece joins its two places and readings of either branch stay there.
 */
export function pieceRules(
  places: readonly number[],
  leastRise: number,
  bridge: { readonly knee: number; readonly valley: number } | null,
): PieceRules {
  const mostRise = (from: number, to: number) =>
    (places[to] as number) - (places[from] as number) - leastRise
  return {
    mostRise,
    allows: (phase, from, to) => {
      if (mostRise(from, to) < 0) return false
      if (bridge === null) return true
      if (phase === dark) return to <= bridge.knee
      if (phase === glow) return from >= bridge.valley
      return from === bridge.knee && to === bridge.valley
    },
  }
}
