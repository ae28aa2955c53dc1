import type { SweepReading, SweepSetup } from '../../core'
import type { ReadingsState } from '../../state/readingsStore'

/** A sweep's set-up as the core wants it: no error given means that it is to be estimated. */
export function setupOf(typed: ReadingsState['sweepSetup']): SweepSetup {
  const { absoluteError, relativeError, ...rest } = typed
  return absoluteError > 0 || relativeError > 0
    ? { ...rest, readingError: { absolute: absoluteError, relative: relativeError } }
    : rest
}

/** Most readings that travel inside a design; of more, an even choice does. */
const mostCarried = 600

/** An even choice of at most so many items, first and last among them. */
export function evenChoice<T>(items: readonly T[], most: number): readonly T[] {
  if (items.length <= most) return items
  return Array.from(
    { length: most },
    (_, k) => items[Math.round((k * (items.length - 1)) / (most - 1))] as T,
  )
}

/** The sweep as it is kept with the lamp. */
export function carriedSweep(readings: readonly SweepReading[], setup: SweepSetup) {
  return {
    seriesResistance: setup.seriesResistance,
    meterResistance: Number.isFinite(setup.meterResistance) ? setup.meterResistance : null,
    meterPlace: setup.meterPlace,
    rowsInAll: readings.length,
    rows: evenChoice(readings, mostCarried).map(({ supply, lamp, direction }) => [
      supply,
      lamp,
      direction ?? null,
    ]),
  }
}
