import { type ComponentType, lazy } from 'react'
import { FiguresPanel } from './FiguresPanel'

/** A panel below the plate. A new one is one more line here; all but the first are loaded when opened. */
export type Panel = {
  /** Never changes; letters and hyphens. */
  readonly id: string
  readonly name: string
  readonly Body: ComponentType
}

const loadLamp = () => import('./lamp/LampPanel')

/** Loads what is not there yet, so that the page goes on working without a network. */
export async function loadPanels(): Promise<void> {
  await Promise.all([loadLamp().then(({ prepare }) => prepare())])
}

/** The panels, in the order they are shown. */
export const panelList: readonly Panel[] = [
  { id: 'figures', name: 'Figures', Body: FiguresPanel },
  { id: 'lamp', name: 'Lamp', Body: lazy(loadLamp) },
]
