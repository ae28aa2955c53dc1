import {
  currentsFromSweep,
  type LeftOutRow,
  type SweepCurrents,
  type SweepReading,
} from './currentsFromSweep'
import { type CharacteristicFit, type FitOptions, fittingCharacteristic } from './fitCharacteristic'
import { reduceSweep } from './reduceSweep'
import type { SweepPoint } from './sweepPoint'
import type { SweepSetup } from './sweepSetup'

/** Everything from readings to a characteristic. */
export type SweepFit = {
  /** All points of the sweep, before any averaging, in the order of the rows; none if unusable. */
  readonly points: readonly SweepPoint[]
  readonly leftOut: readonly LeftOutRow[]
  /** How many of the points the fit saw stand for several each; 0: it saw the points themselves. */
  readonly averaged: number
  readonly fit: CharacteristicFit
}

/** How far a fit has come. */
export type SweepProgress = {
  readonly stage: 'currents' | 'averaging' | 'fitting'
  /** Part done of the whole, 0 … 1. */
  readonly done: number
}

/** Limits on the number of knots. */
export type KnotLimits = Pick<FitOptions, 'leastKnots' | 'mostKnots'>

/**
 * From the readings of a sweep to its characteristic, in steps: gives how far it has come, so that
 * whoever drives it can show that, or stop.
 */
export function* fittingSweep(
  readings: readonly SweepReading[],
  setup: SweepSetup,
  limits: KnotLimits = {},
): Generator<SweepProgress, SweepFit> {
  yield { stage: 'currents', done: 0 }
  const currents: SweepCurrents = currentsFromSweep(readings, setup)
  const { leftOut } = currents
  if (!currents.ok) {
    return { points: [], leftOut, averaged: 0, fit: { ok: false, message: currents.message } }
  }
  yield { stage: 'averaging', done: 0.2 }
  const { points, averaged } = reduceSweep(currents.points)
  const { errors, common } = currents
  const steps = fittingCharacteristic(points, { ...limits, errors, common })
  for (;;) {
    const step = steps.next()
    if (step.done) return { points: currents.points, leftOut, averaged, fit: step.value }
    yield { stage: 'fitting', done: 0.4 + 0.6 * step.value }
  }
}
