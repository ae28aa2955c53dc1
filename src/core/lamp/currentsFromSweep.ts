import { readingScatter } from './readingScatter'
import type { CommonError, Direction, SweepPoint } from './sweepPoint'
import { faultInSetup, type SweepSetup } from './sweepSetup'

/** One row of a sweep as read. */
export type SweepReading = {
  /** Supply, V. */
  readonly supply: number
  /** The other reading, V: across the lamp, or across the series resistor where the meter was there. */
  readonly lamp: number
  /** Absent: from how the supply moved since the reading before. */
  readonly direction?: Direction
  /** Number of the row, from 1; absent: its place in the list. */
  readonly row?: number
}

/** A row that gave no point, and why, in a sentence. */
export type LeftOutRow = { readonly row: number; readonly reason: string }

/** What a sweep says about the lamp. Every row is a point or left out with its reason. */
export type SweepCurrents =
  | {
      readonly ok: true
      /** In the order of the rows. */
      readonly points: readonly SweepPoint[]
      readonly leftOut: readonly LeftOutRow[]
      /** Errors the points share; to be given to the fit. */
      readonly common: CommonError
      /** Whether the errors of the points were given, or guessed from their scatter. */
      readonly errors: 'given' | 'estimated'
    }
  | { readonly ok: false; readonly message: string; readonly leftOut: readonly LeftOutRow[] }

/** A current this many standard errors below zero is no error of reading. */
const believable = 3

/**
 * Lamp current and voltage from the readings of a sweep, with the meter's own current taken out.
 * With supply E, reading V and series resistor R: across the lamp `I = (E − V)/R − V/Rm`; supply to
 * common `I = (E − V)/R`; across the resistor, reading U, `V = E − U` and `I = U/R + U/Rm`.
 * A tolerance is taken as a range in which every value is as likely: its standard error is the
 * tolerance over √3.
 */
export function currentsFromSweep(
  readings: readonly SweepReading[],
  setup: SweepSetup,
): SweepCurrents {
  const fault = faultInSetup(setup)
  if (fault !== null) return { ok: false, message: fault, leftOut: [] }
  const across = setup.meterPlace === 'resistor'
  const series = 1 / setup.seriesResistance
  const metered = setup.meterPlace === 'supply' ? 0 : 1 / setup.meterResistance
  const errorOf = readingErrors(readings, setup)
  const directions = directionsOf(readings)
  const points: SweepPoint[] = []
  const leftOut: LeftOutRow[] = []

  for (const [index, reading] of readings.entries()) {
    const row = reading.row ?? index + 1
    const { supply, lamp } = reading
    const supplyError = errorOf(supply)
    const lampError = errorOf(lamp)
    const unusable = faultInReading(setup.meterPlace, reading, supplyError, lampError)
    if (unusable !== null) {
      leftOut.push({ row, reason: unusable })
      continue
    }
    const voltage = across ? supply - lamp : lamp
    const current = across ? lamp * (series + metered) : (supply - lamp) * series - lamp * metered
    // How current and voltage move with each reading; the two readings err independently.
    const bySupply = across ? 0 : series
    const byLamp = across ? series + metered : -(series + metered)
    const sigmaCurrent = Math.hypot(bySupply * supplyError, byLamp * lampError)
    if (current < -believable * sigmaCurrent) {
      leftOut.push({ row, reason: belowZero(setup, current) })
      continue
    }
    points.push({
      current,
      voltage,
      sigmaCurrent,
      sigmaVoltage: across ? Math.hypot(supplyError, lampError) : lampError,
      covariance: (across ? -1 : 1) * byLamp * lampError ** 2,
      direction: directions[index] as Direction,
      row,
    })
  }
  if (points.length === 0) {
    const message =
      readings.length === 0 ? 'There are no readings yet.' : 'No row of the sweep can be used.'
    return { ok: false, message, leftOut }
  }
  const common = {
    resistor: (setup.resistorTolerance ?? 0) / Math.sqrt(3),
    meter: (setup.meterTolerance ?? 0) / Math.sqrt(3),
    meterConductance: setup.meterPlace === 'lamp' ? metered : 0,
  }
  return { ok: true, points, leftOut, common, errors: setup.readingError ? 'given' : 'estimated' }
}

/** Why a row cannot be used, whatever the resistances; null if it can. */
function faultInReading(
  place: SweepSetup['meterPlace'],
  { supply, lamp }: SweepReading,
  supplyError: number,
  lampError: number,
): string | null {
  const across = place === 'resistor'
  if (!Number.isFinite(supply)) return 'The supply’s voltage is not a number.'
  if (!Number.isFinite(lamp)) {
    return `The ${across ? 'resistor' : 'lamp'}’s voltage is not a number.`
  }
  if (supply < -believable * supplyError || lamp < -believable * lampError) {
    return 'A voltage is below zero: take a sweep of the other polarity by itself, without signs.'
  }
  if (across && lamp - supply > believable * Math.hypot(supplyError, lampError)) {
    return 'There is more voltage across the resistor than the supply gives.'
  }
  return null
}

function belowZero(setup: SweepSetup, current: number): string {
  const size = `${(-current * 1e6).toPrecision(3)} µA below zero`
  return setup.meterPlace === 'lamp' && Number.isFinite(setup.meterResistance)
    ? `The lamp current comes out ${size} once the meter’s own is taken out: are the resistor and the meter’s resistance right?`
    : `The lamp current comes out ${size}: more voltage across the lamp than the supply gives.`
}

/** The standard error of a reading, V, as given or from the scatter of them all. */
function readingErrors(readings: readonly SweepReading[], setup: SweepSetup) {
  const given = setup.readingError
  if (given) return (volts: number) => Math.hypot(given.absolute, given.relative * volts)
  const usable = readings.map(({ lamp }) => lamp).filter(Number.isFinite)
  const scatter = Math.max(readingScatter(usable), Number.MIN_VALUE)
  return () => scatter
}

/** Each row's direction: as given, else as the supply moved, else as before; the first as the next. */
function directionsOf(readings: readonly SweepReading[]): readonly Direction[] {
  const found: (Direction | null)[] = []
  let before: number | null = null
  let last: Direction | null = null
  for (const { supply, direction } of readings) {
    if (direction) last = direction
    else if (before !== null && supply > before) last = 'up'
    else if (before !== null && supply < before) last = 'down'
    if (Number.isFinite(supply)) before = supply
    found.push(last)
  }
  const first = found.find((direction) => direction !== null) ?? 'up'
  return found.map((direction) => direction ?? first)
}
