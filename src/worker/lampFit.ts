import {
  fittingSweep,
  type KnotLimits,
  type SweepFit,
  type SweepProgress,
  type SweepReading,
  type SweepSetup,
} from '../core'

/** What is to be fitted. */
export type FitRequest = {
  readonly readings: readonly SweepReading[]
  readonly setup: SweepSetup
  readonly limits?: KnotLimits
}

/** What came of a request: a fit, or nothing because it was stopped or a newer one came. */
export type FitOutcome =
  | { readonly ok: true; readonly result: SweepFit }
  | { readonly ok: false; readonly stopped: true }

/** Fits sweeps one at a time. */
export type FitService = {
  /** Begins a fit, and ends any other at its next step. `report` hears how far it has come. */
  readonly fit: (
    request: FitRequest,
    report?: (progress: SweepProgress) => void,
  ) => Promise<FitOutcome>
  /** Ends the fit that runs, if any, at its next step. */
  readonly stop: () => void
}

/**
 * The fitting of sweeps, for a worker or for a test: it goes step by step and gives way between
 * steps, so that a newer request or a stop is heard. The newest request wins.
 */
export function fitService(): FitService {
  let newest = 0
  return {
    stop: () => {
      newest++
    },
    fit: async ({ readings, setup, limits }, report) => {
      const own = ++newest
      const steps = fittingSweep(readings, setup, limits)
      for (;;) {
        if (own !== newest) return { ok: false, stopped: true }
        const step = steps.next()
        if (step.done) return { ok: true, result: step.value }
        report?.(step.value)
        await new Promise((resolve) => setTimeout(resolve, 0))
      }
    },
  }
}
