import * as v from 'valibot'
import type { Design } from '../../core'
import { type Opened, refused } from '../opened'
import { explainIssue } from './explainIssue'
import { namedFormat1, packedFormat1 } from './format1Schema'
import type { FormatReader } from './formatReader'
import { unknownFields } from './unknownFields'
import { nameFormat1 } from './writeFormat1'

// Format 1 is out in the world: what this file and its schema read never changes. A new
// format gets a file of its own and a line in designFormat.ts.

/** Reads format 1; never changes. */
export const format1: FormatReader = {
  named: (value) => {
    const opened = readNamed(value)
    const strangers = opened.ok ? unknownFields(value, nameFormat1(opened.design)) : []
    return opened.ok && strangers.length > 0
      ? { ...opened, notes: [`Left out, because it is not known here: ${strangers.join(', ')}.`] }
      : opened
  },
  packed: (value) => {
    const lists = v.safeParse(packedFormat1, value)
    if (!lists.success) {
      return refused('What the link holds is not a design.', v.getDotPath(lists.issues[0]) ?? 'top')
    }
    const [title, note, lampName, numbers, knots] = lists.output
    const [supplyVoltage, sourceResistance, seriesResistance, capacitance, leakageResistance] =
      numbers
    const [leadResistance, recoveryTime, strikeDelay, strayCapacitance] = numbers.slice(5)
    return readNamed({
      title,
      note,
      lampName,
      stage: {
        supplyVoltage,
        sourceResistance,
        seriesResistance,
        capacitance,
        leakageResistance,
        leadResistance,
        ...(numbers.length > 8 ? { strayCapacitance } : {}),
        lamp: { recoveryTime, strikeDelay, knots: unpackKnots(knots) },
      },
    })
  },
}

function unpackKnots(flat: readonly number[]): unknown[] {
  const rest = Array.from({ length: Math.ceil(flat.length / 2) }, (_, i) => ({
    current: flat[2 * i],
    voltage: flat[2 * i + 1],
  }))
  return [{ current: 0, voltage: 0 }, ...rest]
}

function readNamed(value: unknown): Opened {
  const read = v.safeParse(namedFormat1, value)
  if (!read.success) {
    const [issue] = read.issues
    return refused(explainIssue(issue), `${v.getDotPath(issue) ?? 'top'}: ${issue.message}`)
  }
  const { leakageResistance, strayCapacitance, ...rest } = read.output.stage
  const design: Design = {
    ...read.output,
    stage: {
      ...rest,
      leakageResistance: leakageResistance ?? Number.POSITIVE_INFINITY,
      ...(strayCapacitance === undefined ? {} : { strayCapacitance }),
    },
  }
  return { ok: true, design, notes: [] }
}
