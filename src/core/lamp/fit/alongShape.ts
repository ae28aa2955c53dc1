import type { WeightedPoints } from './pieceCosts'
import type { Shape } from './shape'

/** Calls for each point with its distance from the shape, V, at its own level, and the slope there. */
function eachPoint(
  points: Pick<WeightedPoints, 'level' | 'voltage'>,
  { levels, voltages }: Shape,
  call: (point: number, distance: number, slope: number) => void,
): void {
  let piece = 0
  for (let i = 0; i < points.level.length; i++) {
    const at = points.level[i] as number
    while (piece + 2 < levels.length && at > (levels[piece + 1] as number)) piece++
    const left = levels[piece] as number
    const from = voltages[piece] as number
    const slope = ((voltages[piece + 1] as number) - from) / ((levels[piece + 1] as number) - left)
    call(i, (points.voltage[i] as number) - from - slope * (at - left), slope)
  }
}

/** Root mean square distance of the points from a shape, V, each at the point's own level. */
export function rmsOf(points: Pick<WeightedPoints, 'level' | 'voltage'>, shape: Shape): number {
  let sum = 0
  eachPoint(points, shape, (_, distance) => {
    sum += distance * distance
  })
  return Math.sqrt(sum / points.level.length)
}

/** Weighted squares of the points' distances from a shape. */
export function weightedCost(points: WeightedPoints, shape: Shape): number {
  let sum = 0
  eachPoint(points, shape, (i, distance) => {
    sum += (points.weight[i] as number) * distance * distance
  })
  return sum
}

/** Slope, voltage over level, of the piece each point lies on. */
export function slopesAlong(
  points: Pick<WeightedPoints, 'level' | 'voltage'>,
  shape: Shape,
): Float64Array {
  const slopes = new Float64Array(points.level.length)
  eachPoint(points, shape, (i, _, slope) => {
    slopes[i] = slope
  })
  return slopes
}
