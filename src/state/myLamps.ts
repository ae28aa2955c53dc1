import { useStore } from 'zustand'
import { createStore } from 'zustand/vanilla'
import type { LampRecord } from '../core'
import type { DamagedLamp, KeptLamp, LampStore } from '../io/lampStore'
import { duplicateOf } from '../io/lampStoreNames'

/** One's own lamps as far as the page knows them. */
export type MyLamps = {
  readonly lamps: readonly KeptLamp[]
  readonly damaged: readonly DamagedLamp[]
  /** Whether storage has been read. */
  readonly read: boolean
  /** What went wrong last, in a sentence; null of nothing. */
  readonly trouble: string | null
  /** Lamps removed in this visit, the last one last, for undo. */
  readonly removed: readonly KeptLamp[]
}

/** The lamps of this page. */
export const myLampsStore = createStore<MyLamps>()(() => ({
  lamps: [],
  damaged: [],
  read: false,
  trouble: null,
  removed: [],
}))

/** One part of them; select what is there already. */
export function useMyLamps<T>(select: (state: MyLamps) => T): T {
  return useStore(myLampsStore, select)
}

/** What can be done with one's own lamps, each step kept in `store` and shown at once. */
export function lampKeeper(store: LampStore, newId: () => string) {
  const { setState, getState } = myLampsStore
  let asked = 0
  const refresh = async (): Promise<void> => {
    const own = ++asked
    const list = await store.list()
    // An answer overtaken by a later question is out of date.
    if (own !== asked) return
    if (list.ok) setState({ lamps: list.lamps, damaged: list.damaged, read: true })
    else setState({ trouble: list.message, read: true })
  }
  const settle = async (done: { readonly ok: boolean; readonly message?: string }) => {
    if (done.ok) {
      setState({ trouble: null })
      await refresh()
    } else {
      setState({ trouble: done.message ?? null })
    }
    return done.ok
  }
  const put = async (kept: KeptLamp): Promise<boolean> => {
    // Shown even where it cannot be kept: what is on screen is never lost.
    const others = getState().lamps.filter(({ id }) => id !== kept.id)
    setState({ lamps: [...others, kept] })
    return settle(await store.put(kept))
  }
  return {
    refresh,
    keep: (lamp: LampRecord) => put({ id: newId(), lamp }),
    change: put,
    duplicate: (kept: KeptLamp) => put(duplicateOf(kept, getState().lamps)),
    remove: async (kept: KeptLamp) => {
      setState({
        lamps: getState().lamps.filter(({ id }) => id !== kept.id),
        removed: [...getState().removed, kept],
      })
      return settle(await store.remove(kept.id))
    },
    bringBack: async () => {
      const kept = getState().removed.at(-1)
      if (kept === undefined) return false
      setState({ removed: getState().removed.slice(0, -1) })
      return put(kept)
    },
    replaceAll: async (lamps: readonly KeptLamp[]) => {
      setState({ lamps })
      return settle(await store.replaceAll(lamps))
    },
  }
}
