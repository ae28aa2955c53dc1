import {
  type Branches,
  equivalentSource,
  kneeIndexOf,
  loadLineOf,
  type Solution,
  type Stage,
} from '../core'
import type { CurrentAxis, Domain } from './axes'

/** Voltage axis that shows supply, strike voltage and what the flash needs, V. */
export function voltageDomain(stage: Stage, path: Branches): Domain {
  const knee = kneeIndexOf(stage.lamp.knots)
  const strike = knee === null ? 0 : (path.level[knee] ?? 0)
  const highest = Math.max(stage.supplyVoltage, strike)
  // The far end of the glow branch may be steep (a lead resistor): it is shown as far as it matters.
  const end = Math.min(path.level.at(-1) ?? 0, 1.25 * highest)
  return [0, Math.max(1, 1.1 * Math.max(highest, end))]
}

/**
 * Current axis of the plane, A. Logarithmic: from below the pre-strike current (10 nA or less) and what the load
 * line allows to beyond the characteristic. Linear: to 1.6 times what the load line allows.
 */
export function planeDomain(kind: CurrentAxis, stage: Stage, path: Branches): Domain {
  const last = path.current.at(-1) ?? 1e-3
  const line = loadLineOf(stage)
  const source = equivalentSource(line)
  const short = source.voltage / source.resistance
  if (kind === 'linear') {
    const most = Number.isFinite(short) && short > 0 ? 1.6 * short : last
    return [0, Math.min(most, 3 * last)]
  }
  const knee = path.current[path.top[0] ?? 0] ?? 1e-7
  // A load line that passes less than all this would lie out of sight.
  const least = Math.min(1e-8, knee / 5, short > 0 ? short / 10 : 1e-8)
  const low = Math.max(1e-16, least)
  return [low, Math.max(3 * last, low * 100)]
}

/** What stretch of time the trace shows. */
export type Span = 'cycles' | 'flash' | 'switch-on'

/** Time axis of the trace, s, for a span; the trace begins at 0 (`traceOf`). */
export function timeDomain(span: Span, solution: Solution, length: number): Domain {
  const { cycle } = solution
  if (cycle === null) return [0, length]
  if (span === 'flash') {
    const lit = cycle.phases.findIndex((phase) => phase.kind === 'glow')
    let strike = 0
    for (let k = 0; k < lit; k++) strike += cycle.phases[k]?.duration ?? 0
    return [strike - 0.12 * cycle.glowTime, strike + 1.2 * cycle.glowTime]
  }
  if (span === 'switch-on') return [0, length]
  return [0, 2.25 * cycle.period]
}
