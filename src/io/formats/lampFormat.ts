import type { LampRecord } from '../../core'
import { refused } from '../opened'
import { type ReadLamp, readLamp1, writeLamp1 } from './lampFormat1'

/** The format lamps are written in now. */
export const newestLampFormat = 1

// Every format ever written stays readable: a new one adds its reader here, and readers of earlier
// ones go on returning today's LampRecord.
const readers: ReadonlyMap<number, (value: unknown) => ReadLamp> = new Map([[1, readLamp1]])

/** A lamp as plain JSON with named fields and the number of its format. */
export function encodeLamp(lamp: LampRecord): { readonly format: number; readonly lamp: unknown } {
  return { format: newestLampFormat, lamp: writeLamp1(lamp) }
}

/** Reads what `encodeLamp` wrote, in any format up to the newest; anything else is refused. */
export function decodeLamp(value: unknown): ReadLamp {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    return refused('What was opened is not a lamp.')
  }
  const { format, lamp } = value as { readonly format?: unknown; readonly lamp?: unknown }
  const reader = typeof format === 'number' ? readers.get(format) : undefined
  if (reader !== undefined) return reader(lamp)
  return Number.isSafeInteger(format) && (format as number) > newestLampFormat
    ? refused(
        `It was made by a newer Glowloop: lamp format ${format}, this one reads up to ${newestLampFormat}.`,
      )
    : refused('It does not say in which format the lamp was written, so it cannot be read.')
}

/** The lamp itself if it can be written and read back; else why not. */
export function checkLamp(lamp: LampRecord): ReadLamp {
  return decodeLamp(encodeLamp(lamp))
}
