import { useRef, useState } from 'react'
import type { SweepFit, SweepProgress, SweepReading, SweepSetup } from '../../core'
import { fitWorker } from './prepareSweep'

/** Where a fit stands. */
export type FitState =
  | { readonly is: 'idle' }
  | { readonly is: 'running'; readonly progress: SweepProgress | null }
  | { readonly is: 'stopped' }
  | { readonly is: 'done'; readonly result: SweepFit }
  | { readonly is: 'failed'; readonly message: string }

/** Fits a sweep in a worker: the newest request wins, and it can be stopped. */
export function useSweepFit(): {
  state: FitState
  begin: (readings: readonly SweepReading[], setup: SweepSetup) => void
  stop: () => void
  forget: () => void
} {
  const [state, setState] = useState<FitState>({ is: 'idle' })
  const newest = useRef(0)
  const begin = (readings: readonly SweepReading[], setup: SweepSetup) => {
    const own = ++newest.current
    setState({ is: 'running', progress: null })
    fitWorker()
      .fit({ readings, setup }, (progress) => {
        if (own === newest.current) setState({ is: 'running', progress })
      })
      .then((outcome) => {
        if (own !== newest.current) return
        setState(outcome.ok ? { is: 'done', result: outcome.result } : { is: 'stopped' })
      })
      .catch((error: unknown) => {
        if (own !== newest.current) return
        setState({
          is: 'failed',
          message: `The fit could not be done: ${error instanceof Error ? error.message : 'the worker failed'}.`,
        })
      })
  }
  return {
    state,
    begin,
    stop: () => {
      fitWorker().stop()
    },
    forget: () => {
      newest.current++
      setState({ is: 'idle' })
    },
  }
}
