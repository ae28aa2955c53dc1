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
 * and `between` more inside each, half of them where the voltage bends most. An endless phase is followed for
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
    for (const into of timesWithin(span, phase.timeConstant, between)) {
      moments.push(momentIn(phase, feed, start + into, into))
    }
    start += span
  }
  return moments
}

/** Times from 0 to `span`, both included: half even in time, half even in the exponential's fall. */
function timesWithin(span: number, timeConstant: number, between: number): number[] {
  const times = [0, span]
  const even = Math.floor(between / 2)
  const bent = between - even
  const fall = -Math.expm1(-Math.min(span / timeConstant, 20))
  for (let k = 1; k <= even; k++) times.push((span * k) / (even + 1))
  for (let k = 1; k <= bent; k++) {
    times.push(-timeConstant * Math.log1p((-fall * k) / (bent + 1)))
  }
  return times.sort((a, b) => a - b)
}
