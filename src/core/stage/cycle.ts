import type { Jitter } from './jitter'
import type { Trail } from './motion'
import { addPhase, addSums, durationOf, lampCurrentIn, noSums, type Phase } from './phase'
import { feedResistance, type Stage } from './stage'

/** One flash after another: a closed cycle, beginning just after the lamp has gone out. */
export type Cycle = Jitter & {
  /** s */
  readonly period: number
  /** Hz */
  readonly frequency: number
  /** Highest and lowest voltage across the capacitor, V. */
  readonly highVoltage: number
  readonly lowVoltage: number
  /** Time per cycle on the glow branch, s. */
  readonly glowTime: number
  /** Lamp current: highest, mean over the whole cycle, root mean square over it, A. */
  readonly peakLampCurrent: number
  readonly meanLampCurrent: number
  readonly rmsLampCurrent: number
  /** Mean current drawn from the supply, A. */
  readonly meanSupplyCurrent: number
  /** Mean voltage across the capacitor, V. */
  readonly meanVoltage: number
  /** Mean powers, W: drawn from the supply, then where they go. */
  readonly meanSupplyPower: number
  /** In the lamp alone, W. */
  readonly meanLampPower: number
  /** In the series resistor alone, W. */
  readonly meanSeriesPower: number
  readonly meanSourcePower: number
  readonly meanLeadPower: number
  readonly meanLeakagePower: number
  /** Charge through the lamp during the flash, C. */
  readonly flashCharge: number
  /** Energy taken by the lamp alone during the flash, J. */
  readonly flashEnergy: number
  /** From switch-on, capacitor empty, to the first strike, mean strike delay included, s. */
  readonly firstStrike: number
  /** The stretches of the cycle, in order. */
  readonly phases: readonly Phase[]
  /** Supply voltage, V, and resistance between supply and capacitor, Ω: what sampling needs besides. */
  readonly supplyVoltage: number
  readonly feedResistance: number
  readonly leadResistance: number
}

/**
 * Reckons a closed cycle from the trail that led into it: every figure in closed form.
 *
 * @param jitterFor what random waits make of these phases and their period, s.
 */
export function cycleFrom(
  stage: Stage,
  trail: Trail,
  jitterFor: (phases: readonly Phase[], period: number) => Jitter,
): Cycle {
  const phases = trail.phases.slice(trail.cycleStart)
  const whole = noSums()
  const flash = noSums()
  let high = 0
  let low = Number.POSITIVE_INFINITY
  let peak = 0
  for (const phase of phases) {
    addPhase(phase.kind === 'glow' ? flash : whole, phase, stage.supplyVoltage)
    high = Math.max(high, phase.from, phase.to)
    low = Math.min(low, phase.from, phase.to)
    peak = Math.max(peak, lampCurrentIn(phase, phase.from), lampCurrentIn(phase, phase.to))
  }
  addSums(whole, flash)

  const feed = feedResistance(stage)
  const { supplyVoltage: supply, leadResistance: lead } = stage
  const period = whole.time
  const jitter = jitterFor(phases, period)
  const supplyCharge = whole.drive / feed
  const supplyCurrentSquared = whole.driveSquared / (feed * feed)
  return {
    periodDeviation: jitter.periodDeviation,
    meanPeriod: jitter.meanPeriod,
    overRangeChance: jitter.overRangeChance,
    period,
    frequency: 1 / period,
    highVoltage: high,
    lowVoltage: low,
    glowTime: flash.time,
    peakLampCurrent: peak,
    meanLampCurrent: whole.charge / period,
    rmsLampCurrent: Math.sqrt(whole.currentSquared / period),
    meanSupplyCurrent: supplyCharge / period,
    meanVoltage: whole.level / period,
    meanSupplyPower: (supply * supplyCharge) / period,
    meanLampPower: (whole.energy - lead * whole.currentSquared) / period,
    meanSeriesPower: (stage.seriesResistance * supplyCurrentSquared) / period,
    meanSourcePower: (stage.sourceResistance * supplyCurrentSquared) / period,
    meanLeadPower: (lead * whole.currentSquared) / period,
    meanLeakagePower: whole.levelSquared / stage.leakageResistance / period,
    flashCharge: flash.charge,
    flashEnergy: flash.energy - lead * flash.currentSquared,
    firstStrike: durationOf(trail.phases, 0, trail.firstStrike),
    phases,
    supplyVoltage: supply,
    feedResistance: feed,
    leadResistance: lead,
  }
}
