import type { Design } from '../core'
import { mooringBeacon } from './examples'

/** What someone finds on a first visit: a stage that flashes. */
export const freshDesign: Design = mooringBeacon.design
