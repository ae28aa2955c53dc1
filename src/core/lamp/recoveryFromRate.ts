import { formatQuantity } from '../quantity/formatQuantity'
import { cycleWithWaits } from '../stage/cycleWithWaits'
import { bisect } from '../stage/recovery'
import { solveStage } from '../stage/solveStage'
import { faultInStage, type Stage } from '../stage/stage'

/** A rate counted on a fast oscillator. */
export type CountedRate = {
  /** Hz */
  readonly frequency: number
  /** How far it, and the rate reckoned from the parts, may be out: a ratio, 0.05 = 5 %. */
  readonly uncertainty: number
}

/** Recovery time read from a rate. */
export type RecoveryFromRate =
  | {
      readonly ok: true
      /** s */
      readonly recoveryTime: number
      /** Recovery times that go with the rate's uncertainty, s; `low` 0 where none at all would do too. */
      readonly low: number
      /** Null where the lamp would stop flashing before the rate's upper limit is reached. */
      readonly high: number | null
      /** Rate with a lamp that recovers at once, Hz. */
      readonly idealFrequency: number
      /** Voltage at which it strikes at the rate counted, V, and that of the rested lamp. */
      readonly strikeReached: number
      readonly strikeRested: number
      readonly remarks: readonly string[]
    }
  | { readonly ok: false; readonly reason: string }

/** Longest usual recovery time, s [deionisation 50 µs … 1 ms, from memory]. */
const usualLongest = 1e-3

/** Part of the full swing below which a small upset would leave the lamp lit: own choice. */
const leastSwing = 0.1

/** No lamp takes longer, s: own choice, a thousand times the longest of field experience, from memory. */
const longest = 1

/**
 * Recovery time of the lamp in a stage from the rate counted. While the strike voltage is still coming back
 * the lamp strikes early, so flashes are smaller and **faster** than of a lamp that recovers at once; a
 * slower rate has another cause. The rate grows with the recovery time until the lamp cannot let go at all;
 * between those ends the root is bracketed and halved down. The recovery time of the stage's own lamp
 * counts for nothing.
 */
export function recoveryFromRate(stage: Stage, counted: CountedRate): RecoveryFromRate {
  const fault = faultInStage(stage) ?? faultInRate(counted)
  if (fault !== null) return { ok: false, reason: fault }
  const withTime = (recoveryTime: number): Stage => ({
    ...stage,
    lamp: { ...stage.lamp, recoveryTime },
  })
  const ideal = solveStage(withTime(0)).cycle
  if (ideal === null) {
    const reason = 'With these parts the stage does not flash even if the lamp recovers at once.'
    return { ok: false, reason }
  }
  const cycleAt = (time: number) => cycleWithWaits(withTime(time), () => stage.lamp.strikeDelay)
  const { frequency, uncertainty } = counted
  const [slowest, fastest] = [frequency * (1 - uncertainty), frequency * (1 + uncertainty)]
  const idealRate = formatQuantity(ideal.frequency, 'Hz')
  if (fastest < ideal.frequency) {
    return {
      ok: false,
      reason: `Slower than the ${idealRate} of a lamp that recovers at once: recovery makes a lamp strike early and flash faster, so it is not that. Look at the parts, leakage and strike delay.`,
    }
  }
  const timeFor = (wanted: number): number | null => {
    if (wanted <= ideal.frequency) return 0
    const isSlower = (time: number) =>
      (cycleAt(time)?.frequency ?? Number.POSITIVE_INFINITY) < wanted
    const end = Math.max(longest, 1000 * ideal.period)
    const time = isSlower(end) ? end : bisect(0, end, isSlower)
    // Halving ends at the time sought, or else where the lamp stops flashing.
    const reached = cycleAt(time)?.frequency ?? 0
    return Math.abs(reached / wanted - 1) < 1e-6 ? time : null
  }
  const low = timeFor(slowest)
  const time = timeFor(frequency)
  if (time === null || low === null) {
    return {
      ok: false,
      reason: `No recovery time makes it as fast as ${formatQuantity(frequency, 'Hz')}: before that the lamp cannot let go and stays lit. Look at the parts, and at strike and extinction voltage.`,
    }
  }
  const remarks: string[] = []
  if (low === 0) {
    remarks.push(
      `The ${idealRate} of a lamp that recovers at once lies within the uncertainty: the rate shows no sure recovery time. Use a smaller capacitor, for a faster oscillator.`,
    )
  }
  const strikeReached = (cycleAt(time) ?? ideal).highVoltage
  const swing = (strikeReached - ideal.lowVoltage) / (ideal.highVoltage - ideal.lowVoltage)
  if (swing < leastSwing) {
    remarks.push(
      'To be that fast it would have to strike again almost at extinction, which hardly lasts: the rate is unlikely to come of recovery alone.',
    )
  }
  if (time > usualLongest) {
    remarks.push(
      `Lamps usually recover within ${formatQuantity(usualLongest, 's')} (from memory): something else is likely to make it fast.`,
    )
  }
  const high = timeFor(fastest)
  if (high === null) {
    remarks.push(
      'At the upper end of the uncertainty no recovery time fits: this has no upper limit.',
    )
  }
  return {
    ok: true,
    recoveryTime: time,
    low,
    high,
    idealFrequency: ideal.frequency,
    strikeReached,
    strikeRested: ideal.highVoltage,
    remarks,
  }
}

function faultInRate({ frequency, uncertainty }: CountedRate): string | null {
  if (!(frequency > 0 && Number.isFinite(frequency))) return 'The rate must be more than 0 Hz.'
  if (!(uncertainty >= 0 && uncertainty < 1)) {
    return 'The uncertainty of the rate must be from 0 to less than 100 %.'
  }
  return null
}
