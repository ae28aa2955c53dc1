import { type Unit, units } from './units'

/** What stands behind a number: a power of ten, and which unit if one was typed. */
type TypedUnit = { readonly exponent: number; readonly unit: Unit | null }

// Capitals are forgiven except where they matter: m is milli, M is mega.
const symbols: Readonly<Record<string, number>> = {
  f: -15,
  p: -12,
  P: -12,
  n: -9,
  N: -9,
  µ: -6,
  u: -6,
  U: -6,
  m: -3,
  k: 3,
  K: 3,
  M: 6,
  G: 9,
  g: 9,
  T: 12,
}

const words: Readonly<Record<string, number>> = {
  femto: -15,
  pico: -12,
  nano: -9,
  micro: -6,
  micr: -6,
  milli: -3,
  kilo: 3,
  kil: 3,
  mega: 6,
  meg: 6,
  giga: 9,
  gig: 9,
  tera: 12,
}

/** The power of ten of a prefix as symbol or word; null if it is none. */
function readPrefix(text: string): number | null {
  if (text === '') return 0
  if (Object.hasOwn(symbols, text)) return symbols[text] ?? null
  const word = text.toLowerCase()
  return Object.hasOwn(words, word) ? (words[word] ?? null) : null
}

/**
 * Reads "MΩ", "meg", "k", "mA", "kilohms": first as the unit that is wanted, then as any other.
 * Null where it is neither.
 */
export function readUnit(text: string, wanted: Unit): TypedUnit | null {
  const joined = text.replace(/\s+/g, '')
  const bare = readPrefix(joined)
  const own = readAs(joined, wanted)
  if (own) return own
  if (bare !== null) return { exponent: bare, unit: null }
  for (const unit of Object.keys(units) as Unit[]) {
    const other = readAs(joined, unit)
    if (other) return other
  }
  return null
}

function readAs(joined: string, unit: Unit): TypedUnit | null {
  for (const spelling of units[unit].spellings) {
    if (!joined.toLowerCase().endsWith(spelling)) continue
    const exponent = readPrefix(joined.slice(0, joined.length - spelling.length))
    if (exponent !== null) return { exponent, unit }
  }
  return null
}
