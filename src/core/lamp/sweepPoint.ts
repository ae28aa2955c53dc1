/** Which way the supply was being turned when a reading was taken. */
export type Direction = 'up' | 'down'

/** One reading of a sweep as the lamp saw it. */
export type SweepPoint = {
  /** Lamp current with the meter's own taken out, A; below zero only by less than its own error. */
  readonly current: number
  /** Voltage across the lamp, V. */
  readonly voltage: number
  /** Standard error of the current, A. */
  readonly sigmaCurrent: number
  /** Standard error of the voltage, V. */
  readonly sigmaVoltage: number
  /** Covariance of the two errors, A·V: one slip of the meter moves both. Absent: 0. */
  readonly covariance?: number
  /** Which way the sweep was going. */
  readonly direction: Direction
  /** Number of the row it came from, from 1; of the middle one where several were averaged. */
  readonly row: number
}

/**
 * Errors that all readings of a sweep share, so that no averaging lessens them. They move every
 * current by `resistor · (I + V · meterConductance)` and by `meter · V · meterConductance`.
 */
export type CommonError = {
  /** Relative standard error of the series resistor. */
  readonly resistor: number
  /** Relative standard error of the meter's resistance. */
  readonly meter: number
  /** Conductance of the meter across the lamp, S; 0 where it did not load the lamp. */
  readonly meterConductance: number
}

/** Standard error that common errors bring to a current, A, at that current and voltage. */
export function commonCurrentError(common: CommonError, current: number, voltage: number): number {
  const metered = voltage * common.meterConductance
  return Math.hypot(common.resistor * (current + metered), common.meter * metered)
}
