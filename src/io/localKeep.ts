import type { Design } from '../core'
import { readDesignFile, writeDesignFile } from './designFile'
import { type Opened, type Refused, refused } from './opened'

/** Where the browser keeps texts by name: the two calls of `Storage` that are needed. */
export type TextStore = {
  readonly getItem: (key: string) => string | null
  readonly setItem: (key: string, text: string) => void
}

/** The name the design is kept under. */
export const keepKey = 'glowloop.design'

/** A store that is asked for only when used: where storage is blocked, asking already throws. */
export function lazyStore(open: () => TextStore): TextStore {
  return {
    getItem: (key) => open().getItem(key),
    setItem: (key, text) => open().setItem(key, text),
  }
}

/** Keeps the design for the next visit, or says why it could not. */
export function keepDesign(store: TextStore, design: Design): { readonly ok: true } | Refused {
  const written = writeDesignFile(design)
  if (!written.ok) return written
  try {
    store.setItem(keepKey, written.text)
    return { ok: true }
  } catch (error) {
    return refused(
      'The browser did not keep this design: its storage is full or blocked. Save a file or copy the link.',
      detailOf(error),
    )
  }
}

/** The design kept last; null if there is none. */
export function restoreDesign(store: TextStore): Opened | null {
  let text: string | null
  try {
    text = store.getItem(keepKey)
  } catch (error) {
    return refused('The browser does not let this page read what it kept.', detailOf(error))
  }
  if (text === null) return null
  const opened = readDesignFile(text)
  return opened.ok
    ? opened
    : refused(
        `The design kept from the last visit could not be opened. ${opened.message}`,
        opened.detail,
      )
}

function detailOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error)
}
