import { readSweep } from '../../io/sweepTable'
import { startLampFit, type WorkerFit } from '../../worker/startLampFit'

let service: WorkerFit | null = null

/** The worker that fits, started at the first call and kept. */
export function fitWorker(): WorkerFit {
  service ??= startLampFit()
  return service
}

/** Starts the worker and loads the reader of tables, so that neither needs the network later. */
export async function prepareSweep(): Promise<void> {
  fitWorker()
  await readSweep('1,1\n')
}
