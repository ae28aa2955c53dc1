import { steppedPart } from '../../chart/handles'
import { designLimits } from '../../io/designLimits'
import { designStore, useDesign } from '../../state/useDesign'
import { useView } from '../../state/viewStore'
import { QuantityField } from './QuantityField'

type Place = { readonly quiet?: boolean; readonly part?: string; readonly hint?: string }

/** The supply's voltage, stepped by volts. */
export function SupplyField(place: Place) {
  const supplyVoltage = useDesign((state) => state.design.stage.supplyVoltage)
  return (
    <QuantityField
      label="Supply"
      unit="V"
      {...place}
      value={supplyVoltage}
      max={designLimits.supplyVoltage.most}
      onValue={(value) => designStore.getState().change({ supplyVoltage: value })}
      step={(direction, coarse) =>
        Math.max(0, supplyVoltage + (direction === 'up' ? 1 : -1) * (coarse ? 10 : 1))
      }
    />
  )
}

/** The series resistor, stepped by the values chosen. */
export function SeriesField(place: Place) {
  const seriesResistance = useDesign((state) => state.design.stage.seriesResistance)
  const choice = useView((view) => view.choice)
  return (
    <QuantityField
      label="Series resistor"
      unit="Ω"
      {...place}
      value={seriesResistance}
      max={designLimits.seriesResistance.most}
      onValue={(value) => designStore.getState().change({ seriesResistance: value })}
      step={(direction, coarse) =>
        steppedPart(seriesResistance || 1, choice, { direction, coarse }, 1, 1e13)
      }
    />
  )
}
