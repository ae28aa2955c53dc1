import type { Trace } from './traceOf'

/**
 * Whether the lamp was lit at any time in the last `elapsed` seconds before `time` on a trace, so that a flash
 * shorter than a frame is not missed. A trace that loops is followed back over its beginning.
 */
export function litWithin(trace: Trace, time: number, elapsed: number): boolean {
  const { loop } = trace
  if (loop !== null && elapsed >= loop.to - loop.from) return litBetween(trace, loop.from, loop.to)
  const from = time - elapsed
  if (loop !== null && from < loop.from && time >= loop.from && elapsed > 0) {
    // It has just gone round: the end of the loop was passed too.
    const before = loop.to - (loop.from - from)
    return litBetween(trace, before, loop.to) || litBetween(trace, loop.from, time)
  }
  return litBetween(trace, Math.max(0, from), time)
}

/** Whether a lit phase touches the stretch from `from` to `to`, s. */
function litBetween(trace: Trace, from: number, to: number): boolean {
  let start = 0
  const final = trace.phases.length - 1
  for (const [index, phase] of trace.phases.entries()) {
    const end = start + phase.duration
    const lit = phase.kind === 'glow' || phase.kind === 'held'
    // A phase that ends just where the stretch begins is over; the last of all is where a trace rests.
    if (lit && start <= to && (end > from || (index === final && end >= from))) return true
    start = end
  }
  return false
}
