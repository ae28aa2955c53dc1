import { noteDown, type ReadingsState, useReadings } from '../../state/readingsStore'
import { Choice } from '../parts/Choice'
import { QuantityField } from '../parts/QuantityField'

/** How the sweep was taken. */
export function SweepSetupFields() {
  const setup = useReadings((state) => state.sweepSetup)
  const set = (patch: Partial<ReadingsState['sweepSetup']>) =>
    noteDown({ sweepSetup: { ...setup, ...patch } })
  return (
    <>
      <Choice
        name="The meter was"
        value={setup.meterPlace}
        options={[
          ['lamp', 'across the lamp'],
          ['supply', 'across neither'],
          ['resistor', 'across the resistor'],
        ]}
        onChoose={(meterPlace) => set({ meterPlace })}
      />
      <div className="fields three">
        <QuantityField
          label="Series resistor"
          unit="Ω"
          apart
          min={1e-3}
          max={1e13}
          value={setup.seriesResistance}
          onValue={(seriesResistance) => set({ seriesResistance })}
          hint="between supply and lamp"
        />
        <QuantityField
          label="Its tolerance"
          unit="%"
          apart
          max={50}
          value={100 * setup.resistorTolerance}
          onValue={(value) => set({ resistorTolerance: value / 100 })}
          hint="±"
        />
        <QuantityField
          label="Meter’s resistance"
          unit="Ω"
          apart
          min={1e-3}
          max={1e13}
          none={{ value: Number.POSITIVE_INFINITY, word: 'none' }}
          value={setup.meterResistance}
          onValue={(meterResistance) => set({ meterResistance })}
          hint="its own current is taken out"
        />
        <QuantityField
          label="Reading error"
          unit="V"
          apart
          max={1000}
          none={{ value: 0, word: 'estimate' }}
          value={setup.absoluteError}
          onValue={(absoluteError) => set({ absoluteError })}
          hint="standard error"
        />
        <QuantityField
          label="and of the reading"
          unit="%"
          apart
          max={50}
          none={{ value: 0, word: 'none' }}
          value={100 * setup.relativeError}
          onValue={(value) => set({ relativeError: value / 100 })}
          hint="both none: from the scatter"
        />
      </div>
    </>
  )
}
