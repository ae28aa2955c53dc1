import { decodeLamp, encodeLamp, newestLampFormat } from './formats/lampFormat'
import { isLampId, type KeptLamp, newLampId } from './lampStore'
import { mergeLamps } from './lampStoreNames'
import { type Refused, refused } from './opened'

const program = 'Glowloop'
const holds = 'lamps'

/** Most characters of a file of lamps, and most lamps in it. */
export const lampFileLimits = { characters: 64_000_000, lamps: 2000 } as const

/** Lamps read from a file, with sentences about what was left out or read differently. */
export type OpenedLamps =
  | {
      readonly ok: true
      readonly lamps: readonly KeptLamp[]
      readonly notes: readonly string[]
    }
  | Refused

/** The text of a file with all lamps: JSON to read and mend by hand, SI units. */
export function writeLampFile(
  lamps: readonly KeptLamp[],
): { readonly ok: true; readonly text: string } | Refused {
  if (lamps.length > lampFileLimits.lamps) {
    return refused(`A file holds at most ${lampFileLimits.lamps} lamps; these are ${lamps.length}.`)
  }
  const entries: unknown[] = []
  for (const { id, lamp } of lamps) {
    const encoded = encodeLamp(lamp)
    const checked = decodeLamp(encoded)
    if (!checked.ok) {
      return refused(`“${lamp.name}” cannot be saved. ${checked.message}`, checked.detail)
    }
    entries.push({ id, lamp: encoded.lamp })
  }
  const units = 'volts, amperes, ohms, seconds'
  const whole = { program, holds, format: newestLampFormat, units, lamps: entries }
  const text = `${JSON.stringify(whole, null, 1)}\n`
  return text.length > lampFileLimits.characters
    ? refused(
        'These lamps with all their readings are too large for one file: save fewer at a time.',
      )
    : { ok: true, text }
}

/**
 * Opens a file of lamps. One that cannot be read is left out and named, the rest come in; names and ids that
 * occur twice are told apart. Refused as a whole only where nothing in it is a lamp of ours.
 */
export function readLampFile(text: string): OpenedLamps {
  if (text.length > lampFileLimits.characters) {
    return refused('This file is far larger than a file of lamps can be.')
  }
  let value: unknown
  try {
    value = JSON.parse(text.replace(/^\uFEFF/, ''))
  } catch (error) {
    return refused(
      text.trim() === ''
        ? 'This file is empty.'
        : 'This file cannot be read as lamps: it is damaged, cut short or of another kind.',
      error instanceof Error ? error.message : undefined,
    )
  }
  const file = (typeof value === 'object' ? value : null) as Readonly<
    Record<'program' | 'holds' | 'format' | 'lamps', unknown>
  > | null
  if (file?.program !== program) return refused('This file was not saved by Glowloop.')
  if (file.holds !== holds || !Array.isArray(file.lamps)) {
    return refused('This file of Glowloop holds no lamps: it may be a design, opened elsewhere.')
  }
  if (file.lamps.length > lampFileLimits.lamps) {
    return refused(
      `A file holds at most ${lampFileLimits.lamps} lamps; here are ${file.lamps.length}.`,
    )
  }
  return readEntries(file.lamps, file.format)
}

function readEntries(entries: readonly unknown[], format: unknown): OpenedLamps {
  const lamps: KeptLamp[] = []
  const notes: string[] = []
  let first: Refused | null = null
  for (const [i, entry] of entries.entries()) {
    const { id, lamp } = (entry ?? {}) as { readonly id?: unknown; readonly lamp?: unknown }
    const read = decodeLamp({ format, lamp })
    if (read.ok) lamps.push({ id: isLampId(id) ? id : newLampId(), lamp: read.lamp })
    else {
      first ??= read
      notes.push(`Lamp ${i + 1} of the file was left out. ${read.message}`)
    }
  }
  if (lamps.length === 0 && first !== null) return first
  // Each against those before it, as if they came from files of their own.
  const merged = mergeLamps([], lamps)
  if (merged.alreadyThere > 0) notes.push('A lamp that stands in the file twice was opened once.')
  for (const { from, to } of merged.renamed) {
    notes.push(`There are two lamps called “${from}”: one is now “${to}”.`)
  }
  return { ok: true, lamps: merged.lamps, notes }
}
