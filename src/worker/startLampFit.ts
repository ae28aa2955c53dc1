import { proxy, type Remote, wrap } from 'comlink'
import type { FitService } from './lampFit'

/** A service that fits in a worker, and the way to end it. */
export type WorkerFit = FitService & { readonly end: () => void }

/** Starts the worker. A call's `report` is heard on this side. */
export function startLampFit(): WorkerFit {
  const worker = new Worker(new URL('./lampFit.worker.ts', import.meta.url), { type: 'module' })
  const service: Remote<FitService> = wrap<FitService>(worker)
  return {
    fit: (request, report) => service.fit(request, report && proxy(report)),
    stop: () => void service.stop(),
    end: () => worker.terminate(),
  }
}
