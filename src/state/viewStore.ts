import { useStore } from 'zustand'
import { createStore } from 'zustand/vanilla'

/** What cannot be opened: why, and the text itself for whoever wants to mend it. */
export type Failure = {
  readonly message: string
  readonly detail: string | null
  /** The damaged link or file text. */
  readonly text: string
}

/** Light or dark, or as the system has it. */
export type Theme = 'system' | 'light' | 'dark'

/** How the page looks at a design; not part of the design, and no step to undo. */
export type ViewState = {
  readonly currentAxis: 'logarithmic' | 'linear'
  readonly span: 'cycles' | 'flash' | 'switch-on'
  readonly zoom: {
    readonly current: readonly [number, number] | null
    readonly voltage: readonly [number, number] | null
    readonly time: readonly [number, number] | null
  }
  /** Preferred values that steps and drags keep to. */
  readonly choice: 'any' | 'E6' | 'E12' | 'E24'
  readonly selected: 'supply' | 'slope' | `knot-${number}` | null
  /** The next click on the plane puts the selected handle there. */
  readonly placing: boolean
  readonly running: boolean
  /** Seconds of the stage for each second on screen; null = chosen by the page. */
  readonly speed: number | null
  /** A new object puts the marker at its time, s. */
  readonly cursor: { readonly time: number } | null
  readonly panel: string
  readonly theme: Theme
  readonly failure: Failure | null
}

const first: ViewState = {
  currentAxis: 'logarithmic',
  span: 'cycles',
  zoom: { current: null, voltage: null, time: null },
  choice: 'any',
  selected: null,
  placing: false,
  running: true,
  speed: null,
  cursor: null,
  panel: 'figures',
  theme: 'system',
  failure: null,
}

/** The view of this page. */
export const viewStore = createStore<ViewState>()(() => first)

/** One part of the view; select what is there already. */
export function useView<T>(select: (state: ViewState) => T): T {
  return useStore(viewStore, select)
}

/** Changes parts of the view. */
export const look = (patch: Partial<ViewState>): void => viewStore.setState(patch)
