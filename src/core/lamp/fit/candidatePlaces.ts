/** A step of voltage between neighbours that makes corners of both, as a part of the greatest voltage. */
const corner = 0.06

/** Such steps at most: the greatest. More are noise. */
const mostCorners = 6

/**
 * Levels at which a knot may stand, V, rising: 0, then levels of points, the last point's being the
 * last. Few enough to search through, and thick where points are many or the curve goes far; all the
 * points where `most` allows it. With `between`, also the middle of the step before each. `kept` are
 * levels that must be among them.
 */
export function candidatePlaces(
  level: ArrayLike<number>,
  voltage: ArrayLike<number>,
  most: number,
  between: boolean,
  kept: readonly number[],
): readonly number[] {
  const count = level.length
  const first = level[0] as number
  const last = level[count - 1] as number
  const steps = Array.from({ length: count }, (_, i) =>
    Math.abs((voltage[i] as number) - (voltage[Math.max(0, i - 1)] as number)),
  )
  const up = steps.reduce((sum, step) => sum + step, 0)
  const top = Array.from(voltage).reduce((greatest, v) => Math.max(greatest, v), 0)
  const corners = new Set(
    steps
      .map((step, i) => ({ step, i }))
      .filter(({ step }) => step > corner * top)
      .sort((a, b) => b.step - a.step)
      .slice(0, mostCorners)
      .map(({ i }) => i),
  )
  const chosen = new Set<number>(kept)
  let travelled = 1
  for (let i = 0; i < count; i++) {
    const here = level[i] as number
    const before = level[Math.max(0, i - 1)] as number
    // A third each for the points passed, the way along and the way up and down.
    const share =
      1 / count +
      Math.log((here - first + 0.05 * last) / (before - first + 0.05 * last)) / Math.log(21) +
      (steps[i] as number) / (up || 1)
    travelled += (share * (most - 1)) / 3
    const isCorner = corners.has(i)
    if (count > most && travelled < 1 && !isCorner) continue
    travelled %= 1
    // Both ends of a long step are corners, or the corner is somewhere between.
    if (isCorner) {
      for (const part of [0, 0.25, 0.5, 0.75]) chosen.add(before + part * (here - before))
    } else if (between) chosen.add((before + here) / 2)
    chosen.add(here)
  }
  chosen.add(last)
  return [0, ...[...chosen].filter((place) => place > 0 && place <= last).sort((a, b) => a - b)]
}
