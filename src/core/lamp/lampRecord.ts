import { faultInKnots, type Knot, type Lamp } from '../stage/lamp'

/** Where what is known of a lamp comes from. */
export type LampOrigin = 'catalogue' | 'sweep' | 'strike tests' | 'rates' | 'typed'

/** Every origin a lamp may have, for choosing and checking. */
export const lampOrigins: readonly LampOrigin[] = [
  'catalogue',
  'sweep',
  'strike tests',
  'rates',
  'typed',
]

/** Lowest, typical and highest value to expect of one lamp out of a bag of its kind, V. */
export type Span = { readonly low: number; readonly typical: number; readonly high: number }

/** How much lamps of a kind, or one lamp's readings, differ in strike and extinction voltage. */
export type LampSpread = { readonly strike: Span; readonly extinction: Span }

/** One thing known of a lamp, as it is shown: what, how much, and who says so. */
export type LampFact = {
  readonly label: string
  readonly value: string
  readonly source: string
  /** Set where nobody measured or published it. */
  readonly guessed: boolean
}

/** Data as JSON can hold it. */
export type PlainData =
  | null
  | boolean
  | number
  | string
  | readonly PlainData[]
  | { readonly [key: string]: PlainData }

/** Which way round a lamp is in the circuit. */
export type Polarity = 'forward' | 'reverse'

/** All that is known of one lamp, or of a kind of lamp. */
export type LampRecord = {
  /** What its owner calls it; at most 60 characters when kept. */
  readonly name: string
  /** Free text; may be empty. */
  readonly note: string
  readonly origin: LampOrigin
  /** Characteristic of the glass alone, without a resistor built into the base. */
  readonly knots: readonly Knot[]
  /** The same the other way round, where the lamp differs by polarity; null where it does not. */
  readonly reverseKnots: readonly Knot[] | null
  /** Resistor built into the base, Ω; 0 = none. It adds to the stage's lead resistor. */
  readonly baseResistance: number
  /** As in `Lamp`, s. */
  readonly recoveryTime: number
  /** As in `Lamp`, s. */
  readonly strikeDelay: number
  readonly spread: LampSpread | null
  readonly facts: readonly LampFact[]
  /** The readings it was derived from, as they were taken; null of none. */
  readonly measured: PlainData | null
}

/**
 * The lamp as a stage wants it, in one polarity. A resistor in its base is not part of the
 * characteristic: it goes into the stage's lead resistance, by `leadResistanceWith`.
 */
export function stageLampOf(record: LampRecord, polarity: Polarity = 'forward'): Lamp {
  const turned = polarity === 'reverse' ? record.reverseKnots : null
  return {
    knots: turned ?? record.knots,
    recoveryTime: record.recoveryTime,
    strikeDelay: record.strikeDelay,
  }
}

/** Lead resistance of the stage, Ω: the part in the lamp's lead and the resistor in its base together. */
export function leadResistanceWith(record: LampRecord, leadPart: number): number {
  return leadPart + record.baseResistance
}

/**
 * Takes a base resistor, Ω, out of a characteristic measured at the lamp's terminals; null where more
 * volts would drop in the resistor than were measured, so that it cannot be as large as that.
 */
export function knotsWithoutBase(
  knots: readonly Knot[],
  baseResistance: number,
): readonly Knot[] | null {
  const inner = knots.map(({ current, voltage }) => ({
    current,
    voltage: voltage - baseResistance * current,
  }))
  return inner.every(({ voltage }) => voltage >= 0) ? inner : null
}

const notNegative = (value: number) => Number.isFinite(value) && value >= 0

const inOrder = ({ low, typical, high }: Span) =>
  notNegative(low) && low <= typical && typical <= high && Number.isFinite(high)

/** Says in plain words what makes a record impossible to use; null when nothing does. */
export function faultInLampRecord(record: LampRecord): string | null {
  if (!notNegative(record.baseResistance)) return 'The resistor in the base must be 0 Ω or more.'
  if (!notNegative(record.recoveryTime)) return 'The recovery time must be 0 s or more.'
  if (!notNegative(record.strikeDelay)) return 'The strike delay must be 0 s or more.'
  if (record.spread !== null) {
    const { strike, extinction } = record.spread
    if (!inOrder(strike)) return 'The strike voltages must run from low over typical to high.'
    if (!inOrder(extinction)) {
      return 'The extinction voltages must run from low over typical to high.'
    }
    if (extinction.typical >= strike.typical) {
      return 'The typical extinction voltage must lie below the typical strike voltage.'
    }
  }
  const turned = record.reverseKnots === null ? null : faultInKnots(record.reverseKnots)
  return faultInKnots(record.knots) ?? (turned === null ? null : `The other way round: ${turned}`)
}
