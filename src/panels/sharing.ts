import { fileNameFor, readDesignFile, writeDesignFile } from '../io/designFile'
import { linkFragment, openFragment } from '../io/link'
import { keepDesign, lazyStore, restoreDesign } from '../io/localKeep'
import type { Opened } from '../io/opened'
import { designStore } from '../state/useDesign'
import { look } from '../state/viewStore'
import { saveText } from './saveText'

const store = lazyStore(() => window.localStorage)

/** Puts the design kept from the last visit on the page, then the one the address names, if any. */
export function openFirst(): void {
  const kept = restoreDesign(store)
  if (kept?.ok) designStore.getState().startWith(kept.design)
  else if (kept !== null) designStore.getState().say(kept.message)
  openAddress()
}

/** Opens the design in the address, if there is one; a damaged one is reported and changes nothing. */
export function openAddress(): void {
  const { hash } = window.location
  const opened = openFragment(hash)
  if (opened !== null) show(opened, hash)
}

function show(opened: Opened, text: string): void {
  if (opened.ok) {
    look({ failure: null })
    designStore.getState().open(opened.design, opened.notes.join(' ') || undefined)
  } else {
    look({ failure: { message: opened.message, detail: opened.detail ?? null, text } })
  }
}

let told = false

/** Writes the design into the address and keeps it for the next visit. */
export function keep(): void {
  const { design, say } = designStore.getState()
  const link = linkFragment(design)
  if (link.ok) history.replaceState(history.state, '', link.fragment)
  const result = keepDesign(store, design)
  if (!result.ok && !told) {
    told = true
    say(result.message)
  }
}

/** What comes of making a link. */
export type Shared =
  | {
      readonly ok: true
      readonly link: string
      /** What does not fit into a link and stays behind, in words; null of nothing. */
      readonly leftOut: string | null
    }
  | { readonly ok: false; readonly message: string }

/** The link to this design, or a sentence that says why there is none. */
export function shareLink(): Shared {
  const link = linkFragment(designStore.getState().design)
  if (!link.ok) return link
  const page = window.location.href.replace(/#.*$/, '')
  return { ok: true, link: `${page}${link.fragment}`, leftOut: link.leftOut }
}

/** Saves the design as a file. */
export function saveFile(): void {
  const { design, say } = designStore.getState()
  const written = writeDesignFile(design)
  if (!written.ok) {
    say(written.message)
    return
  }
  saveText(fileNameFor(design), written.text, 'application/json')
}

const mostBytes = 4_000_000
const mostShown = 20_000

/** Opens a saved design; what cannot be read is reported and changes nothing. */
export async function openFile(file: File): Promise<void> {
  if (file.size > mostBytes) {
    const message = 'This file is far larger than a design of Glowloop can be.'
    look({ failure: { message, detail: null, text: '' } })
    return
  }
  const text = await file.text()
  show(readDesignFile(text), text.slice(0, mostShown))
}
