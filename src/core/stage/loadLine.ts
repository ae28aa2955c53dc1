import { feedResistance, type Stage } from './stage'

/**
 * What supply, resistors and leakage allow at the capacitor: at `v` volts the current left over for lamp
 * and capacitor is `(voltage − v)/resistance − v·leakage`.
 */
export type LoadLine = {
  /** Open-circuit voltage of the supply, V. */
  readonly voltage: number
  /** Source and series resistance together, Ω. */
  readonly resistance: number
  /** Conductance of the leakage across the capacitor, S; 0 = none. */
  readonly leakage: number
}

/** The load line of a stage. */
export function loadLineOf(stage: Stage): LoadLine {
  return {
    voltage: stage.supplyVoltage,
    resistance: feedResistance(stage),
    leakage: 1 / stage.leakageResistance,
  }
}

/** Current, A, that the load line leaves for the lamp at `level` V across the capacitor; may be negative. */
export function loadCurrent(line: LoadLine, level: number): number {
  return (line.voltage - level) / line.resistance - level * line.leakage
}

/**
 * The load line as one source: open-circuit voltage, V, and resistance, Ω, seen by the lamp
 * (Thévenin's theorem).
 */
export function equivalentSource(line: LoadLine): { voltage: number; resistance: number } {
  const shrink = 1 + line.resistance * line.leakage
  return { voltage: line.voltage / shrink, resistance: line.resistance / shrink }
}

/**
 * Resistance between supply and capacitor, Ω, that takes the load line through a point: `level` V across
 * the capacitor and `current` A in the lamp. Zero or less where no resistance does.
 */
export function resistanceThrough(
  supplyVoltage: number,
  leakage: number,
  level: number,
  current: number,
): number {
  return (supplyVoltage - level) / (current + level * leakage)
}

/** Supply voltage, V, that takes the load line through a point, with the resistance given in Ω. */
export function supplyThrough(
  resistance: number,
  leakage: number,
  level: number,
  current: number,
): number {
  return level + resistance * (current + level * leakage)
}
