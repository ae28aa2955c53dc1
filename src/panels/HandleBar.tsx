import { type HandleId, knotName, knotOf, steppedPart } from '../chart/handles'
import { designLimits } from '../io/designLimits'
import { designStore, useDesign } from '../state/useDesign'
import { look, useView } from '../state/viewStore'
import { QuantityField } from './parts/QuantityField'

/** The handle last touched: its values to type, and a way to place it that needs no drag. */
export function HandleBar() {
  const selected = useView((view) => view.selected)
  const placing = useView((view) => view.placing)
  const knots = useDesign((state) => state.design.stage.lamp.knots)
  if (selected === null || (knotOf(selected) >= 0 && knots[knotOf(selected)] === undefined)) {
    return (
      <div className="handle-bar empty">
        <p>
          Drag the load line, its supply end or a knot of the lamp. Each can also be chosen with Tab
          and moved with the arrow keys.
        </p>
      </div>
    )
  }
  const name =
    selected === 'supply'
      ? 'Supply end'
      : selected === 'slope'
        ? 'Slope of the load line'
        : knotName(knots, knotOf(selected))
  return (
    <div className="handle-bar">
      <h3>{name}</h3>
      <HandleFields id={selected} />
      <button
        type="button"
        className={placing ? 'button pressed' : 'button'}
        aria-pressed={placing}
        onClick={() => look({ placing: !placing })}
      >
        {placing ? 'Now click on the plane' : 'Place with a click'}
      </button>
    </div>
  )
}

function HandleFields({ id }: { id: HandleId }) {
  const stage = useDesign((state) => state.design.stage)
  const choice = useView((view) => view.choice)
  const { change, changeKnot } = designStore.getState()
  if (id === 'supply') {
    return (
      <QuantityField
        label="Supply"
        quiet
        unit="V"
        value={stage.supplyVoltage}
        max={designLimits.supplyVoltage.most}
        onValue={(supplyVoltage) => change({ supplyVoltage })}
        step={(direction, coarse) =>
          Math.max(0, stage.supplyVoltage + (direction === 'up' ? 1 : -1) * (coarse ? 10 : 1))
        }
      />
    )
  }
  if (id === 'slope') {
    return (
      <QuantityField
        label="Series resistor"
        quiet
        unit="Ω"
        value={stage.seriesResistance}
        max={designLimits.seriesResistance.most}
        onValue={(seriesResistance) => change({ seriesResistance })}
        step={(direction, coarse) =>
          steppedPart(stage.seriesResistance || 1, choice, { direction, coarse }, 1, 1e13)
        }
      />
    )
  }
  const index = knotOf(id)
  const knot = stage.lamp.knots[index]
  if (knot === undefined) return null
  return (
    <>
      <QuantityField
        label="Voltage"
        quiet
        unit="V"
        value={knot.voltage}
        max={designLimits.voltage.most}
        onValue={(voltage) => changeKnot(index, { ...knot, voltage })}
        step={(direction, coarse) =>
          Math.max(0, knot.voltage + (direction === 'up' ? 1 : -1) * (coarse ? 5 : 0.5))
        }
      />
      <QuantityField
        label="Current"
        quiet
        unit="A"
        value={knot.current}
        max={designLimits.current.most}
        onValue={(current) => changeKnot(index, { ...knot, current })}
        step={(direction, coarse) =>
          steppedPart(knot.current, 'any', { direction, coarse }, 1e-15, 100)
        }
      />
    </>
  )
}
