import type { Bridge } from './searchKnots'
import type { Shape } from './shape'
import { effectiveVariance, type Sheared, withoutPoints } from './sheared'

/** The sides of a falling region that the sweep passed over, and the points on them. */
export type Bridging = {
  /** Levels of the last dark and of the first lit point. */
  readonly bridge: Bridge
  /** The points on the two sides. */
  readonly sides: Sheared
  /** How many points stand between them. */
  readonly between: number
}

/** A point this many standard errors off both ends of the fall is in it. */
const clear = 6

/** Points in the fall show its slope if they lie this part of it apart, or more. */
const apart = 0.12

/**
 * What to do without the falling region where no point lies clearly in it, or only points of one setting
 * of the supply, through which a fall of any slope would go; null where the points show its slope.
 */
export function bridgeOver(sheared: Sheared, shape: Shape, errorScale: number): Bridging | null {
  const { levels, voltages, knee, valley } = shape
  const top = voltages[knee] as number
  const foot = voltages[valley] as number
  const from = levels[knee] as number
  const to = levels[valley] as number
  const between: number[] = []
  for (let i = 0; i < sheared.level.length; i++) {
    const level = sheared.level[i] as number
    const voltage = sheared.voltage[i] as number
    // Near the foot a point lies on a flat piece, near the top on one of nearly slope 1.
    const sigmas = [0, 1].map((slope) => Math.sqrt(effectiveVariance(sheared, i, slope)))
    const margins = sigmas.map((sigma) => Math.min(0.1 * (top - foot), clear * errorScale * sigma))
    const inside = voltage > foot + (margins[0] as number) && voltage < top - (margins[1] as number)
    if (level > from && level < to && inside) between.push(i)
  }
  const first = sheared.level[between[0] ?? 0] as number
  const last = sheared.level[between.at(-1) ?? 0] as number
  if (last - first > apart * (to - from)) return null
  const sides = withoutPoints(sheared, between)
  const lit = steepestFall(sides)
  if (lit < 1 || !((sides.level[lit - 1] as number) > 0)) return null
  const bridge = { knee: sides.level[lit - 1] as number, valley: sides.level[lit] as number }
  return { bridge, sides, between: between.length }
}

/** The point before which the voltage falls most. */
function steepestFall({ voltage }: Sheared): number {
  let most = 0
  let at = 0
  for (let i = 1; i < voltage.length; i++) {
    const fall = (voltage[i - 1] as number) - (voltage[i] as number)
    if (fall > most) {
      most = fall
      at = i
    }
  }
  return at
}

/**
 * Whether a shape's fall is more than the errors of reading, and than a hundredth of its height. An
 * error of current counts as well: along the dark branch it looks like one of voltage.
 */
export function reallyFalls(sheared: Sheared, shape: Shape, errorScale: number): boolean {
  const top = shape.voltages[shape.knee] as number
  const drop = top - (shape.voltages[shape.valley] as number)
  const variances = [0, 1].map((slope) => {
    const all = sheared.level.map((_, i) => effectiveVariance(sheared, i, slope)).sort()
    return all[all.length >> 1] as number
  })
  return drop > Math.max(0.01 * top, 5 * errorScale * Math.sqrt(Math.max(...variances)))
}
