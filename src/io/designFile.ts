import type { Design } from '../core'
import { checkDesign, decodeDesign, encodeDesign } from './designFormat'
import { type Opened, type Refused, refused } from './opened'

const program = 'Glowloop'
const mostCharacters = 2_000_000
const longestName = 50
const ending = '.glowloop.json'

/**
 * The text of a saved design: JSON to read and mend by hand, with named fields in SI units.
 * Refused with a sentence if a number is out of range.
 */
export function writeDesignFile(
  design: Design,
): { readonly ok: true; readonly text: string } | Refused {
  const checked = checkDesign(design)
  if (!checked.ok) return checked
  const { format, design: named } = encodeDesign(checked.design)
  const units = 'volts, amperes, ohms, farads, seconds; a leakage of null means none'
  return {
    ok: true,
    text: `${JSON.stringify({ program, format, units, design: named }, null, 2)}\n`,
  }
}

/** Opens the text of a saved design; everything else is refused with a sentence. */
export function readDesignFile(text: string): Opened {
  if (text.length > mostCharacters) {
    return refused('This file is far larger than a design of Glowloop can be.')
  }
  let value: unknown
  try {
    value = JSON.parse(text.replace(/^\uFEFF/, ''))
  } catch (error) {
    return refused(
      text.trim() === ''
        ? 'This file is empty.'
        : 'This file cannot be read as a design: it is damaged, cut short or of another kind.',
      error instanceof Error ? error.message : undefined,
    )
  }
  const isOurs =
    typeof value === 'object' &&
    value !== null &&
    (value as { readonly program?: unknown }).program === program
  return isOurs ? decodeDesign(value) : refused('This file is not a design saved by Glowloop.')
}

/** A name for the file, from the title: letters and digits of any script, the rest as hyphens. */
export function fileNameFor(design: Design): string {
  const words = design.title
    .normalize('NFC')
    .toLowerCase()
    .replace(/[^\p{L}\p{M}\p{N}]+/gu, '-')
  const name = Array.from(words)
    .slice(0, longestName)
    .join('')
    .replace(/^-+|-+$/g, '')
  // Windows keeps these names for devices, whatever ending follows.
  const kept = /^(?:con|prn|aux|nul|com\d|lpt\d)$/.test(name)
  return `${name === '' || kept ? `design${kept ? `-${name}` : ''}` : name}${ending}`
}
