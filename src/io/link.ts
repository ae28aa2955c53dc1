import { deflateSync, strFromU8, strToU8 } from 'fflate'
import type { Design } from '../core'
import { fromBase64url, toBase64url } from './base64url'
import { checksum } from './checksum'
import { checkDesign, formatFor, packDesign, readerOf, unpackDesign } from './designFormat'
import { inflateCapped } from './inflateCapped'
import { type Opened, type Refused, refused } from './opened'

/** Longest link part that is written or read, in characters, "#" included. */
export const longestFragment = 2000

/** What a link carries, and what stays behind where all is too long: all first. */
const shares = [
  ['all', null],
  ['without readings', 'the lamp’s readings'],
  ['without readings and facts', 'the lamp’s readings and what its facts rest on'],
] as const

const mostInflated = 64_000
// Percent-encoding can make every character three.
const longestEncoded = 3 * longestFragment

/**
 * The part of an address from "#" on that holds a whole design: `#format.checksum.data`. Refused
 * with a sentence if the design has a number out of range, or texts so long that mail and chat
 * programs might cut the link.
 */
export function linkFragment(design: Design):
  | {
      readonly ok: true
      readonly fragment: string
      /** What did not fit and stays behind, in words; null of nothing. */
      readonly leftOut: string | null
    }
  | Refused {
  const checked = checkDesign(design)
  if (!checked.ok) return checked
  const format = formatFor(checked.design)
  let length = 0
  for (const [share, leftOut] of shares) {
    const json = strToU8(JSON.stringify(packDesign(checked.design, share)))
    const data = deflateSync(json, { level: 9 })
    const fragment = `#${format}.${checksumOf(format, data)}.${toBase64url(data)}`
    if (fragment.length <= longestFragment) return { ok: true, fragment, leftOut }
    length = fragment.length
  }
  return refused(
    `The link would be ${length} characters long, and beyond ${longestFragment} mail and ` +
      'chat programs may cut it: shorten the note, or save a file instead.',
  )
}

/**
 * Opens the part of an address from "#" on; null if there is none. Forgives what mail and chat
 * programs do to links: percent-encoding, line breaks, punctuation at the end. Never opens a
 * damaged link: the checksum is over format and data, so one changed character always shows.
 */
export function openFragment(hash: string): Opened | null {
  if (hash.length > longestEncoded) return refused(tooLong)
  const text = tidy(hash)
  if (text === '') return null
  if (text.length + 1 > longestFragment) return refused(tooLong)
  const [, format, sum = '', data = ''] = /^(\d{1,6})(?:\.([^.]*)\.?(.*))?$/.exec(text) ?? []
  if (format === undefined) return refused('The end of this address is not a design of Glowloop.')
  const known = readerOf(Number(format))
  if (!known.ok) return known
  const bytes = fromBase64url(data)
  if (bytes === null || bytes.length === 0 || sum !== checksumOf(Number(format), bytes)) {
    return refused(damaged)
  }
  const inflated = inflateCapped(bytes, mostInflated)
  if (!inflated.ok) {
    return refused(
      inflated.why === 'large' ? 'This link unpacks to far more than a design can be.' : damaged,
    )
  }
  const value = parse(inflated.bytes)
  return value === undefined ? refused(damaged) : unpackDesign(Number(format), value)
}

const tooLong = `This link is too long: a design fits into ${longestFragment} characters.`
const damaged =
  'This link is damaged: part of it is missing or changed. Copy it again from where it came, whole.'

function checksumOf(format: number, data: Uint8Array): string {
  const head = strToU8(`${format}.`)
  const all = new Uint8Array(head.length + data.length)
  all.set(head)
  all.set(data, head.length)
  return checksum(all).toString(16).padStart(8, '0')
}

function tidy(hash: string): string {
  return percentDecoded(hash)
    .replace(/[\s\u00AD\u200B-\u200D\u2060\uFEFF]/g, '')
    .replace(/^#+/, '')
    .replace(/[^\w-]+$/, '')
}

function percentDecoded(hash: string): string {
  try {
    return decodeURIComponent(hash)
  } catch {
    return hash
  }
}

function parse(bytes: Uint8Array): unknown {
  try {
    return JSON.parse(strFromU8(bytes))
  } catch {
    return undefined
  }
}
