import { useEffect, useRef } from 'react'
import type { Trace } from './traceOf'

/** How time runs on screen. */
export type Playing = {
  readonly running: boolean
  /** Seconds of the stage for each second on screen. */
  readonly speed: number
}

/** Told at each frame: the time on the trace, s, and how much of the stage's time went by since, s. */
export type Tick = (time: number, elapsed: number) => void

/** The place after `elapsed` seconds on a trace that loops, or runs once and stays at its end. */
export function advance(trace: Trace, time: number, elapsed: number): number {
  const { loop, length } = trace
  const next = time + elapsed
  if (loop === null) return Math.min(next, length)
  if (next < loop.to) return next
  const period = loop.to - loop.from
  return period > 0 ? loop.from + ((next - loop.from) % period) : loop.from
}

/**
 * Moves a time along the trace while it runs, outside React: `tick` draws. The time keeps its place when the
 * stage changes, as far as the new trace reaches, and goes where a new `cursor` puts it.
 */
export function usePlayback(
  trace: Trace,
  playing: Playing,
  cursor: { readonly time: number } | null,
  tick: Tick,
): void {
  const time = useRef(0)
  const latest = useRef({ trace, tick, playing })
  latest.current = { trace, tick, playing }

  useEffect(() => {
    if (!playing.running) return
    // Running again from the end of a trace that does not loop begins anew.
    const { trace: whole } = latest.current
    if (whole.loop === null && time.current >= whole.length) time.current = 0
    let frame = 0
    let before: number | null = null
    const next = (now: number) => {
      frame = requestAnimationFrame(next)
      const { trace: present, tick: draw, playing: pace } = latest.current
      // A tab that slept does not leap.
      const elapsed = before === null ? 0 : Math.min(0.1, (now - before) / 1000) * pace.speed
      before = now
      time.current = advance(present, time.current, elapsed)
      draw(time.current, elapsed)
    }
    frame = requestAnimationFrame(next)
    return () => cancelAnimationFrame(frame)
  }, [playing.running])

  useEffect(() => {
    const { playing: pace } = latest.current
    time.current =
      trace.loop === null && !pace.running ? trace.length : advance(trace, time.current, 0)
    latest.current.tick(time.current, 0)
  }, [trace])

  useEffect(() => {
    if (cursor === null) return
    time.current = cursor.time
    latest.current.tick(time.current, 0)
  }, [cursor])

  // Axes may have moved under the marker.
  useEffect(() => {
    latest.current.tick(time.current, 0)
  })
}
