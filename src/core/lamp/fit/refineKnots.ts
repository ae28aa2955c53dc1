import { type Free, residualsOf } from './residuals'
import { keepCourse, type Shape } from './shape'
import type { Sheared } from './sheared'
import { invertNormal } from './solveNormal'

/** A shape with what it costs: squares of the points' distances in standard errors. */
export type CostedShape = { readonly shape: Shape; readonly cost: number }

/** The numbers of a shape that may move: every voltage, and the levels of knots that are not `pinned`. */
export function freeNumbers(shape: Shape, pinned: readonly number[]): readonly Free[] {
  return shape.levels.flatMap((_, knot): readonly Free[] => {
    if (knot === 0) return []
    const voltage = { knot, kind: 'voltage' } as const
    return pinned.includes(knot) ? [voltage] : [voltage, { knot, kind: 'level' }]
  })
}

/** Steps at most; a dozen are usual. */
const mostSteps = 40

/**
 * Moves the free knots off their places to where the squares are least nearby, by damped
 * Gauss–Newton steps. A step is kept only if the shape keeps its course and costs less: what comes
 * back is never worse than what was given.
 */
export function refineKnots(
  sheared: Sheared,
  start: Shape,
  free: readonly Free[],
  leastRise: number,
): CostedShape {
  let shape = start
  let now = residualsOf(sheared, shape, free, true)
  let damping = 1e-3
  for (let step = 0; step < mostSteps && damping < 1e9; step++) {
    const moved = dampedStep(shape, free, now.normal, damping)
    const trial = moved && keepCourse(moved, leastRise)
    const found = trial && residualsOf(sheared, trial, free, false)
    if (!trial || !found || !(found.cost < now.cost)) {
      damping *= 8
      continue
    }
    const gain = now.cost - found.cost
    shape = trial
    now = residualsOf(sheared, shape, free, true)
    damping = Math.max(1e-9, damping / 8)
    if (gain < 1e-7 * now.cost) break
  }
  return { shape, cost: now.cost }
}

/** The shape one damped step on; null where the equations fix none. */
function dampedStep(
  shape: Shape,
  free: readonly Free[],
  normal: { readonly matrix: Float64Array; readonly side: Float64Array } | null,
  damping: number,
): Shape | null {
  if (!normal) return null
  const size = free.length
  const matrix = Float64Array.from(normal.matrix)
  for (let i = 0; i < size; i++) {
    matrix[i * size + i] = (matrix[i * size + i] as number) * (1 + damping) + 1e-300
  }
  const inverse = invertNormal(matrix, size)
  if (!inverse) return null
  const levels = [...shape.levels]
  const voltages = [...shape.voltages]
  for (const [i, { knot, kind }] of free.entries()) {
    let move = 0
    for (let j = 0; j < size; j++) {
      move += (inverse[i * size + j] as number) * (normal.side[j] as number)
    }
    const numbers = kind === 'level' ? levels : voltages
    numbers[knot] = (numbers[knot] as number) + move
  }
  return { ...shape, levels, voltages }
}
