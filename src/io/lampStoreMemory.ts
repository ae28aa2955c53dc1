import { entriesOf, entryOf, idsToDrop, type LampEntry, type LampStore, listOf } from './lampStore'

/**
 * A store that lasts as long as the page: for tests, and where the browser keeps nothing.
 *
 * @param begins what it holds at first, as a browser's storage would: entries, whole or damaged.
 */
export function memoryLampStore(begins: readonly LampEntry[] = []): LampStore {
  const entries = new Map(begins.map((entry) => [entry.id, entry]))
  return {
    list: async () => listOf([...entries.values()]),
    put: async (kept) => {
      const made = entryOf(kept)
      if (!made.ok) return made
      entries.set(kept.id, made.entry)
      return { ok: true }
    },
    remove: async (id) => {
      entries.delete(id)
      return { ok: true }
    },
    replaceAll: async (lamps) => {
      const made = entriesOf(lamps)
      if (!made.ok) return made
      for (const id of idsToDrop([...entries.values()], made.entries)) entries.delete(id)
      for (const entry of made.entries) entries.set(entry.id, entry)
      return { ok: true }
    },
  }
}
