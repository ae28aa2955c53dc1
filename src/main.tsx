import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { App } from './panels/App'
import { loadPanels } from './panels/panelList'
import { startSharing } from './panels/startSharing'
import { designStore } from './state/useDesign'
import { look } from './state/viewStore'
import '@fontsource/source-sans-3/greek-400.css'
import '@fontsource/source-sans-3/greek-600.css'
import '@fontsource/source-sans-3/latin-400.css'
import '@fontsource/source-sans-3/latin-600.css'
import '@fontsource/source-serif-4/greek-400.css'
import '@fontsource/source-serif-4/latin-400.css'
import '@fontsource/source-serif-4/latin-400-italic.css'
import '@fontsource/source-serif-4/latin-600.css'
import './style/theme.css'
import './style/page.css'
import './style/plate.css'
import './style/controls.css'
import './style/lamp.css'

if (window.matchMedia('(prefers-reduced-motion: reduce)').matches) look({ running: false })

const root = document.getElementById('root')
if (root === null) throw new Error('The page has no place to draw in.')
const draw = () =>
  createRoot(root).render(
    <StrictMode>
      <App />
    </StrictMode>,
  )
// Drawn once the design is known, so that no other one flashes up first. Not awaited here: what is loaded then
// needs this module complete.
void startSharing()
  .catch(() =>
    designStore
      .getState()
      .say('Links and files cannot be opened or saved: part of this page did not load. Reload it.'),
  )
  .finally(() => {
    draw()
    // What is opened later is fetched now that the page stands: it then needs no network.
    window.setTimeout(() => void loadPanels().catch(() => undefined), 700)
  })
