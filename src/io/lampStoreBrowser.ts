import { entriesOf, entryOf, idsToDrop, type Kept, type LampStore, listOf } from './lampStore'
import { type Refused, refused } from './opened'

/** Name of the database, and of the one object store in it. */
const lampDatabase = 'glowloop'
const lamps = 'lamps'

/** Longest wait for storage, ms: one that never answers must not leave the page hanging. */
const patience = 10_000

type Mode = 'readonly' | 'readwrite'
type Done<Value> = { readonly ok: true; readonly value: Value } | Refused

/**
 * The browser's own storage for lamps, IndexedDB. It is opened anew for each call and closed after it, so that
 * no page stands in the way of another.
 *
 * @param open gives the browser's factory when asked: where storage is blocked, asking already throws.
 */
export function browserLampStore(open: () => IDBFactory = () => indexedDB): LampStore {
  const change = async (work: (store: IDBObjectStore) => void): Promise<Kept> => {
    const done = await within(open, 'readwrite', (store) => {
      work(store)
      return null
    })
    return done.ok ? { ok: true } : done
  }
  return {
    list: async () => {
      const done = await within<unknown[]>(open, 'readonly', (store) => store.getAll())
      return done.ok ? listOf(done.value) : done
    },
    put: async (kept) => {
      const made = entryOf(kept)
      return made.ok ? change((store) => store.put(made.entry)) : made
    },
    remove: (id) => change((store) => store.delete(id)),
    replaceAll: async (list) => {
      const made = entriesOf(list)
      if (!made.ok) return made
      return change((store) => {
        const present = store.getAll()
        present.onsuccess = () => {
          for (const id of idsToDrop(present.result, made.entries)) store.delete(id)
          for (const entry of made.entries) store.put(entry)
        }
      })
    },
  }
}

/** Runs one transaction; what it asked for is there only once all of it is safely written. */
async function within<Value>(
  open: () => IDBFactory,
  mode: Mode,
  work: (store: IDBObjectStore) => IDBRequest<Value> | null,
): Promise<Done<Value>> {
  try {
    const database = await opened(open())
    try {
      return { ok: true, value: await carriedOut(database.transaction(lamps, mode), work) }
    } finally {
      database.close()
    }
  } catch (error) {
    return explain(error, mode)
  }
}

function carriedOut<Value>(
  transaction: IDBTransaction,
  work: (store: IDBObjectStore) => IDBRequest<Value> | null,
): Promise<Value> {
  return new Promise((resolve, reject) => {
    // Broken off, so that nothing is written after it was said that nothing was.
    const alarm = setTimeout(() => transaction.abort(), patience)
    const request = work(transaction.objectStore(lamps))
    transaction.oncomplete = () => {
      clearTimeout(alarm)
      resolve(request?.result as Value)
    }
    transaction.onabort = () => {
      clearTimeout(alarm)
      reject(transaction.error ?? new Error('broken off'))
    }
  })
}

function opened(factory: IDBFactory): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    let given = false
    const give = (up: () => void) => {
      given = true
      clearTimeout(alarm)
      up()
    }
    const alarm = setTimeout(() => give(() => reject(new Error('no answer'))), patience)
    const request = factory.open(lampDatabase, 1)
    request.onupgradeneeded = () => request.result.createObjectStore(lamps, { keyPath: 'id' })
    request.onerror = () => give(() => reject(request.error ?? new Error('not opened')))
    request.onblocked = () => give(() => reject(new DOMException('blocked', 'InvalidStateError')))
    request.onsuccess = () => {
      const database = request.result
      // Too late: nobody waits for it any more.
      if (given) return database.close()
      // A newer version of the program, in another tab, may need to change the database.
      database.onversionchange = () => database.close()
      give(() => resolve(database))
    }
  })
}

function explain(error: unknown, mode: Mode): Refused {
  const { name, message } = error instanceof Error ? error : new Error(String(error))
  const kept = mode === 'readonly' ? 'Your lamps could not be read' : 'The lamp was not kept'
  const rescue = 'What is on screen is still there: save the lamps as a file.'
  const why: Readonly<Record<string, string>> = {
    QuotaExceededError: 'the browser’s storage is full',
    SecurityError: 'the browser does not let this page keep anything',
    InvalidStateError: 'the browser blocks its storage, as in a private window or with another tab',
    VersionError: 'a newer Glowloop has been here and keeps them in its own way',
    NotFoundError: 'the browser’s storage is damaged',
    UnknownError: 'the browser’s storage is damaged',
  }
  return refused(
    `${kept}: ${why[name] ?? 'the browser’s storage does not work'}. ${rescue}`,
    `${name}: ${message}`,
  )
}
