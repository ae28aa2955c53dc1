import type { Shape } from './shape'
import { effectiveVariance, type Sheared } from './sheared'

/** How far the points lie from a shape, and how that answers to its knots. */
export type Residuals = {
  /** Sum of the squares of all distances, each in standard errors of its own. */
  readonly cost: number
  /** Normal matrix and right-hand side in the free numbers; asked for or null. */
  readonly normal: { readonly matrix: Float64Array; readonly side: Float64Array } | null
}

/** One free number of a shape: a knot's level or its voltage. */
export type Free = { readonly knot: number; readonly kind: 'level' | 'voltage' }

/**
 * Squares of the distances in standard errors (effective variance: a steeper piece makes a point's
 * error in level count for more) and, on request, the Gauss–Newton normal equations for the free numbers.
 */
export function residualsOf(
  sheared: Sheared,
  shape: Shape,
  free: readonly Free[],
  withNormal: boolean,
): Residuals {
  const { levels, voltages } = shape
  const size = free.length
  const matrix = new Float64Array(size * size)
  const side = new Float64Array(size)
  // Which free number a knot's level and voltage are; −1 for none.
  const levelAt = levels.map((_, i) => free.findIndex((f) => f.knot === i && f.kind === 'level'))
  const voltageAt = levels.map((_, i) =>
    free.findIndex((f) => f.knot === i && f.kind === 'voltage'),
  )
  const index = [0, 0, 0, 0]
  const slopeBy = [0, 0, 0, 0]
  const rowBy = [0, 0, 0, 0]
  let cost = 0
  let piece = 0
  for (let point = 0; point < sheared.level.length; point++) {
    const level = sheared.level[point] as number
    while (piece + 2 < levels.length && level > (levels[piece + 1] as number)) piece++
    const left = levels[piece] as number
    const width = (levels[piece + 1] as number) - left
    const rise = (voltages[piece + 1] as number) - (voltages[piece] as number)
    const slope = rise / width
    const t = (level - left) / width
    const distance = (sheared.voltage[point] as number) - (voltages[piece] as number) - t * rise
    const variance = effectiveVariance(sheared, point, slope)
    const root = Math.sqrt(variance)
    const residual = distance / root
    cost += residual * residual
    if (!withNormal) continue

    index[0] = voltageAt[piece] as number
    index[1] = voltageAt[piece + 1] as number
    index[2] = levelAt[piece] as number
    index[3] = levelAt[piece + 1] as number
    slopeBy[0] = -1 / width
    slopeBy[1] = 1 / width
    slopeBy[2] = slope / width
    slopeBy[3] = -slope / width
    rowBy[0] = -(1 - t)
    rowBy[1] = -t
    rowBy[2] = slope * (1 - t)
    rowBy[3] = slope * t
    const varianceBySlope =
      2 * (slope * (sheared.levelVariance[point] as number) - (sheared.covariance[point] as number))
    for (let k = 0; k < 4; k++) {
      rowBy[k] =
        (rowBy[k] as number) / root -
        (residual / (2 * variance)) * varianceBySlope * (slopeBy[k] as number)
    }
    for (let k = 0; k < 4; k++) {
      const i = index[k] as number
      if (i < 0) continue
      side[i] = (side[i] as number) - (rowBy[k] as number) * residual
      for (let l = 0; l < 4; l++) {
        const j = index[l] as number
        if (j < 0) continue
        const at = i * size + j
        matrix[at] = (matrix[at] as number) + (rowBy[k] as number) * (rowBy[l] as number)
      }
    }
  }
  return { cost, normal: withNormal ? { matrix, side } : null }
}
