import type { Knot } from '../../stage/lamp'
import { type CommonError, commonCurrentError } from '../sweepPoint'
import { type Free, residualsOf } from './residuals'
import type { Shape } from './shape'
import type { Sheared } from './sheared'
import { invertNormal } from './solveNormal'

/** Knots of a shape: the current is (level − voltage) / shear. */
export function knotsOf({ levels, voltages }: Shape, shear: number): readonly Knot[] {
  return levels.map((level, i) => {
    const voltage = voltages[i] as number
    return { current: i === 0 ? 0 : (level - voltage) / shear, voltage }
  })
}

/**
 * Standard errors of the knots of a shape, A and V: from the inverse of the normal equations, times
 * `scale`; the current's by the delta method, being linear in level and voltage. Common errors of
 * the currents are added in quadrature. Null where the points do not fix all the knots.
 */
export function knotErrors(
  sheared: Sheared,
  shape: Shape,
  free: readonly Free[],
  scale: number,
  common: CommonError | undefined,
): readonly Knot[] | null {
  const size = free.length
  const { normal } = residualsOf(sheared, shape, free, true)
  if (!normal) return null
  // What the points do not fix at all lies anywhere along the sweep: so much is known beforehand.
  const range = shape.levels.at(-1) as number
  for (let i = 0; i < size; i++) {
    normal.matrix[i * size + i] = (normal.matrix[i * size + i] as number) + (scale / range) ** 2
  }
  const inverse = invertNormal(normal.matrix, size)
  if (!inverse) return null
  const place = (knot: number, kind: Free['kind']) =>
    free.findIndex((f) => f.knot === knot && f.kind === kind)
  const covariance = (i: number, j: number) =>
    i < 0 || j < 0 ? 0 : (inverse[i * size + j] as number) * scale * scale
  return knotsOf(shape, sheared.shear).map(({ current, voltage }, knot) => {
    if (knot === 0) return { current: 0, voltage: 0 }
    const v = place(knot, 'voltage')
    const l = place(knot, 'level')
    const byCurrent = covariance(l, l) - 2 * covariance(l, v) + covariance(v, v)
    const shared = common ? commonCurrentError(common, current, voltage) : 0
    return {
      current: Math.hypot(Math.sqrt(Math.max(0, byCurrent)) / sheared.shear, shared),
      voltage: Math.sqrt(covariance(v, v)),
    }
  })
}
