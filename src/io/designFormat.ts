import type { Design } from '../core'
import { format1 } from './formats/format1'
import { format2 } from './formats/format2'
import type { FormatReader } from './formats/formatReader'
import { nameFormat2, packFormat2, type Share } from './formats/writeFormat2'
import { type Opened, type Refused, refused } from './opened'

/** The newest format this program reads. */
export const newestFormat = 2

/** The format a design is written in: the oldest that holds all of it, so that older pages can read it too. */
export function formatFor(design: Design): number {
  return design.lampDetails === undefined ? 1 : newestFormat
}

// Every format ever written stays readable: a new one adds its reader here, and readers of earlier
// ones go on returning today's Design.
const readers: ReadonlyMap<number, FormatReader> = new Map([
  [1, format1],
  [2, format2],
])

/** A design as plain JSON with named fields and the number of its format. */
export function encodeDesign(design: Design): {
  readonly format: number
  readonly design: unknown
} {
  return { format: formatFor(design), design: nameFormat2(design) }
}

/** A design as short lists, for links; the format's number travels beside it. */
export function packDesign(design: Design, share: Share = 'all'): unknown {
  return packFormat2(design, share)
}

/** Reads what `encodeDesign` wrote, in any format up to the newest; anything else is refused. */
export function decodeDesign(value: unknown): Opened {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    return refused('What was opened is not a design.')
  }
  const { format, design } = value as { readonly format?: unknown; readonly design?: unknown }
  const reader = readerOf(format)
  return reader.ok ? reader.reader.named(design) : reader
}

/** Reads what `packDesign` wrote, given the format's number. */
export function unpackDesign(format: number, value: unknown): Opened {
  const reader = readerOf(format)
  return reader.ok ? reader.reader.packed(value) : reader
}

/** The design itself if it can be written and read back; else why not. */
export function checkDesign(design: Design): Opened {
  return decodeDesign(encodeDesign(design))
}

/** The reader of a format, or why there is none. */
export function readerOf(
  format: unknown,
): { readonly ok: true; readonly reader: FormatReader } | Refused {
  const reader = typeof format === 'number' ? readers.get(format) : undefined
  if (reader) return { ok: true, reader }
  if (Number.isSafeInteger(format) && (format as number) > newestFormat) {
    return refused(
      `It was made by a newer Glowloop: format ${format}, this one reads up to ${newestFormat}.`,
    )
  }
  return refused('It does not say in which format it was written, so it cannot be read.')
}
