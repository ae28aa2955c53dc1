import type { LampDetails } from '../lamp/lampDetails'
import type { Stage } from './stage'

/** Everything a person keeps, shares and opens again: one stage and what they call it. */
export type Design = {
  /** What the design is called; may be empty; at most 80 characters. */
  readonly title: string
  /** Free text that travels with the design; may be empty; at most 400 characters. */
  readonly note: string
  /** What the lamp is called; may be empty; at most 60 characters. */
  readonly lampName: string
  /** The parts as fitted and the lamp as characterised; `workingStage` adds base resistor and conditions. */
  readonly stage: Stage
  /** What is known of the lamp besides; absent = figures typed, nothing more. */
  readonly lampDetails?: LampDetails
}
