import { useRef } from 'react'
import { FailureNote } from './FailureNote'
import { HeaderBar } from './HeaderBar'
import { LowerPanels } from './LowerPanels'
import { NoticeLine } from './NoticeLine'
import { PlatePanel } from './PlatePanel'
import { StagePanel } from './StagePanel'
import { useTheme } from './useTheme'
import { useUndoKeys } from './useUndoKeys'
import { VerdictBar } from './VerdictBar'

/** The whole page. */
export function App() {
  const glow = useRef<SVGGElement>(null)
  useTheme()
  useUndoKeys()
  return (
    <>
      <HeaderBar />
      <FailureNote />
      <NoticeLine />
      <main>
        <VerdictBar glow={glow} />
        <div className="bench">
          <StagePanel />
          <PlatePanel glow={glow} />
        </div>
        <LowerPanels />
      </main>
      <footer>
        <p>
          A planning aid. Voltages here hurt: follow your local codes; mains work belongs to
          licensed people. Everything is reckoned on this page; nothing leaves it.
        </p>
      </footer>
    </>
  )
}
