import type { Direction, SweepPoint } from '../sweepPoint'

/**
 * How far beyond the last point of a branch its end may lie, in the branch's own measure (V for the
 * knee, A for the valley): `reach` where the next step of the supply showed that it was passed, null
 * where nothing shows.
 */
export type BranchEnd = { readonly last: SweepPoint; readonly reach: number | null }

/** Points looked back over for the size of a step. */
const pointsBack = 8

/**
 * The knee as an up-going sweep brackets it: the highest dark point after which the lamp was no
 * longer dark, and the step of voltage that would have come next.
 */
export function kneeEnd(points: readonly SweepPoint[], isDark: (point: SweepPoint) => boolean) {
  return endOf(points, 'up', isDark, ({ voltage }) => voltage)
}

/**
 * The valley as a down-going sweep brackets it: the lit point of least current after which it
 * was no longer lit, and the step of current that would have come next.
 */
export function valleyEnd(points: readonly SweepPoint[], isLit: (point: SweepPoint) => boolean) {
  return endOf(points, 'down', isLit, ({ current }) => -current)
}

function endOf(
  points: readonly SweepPoint[],
  direction: Direction,
  onBranch: (point: SweepPoint) => boolean,
  measure: (point: SweepPoint) => number,
): BranchEnd | null {
  const ordered = points.filter((point) => point.direction === direction)
  ordered.sort((a, b) => a.row - b.row)
  let best: BranchEnd | null = null
  for (const [i, last] of ordered.entries()) {
    const next = ordered[i + 1]
    if (!next || !onBranch(last) || onBranch(next)) continue
    if (best && measure(best.last) >= measure(last)) continue
    let first = i
    while (i - first < pointsBack && first > 0 && onBranch(ordered[first - 1] as SweepPoint)) {
      first--
    }
    const start = ordered[first] as SweepPoint
    // By rows, not by points: one point may stand for many rows.
    const step = (measure(last) - measure(start)) / Math.max(1, last.row - start.row)
    const reach = first < i ? Math.max(0, step * (next.row - last.row)) : null
    best = { last, reach }
  }
  return best
}
