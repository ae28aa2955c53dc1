import { formatQuantity } from '../quantity/formatQuantity'
import { movedKnots, thresholdsOf } from './conditionsMove'
import type { LampFact, LampOrigin, LampRecord, PlainData, Span } from './lampRecord'

/** A voltage read, V, with its standard deviation; null = not read. */
export type ReadThreshold = { readonly value: number; readonly deviation: number } | null

/** What readings say of a lamp's thresholds. */
export type Thresholds = {
  readonly strike: ReadThreshold
  readonly extinction: ReadThreshold
  /** s; null = not read. */
  readonly strikeDelay: number | null
  readonly origin: Extract<LampOrigin, 'strike tests' | 'rates'>
  readonly measured: PlainData
}

/** A record with measured thresholds, or why there is none. */
export type WithThresholds =
  | { readonly ok: true; readonly record: LampRecord }
  | { readonly ok: false; readonly reason: string }

/**
 * A lamp whose strike and extinction voltage were read, its curve otherwise as before: the dark branch is
 * stretched to the new strike voltage, all from the valley on lifted to the new extinction voltage. The
 * spread is two standard deviations to each side. Says in its facts what was read and what was kept.
 */
export function recordWithThresholds(record: LampRecord, read: Thresholds): WithThresholds {
  const before = thresholdsOf(record.knots)
  if (before === null) {
    return {
      ok: false,
      reason: 'The lamp in the design never falls in voltage: choose one that does first.',
    }
  }
  const strike = read.strike?.value ?? before.strike
  const extinction = read.extinction?.value ?? before.extinction
  const knots = movedKnots(record.knots, strike - before.strike, extinction - before.extinction)
  if (knots === null) {
    return {
      ok: false,
      reason: `Strike at ${volts(strike)} and extinction at ${volts(extinction)} are no glow lamp: strike must lie above extinction.`,
    }
  }
  const old = record.spread
  return {
    ok: true,
    record: {
      ...record,
      origin: read.origin,
      knots,
      reverseKnots: null,
      strikeDelay: read.strikeDelay ?? record.strikeDelay,
      spread: {
        strike: spanOf(read.strike) ?? old?.strike ?? flat(strike),
        extinction: spanOf(read.extinction) ?? old?.extinction ?? flat(extinction),
      },
      facts: factsFor(read),
      measured: read.measured,
    },
  }
}

const volts = (value: number) => formatQuantity(value, 'V')

const flat = (value: number): Span => ({ low: value, typical: value, high: value })

function spanOf(read: ReadThreshold): Span | null {
  if (read === null) return null
  const { value, deviation } = read
  return { low: Math.max(0, value - 2 * deviation), typical: value, high: value + 2 * deviation }
}

function factsFor(read: Thresholds): LampFact[] {
  const from = read.origin === 'rates' ? 'from flashes counted' : 'from repeated tries'
  const fact = (label: string, threshold: ReadThreshold): LampFact[] =>
    threshold === null
      ? []
      : [
          {
            label,
            value: `${volts(threshold.value)} ± ${formatQuantity(threshold.deviation, 'V', 2)}`,
            source: `measured, ${from}; standard deviation`,
            guessed: false,
          },
        ]
  const delay: LampFact[] =
    read.strikeDelay === null
      ? []
      : [
          {
            label: 'Strike delay',
            value: formatQuantity(read.strikeDelay, 's', 2),
            source: 'measured, from the scatter under a steady ramp',
            guessed: false,
          },
        ]
  return [
    ...fact('Strike voltage', read.strike),
    ...fact('Extinction voltage', read.extinction),
    ...delay,
    {
      label: 'Shape of the curve',
      value: 'that of the lamp before',
      source: 'guessed: these readings say nothing of currents',
      guessed: true,
    },
  ]
}
