import { lampLimits } from './formats/lampFormat1Schema'
import { type KeptLamp, newLampId } from './lampStore'

const bare = (name: string) => name.trim().toLowerCase()

/**
 * A name that none of `taken` has, capitals and outer spaces aside: the one wanted, else with the first free
 * number in brackets, shortened where it would be too long.
 */
export function freeName(wanted: string, taken: readonly string[]): string {
  return freeAmong(wanted, new Set(taken.map(bare)))
}

function freeAmong(wanted: string, taken: ReadonlySet<string>): string {
  if (!taken.has(bare(wanted))) return wanted
  const stem = wanted.replace(/ \(\d{1,6}\)$/, '')
  for (let number = 2; ; number++) {
    const ending = ` (${number})`
    const name = cut(stem, lampLimits.name - ending.length).trimEnd() + ending
    if (!taken.has(bare(name))) return name
  }
}

/** At most so many UTF-16 units, without half a character at the end. */
function cut(text: string, most: number): string {
  let kept = ''
  for (const character of text) {
    if (kept.length + character.length > most) break
    kept += character
  }
  return kept
}

/** A copy of a lamp under an id and a name of its own. */
export function duplicateOf(kept: KeptLamp, all: readonly KeptLamp[]): KeptLamp {
  const name = freeName(
    kept.lamp.name,
    all.map(({ lamp }) => lamp.name),
  )
  return { id: newLampId(), lamp: { ...kept.lamp, name } }
}

/** Lamps from a file put with those there are. */
export type MergedLamps = {
  /** All lamps, those there were first and unchanged. */
  readonly lamps: readonly KeptLamp[]
  /** How many came new, and how many were there already, the same to the last figure. */
  readonly added: number
  readonly alreadyThere: number
  /** Old and new names of those that had to be renamed. */
  readonly renamed: readonly { readonly from: string; readonly to: string }[]
}

/**
 * Puts opened lamps with one's own, and loses neither: a lamp that is there already is left out, one that has the
 * id of a different lamp gets a new id, one that has another's name a new name.
 */
export function mergeLamps(mine: readonly KeptLamp[], opened: readonly KeptLamp[]): MergedLamps {
  const all = new Map(mine.map((kept) => [kept.id, kept]))
  const names = new Set(mine.map(({ lamp }) => bare(lamp.name)))
  const renamed: { from: string; to: string }[] = []
  let alreadyThere = 0
  for (const { id, lamp } of opened) {
    const other = all.get(id)
    if (other !== undefined && JSON.stringify(other.lamp) === JSON.stringify(lamp)) {
      alreadyThere++
      continue
    }
    const name = freeAmong(lamp.name, names)
    if (name !== lamp.name) renamed.push({ from: lamp.name, to: name })
    const ownId = other === undefined ? id : newLampId()
    all.set(ownId, { id: ownId, lamp: { ...lamp, name } })
    names.add(bare(name))
  }
  return { lamps: [...all.values()], added: all.size - mine.length, alreadyThere, renamed }
}
