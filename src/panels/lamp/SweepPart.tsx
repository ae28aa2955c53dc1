import { useEffect, useState } from 'react'
import { recordOfDesign, recordWithFit } from '../../core'
import { readSweep, type SweepTable, type SweepTableOptions } from '../../io/sweepTable'
import { writeSweep } from '../../io/sweepWrite'
import { noteDown, useReadings } from '../../state/readingsStore'
import { designStore } from '../../state/useDesign'
import { FileButton } from '../parts/FileButton'
import { saveText } from '../saveText'
import { FitResult } from './FitResult'
import { SweepPreview } from './SweepPreview'
import { SweepSetupFields } from './SweepSetupFields'
import { carriedSweep, evenChoice, setupOf } from './sweepChoice'
import { useSweepFit } from './useSweepFit'

/** Most points drawn on the plane. */
const mostShown = 1500

/** A sweep with supply and meter: typed, pasted or opened, looked over, fitted, and put into the design. */
export function SweepPart() {
  const text = useReadings((state) => state.sweepText)
  const typedSetup = useReadings((state) => state.sweepSetup)
  const [options, setOptions] = useState<SweepTableOptions>({})
  const [table, setTable] = useState<SweepTable | null>(null)
  const [fileName, setFileName] = useState<string | null>(null)
  const { state, begin, stop, forget } = useSweepFit()
  const setup = setupOf(typedSetup)

  useEffect(() => {
    let current = true
    if (text.trim() === '') setTable(null)
    else void readSweep(text, options).then((read) => current && setTable(read))
    return () => {
      current = false
    }
  }, [text, options])

  const result = state.is === 'done' ? state.result : null
  useEffect(() => {
    if (result === null) return
    noteDown({
      sweepShown: {
        points: evenChoice(result.points, mostShown),
        knots: result.fit.ok ? result.fit.knots : null,
      },
    })
  }, [result])

  const enter = (entered: string) => {
    forget()
    noteDown({ sweepText: entered, sweepShown: null })
  }
  const open = async (chosen: File) => {
    setFileName(chosen.name)
    setOptions({})
    enter(await chosen.text())
  }
  const adopt = () => {
    if (result === null || !result.fit.ok || table?.ok !== true) return
    const record = recordOfDesign(designStore.getState().design)
    designStore
      .getState()
      .fitLamp(recordWithFit(record, result.fit, carriedSweep(table.readings, setup)))
  }

  return (
    <div className="lamp-part two">
      <section aria-label="The readings">
        <h3>The readings</h3>
        <p className="hint">
          Turn the supply up until the lamp strikes and on, then down until it goes out and on. Each
          row: supply volts, lamp volts. Paste a table, type it, or open a file.
        </p>
        <SweepSetupFields />
        <textarea
          className="sweep-text"
          rows={7}
          spellCheck={false}
          aria-label="Readings of the sweep, a row each"
          placeholder={'Supply (V), Lamp (V)\n10, 10.0\n20, 20.0'}
          value={text.length > 60_000 ? `${text.slice(0, 60_000)}\n…` : text}
          readOnly={text.length > 60_000}
          onChange={(event) => enter(event.currentTarget.value)}
        />
        {text.length > 60_000 && (
          <p className="hint">A long table: its beginning is shown, all of it is used.</p>
        )}
        <div className="button-row">
          <FileButton
            words="Open a file"
            label="Open a file of readings"
            accept=".csv,.tsv,.txt,text/*"
            onFile={(chosen) => void open(chosen)}
          />
          <button
            type="button"
            className="button"
            disabled={table?.ok !== true || table.readings.length === 0}
            onClick={() => {
              if (table?.ok === true) {
                saveText('lamp-sweep.csv', writeSweep(table.readings, setup), 'text/csv')
              }
            }}
          >
            Save as CSV
          </button>
          <button type="button" className="button" disabled={text === ''} onClick={() => enter('')}>
            Clear
          </button>
          {fileName !== null && text !== '' && <span className="hint">{fileName}</span>}
        </div>
      </section>
      <section aria-label="As understood">
        <h3>As understood</h3>
        <SweepPreview table={table} options={options} onOptions={setOptions} />
        {table?.ok === true && (
          <FitResult
            state={state}
            readings={table.readings.length}
            onBegin={() => begin(table.readings, setup)}
            onStop={stop}
            onAdopt={adopt}
          />
        )}
      </section>
    </div>
  )
}
