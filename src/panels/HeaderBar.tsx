import { useRef, useState } from 'react'
import { examples } from '../state/examples'
import { designStore, useDesign } from '../state/useDesign'
import { look, type Theme, useView } from '../state/viewStore'
import { FileButton } from './parts/FileButton'
import type { Shared } from './sharing'
import { sharing } from './startSharing'

/** Name, title of the design, and what can be done with it as a whole. */
export function HeaderBar() {
  const title = useDesign((state) => state.design.title)
  const canUndo = useDesign((state) => state.past.length > 0)
  const canRedo = useDesign((state) => state.future.length > 0)
  const store = designStore.getState()
  return (
    <header className="header">
      <h1>Glowloop</h1>
      <input
        className="title"
        type="text"
        aria-label="Title of the design"
        placeholder="untitled"
        maxLength={80}
        value={title}
        onFocus={store.beginDrag}
        onBlur={store.endDrag}
        onChange={(event) => store.rename(event.currentTarget.value)}
      />
      <div className="header-buttons">
        <button type="button" className="button" disabled={!canUndo} onClick={store.undo}>
          Undo
        </button>
        <button type="button" className="button" disabled={!canRedo} onClick={store.redo}>
          Redo
        </button>
        <ExamplesMenu />
        <FileButton
          words="Open"
          label="Open a saved design"
          accept=".json,application/json"
          onFile={(chosen) => void sharing().then(({ openFile }) => openFile(chosen))}
        />
        <button
          type="button"
          className="button"
          onClick={() => void sharing().then(({ saveFile }) => saveFile())}
        >
          Save
        </button>
        <LinkMenu />
        <ThemeChoice />
      </div>
    </header>
  )
}

function ExamplesMenu() {
  const menu = useRef<HTMLDivElement>(null)
  return (
    <>
      <button type="button" className="button" popoverTarget="examples">
        Examples
      </button>
      <div id="examples" popover="auto" ref={menu} className="menu">
        <h2 className="small-title">Worked examples</h2>
        {examples.map(({ id, shows, design }) => (
          <button
            key={id}
            type="button"
            onClick={() => {
              designStore.getState().open(design)
              menu.current?.hidePopover()
            }}
          >
            <strong>{design.title}</strong>
            <span>{shows}</span>
          </button>
        ))}
        <p className="hint">Your own design stays one Undo away.</p>
      </div>
    </>
  )
}

function LinkMenu() {
  const [shared, setShared] = useState<Shared | null>(null)
  const [copied, setCopied] = useState(false)
  const field = useRef<HTMLTextAreaElement>(null)
  const copy = async () => {
    if (shared?.ok !== true) return
    try {
      await navigator.clipboard.writeText(shared.link)
      setCopied(true)
    } catch {
      // Where the browser does not allow it, the link is selected for copying by hand.
      field.current?.select()
    }
  }
  return (
    <>
      <button
        type="button"
        className="button strong"
        popoverTarget="link"
        onClick={() => {
          setCopied(false)
          void sharing().then(({ shareLink }) => setShared(shareLink()))
        }}
      >
        Link
      </button>
      <div id="link" popover="auto" className="menu">
        <h2 className="small-title">A link that opens this very design</h2>
        {shared?.ok === true && (
          <>
            <textarea
              ref={field}
              readOnly
              rows={4}
              aria-label="Link to this design"
              value={shared.link}
              onFocus={(event) => event.currentTarget.select()}
            />
            <button type="button" className="button strong" onClick={copy}>
              {copied ? 'Copied' : 'Copy the link'}
            </button>
            {shared.leftOut !== null && (
              <p>
                <strong>Too long for a link: {shared.leftOut} stay behind.</strong> Save a file to
                send them too.
              </p>
            )}
            <p className="hint">
              {shared.leftOut === null ? 'The whole design' : 'All else'} is in the link itself:{' '}
              {shared.link.length} characters. Nothing is sent anywhere.
            </p>
          </>
        )}
        {shared?.ok === false && <p>{shared.message}</p>}
      </div>
    </>
  )
}

const themes: readonly Theme[] = ['system', 'light', 'dark']
const themeWords = { system: 'As system', light: 'Light', dark: 'Dark' } as const

function ThemeChoice() {
  const theme = useView((view) => view.theme)
  return (
    <label className="theme-choice">
      <span className="unseen">Light or dark page</span>
      <select
        value={theme}
        onChange={(event) => look({ theme: event.currentTarget.value as Theme })}
      >
        {themes.map((value) => (
          <option key={value} value={value}>
            {themeWords[value]}
          </option>
        ))}
      </select>
    </label>
  )
}
