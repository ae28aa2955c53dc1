import { useMemo } from 'react'
import {
  formatQuantity,
  kneeIndexOf,
  recordOfDesign,
  recordWithThresholds,
  thresholdsFromRates,
} from '../../core'
import { noteDown, useReadings } from '../../state/readingsStore'
import { designStore, useDesign } from '../../state/useDesign'
import { QuantityField } from '../parts/QuantityField'
import { type Column, RowsTable, readTable } from '../parts/RowsTable'

const columns: readonly Column[] = [
  { name: 'Supply', unit: 'V' },
  { name: 'Flashes', unit: '' },
  { name: 'Counted in', unit: 's' },
]

const volts = (value: number) => formatQuantity(value, 'V')

/** No meter across the lamp: flashes counted at two or more supply voltages give strike and extinction. */
export function WatchPart() {
  const table = useReadings((state) => state.rateRows)
  const parts = useReadings((state) => state.rateParts)
  const knots = useDesign((state) => state.design.stage.lamp.knots)
  const knee = kneeIndexOf(knots)
  const preStrikeCurrent = knee === null ? 0 : (knots[knee]?.current ?? 0)
  const read = useMemo(() => readTable(table, columns), [table])
  const result = useMemo(() => {
    const observations = read.rows.map(({ numbers: [supplyVoltage, flashes, time] }) => ({
      supplyVoltage: supplyVoltage ?? 0,
      flashes: flashes ?? 0,
      time: time ?? 0,
    }))
    return observations.length === 0
      ? null
      : thresholdsFromRates(observations, {
          ...parts,
          supplyTolerance: 0,
          leakageResistance: Number.POSITIVE_INFINITY,
          preStrikeCurrent,
          glowResistance: 0,
          flashTime: 0,
        })
  }, [read, parts, preStrikeCurrent])
  const set = (patch: Partial<typeof parts>) => noteDown({ rateParts: { ...parts, ...patch } })

  const adopt = () => {
    if (result === null || !result.ok) return
    const record = recordWithThresholds(recordOfDesign(designStore.getState().design), {
      strike: { value: result.strike, deviation: result.strikeDeviation },
      extinction: { value: result.extinction, deviation: result.extinctionDeviation },
      strikeDelay: null,
      origin: 'rates',
      measured: { rows: table, parts },
    })
    if (record.ok) designStore.getState().fitLamp(record.record)
    else designStore.getState().say(record.reason)
  }

  return (
    <div className="lamp-part two">
      <section aria-label="Flashes counted">
        <h3>Flashes counted</h3>
        <p className="hint">
          With a known resistor and capacitor, count flashes at two supply voltages or more, far
          apart. Slow flashing is best: the flash itself then takes no time to speak of.
        </p>
        <div className="fields">
          <QuantityField
            label="Resistor, with the supply’s"
            unit="Ω"
            apart
            value={parts.seriesResistance}
            min={1}
            max={1e13}
            onValue={(seriesResistance) => set({ seriesResistance })}
            hint="all between supply and capacitor"
          />
          <QuantityField
            label="Its tolerance"
            unit="%"
            apart
            value={100 * parts.resistanceTolerance}
            max={80}
            onValue={(value) => set({ resistanceTolerance: value / 100 })}
            hint="±"
          />
          <QuantityField
            label="Capacitor"
            unit="F"
            apart
            value={parts.capacitance}
            min={1e-12}
            max={1}
            onValue={(capacitance) => set({ capacitance })}
            hint="across the lamp"
          />
          <QuantityField
            label="Its tolerance"
            unit="%"
            apart
            value={100 * parts.capacitanceTolerance}
            max={80}
            onValue={(value) => set({ capacitanceTolerance: value / 100 })}
            hint="±"
          />
        </div>
        <RowsTable
          label="Flashes counted at each supply voltage"
          columns={columns}
          table={table}
          onChange={(rateRows) => noteDown({ rateRows })}
        />
      </section>
      <section aria-label="What they say" aria-live="polite">
        <h3>What they say</h3>
        {read.faults.map((fault) => (
          <p key={fault} className="wrong-text">
            {fault}
          </p>
        ))}
        {result === null && <p className="hint">Type a count to begin.</p>}
        {result?.ok === false && <p className="wrong-text">{result.reason}</p>}
        {result?.ok === true && (
          <>
            <p>
              Strikes at <strong>{volts(result.strike)}</strong> ±{' '}
              {formatQuantity(result.strikeDeviation, 'V', 2)}, goes out at{' '}
              <strong>{volts(result.extinction)}</strong> ±{' '}
              {formatQuantity(result.extinctionDeviation, 'V', 2)} (standard deviations, from
              counting and from the parts’ tolerances).
            </p>
            <p className="hint">
              From counting alone: ± {formatQuantity(result.fromCounting.strike, 'V', 2)} and ±{' '}
              {formatQuantity(result.fromCounting.extinction, 'V', 2)}.
            </p>
            {result.illConditioned && (
              <p>
                <strong>These voltages tell the two apart badly</strong> (condition{' '}
                {formatQuantity(result.condition, '', 2)}): a small slip in counting moves both far.
              </p>
            )}
            {result.next !== null && (
              <p>
                The next count that would help most: at{' '}
                <strong>{volts(result.next.supplyVoltage)}</strong>, to ±{' '}
                {formatQuantity(result.next.strikeDeviation, 'V', 2)} and ±{' '}
                {formatQuantity(result.next.extinctionDeviation, 'V', 2)}.
              </p>
            )}
            {result.remarks.map((remark) => (
              <p key={remark}>{remark}</p>
            ))}
            <button type="button" className="button strong" onClick={adopt}>
              Give the lamp in the design these voltages
            </button>
            <p className="hint">The shape of its curve stays; only what was read changes.</p>
          </>
        )}
      </section>
    </div>
  )
}
