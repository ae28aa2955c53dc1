import { useEffect, useState } from 'react'
import { formatQuantity, kneeIndexOf, type LampRecord, recordOfDesign } from '../../core'
import type { KeptLamp } from '../../io/lampStore'
import { useMyLamps } from '../../state/myLamps'
import { designStore, useDesign } from '../../state/useDesign'
import { FileButton } from '../parts/FileButton'
import { saveText } from '../saveText'
import { FactList } from './FactList'
import { keeper, lampsFileText, mergeLampFile } from './ownLamps'

/** One's own lamps: kept in the browser, put into a design, saved and opened all together. */
export function MyLampsPart() {
  const lamps = useMyLamps((state) => state.lamps)
  const damaged = useMyLamps((state) => state.damaged)
  const trouble = useMyLamps((state) => state.trouble)
  const removed = useMyLamps((state) => state.removed)
  const read = useMyLamps((state) => state.read)
  const lampName = useDesign((state) => state.design.lampName)
  const [said, setSaid] = useState<string | null>(null)
  const [shown, setShown] = useState<string | null>(null)
  useEffect(() => void keeper.refresh(), [])
  const chosen = lamps.find(({ id }) => id === shown)
  return (
    <div className="lamp-part two">
      <section aria-label="Kept in this browser">
        <h3>Kept in this browser</h3>
        <div className="button-row">
          <button
            type="button"
            className="button strong"
            onClick={() => void keeper.keep(named(recordOfDesign(designStore.getState().design)))}
          >
            Keep the lamp of this design{lampName === '' ? '' : ` (${lampName})`}
          </button>
          {removed.length > 0 && (
            <button type="button" className="button" onClick={() => void keeper.bringBack()}>
              Bring back {removed.at(-1)?.lamp.name ?? 'the lamp removed'}
            </button>
          )}
        </div>
        {trouble !== null && <p className="wrong-text">{trouble}</p>}
        {said !== null && <p role="status">{said}</p>}
        {read && lamps.length === 0 && <p className="hint">None yet.</p>}
        <ul className="own-lamps">
          {lamps.map((kept) => (
            <OwnLamp key={kept.id} kept={kept} open={kept.id === shown} onOpen={setShown} />
          ))}
        </ul>
        {damaged.map(({ id, message }) => (
          <p key={id} className="wrong-text">
            {message}
          </p>
        ))}
        <div className="button-row">
          <button
            type="button"
            className="button"
            disabled={lamps.length === 0}
            onClick={() => {
              const text = lampsFileText(lamps)
              if (text.ok) saveText('my-lamps.glowloop.json', text.text, 'application/json')
              else setSaid(text.message)
            }}
          >
            Save all as a file
          </button>
          <FileButton
            words="Open a file of lamps"
            label="Open a file of lamps"
            accept=".json,application/json"
            onFile={(chosen) => void mergeLampFile(chosen, lamps).then(setSaid)}
          />
        </div>
      </section>
      <section aria-label="What is known of it">
        <h3>{chosen?.lamp.name ?? 'What is known of it'}</h3>
        {chosen === undefined ? (
          <p className="hint">Choose a lamp to see what is known of it.</p>
        ) : (
          <>
            {chosen.lamp.note !== '' && <p>{chosen.lamp.note}</p>}
            <FactList facts={chosen.lamp.facts} />
          </>
        )}
      </section>
    </div>
  )
}

const named = (record: LampRecord): LampRecord =>
  record.name.trim() === '' ? { ...record, name: 'Lamp without a name' } : record

function OwnLamp(props: { kept: KeptLamp; open: boolean; onOpen: (id: string) => void }) {
  const { kept, open, onOpen } = props
  const { lamp } = kept
  const [name, setName] = useState<string | null>(null)
  const knee = kneeIndexOf(lamp.knots)
  const strike = knee === null ? null : (lamp.knots[knee]?.voltage ?? null)
  const rename = () => {
    if (name !== null && name.trim() !== '' && name !== lamp.name) {
      void keeper.change({ ...kept, lamp: { ...lamp, name: name.trim() } })
    }
    setName(null)
  }
  return (
    <li className={open ? 'chosen' : ''}>
      <input
        type="text"
        maxLength={60}
        aria-label={`Name of ${lamp.name}`}
        value={name ?? lamp.name}
        onFocus={() => onOpen(kept.id)}
        onChange={(event) => setName(event.currentTarget.value)}
        onBlur={rename}
        onKeyDown={(event) => {
          if (event.key === 'Enter') rename()
        }}
      />
      <span className="hint">
        {lamp.origin}
        {strike !== null && `, strikes at ${formatQuantity(strike, 'V')}`}
      </span>
      <span className="button-row">
        <button
          type="button"
          className="button"
          onClick={() => designStore.getState().fitLamp(lamp)}
        >
          Use
        </button>
        <button type="button" className="button" onClick={() => void keeper.duplicate(kept)}>
          Copy
        </button>
        <button
          type="button"
          className="button"
          aria-label={`Remove ${lamp.name}`}
          onClick={() => void keeper.remove(kept)}
        >
          Remove
        </button>
      </span>
    </li>
  )
}
