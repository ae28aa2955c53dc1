import { fileNameFor, readDesignFile, writeDesignFile } from '../io/designFile'
import { linkFragment, openFragment } from '../io/link'
import { keepDesign, lazyStore, restoreDesign } from '../io/localKeep'
import { designStore } from '../state/useDesign'
import { look } from '../state/viewStore'

const store = lazyStore(() => window.localStorage)

/** At most one write in this time, ms: browsers refuse more than about three a second for long. */
const pause = 400

/**
 * Puts the design on the page that the address names, else the one kept from the last visit, and from then
 * on keeps design and address in step. Returns what undoes the listening.
 */
export function startSharing(): () => void {
  const kept = restoreDesign(store)
  if (kept?.ok) designStore.getState().startWith(kept.design)
  else if (kept !== null) designStore.getState().say(kept.message)
  openAddress()

  let timer = 0
  let told = false
  const write = () => {
    timer = 0
    const { design, dragging, say } = designStore.getState()
    if (dragging) return
    const link = linkFragment(design)
    if (link.ok) history.replaceState(history.state, '', link.fragment)
    const result = keepDesign(store, design)
    if (!result.ok && !told) {
      told = true
      say(result.message)
    }
  }
  const stop = designStore.subscribe((state, before) => {
    const changed = state.design !== before.design || state.dragging !== before.dragging
    if (changed && !state.dragging && timer === 0) timer = window.setTimeout(write, pause)
  })
  // A page about to go away writes what it has not written yet.
  const leave = () => {
    if (timer === 0) return
    window.clearTimeout(timer)
    write()
  }
  window.addEventListener('hashchange', openAddress)
  window.addEventListener('pagehide', leave)
  return () => {
    stop()
    window.clearTimeout(timer)
    window.removeEventListener('hashchange', openAddress)
    window.removeEventListener('pagehide', leave)
  }
}

/** Opens the design in the address, if there is one; a damaged one is reported and changes nothing. */
function openAddress(): void {
  const opened = openFragment(window.location.hash)
  if (opened === null) return
  if (opened.ok) {
    look({ failure: null })
    designStore.getState().open(opened.design, opened.notes.join(' ') || undefined)
  } else {
    look({
      failure: {
        message: opened.message,
        detail: opened.detail ?? null,
        text: window.location.hash,
      },
    })
  }
}

/** The link to this design, or a sentence that says why there is none. */
export function shareLink(): { ok: true; link: string } | { ok: false; message: string } {
  const link = linkFragment(designStore.getState().design)
  if (!link.ok) return link
  return { ok: true, link: `${window.location.href.replace(/#.*$/, '')}${link.fragment}` }
}

/** Saves the design as a file. */
export function saveFile(): void {
  const { design, say } = designStore.getState()
  const written = writeDesignFile(design)
  if (!written.ok) {
    say(written.message)
    return
  }
  const address = URL.createObjectURL(new Blob([written.text], { type: 'application/json' }))
  const anchor = document.createElement('a')
  anchor.href = address
  anchor.download = fileNameFor(design)
  anchor.click()
  window.setTimeout(() => URL.revokeObjectURL(address), 10_000)
}

const mostBytes = 4_000_000

/** Opens a saved design; what cannot be read is reported and changes nothing. */
export async function openFile(file: File): Promise<void> {
  const tooLarge = file.size > mostBytes
  const text = tooLarge ? '' : await file.text()
  const opened = readDesignFile(text)
  if (opened.ok) {
    look({ failure: null })
    designStore.getState().open(opened.design, opened.notes.join(' ') || undefined)
    return
  }
  look({
    failure: {
      message: tooLarge
        ? 'This file is far larger than a design of Glowloop can be.'
        : opened.message,
      detail: opened.detail ?? null,
      text: text.slice(0, 20_000),
    },
  })
}
