import {
  feedResistance,
  type Moment,
  type Phase,
  type Solution,
  type Stage,
  tracePhases,
} from '../core'
import type { Span } from './domains'

/** What runs along the time axis: phases laid end to end from time 0, and the moments that draw them. */
export type Trace = {
  readonly phases: readonly Phase[]
  readonly moments: readonly Moment[]
  /** s; finite */
  readonly length: number
  /** Time at which the marker starts again, s, and where it then stands. */
  readonly loop: { readonly from: number; readonly to: number } | null
}

/** Points inside each phase, and in all: the light is drawn there and back, so it has twice as many. */
const pointsInside = 56
const pointsInAll = 1000

/** An endless approach to a rest is drawn for this many time constants. */
const patience = 6

/** The trace to draw: whole cycles, or from switch-on; a stage that does not flash has only the latter. */
export function traceOf(stage: Stage, solution: Solution, span: Span): Trace {
  const feed = {
    supplyVoltage: stage.supplyVoltage,
    feedResistance: feedResistance(stage),
    leadResistance: stage.leadResistance,
  }
  const { cycle } = solution
  let phases: readonly Phase[]
  let lead = 0
  if (cycle === null) {
    phases = solution.fromSwitchOn.map((phase) =>
      Number.isFinite(phase.duration) ? phase : finite(phase),
    )
  } else if (span === 'switch-on') {
    phases = [...solution.fromSwitchOn, ...cycle.phases]
    lead = solution.fromSwitchOn.reduce((sum, phase) => sum + phase.duration, 0) - cycle.period
  } else {
    phases = [...cycle.phases, ...cycle.phases, ...cycle.phases]
  }
  const most = Math.max(0, Math.floor(pointsInAll / phases.length) - 2)
  const length = phases.reduce((sum, phase) => sum + phase.duration, 0)
  return {
    phases,
    moments: tracePhases(phases, feed, Math.min(pointsInside, most)),
    length,
    loop: cycle === null ? null : { from: lead, to: lead + cycle.period },
  }
}

/** A rest reached for good, cut off when nothing more is to be seen. */
function finite(phase: Phase): Phase {
  const duration = patience * phase.timeConstant
  const gone = -Math.expm1(-patience)
  return { ...phase, duration, to: phase.from + (phase.toward - phase.from) * gone }
}
