import type { LampRecord } from '../core'
import { decodeLamp, encodeLamp } from './formats/lampFormat'
import { type Refused, refused } from './opened'

/** A lamp of one's own, under an id that stays the same through renaming, files and undo. */
export type KeptLamp = { readonly id: string; readonly lamp: LampRecord }

/** A lamp in storage that could not be read; it is left where it is. */
export type DamagedLamp = {
  readonly id: string
  readonly message: string
  /** What is there instead, to be saved by who wants to mend it; empty of nothing readable. */
  readonly text: string
}

/** What storage holds, by name and then by id. */
export type LampList =
  | {
      readonly ok: true
      readonly lamps: readonly KeptLamp[]
      readonly damaged: readonly DamagedLamp[]
    }
  | Refused

/** Whether something was kept, or why not. */
export type Kept = { readonly ok: true } | Refused

/** Where one's own lamps are kept. Nothing is thrown: every trouble comes back as a sentence. */
export type LampStore = {
  readonly list: () => Promise<LampList>
  /** Keeps a lamp, in place of the one with its id if there is one. */
  readonly put: (kept: KeptLamp) => Promise<Kept>
  /** Removes a lamp, readable or damaged; no matter if there is none. Undo is putting it back. */
  readonly remove: (id: string) => Promise<Kept>
  /**
   * Keeps these lamps and no others: all of it, or nothing changes. Damaged ones stay too, unless one of
   * these has their id: they are nobody's to lose.
   */
  readonly replaceAll: (lamps: readonly KeptLamp[]) => Promise<Kept>
}

/** One entry of storage: the id and the lamp as text, so that a later version can still read it. */
export type LampEntry = { readonly id: string; readonly text: string }

const idPattern = /^[a-z0-9-]{1,40}$/

/** Whether a text can be the id of a lamp. */
export function isLampId(id: unknown): id is string {
  return typeof id === 'string' && idPattern.test(id)
}

/** A new id: 128 random bits. */
export function newLampId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(16))
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('')
}

/** The entry of a lamp, or why it cannot be kept: only what can be read again is. */
export function entryOf(
  kept: KeptLamp,
): { readonly ok: true; readonly entry: LampEntry } | Refused {
  if (!isLampId(kept.id)) return refused('This lamp has no proper id, so it cannot be kept.')
  const encoded = encodeLamp(kept.lamp)
  const checked = decodeLamp(encoded)
  return checked.ok ? { ok: true, entry: { id: kept.id, text: JSON.stringify(encoded) } } : checked
}

/** The entries of lamps, or why one cannot be kept. */
export function entriesOf(
  lamps: readonly KeptLamp[],
): { readonly ok: true; readonly entries: readonly LampEntry[] } | Refused {
  const entries: LampEntry[] = []
  for (const kept of lamps) {
    const made = entryOf(kept)
    if (!made.ok) return refused(`“${kept.lamp.name}”: ${made.message}`, made.detail)
    entries.push(made.entry)
  }
  return { ok: true, entries }
}

/** Reads the entries of a store; those that cannot be read are named, not dropped. */
export function listOf(entries: readonly unknown[]): LampList {
  const lamps: KeptLamp[] = []
  const damaged: DamagedLamp[] = []
  for (const entry of entries) {
    const { id, text } = (entry ?? {}) as { readonly id?: unknown; readonly text?: unknown }
    const name = typeof id === 'string' ? id : ''
    const read = isLampId(id) ? readText(text) : refused('It has no proper id.')
    if (read.ok) lamps.push({ id: name, lamp: read.lamp })
    else {
      const message = `A lamp kept in the browser cannot be read and was left as it is. ${read.message}`
      damaged.push({ id: name, message, text: typeof text === 'string' ? text : '' })
    }
  }
  return { ok: true, lamps: inOrder(lamps), damaged }
}

function readText(text: unknown) {
  if (typeof text !== 'string') return refused('It is damaged.')
  try {
    return decodeLamp(JSON.parse(text))
  } catch {
    return refused('It is damaged.')
  }
}

/** Ids of the entries that hold a lamp and are not among those kept: what `replaceAll` takes away. */
export function idsToDrop(entries: readonly unknown[], kept: readonly LampEntry[]): string[] {
  const staying = new Set(kept.map(({ id }) => id))
  const listed = listOf(entries)
  return listed.ok ? listed.lamps.map(({ id }) => id).filter((id) => !staying.has(id)) : []
}

/** Lamps by name, as a reader expects them ("no. 2" before "no. 10"), equal names by id. */
function inOrder(lamps: readonly KeptLamp[]): readonly KeptLamp[] {
  const byName = new Intl.Collator('en', { numeric: true, sensitivity: 'base' })
  return [...lamps].sort(
    (a, b) => byName.compare(a.lamp.name, b.lamp.name) || (a.id < b.id ? -1 : 1),
  )
}
