import { Suspense } from 'react'
import { look, useView } from '../state/viewStore'
import { PanelGuard } from './PanelGuard'
import { panelList } from './panelList'

/** One panel open below the plate, chosen from the row above it. */
export function LowerPanels() {
  const chosen = useView((view) => view.panel)
  const panel = panelList.find(({ id }) => id === chosen) ?? panelList[0]
  if (panel === undefined) return null
  return (
    <section className="lower" aria-label={panel.name}>
      <nav aria-label="Panels">
        {panelList.map(({ id, name }) => (
          <button
            key={id}
            type="button"
            aria-current={id === panel.id ? 'page' : undefined}
            onClick={() => look({ panel: id })}
          >
            {name}
          </button>
        ))}
      </nav>
      <PanelGuard key={panel.id}>
        <Suspense fallback={<p className="nothing">Opening …</p>}>
          <panel.Body />
        </Suspense>
      </PanelGuard>
    </section>
  )
}
