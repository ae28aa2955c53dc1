/** As much of an IndexedDB as one store of entries by id needs, with trouble on demand. */
export function simpleDatabase(begins: readonly { readonly id: string; readonly text: string }[]) {
  let entries = new Map<string, { readonly id: string }>(begins.map((entry) => [entry.id, entry]))
  let openingFault: DOMException | null = null
  let writingFault: DOMException | null = null
  let opened = 0
  let closed = 0

  const transaction = () => {
    const next = new Map(entries)
    let waiting = 0
    let wrote = false
    const of = {
      error: null as DOMException | null,
      oncomplete: null as (() => void) | null,
      onabort: null as (() => void) | null,
      abort: () => of.onabort?.(),
      objectStore: () => store,
    }
    const end = () => {
      if (waiting > 0) return
      if (wrote && writingFault !== null) {
        of.error = writingFault
        of.onabort?.()
        return
      }
      entries = next
      of.oncomplete?.()
    }
    const request = <Value>(work: () => Value) => {
      const asked = {
        result: undefined as Value | undefined,
        onsuccess: null as (() => void) | null,
      }
      waiting++
      queueMicrotask(() => {
        asked.result = work()
        asked.onsuccess?.()
        waiting--
        queueMicrotask(end)
      })
      return asked
    }
    const store = {
      getAll: () => request(() => [...next.values()]),
      put: (entry: { readonly id: string }) => {
        wrote = true
        return request(() => next.set(entry.id, structuredClone(entry)))
      },
      delete: (id: string) => request(() => next.delete(id)),
    }
    return of
  }

  const factory = {
    open: () => {
      const request = {
        result: { transaction, close: () => closed++ },
        error: openingFault,
        onsuccess: null as (() => void) | null,
        onerror: null as (() => void) | null,
      }
      queueMicrotask(() => {
        if (openingFault !== null) return request.onerror?.()
        opened++
        request.onsuccess?.()
      })
      return request
    },
  }

  return {
    factory: factory as unknown as IDBFactory,
    failOpening: (fault: DOMException) => {
      openingFault = fault
    },
    failWrites: (fault: DOMException) => {
      writingFault = fault
    },
    opened: () => opened,
    closed: () => closed,
  }
}
