import { line as pathMaker } from 'd3'
import { branchesOf, type Knot } from '../core'
import { characteristicPoints, type PlanePoint } from './curves'
import type { PlaneInput } from './planePicture'

/** Readings of a sweep and what was fitted to them: A and V across the lamp alone. */
export type Overlay = {
  readonly points: readonly Knot[]
  readonly knots: readonly Knot[] | null
}

/** The dots as one path of points without length, which round line ends make visible; and the fitted line. */
export function overlayPaths(
  { stage, x, y, kind }: PlaneInput,
  { points, knots }: Overlay,
): { dots: string; fit: string } {
  const lead = stage.leadResistance
  const dots = points
    .map(({ current, voltage }) => {
      const level = voltage + lead * Math.max(0, current)
      return `M${x.place(Math.max(0, current)).toFixed(1)} ${y.place(level).toFixed(1)}h0`
    })
    .join('')
  if (knots === null) return { dots, fit: '' }
  const draw = pathMaker<PlanePoint>(
    ([current]) => x.place(current),
    ([, voltage]) => y.place(voltage),
  ).digits(2)
  return { dots, fit: draw(characteristicPoints(branchesOf(knots, lead), kind, x.domain)) ?? '' }
}
