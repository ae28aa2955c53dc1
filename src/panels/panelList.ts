import type { ComponentType } from 'react'
import { FiguresPanel } from './FiguresPanel'
import { LampFigures } from './LampFigures'

/** A panel below the plate. A new one is one more line here. */
export type Panel = {
  /** Never changes; letters and hyphens. */
  readonly id: string
  readonly name: string
  readonly Body: ComponentType
}

/** The panels, in the order they are shown. */
export const panelList: readonly Panel[] = [
  { id: 'figures', name: 'Figures', Body: FiguresPanel },
  { id: 'lamp', name: 'Lamp', Body: LampFigures },
]
