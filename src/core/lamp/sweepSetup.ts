/** Where the meter was while the lamp's voltage was read. */
export type MeterPlace =
  /** Across the lamp: its own current runs through the series resistor too. */
  | 'lamp'
  /** From supply to common: it takes nothing from the lamp. */
  | 'supply'
  /** Across the series resistor: the lamp's voltage is the supply's less the reading. */
  | 'resistor'

/** How a sweep was taken. */
export type SweepSetup = {
  /** Resistor between supply and lamp, Ω, above 0. */
  readonly seriesResistance: number
  /** The meter's own resistance, Ω, above 0; infinite for one that takes no current. */
  readonly meterResistance: number
  readonly meterPlace: MeterPlace
  /**
   * Standard error of a reading: `absolute` in V and `relative` as a part of the reading, added in
   * quadrature. Absent: estimated from the scatter of neighbouring readings.
   */
  readonly readingError?: { readonly absolute: number; readonly relative: number }
  /** The series resistor's tolerance as a part of its value; 0 if absent. */
  readonly resistorTolerance?: number
  /** The tolerance of the meter's resistance as a part of it; 0 if absent. */
  readonly meterTolerance?: number
}

/** Says in a sentence what makes a set-up impossible; null when nothing does. */
export function faultInSetup(setup: SweepSetup): string | null {
  const { seriesResistance, meterResistance, readingError } = setup
  if (!(seriesResistance > 0 && Number.isFinite(seriesResistance))) {
    return 'The series resistor must be a number of ohms above 0: without it no current is known.'
  }
  if (!(meterResistance > 0)) return 'The meter’s resistance must be above 0 Ω, or infinite.'
  const parts: readonly (number | undefined)[] = [
    readingError?.absolute,
    readingError?.relative,
    setup.resistorTolerance,
    setup.meterTolerance,
  ]
  if (parts.some((part) => part !== undefined && !(part >= 0 && Number.isFinite(part)))) {
    return 'Errors and tolerances must be numbers, 0 or more.'
  }
  if (readingError && readingError.absolute === 0 && readingError.relative === 0) {
    return 'A reading without any error is not known: give one, or leave it to be estimated.'
  }
  return null
}
