import { type CurrentAxis, currentAxis, linearAxis, magnify } from '../chart/axes'
import { planeDomain, type Span, timeDomain, voltageDomain } from '../chart/domains'
import type { Zoom } from '../chart/Plate'
import type { Trace } from '../chart/traceOf'
import { branchesOf, type Solution, type Stage } from '../core'

/** The plane magnified about its middle, from wherever it is now. */
export function zoomPlane(zoom: Zoom, kind: CurrentAxis, stage: Stage, factor: number): Zoom {
  const path = branchesOf(stage.lamp.knots, stage.leadResistance)
  const x = currentAxis(kind, zoom.current ?? planeDomain(kind, stage, path), [0, 1])
  const y = linearAxis(zoom.voltage ?? voltageDomain(stage, path), [0, 1], 1)
  return {
    ...zoom,
    current: magnify(x, kind, x.value(0.5), factor),
    voltage: magnify(y, 'linear', y.value(0.5), factor),
  }
}

/** The time axis magnified about its middle. */
export function zoomTime(
  zoom: Zoom,
  span: Span,
  solution: Solution,
  trace: Trace,
  factor: number,
): Zoom {
  const axis = linearAxis(zoom.time ?? timeDomain(span, solution, trace.length), [0, 1], 1)
  return { ...zoom, time: magnify(axis, 'linear', axis.value(0.5), factor) }
}
