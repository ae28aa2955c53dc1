import * as v from 'valibot'
import {
  faultInKnots,
  faultInLampRecord,
  type Knot,
  type LampRecord,
  type PlainData,
} from '../../core'
import { type Refused, refused } from '../opened'
import { explainIssue } from './explainIssue'
import { lampLimits, lampSchema1 } from './lampFormat1Schema'
import { faultInPlainData } from './lampPlainData'

/** A lamp read, or why there is none. */
export type ReadLamp = { readonly ok: true; readonly lamp: LampRecord } | Refused

// Format 1 is out in the world: what this file and its schema read never changes.

/** Reads a lamp in format 1; never changes. */
export function readLamp1(value: unknown): ReadLamp {
  const read = v.safeParse(lampSchema1, value)
  if (!read.success) {
    const [issue] = read.issues
    return refused(explain(issue), `${v.getDotPath(issue) ?? 'top'}: ${issue.message}`)
  }
  const lamp: LampRecord = { ...read.output, measured: read.output.measured as PlainData | null }
  const fault = faultInLampRecord(lamp)
  return fault === null ? { ok: true, lamp } : refused(fault)
}

/** A lamp with the named fields of format 1, and no others. */
export function writeLamp1(lamp: LampRecord): unknown {
  const { name, note, origin, baseResistance, recoveryTime, strikeDelay, spread, measured } = lamp
  const named = (list: readonly Knot[]) =>
    list.map(({ current, voltage }) => ({ current, voltage }))
  return {
    name,
    note,
    origin,
    knots: named(lamp.knots),
    reverseKnots: lamp.reverseKnots === null ? null : named(lamp.reverseKnots),
    baseResistance,
    recoveryTime,
    strikeDelay,
    spread:
      spread === null
        ? null
        : { strike: { ...spread.strike }, extinction: { ...spread.extinction } },
    facts: lamp.facts.map(({ label, value, source, guessed }) => ({
      label,
      value,
      source,
      guessed,
    })),
    measured,
  }
}

/** Fields whose numbers and knots are named in a design as they are here. */
const shared: ReadonlySet<string> = new Set(['recoveryTime', 'strikeDelay', 'current', 'voltage'])

function explain(issue: v.BaseIssue<unknown>): string {
  const keys = issue.path?.map(({ key }) => key) ?? []
  const field = String(keys.at(-1) ?? '')
  const { input } = issue
  if (keys.length === 0) return 'What was opened is not a lamp.'
  if (shared.has(field) || field === 'knots') return explainIssue(issue)
  if (field === 'reverseKnots') {
    const fault = Array.isArray(input) && issue.type === 'check' ? faultInKnots(input) : null
    return `The knots the other way round are no characteristic.${fault === null ? '' : ` ${fault}`}`
  }
  if (field === 'name' || field === 'note') {
    return typeof input === 'string'
      ? `The ${field} of a lamp may be at most ${lampLimits[field]} characters long; here it has ${input.length}.`
      : `The ${field} of the lamp must be text.`
  }
  if (keys[0] === 'measured') {
    return `The readings kept with the lamp cannot be read: ${faultInPlainData(input) ?? 'they are damaged'}.`
  }
  if (keys[0] === 'spread')
    return 'The lowest, typical and highest voltages are missing or out of order.'
  if (keys[0] === 'facts')
    return 'What is known of the lamp besides is too long or of the wrong kind.'
  if (field === 'baseResistance')
    return 'The resistor in the base must be a number of ohms, 0 or more.'
  return `The lamp is not complete: “${field}” is missing or of the wrong kind.`
}
