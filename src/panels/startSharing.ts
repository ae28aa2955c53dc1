import { designStore } from '../state/useDesign'

type Sharing = typeof import('./sharing')

let loaded: Sharing | null = null

/** Reading and writing links and files: loaded when first needed, so that the page stands sooner. */
export async function sharing(): Promise<Sharing> {
  loaded ??= await import('./sharing')
  return loaded
}

/** At most one write in this time, ms: browsers refuse more than about three a second for long. */
const pause = 400

/** Whether the address or the last visit may hold a design. */
function mayHoldDesign(): boolean {
  if (window.location.hash.length > 1) return true
  try {
    return window.localStorage.length > 0
  } catch {
    return true
  }
}

/**
 * Puts the design on the page that the address names, else the one kept from the last visit, and from then on
 * keeps design and address in step.
 */
export async function startSharing(): Promise<void> {
  listen()
  if (mayHoldDesign()) (await sharing()).openFirst()
  else window.setTimeout(() => void sharing(), 700)
}

function listen(): void {
  let timer = 0
  const write = () => {
    timer = 0
    if (designStore.getState().dragging) return
    if (loaded !== null) loaded.keep()
    else void sharing().then((module) => module.keep())
  }
  designStore.subscribe((state, before) => {
    const changed = state.design !== before.design || state.dragging !== before.dragging
    if (changed && !state.dragging && timer === 0) timer = window.setTimeout(write, pause)
  })
  window.addEventListener('hashchange', () => void sharing().then((module) => module.openAddress()))
  // A page about to go away writes what it has not written yet.
  window.addEventListener('pagehide', () => {
    if (timer === 0) return
    window.clearTimeout(timer)
    write()
  })
}
