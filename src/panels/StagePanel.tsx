import { useRef } from 'react'
import { CircuitDrawing } from '../chart/CircuitDrawing'
import { steppedPart } from '../chart/handles'
import { designLimits, textLimits } from '../io/designLimits'
import { designStore, useDesign } from '../state/useDesign'
import { look, useView } from '../state/viewStore'
import { Choice } from './parts/Choice'
import { SeriesField, SupplyField } from './parts/PartFields'
import { QuantityField } from './parts/QuantityField'

const infinity = Number.POSITIVE_INFINITY

/** The circuit drawn, and a field for each of its parts. */
export function StagePanel() {
  const stage = useDesign((state) => state.design.stage)
  const note = useDesign((state) => state.design.note)
  const lampName = useDesign((state) => state.design.lampName)
  const choice = useView((view) => view.choice)
  const panel = useRef<HTMLElement>(null)
  const { change } = designStore.getState()
  return (
    <section className="stage-panel" ref={panel} aria-labelledby="stage-title">
      <h2 className="small-title" id="stage-title">
        The stage
      </h2>
      <CircuitDrawing
        stage={stage}
        lampName={lampName}
        onPart={(part) =>
          panel.current?.querySelector<HTMLInputElement>(`input[data-part="${part}"]`)?.focus()
        }
      />
      <div className="fields">
        <SupplyField part="supplyVoltage" hint="open-circuit voltage" />
        <QuantityField
          label="Source resistance"
          unit="Ω"
          part="sourceResistance"
          value={stage.sourceResistance}
          max={designLimits.sourceResistance.most}
          none={{ value: 0, word: 'none' }}
          onValue={(sourceResistance) => change({ sourceResistance })}
          hint="the supply’s own"
        />
        <SeriesField part="seriesResistance" hint="sets the load line" />
        <QuantityField
          label="Capacitor"
          unit="F"
          part="capacitance"
          value={stage.capacitance}
          max={designLimits.capacitance.most}
          none={{ value: 0, word: 'none' }}
          onValue={(capacitance) => change({ capacitance })}
          step={(direction, coarse) =>
            steppedPart(stage.capacitance || 1e-9, choice, { direction, coarse }, 1e-12, 1)
          }
          hint="none: 10 pF of stray counts"
        />
        <QuantityField
          label="Leakage"
          unit="Ω"
          part="leakageResistance"
          value={stage.leakageResistance}
          min={1e-3}
          max={designLimits.leakageResistance.most}
          none={{ value: infinity, word: 'none' }}
          onValue={(leakageResistance) => change({ leakageResistance })}
          hint="across the capacitor: its own, dirt, a meter"
        />
        <QuantityField
          label="Lead resistor"
          unit="Ω"
          part="leadResistance"
          value={stage.leadResistance}
          max={designLimits.leadResistance.most}
          none={{ value: 0, word: 'none' }}
          onValue={(leadResistance) => change({ leadResistance })}
          hint="in the lamp’s lead, limits the peak"
        />
      </div>
      <Choice
        name="Step resistor and capacitor by"
        value={choice}
        options={[
          ['any', '1 %'],
          ['E6', 'E6'],
          ['E12', 'E12'],
          ['E24', 'E24'],
        ]}
        onChoose={(value) => look({ choice: value })}
      />
      <div className="field note">
        <label htmlFor="design-note">Note</label>
        <textarea
          id="design-note"
          rows={3}
          maxLength={textLimits.note.most}
          value={note}
          onFocus={() => designStore.getState().beginDrag()}
          onBlur={() => designStore.getState().endDrag()}
          onChange={(event) => change({ note: event.currentTarget.value })}
        />
      </div>
    </section>
  )
}
