import { useMemo } from 'react'
import {
  delaySource,
  formatQuantity,
  recordOfDesign,
  recordWithThresholds,
  type Sample,
  type Surroundings,
  sampleSource,
  strikeTests,
} from '../../core'
import { noteDown, useReadings } from '../../state/readingsStore'
import { designStore } from '../../state/useDesign'
import { QuantityField } from '../parts/QuantityField'
import { type Column, RowsTable, readTable } from '../parts/RowsTable'

const columns: readonly Column[] = [
  { name: 'Struck at', unit: 'V', optional: true },
  { name: 'Went out at', unit: 'V', optional: true },
  { name: 'Surroundings', words: ['lit', 'dim', 'dark'] },
]

const volts = (value: number) => formatQuantity(value, 'V')

/** Repeated strike and drop-out readings: mean, spread, drift, darkness and the strike delay. */
export function StrikePart() {
  const table = useReadings((state) => state.strikeRows)
  const rampRate = useReadings((state) => state.rampRate)
  const read = useMemo(() => readTable(table, columns), [table])
  const result = useMemo(() => {
    const readings = read.rows.map(({ numbers, words }) => ({
      strike: numbers[0] ?? null,
      dropOut: numbers[1] ?? null,
      surroundings: words[0] as Surroundings,
    }))
    return readings.length === 0
      ? null
      : strikeTests(readings, { rampRate: rampRate > 0 ? rampRate : null })
  }, [read, rampRate])

  const adopt = () => {
    if (result === null || !result.ok) return
    const { strike, dropOut, delay } = result
    const record = recordWithThresholds(recordOfDesign(designStore.getState().design), {
      strike:
        strike === null
          ? null
          : { value: delay?.threshold ?? strike.mean, deviation: strike.deviation ?? 0 },
      extinction:
        dropOut === null ? null : { value: dropOut.mean, deviation: dropOut.deviation ?? 0 },
      strikeDelay: delay?.delay ?? null,
      origin: 'strike tests',
      measured: { rows: table, rampRate },
    })
    if (record.ok) designStore.getState().fitLamp(record.record)
    else designStore.getState().say(record.reason)
  }

  return (
    <div className="lamp-part two">
      <section aria-label="Tries">
        <h3>Tries, in the order they were made</h3>
        <p className="hint">
          Raise the voltage slowly until it strikes, lower it until it goes out; note both as read
          across the lamp.
        </p>
        <RowsTable
          label="Strike and drop-out readings"
          columns={columns}
          table={table}
          onChange={(strikeRows) => noteDown({ strikeRows })}
        />
        <QuantityField
          label="Voltage raised by, each second"
          unit="V"
          value={rampRate}
          max={1e5}
          none={{ value: 0, word: 'by hand' }}
          onValue={(rate) => noteDown({ rampRate: rate })}
          apart
          hint="only a steady ramp tells the strike delay"
        />
      </section>
      <section aria-label="What they say" aria-live="polite">
        <h3>What they say</h3>
        {read.faults.map((fault) => (
          <p key={fault} className="wrong-text">
            {fault}
          </p>
        ))}
        {result === null && <p className="hint">Type a reading to begin.</p>}
        {result?.ok === false && <p className="wrong-text">{result.reason}</p>}
        {result?.ok === true && (
          <>
            <SampleLines name="Strikes at" sample={result.strike} />
            <SampleLines name="Goes out at" sample={result.dropOut} />
            {result.delay !== null && (
              <p title={delaySource}>
                Strike delay <strong>{formatQuantity(result.delay.delay, 's', 2)}</strong> (
                {formatQuantity(result.delay.delayInterval.low, 's', 2)} to{' '}
                {formatQuantity(result.delay.delayInterval.high, 's', 2)}, 95 %); without it the
                lamp strikes at {volts(result.delay.threshold)}.
              </p>
            )}
            {result.remarks.map((remark) => (
              <p key={remark}>{remark}</p>
            ))}
            <button type="button" className="button strong" onClick={adopt}>
              Give the lamp in the design these voltages
            </button>
            <p className="hint">
              The shape of its curve stays; only what was read changes. Ranges: {sampleSource}.
            </p>
          </>
        )}
      </section>
    </div>
  )
}

function SampleLines({ name, sample }: { name: string; sample: Sample | null }) {
  if (sample === null) return null
  return (
    <p>
      {name} <strong>{volts(sample.mean)}</strong>
      {sample.meanInterval !== null &&
        ` (mean of ${sample.count}, 95 % within ${volts(sample.meanInterval.low)} to ${volts(sample.meanInterval.high)})`}
      {sample.deviation !== null &&
        `; single tries scatter by ${formatQuantity(sample.deviation, 'V', 2)} (standard deviation)`}
      {sample.drift?.significant === true &&
        `; it drifts by ${formatQuantity(sample.drift.slope, 'V', 2)} from try to try`}
      .
    </p>
  )
}
