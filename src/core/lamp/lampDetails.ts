import type { Knot } from '../stage/lamp'
import { type LampConditions, noConditions } from './conditionsDefaults'
import type { LampFact, LampOrigin, LampSpread, PlainData } from './lampRecord'

/** What a design holds of its lamp beyond the characteristic in use. */
export type LampDetails = {
  readonly origin: LampOrigin
  /** Free text about the lamp; may be empty; at most 400 characters. */
  readonly note: string
  /** Resistor built into the base, Ω; 0 = none. */
  readonly baseResistance: number
  /** Characteristic the other way round, where the lamp differs by polarity; null where it does not. */
  readonly otherWay: readonly Knot[] | null
  readonly spread: LampSpread | null
  readonly facts: readonly LampFact[]
  /** The readings it was derived from; null of none. */
  readonly measured: PlainData | null
  readonly conditions: LampConditions
}

/** Nothing known beyond figures that were typed. */
export const typedDetails: LampDetails = {
  origin: 'typed',
  note: '',
  baseResistance: 0,
  otherWay: null,
  spread: null,
  facts: [],
  measured: null,
  conditions: noConditions,
}
