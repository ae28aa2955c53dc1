import type { Cycle } from './cycle'
import { lampCurrentIn, levelIn, type Phase } from './phase'

/** What everything is at one moment. */
export type Moment = {
  /** s since the beginning of the cycle, or since switch-on. */
  readonly time: number
  /** Voltage across the capacitor, V. */
  readonly voltage: number
  /** Voltage at the lamp alone, V. */
  readonly lampVoltage: number
  /** A */
  readonly lampCurrent: number
  /** Current drawn from the supply, A. */
  readonly supplyCurrent: number
  /** Whether the lamp is lit. */
  readonly lit: boolean
}

/** What a moment needs beyond its phase: V, Ω, Ω. */
export type Feed = Pick<Cycle, 'supplyVoltage' | 'feedResistance' | 'leadResistance'>

function momentIn(phase: Phase, feed: Feed, time: number, into: number): Moment {
  const voltage = levelIn(phase, into)
  const lampCurrent = lampCurrentIn(phase, voltage)
  return {
    time,
    voltage,
    lampVoltage: voltage - feed.leadResistance * lampCurrent,
    lampCurrent,
    supplyCurrent: (feed.supplyVoltage - voltage) / feed.feedResistance,
    lit: phase.kind === 'glow' || phase.kind === 'held',
  }
}

/**
 * The moment `time` seconds into a row of phases; where one ends and the next begins, the later one. Beyond
 * their end it is the last moment of the last phase; null of no phases.
 */
export function momentAt(phases: readonly Phase[], feed: Feed, time: number): Moment | null {
  let start = 0
  for (const phase of phases) {
    if (time < start + phase.duration) return momentIn(phase, feed, time, time - start)
    start += phase.duration
  }
  const last = phases.at(-1)
  return last === undefined ? null : momentIn(last, feed, start, last.duration)
}

/**
 * `count` moments of a cycle, evenly spaced from its beginning to its end, both included. At the strike the
 * current jumps: a moment exactly there is the one just after. The last is the one just before the lamp goes
 * out. Fewer than two are none.
 */
export function sampleCycle(cycle: Cycle, count: number): Moment[] {
  const moments: Moment[] = []
  if (!(count >= 2)) return moments
  let index = 0
  let start = 0
  for (let k = 0; k < count; k++) {
    const time = k + 1 === count ? cycle.period : (cycle.period * k) / (count - 1)
    let phase = cycle.phases[index] as Phase
    while (index + 1 < cycle.phases.length && time >= start + phase.duration) {
      start += phase.duration
      index++
      phase = cycle.phases[index] as Phase
    }
    const into = k + 1 === count ? phase.duration : time - start
    moments.push(momentIn(phase, cycle, time, into))
  }
  return moments
}

/**
 * Moments along a row of phases for drawing: both ends of every phase, so that corners and jumps are exact,
 * and `between` more inside each, closer together where the voltage bends. An endless phase is followed for
 * `patience` of its time constants.
 */
export function tracePhases(
  phases: readonly Phase[],
  feed: Feed,
  between: number,
  patience = 5,
): Moment[] {
  const moments: Moment[] = []
  let start = 0
  for (const phase of phases) {
    const span = Number.isFinite(phase.duration) ? phase.duration : patience * phase.timeConstant
    // Equal steps of exp(−t/τ) put the points where the curve bends most; short phases come out even.
    const fall = -Math.expm1(-Math.min(span / phase.timeConstant, 5))
    for (let k = 0; k <= between + 1; k++) {
      const into =
        k === 0
          ? 0
          : k > between
            ? span
            : -phase.timeConstant * Math.log1p((-fall * k) / (between + 1))
      moments.push(momentIn(phase, feed, start + into, k > between ? Math.max(into, span) : into))
    }
    start += span
  }
  return moments
}
