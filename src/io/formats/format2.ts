import * as v from 'valibot'
import { type Design, type LampDetails, typedDetails } from '../../core'
import { type Opened, refused } from '../opened'
import { format1 } from './format1'
import { detailsFormat2 } from './format2Schema'
import type { FormatReader } from './formatReader'
import { unknownFields } from './unknownFields'

// Format 2 is format 1 with what is known of the lamp beside it. Once out, it never changes.

/** Reads format 2; never changes. */
export const format2: FormatReader = {
  named: (value) => {
    if (typeof value !== 'object' || value === null) return format1.named(value)
    const { lampDetails, ...rest } = value as Readonly<Record<string, unknown>>
    return withDetails(format1.named(rest), lampDetails)
  },
  packed: (value) => {
    if (!Array.isArray(value) || value.length > 6) {
      return refused('What the link holds is not a design.', 'top')
    }
    return withDetails(format1.packed(value.slice(0, 5)), value[5])
  },
}

/** Adds the details, where there are any, to a design that could be read. */
function withDetails(opened: Opened, given: unknown): Opened {
  if (!opened.ok || given === undefined || given === null) return opened
  const read = v.safeParse(detailsFormat2, given)
  if (!read.success) {
    const [issue] = read.issues
    const place = v.getDotPath(issue) ?? 'lampDetails'
    return refused(
      `What is said about the lamp cannot be read: “${place}” is missing, out of range or of the wrong kind.`,
      `${place}: ${issue.message}`,
    )
  }
  // Absent fields are as for a lamp merely typed; none is present and undefined.
  const lampDetails = { ...typedDetails, ...read.output } as LampDetails
  const strangers = unknownFields(given, lampDetails)
  const design: Design = { ...opened.design, lampDetails }
  const notes =
    strangers.length > 0
      ? [...opened.notes, `Left out, because it is not known here: ${strangers.join(', ')}.`]
      : opened.notes
  return { ok: true, design, notes }
}
