import { area as areaMaker, line as pathMaker } from 'd3'
import type { Moment } from '../core'
import type { Axis } from './axes'
import type { Trace } from './traceOf'

/** The waveforms as SVG paths. */
export type TracePicture = {
  readonly voltage: string
  readonly current: string
  /** The lamp current filled down to zero: the light, which is about proportional to it. */
  readonly light: string
}

/** Draws the waveforms on their axes. */
export function tracePicture(trace: Trace, time: Axis, voltage: Axis, current: Axis): TracePicture {
  const x = (moment: Moment) => Math.max(-1e5, Math.min(1e5, time.place(moment.time)))
  return {
    voltage:
      pathMaker<Moment>(x, (moment) => voltage.place(moment.voltage)).digits(2)(trace.moments) ??
      '',
    current:
      pathMaker<Moment>(x, (moment) => current.place(moment.lampCurrent)).digits(2)(
        trace.moments,
      ) ?? '',
    light:
      areaMaker<Moment>(x, current.place(0), (moment) => current.place(moment.lampCurrent))
        .defined((moment) => moment.lit)
        .digits(2)(trace.moments) ?? '',
  }
}

/** Highest lamp current on a trace, A, for its axis; a little above zero where none flows. */
export function highestCurrent(trace: Trace): number {
  return trace.moments.reduce((most, moment) => Math.max(most, moment.lampCurrent), 0)
}
